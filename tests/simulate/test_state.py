"""The cycle machine: edges, latches, sets, gated and divided clocks, unknowns."""

import random
import subprocess
from pathlib import Path

import pytest
from circuits import design_of, random_gates
from outside import outside

from insertdft.design.link import link
from insertdft.library import read_library
from insertdft.simulate.state import Machine
from insertdft.source import read_netlist, read_sources


def value(machine: Machine, port: str) -> str:
    one, zero = machine.port(port)
    return "1" if one[0] & 1 else ("0" if zero[0] & 1 else "x")


def test_a_flip_flop_takes_its_data_at_the_edge_and_keeps_it() -> None:
    machine = Machine(
        design_of(
            "module top (c, d, q, n); input c, d; output q, n;"
            " DFF f (.D(d), .CK(c), .Q(q)); DFFN g (.D(d), .CK(c), .Q(n)); endmodule"
        )
    )
    seen = []
    for ports in ({"c": 0, "d": 1}, {"c": 1}, {"d": 0}, {"c": 0}, {"c": 1}):
        machine.force(ports)
        seen.append(value(machine, "q") + value(machine, "n"))

    assert seen == ["xx", "1x", "1x", "10", "00"]


def test_a_shift_register_moves_one_place_a_pulse() -> None:
    machine = Machine(
        design_of(
            "module top (c, d, q); input c, d; output q; wire a, b;"
            " DFF f (.D(d), .CK(c), .Q(a)); DFF g (.D(a), .CK(c), .Q(b));"
            " DFF h (.D(b), .CK(c), .Q(q)); endmodule"
        )
    )
    machine.force({"c": 0})
    seen = ""
    for bit in (1, 0, 1, 1, 0, 0):
        machine.force({"d": bit})
        machine.pulse({"c": 0})
        seen += value(machine, "q")

    assert seen == "xx1011"


def test_a_reset_acts_without_a_clock_and_both_outputs_follow() -> None:
    machine = Machine(
        design_of(
            "module top (c, d, r, q, n); input c, d, r; output q, n;"
            " DFFR f (.D(d), .CK(c), .R(r), .Q(q), .QN(n)); endmodule"
        )
    )
    machine.force({"c": 0, "d": 1, "r": 1})
    machine.pulse({"c": 0})
    before = value(machine, "q") + value(machine, "n")
    machine.force({"r": 0})

    assert before == "10"
    assert value(machine, "q") + value(machine, "n") == "01"


def test_an_open_latch_passes_data_on_and_a_closed_one_keeps_it() -> None:
    machine = Machine(
        design_of(
            "module top (g, h, d, q); input g, h, d; output q; wire a;"
            " LATCH l (.D(d), .G(g), .Q(a)); LATCH m (.D(a), .G(h), .Q(q)); endmodule"
        )
    )
    seen = ""
    for ports in ({"g": 1, "h": 1, "d": 1}, {"d": 0}, {"g": 0}, {"d": 1}, {"h": 0}, {"g": 1}):
        machine.force(ports)
        seen += value(machine, "q")

    assert seen == "100000"
    machine.force({"h": 1})
    assert value(machine, "q") == "1"


def test_a_gated_clock_moves_its_cell_only_while_enabled() -> None:
    machine = Machine(
        design_of(
            "module top (c, e, d, q); input c, e, d; output q; wire k;"
            " GATE u (.E(e), .CK(c), .GCK(k)); DFF f (.D(d), .CK(k), .Q(q)); endmodule"
        )
    )
    machine.force({"c": 0, "e": 1, "d": 1})
    machine.pulse({"c": 0})
    machine.force({"e": 0, "d": 0})
    machine.pulse({"c": 0})
    held = value(machine, "q")
    machine.force({"e": 1})
    machine.pulse({"c": 0})

    assert (held, value(machine, "q")) == ("1", "0")


def test_an_unknown_clock_leaves_the_state_unknown_unless_data_equals_it() -> None:
    machine = Machine(
        design_of(
            "module top (c, x, d, q); input c, x, d; output q; wire k;"
            " and u (k, c, x); DFF f (.D(d), .CK(k), .Q(q)); endmodule"
        )
    )
    machine.force({"c": 0, "x": 1, "d": 1})
    machine.pulse({"c": 0})
    unknown = {"x": 0}
    machine.force(unknown)
    machine.values[1, machine.circuit.inputs["x"]] = 0  # neither 0 nor 1
    machine.pulse({"c": 0})
    same = value(machine, "q")
    machine.force({"d": 0})
    machine.pulse({"c": 0})

    assert (same, value(machine, "q")) == ("1", "x")


def test_a_ring_that_never_rests_is_reported_and_unknown() -> None:
    machine = Machine(
        design_of(
            "module top (g, d, q); input g, d; output q; wire n;"
            " LATCH l (.D(n), .G(g), .Q(q)); nand u (n, q, d); endmodule"
        )
    )
    machine.force({"g": 1, "d": 0})
    calm = machine.restless
    machine.force({"d": 1})

    assert calm == 0
    assert machine.restless == 1
    assert value(machine, "q") == "x"


@pytest.mark.parametrize("seed", range(3))
def test_random_sequential_circuits_move_like_the_event_simulator(
    seed: int, tmp_path: Path
) -> None:
    gates = random_gates(seed, inputs=5, flops=8, gates=60, outputs=3)
    chance = random.Random(seed)  # noqa: S311
    vectors = [[chance.randint(0, 1) for _ in gates.inputs] for _ in range(30)]

    assert run_machine(gates.verilog(), list(gates.inputs), vectors) == run_icarus(
        gates.verilog(), list(gates.inputs), len(gates.outputs), vectors, tmp_path
    )


def run_machine(verilog: str, inputs: list[str], vectors: list[list[int]]) -> list[str]:
    machine = Machine(design_of(verilog))
    machine.force({"clk": 0})
    rows = []
    for vector in vectors:
        machine.force(dict(zip(inputs, vector, strict=True)))
        machine.pulse({"clk": 0})
        rows.append("".join(value(machine, name) for name in machine.circuit.outputs))
    return rows


def run_icarus(
    verilog: str, inputs: list[str], outputs: int, vectors: list[list[int]], folder: Path
) -> list[str]:
    model = "module DFF (input D, input CK, output reg Q); always @(posedge CK) Q <= D; endmodule\n"
    names = ", ".join(f".{name}({name})" for name in ["clk", *inputs])
    outs = ", ".join(f".po_{i}(o[{i}])" for i in range(outputs))
    steps = "\n".join(
        f"{{{', '.join(inputs)}}} = {len(v)}'b{''.join(map(str, v))}; #1 clk = 1; #1 clk = 0; #1"
        ' for (i = 0; i < N; i = i + 1) $write("%b", o[i]); $write("\\n");'
        for v in vectors
    ).replace("N", str(outputs))
    bench = (
        f"module tb; reg {', '.join(['clk', *inputs])}; wire [{outputs - 1}:0] o; integer i;\n"
        f"top dut ({names}, {outs});\ninitial begin clk = 0; #1\n{steps}\n$finish; end endmodule\n"
    )
    source, program = folder / "tb.v", folder / "tb.vvp"
    source.write_text(verilog + model + bench, encoding="utf-8")
    subprocess.run(["iverilog", "-o", program, source], check=True)
    done = subprocess.run(["vvp", program], check=True, capture_output=True, text=True)
    return [line for line in done.stdout.splitlines() if line]


LIBRARIES = {
    "osu035": ("/usr/share/qflow/tech/osu035/osu035_stdcells.lib",),
    "ihp": ("ihp-sg13g2", "sg13g2_stdcell_typ_1p20V_25C.lib"),
    "sky130hd": ("sky130hd", "sky130hd_tt.lib.gz"),
}


def real_machine(name: str, kit: str) -> Machine:
    library = read_library(read_sources([outside("libs", *LIBRARIES[kit])]))
    netlist = read_netlist(read_sources([outside("netlists", f"{name}.{kit}.v.gz")]))
    return Machine(link(netlist, library)[0])


def number(machine: Machine, port: str, width: int) -> int:
    return int("".join(value(machine, f"{port}[{i}]") for i in reversed(range(width))), 2)


@pytest.mark.parametrize(("name", "kit"), [("counter", "ihp"), ("counter_attr", "sky130hd")])
def test_a_counter_of_real_cells_counts(name: str, kit: str) -> None:
    machine = real_machine(name, kit)
    machine.force({"clk": 0, "rst": 1, "en": 1})
    machine.pulse({"clk": 0})
    machine.force({"rst": 0})
    seen = []
    for _ in range(5):
        machine.pulse({"clk": 0})
        seen.append(number(machine, "q", 8))

    assert seen == [1, 2, 3, 4, 5]


@pytest.mark.parametrize("kit", ["osu035", "sky130hd"])
def test_a_counter_of_latch_pairs_counts_on_two_phases(kit: str) -> None:
    machine = real_machine("latch_counter", kit)
    machine.force({"C": 0, "B": 0, "rst": 1, "en": 1})
    seen = []
    for cycle in range(6):
        machine.force({"rst": int(cycle == 0)})
        machine.pulse({"C": 0})
        machine.pulse({"B": 0})
        seen.append(number(machine, "q", 8))

    assert seen == [0, 1, 2, 3, 4, 5]


@pytest.mark.parametrize(("name", "kit"), [("icg_regs", "sky130hd"), ("icg_regs_te", "ihp")])
def test_a_register_file_behind_clock_gates_keeps_what_is_written(name: str, kit: str) -> None:
    machine = real_machine(name, kit)
    machine.force({"clk": 0, "rst_n": 0, "we": 0})
    machine.force({"rst_n": 1, "we": 1})
    words = [0xC0FFEE00 + 0x01234567 * place & 0xFFFFFFFF for place in range(16)]
    for place, word in enumerate(words):
        machine.force(bits("wa", 4, place) | bits("wd", 32, word))
        machine.pulse({"clk": 0})
    machine.force({"we": 0} | bits("wd", 32, 0))
    machine.pulse({"clk": 0})
    seen = []
    for place in range(16):
        machine.force(bits("ra", 4, place))
        machine.pulse({"clk": 0})
        seen.append(number(machine, "rd", 32))

    assert seen == words


def bits(port: str, width: int, value: int) -> dict[str, int]:
    return {f"{port}[{i}]": value >> i & 1 for i in range(width)}
