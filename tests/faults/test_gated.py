"""Faults in the logic of clock gates, against cycle simulation of the wrong netlist."""

import numpy as np
from circuits import design_of

from insertdft.design.flat import Design
from insertdft.faults.access import full_access, scan_access
from insertdft.faults.collapse import FaultList, make_faults
from insertdft.faults.grade import grade_patterns
from insertdft.faults.sites import PIN, STEM
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.state import Machine
from insertdft.simulate.words import Words, random_words

CELLS = (
    ("AOI21", "u1", {"A": "a", "B": "q0", "C": "b", "Y": "n"}),
    ("MUX", "u2", {"A": "n", "B": "q1", "S": "a", "Y": "m"}),
    ("FA", "u3", {"A": "d", "B": "q2", "C": "m", "S": "x", "CO": "y"}),
    ("GATE", "g1", {"E": "m", "CK": "c", "GCK": "k"}),
    ("MUX", "g2", {"A": "one", "B": "y", "S": "b", "Y": "e"}),
    ("GATE", "g3", {"E": "e", "CK": "k", "GCK": "l"}),
    ("DFF", "f0", {"D": "x", "CK": "c", "Q": "q0"}),
    ("DFF", "f1", {"D": "y", "CK": "k", "Q": "q1"}),
    ("DFFE", "f2", {"D": "n", "E": "x", "CK": "l", "Q": "q2"}),
)
PORTS = ("c", "a", "b", "d", "one")
PATTERNS = 128


def netlist(stuck: dict[tuple[str, str], str], port: str = "x") -> str:
    """Return the circuit with some pins tied; output ``z`` shows ``port``."""
    lines = [
        f"{cell} {name} ("
        + ", ".join(f".{pin}({stuck.get((name, pin), net)})" for pin, net in pins.items())
        + ");"
        for cell, name, pins in CELLS
    ]
    nets = sorted({net for _, _, pins in CELLS for net in pins.values()} - set(PORTS))
    ports = ", ".join(PORTS)
    return (
        f"module top ({ports}, z); input {ports}; output z; wire {', '.join(nets)};"
        f" assign z = {port};\n" + "\n".join(lines) + "\nendmodule"
    )


def run(text: str, words: dict[str, Words], states: Words) -> tuple[Words, ...]:
    """Return z before the pulse and the flip-flops after it."""
    machine = Machine(design_of(text), words=2, unknown=False)
    held = machine.circuit.states
    rows = held.instance.tolist()
    flops = [rows.index(number) for number in flop_numbers(machine.circuit.design)]
    every = np.zeros((len(held.slot), 2), np.uint64)
    every[flops] = states
    machine.force({**words, "c": 0})
    machine.load(every)
    seen = machine.port("z")[0].copy()
    machine.force({"c": 1})
    machine.force({"c": 0})
    return seen, *machine.states()[0][flops]


def flop_numbers(design: Design) -> list[int]:
    return [i for i in range(len(design.cell)) if design.name(i)[0] == "f"]


def wrong_netlist(faults: FaultList, fault: int) -> str:
    sites, (site, value) = faults.sites, divmod(fault, 2)
    design, constant = sites.circuit.design, f"1'b{value}"
    net = design.net_name(int(sites.net[site]))
    if sites.kind[site] == PIN:
        row = int(sites.row[site])
        name = design.name(int(design.pin_instance[row]))
        return netlist({(name, design.pin_names[int(design.pin_name[row])]): constant})
    if sites.kind[site] == STEM:
        readers = {
            (name, pin): constant
            for cell, name, pins in CELLS
            for pin, one in pins.items()
            if one == net and not is_output(cell, pin)
        }
        return netlist(readers, constant if net in ("x", "z") else "x")
    return netlist({}, constant)


def is_output(cell: str, pin: str) -> bool:
    return pin in ("Y", "Q", "CO", "GCK") or (cell, pin) == ("FA", "S")


def test_each_fault_is_detected_as_in_the_wrong_netlist() -> None:
    circuit = make_circuit(design_of(netlist({})), pulsed={"c": 0})
    faults = make_faults(circuit)
    access = full_access(circuit, {})
    bits = random_words(np.random.default_rng(5), (len(access.free), 2))
    order = access.free.tolist()
    words = {name: bits[order.index(circuit.inputs[name])] for name in PORTS if name != "c"}
    flops = flop_numbers(circuit.design)
    assert circuit.states.instance.tolist() == flops
    states = np.stack([bits[order.index(slot)] for slot in circuit.states.slot.tolist()])

    grade = grade_patterns(faults, access, bits, PATTERNS)

    good = run(netlist({}), words, states)
    enable_faults = 0
    for number, fault in enumerate(faults.first.tolist()):
        bad = run(wrong_netlist(faults, fault), words, states)
        differ = np.bitwise_or.reduce([a ^ b for a, b in zip(good, bad, strict=True)])
        hits = int.from_bytes(differ.astype("<u8").tobytes(), "little")
        first = (hits & -hits).bit_length() - 1
        assert grade.detected_at[number] == first, fault
        net = circuit.design.net_name(int(faults.sites.net[fault // 2]))
        enable_faults += net in ("m", "e") and first >= 0
    assert enable_faults > 2


def test_without_following_the_pulse_the_enable_is_not_observed() -> None:
    design = design_of(netlist({}))
    graded = []
    for circuit in (make_circuit(design), make_circuit(design, pulsed={"c": 0})):
        faults = make_faults(circuit)
        flops = flop_numbers(design)
        access = scan_access(circuit, flops, flops, {"c": 0})
        bits = random_words(np.random.default_rng(5), (len(access.free), 2))
        names = [design.net_name(int(net)) for net in faults.sites.net[faults.first // 2]]
        grade = grade_patterns(faults, access, bits, PATTERNS)
        graded.append(sorted(n for n, at in zip(names, grade.detected_at, strict=True) if at >= 0))

    assert "e" not in graded[0]
    assert "e" in graded[1]
