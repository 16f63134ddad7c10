"""Fault simulation against simulation of one fault at a time."""

from collections.abc import Mapping

import numpy as np
import pytest
from circuits import Gates, design_of, random_gates, read_bench
from outside import outside

from insertdft.faults.access import Access, full_access, scan_access
from insertdft.faults.collapse import FaultList, make_faults
from insertdft.faults.grade import Grade, grade_patterns, grade_random, sample
from insertdft.faults.sites import PIN, PORT, STEM
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.words import Words, random_words

Pair = tuple[int, int]  # patterns with a sure 1, patterns with a sure 0


def simulate(
    gates: Gates,
    order: list[str],
    sources: Mapping[str, Pair],
    stem: Mapping[str, Pair],
    branch: Mapping[tuple[str, int], Pair],
) -> dict[str, Pair]:
    """Return three-valued values of all names, one gate after the other."""
    values = {name: stem.get(name, value) for name, value in sources.items()}
    for name in order:
        kind, inputs = gates.gates[name]
        seen = [branch.get((name, i), values[one]) for i, one in enumerate(inputs)]
        values[name] = stem.get(name, gate(kind, seen))
    return values


def gate(kind: str, values: list[Pair]) -> Pair:
    one, zero = values[0]
    for a, b in values[1:]:
        match kind:
            case "and" | "nand":
                one, zero = one & a, zero | b
            case "or" | "nor":
                one, zero = one | a, zero & b
            case "xor" | "xnor":
                one, zero = one & b | zero & a, one & a | zero & b
    return (zero, one) if kind in ("nand", "nor", "xnor", "not") else (one, zero)


class OneAtATime:
    """Detects each fault of a list by simulating it alone."""

    def __init__(self, gates: Gates, access: Access, bits: Words, patterns: int) -> None:
        self.gates, self.access, self.order = gates, access, gates.order()
        ones = (1 << patterns) - 1
        self.ones = ones
        circuit = access.circuit
        slots = access.free.tolist()
        words = {
            slot: int.from_bytes(row.astype("<u8").tobytes(), "little") & ones
            for slot, row in zip(slots, bits, strict=True)
        }
        words |= {slot: ones * value for slot, value in access.held.items()}
        places = {name: circuit.inputs[name] for name in circuit.inputs if name != "clk"}
        names = dict(zip(gates.inputs, places.values(), strict=True))
        names |= dict(zip(gates.flops, circuit.states.slot.tolist(), strict=True))
        self.sources = {
            name: (words[slot], words[slot] ^ ones) if slot in words else (0, 0)
            for name, slot in names.items()
        }
        self.good = simulate(gates, self.order, self.sources, {}, {})

    def detected_at(self, faults: FaultList) -> list[int]:
        return [self._first(faults, fault) for fault in faults.first.tolist()]

    def _first(self, faults: FaultList, fault: int) -> int:
        sites, (site, value) = faults.sites, divmod(fault, 2)
        design = sites.circuit.design
        stuck = (self.ones, 0) if value else (0, self.ones)
        net = design.net_name(int(sites.net[site])).removeprefix("\\")
        stem: dict[str, Pair] = {}
        branch: dict[tuple[str, int], Pair] = {}
        port = ""
        if sites.kind[site] == STEM:
            stem = {net: stuck}
        elif sites.kind[site] == PIN:
            row = int(sites.row[site])
            instance = design.name(int(design.pin_instance[row]))
            pin = design.pin_names[int(design.pin_name[row])]
            if instance[0] == "g":
                branch = {(list(self.gates.gates)[int(instance[1:])], int(pin[1:]) - 1): stuck}
            else:
                port = instance
        else:
            assert sites.kind[site] == PORT
            port = design.ports[int(sites.port[site])].name
        wrong = simulate(self.gates, self.order, self.sources, stem, branch)
        hits = self._hits(wrong, port, stuck)
        return (hits & -hits).bit_length() - 1

    def _hits(self, wrong: Mapping[str, Pair], port: str, stuck: Pair) -> int:
        ends = {f"po_{i}": name for i, name in enumerate(self.gates.outputs)}
        for number, data in enumerate(self.gates.flops.values()):
            if self.access.observe[number]:
                ends[f"f{number}"] = data
        hits = 0
        for end, name in ends.items():
            one, zero = self.good[name]
            bad_one, bad_zero = stuck if end == port else wrong[name]
            hits |= one & bad_zero | zero & bad_one
        return hits


def graded(gates: Gates, scanned: float, seed: int) -> tuple[Grade, list[int]]:
    """Return what the product and the reference say, for a share of scanned flip-flops."""
    design = design_of(gates.verilog())
    circuit = make_circuit(design)
    faults = make_faults(circuit)
    chance = np.random.default_rng(seed)
    flops = circuit.states.instance.tolist()
    control = [i for i in flops if chance.random() < scanned]
    observe = [i for i in control if chance.random() < 0.9] if scanned < 1 else control
    access = scan_access(circuit, control, observe, {"clk": 0})
    bits = random_words(chance, (len(access.free), 3))
    return (
        grade_patterns(faults, access, bits, 150),
        OneAtATime(gates, access, bits, 150).detected_at(faults),
    )


@pytest.mark.parametrize("scanned", [1.0, 0.5, 0.0])
@pytest.mark.parametrize("seed", range(6))
def test_each_fault_is_first_detected_where_it_is_alone(seed: int, scanned: float) -> None:
    gates = random_gates(seed, inputs=6, flops=8, gates=90, outputs=2)

    grade, reference = graded(gates, scanned, seed)

    assert grade.detected_at.tolist() == reference
    assert 0 < grade.detected < grade.faults.collapsed


@pytest.mark.parametrize("name", ["c432", "s298", "s820"])
def test_benchmark_faults_are_first_detected_where_they_are_alone(name: str) -> None:
    gates = read_bench(outside("bench", f"{name}.bench").read_text(encoding="utf-8"))

    grade, reference = graded(gates, 1.0, 1)

    assert grade.detected_at.tolist() == reference


def test_the_comparison_notices_a_fault_moved_to_another_line() -> None:
    gates = random_gates(1, inputs=6, flops=8, gates=90, outputs=2)
    grade, reference = graded(gates, 1.0, 1)
    name = list(gates.gates)[40]
    kind, terms = gates.gates[name]
    other = "or" if kind not in ("or", "nor") else "and"
    changed = Gates(gates.inputs, gates.outputs, gates.flops, {**gates.gates, name: (other, terms)})

    again, _ = graded(changed, 1.0, 1)

    assert grade.detected_at.tolist() == reference
    assert again.detected_at.tolist() != reference


def test_classes_are_detected_as_one() -> None:
    gates = random_gates(5, inputs=6, flops=8, gates=90, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    access = full_access(circuit, {"clk": 0})
    apart = FaultList(
        faults.sites,
        np.arange(faults.total, dtype=np.int32),
        np.arange(faults.total, dtype=np.int32),
    )
    bits = random_words(np.random.default_rng(1), (len(access.free), 2))

    together = grade_patterns(faults, access, bits, 128)
    single = grade_patterns(apart, access, bits, 128)

    assert single.detected_at.tolist() == together.detected_at[faults.class_of].tolist()


def test_equal_seeds_give_equal_results_and_the_curve_ends_at_the_coverage() -> None:
    gates = random_gates(2, inputs=6, flops=8, gates=90, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    access = full_access(circuit, {"clk": 0})

    one, two, other = (grade_random(faults, access, 100, seed) for seed in (7, 7, 8))

    assert one.detected_at.tolist() == two.detected_at.tolist()
    assert one.detected_at.tolist() != other.detected_at.tolist()
    curve = one.curve()
    assert len(curve) == 100
    assert (np.diff(curve) >= 0).all()
    assert curve[-1] == pytest.approx(one.coverage)
    assert one.detected_at.max() < 100


def test_a_sample_is_graded_as_in_the_whole() -> None:
    gates = random_gates(2, inputs=6, flops=8, gates=90, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    access = full_access(circuit, {"clk": 0})
    chosen = sample(faults, 40, seed=1)

    part = grade_random(faults, access, 128, 1, chosen)
    whole = grade_random(faults, access, 128, 1)

    assert len(chosen) == 40
    assert part.detected_at[chosen].tolist() == whole.detected_at[chosen].tolist()
    assert part.detected == (whole.detected_at[chosen] >= 0).sum()
