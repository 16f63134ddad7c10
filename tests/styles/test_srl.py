"""Composed shift-register latches: truth table and freedom from hazards, in an event simulator."""

import random
import subprocess
from itertools import permutations, product
from pathlib import Path

import pytest
from kits import OSU, osu
from outside import outside

from insertdft.library import read_library
from insertdft.library.cell import Library
from insertdft.source import read_sources
from insertdft.styles.srl import ComposedModule, Kind, Shape, compose, renamed, to_verilog
from insertdft.text import SourceText

Step = tuple[str, int]

PLAIN = [Shape(kind, inverse_output=True) for kind in Kind]
FORCED = [
    Shape(Kind.TWO_PORT, clock_low=True),
    Shape(Kind.TWO_PORT, clear=0),
    Shape(Kind.SINGLE, clear=1, inverse_output=True),
    Shape(Kind.DOUBLE, preset=0, inverse_output=True, true_output=False),
    Shape(Kind.DOUBLE, clear=0, preset=0, inverse_output=True),
    Shape(Kind.TWO_PORT, clear=1, preset=0, preset_wins=True, inverse_output=True),
    Shape(Kind.DOUBLE, clock_low=True, clear=0, preset=1, preset_wins=True),
]


class Reference:
    """What the module has to do, from the equations of the paper."""

    def __init__(self, shape: Shape) -> None:
        self.shape = shape
        self.pins = dict.fromkeys("DCIABRS", 0)
        self.pins["C"] = int(shape.clock_low)
        self.pins["R"] = 1 - (shape.clear if shape.clear is not None else 1)
        self.pins["S"] = 1 - (shape.preset if shape.preset is not None else 1)
        self.first = self.second = 0

    def change(self, pin: str, value: int) -> None:
        self.pins[pin] = value
        shape, pins = self.shape, self.pins
        if pins["C"] != shape.clock_low:
            self.first = pins["D"]
        if pins["A"]:
            self.first = pins["I"]
        forced = self._forced()
        if forced is not None:
            self.first = forced
        if pins["B"]:
            self.second = self.first
        if forced is not None and shape.kind is Kind.DOUBLE:
            self.second = forced

    def _forced(self) -> int | None:
        clears = self.shape.clear is not None and self.pins["R"] == self.shape.clear
        presets = self.shape.preset is not None and self.pins["S"] == self.shape.preset
        if clears and presets:
            return int(self.shape.preset_wins)
        return 0 if clears else 1 if presets else None

    def outputs(self) -> dict[str, int]:
        state = self.second if self.shape.kind is Kind.DOUBLE else self.first
        found = {"Q": state} if self.shape.true_output else {}
        found |= {"QN": 1 - state} if self.shape.inverse_output else {}
        found |= {"L2": self.second} if self.shape.kind is Kind.SINGLE else {}
        return found


def pulses(shape: Shape) -> list[Step]:
    """Every order of A, B and C pulses for every data, and a long random walk."""
    on, off = int(not shape.clock_low), int(shape.clock_low)
    clocks = "ABC" if shape.kind is not Kind.TWO_PORT else "AC"
    steps: list[Step] = []
    for order in permutations(clocks):
        for data, scan, data_after, scan_after in product((0, 1), repeat=4):
            steps += [("D", data), ("I", scan)]
            for clock in order:
                steps += [(clock, on if clock == "C" else 1)]
                steps += [("D", data_after), ("I", scan_after)] if clock == order[-1] else []
                steps += [(clock, off if clock == "C" else 0)]
    chance = random.Random(7)  # noqa: S311
    pins = "DICAB"[: 4 + (shape.kind is not Kind.TWO_PORT)]
    pins += "R" * (shape.clear is not None) + "S" * (shape.preset is not None)
    now = {**Reference(shape).pins, **dict(steps)}
    for _ in range(600):
        pin = chance.choice(pins)
        value = 1 - now[pin]
        if pin in "AC" and (now["A"] if pin == "C" else now["C"] != off):
            continue
        now[pin] = value
        steps.append((pin, value))
    return steps


def bench(module: ComposedModule, shape: Shape, settle: int) -> str:
    """A test bench that checks value and number of changes of each output after each step."""
    reference = Reference(shape)
    inputs = [name for name, direction in module.ports if direction == "input"]
    outputs = list(reference.outputs())
    lines = ["module tb;", "  integer bad = 0, checks = 0;"]
    lines += [f"  reg {pin} = {reference.pins[pin]};" for pin in inputs]
    lines += [f"  wire {pin}; integer n_{pin} = 0;" for pin in outputs]
    lines += [f"  always @({pin}) n_{pin} = n_{pin} + 1;" for pin in outputs]
    pins = ", ".join(f".{pin}({pin})" for pin in (*inputs, *outputs))
    lines += [f"  {module.name} dut ({pins});", "  initial begin"]
    on = int(not shape.clock_low)
    start = [("D", 0), ("C", on)] + ([("B", 1), ("B", 0)] if "B" in inputs else [])
    for pin, value in [*start, ("C", 1 - on)]:
        reference.change(pin, value)
        lines.append(f"    {pin} = {value}; #{settle};")
    for number, (pin, value) in enumerate(pulses(shape)):
        before = reference.outputs()
        reference.change(pin, value)
        zero = " ".join(f"n_{name} = 0;" for name in outputs)
        lines.append(f"    {zero} {pin} = {value}; #{settle};")
        for name, wanted in reference.outputs().items():
            changes = int(before[name] != wanted)
            lines.append(
                f"    checks = checks + 1; if ({name} !== {wanted} || n_{name} != {changes}) begin"
                f" bad = bad + 1;"
                f' if (bad < 5) $display("step {number} {pin}={value}: {name}=%b, %0d changes,'
                f' wanted {wanted} and {changes}", {name}, n_{name}); end'
            )
    lines += ['    $display("%0d checks, %0d bad", checks, bad); $finish;', "  end", "endmodule"]
    return "\n".join(lines) + "\n"


def simulate(folder: Path, texts: dict[str, str], *options: str) -> str:
    for name, text in texts.items():
        (folder / name).write_text(f"`timescale 1ns/1ps\n{text}", encoding="latin-1")
    done = subprocess.run(
        ["iverilog", "-g2005", *options, "-o", "tb.vvp", *texts],
        cwd=folder,
        capture_output=True,
        text=True,
        check=False,
    )
    assert done.returncode == 0, done.stderr
    ran = subprocess.run(
        ["vvp", "-n", "tb.vvp"], cwd=folder, capture_output=True, text=True, check=True
    )
    return ran.stdout


def gates_with_delays(module: ComposedModule, seed: int) -> str:
    """The module with each gate as a primitive that has a random delay of its own."""
    chance = random.Random(seed)  # noqa: S311
    names = ", ".join(name for name, _ in module.ports)
    lines = [f"module {module.name} ({names});"]
    lines += [f"  {direction} {name};" for name, direction in module.ports]
    lines += [f"  wire {name};" for name in module.wires()]
    for part in module.parts:
        output = part.pins["Y"]
        ins = ", ".join(net for pin, net in part.pins.items() if pin != "Y")
        kind = "not" if part.cell.startswith("INV") else "nand"
        rise, fall = chance.randint(1, 9), chance.randint(1, 9)
        lines.append(f"  {kind} #({rise},{fall}) {part.instance} ({output}, {ins});")
    return "\n".join([*lines, "endmodule", ""])


def made(shape: Shape, library: Library | None = None) -> ComposedModule:
    module = compose(library or osu("osu035"), shape)
    assert module is not None
    return module


def verdict(output: str) -> tuple[int, int]:
    checks, _, bad, _ = output.splitlines()[-1].split()
    return int(checks), int(bad)


@pytest.mark.parametrize("seed", [1, 2, 3])
@pytest.mark.parametrize("shape", PLAIN, ids=lambda shape: shape.kind.value)
def test_every_order_of_pulses_is_followed_without_a_hazard_at_any_gate_delays(
    tmp_path: Path, shape: Shape, seed: int
) -> None:
    module = made(shape)
    texts = {"dut.v": gates_with_delays(module, seed), "tb.v": bench(module, shape, 200)}

    checks, bad = verdict(output := simulate(tmp_path, texts))

    assert bad == 0, output
    assert checks > 1000


@pytest.mark.parametrize("shape", FORCED, ids=lambda shape: made(shape).name)
def test_levels_sets_and_resets_do_what_they_say(tmp_path: Path, shape: Shape) -> None:
    module = made(shape)
    texts = {"dut.v": gates_with_delays(module, 5), "tb.v": bench(module, shape, 200)}

    assert verdict(output := simulate(tmp_path, texts))[1] == 0, output


@pytest.mark.parametrize("kit", ["osu035", "osu018", "osu050"])
@pytest.mark.parametrize("shape", [PLAIN[1], FORCED[4]], ids=["double", "double_rs"])
def test_the_gates_of_a_real_library_with_its_delays_do_the_same(
    tmp_path: Path, kit: str, shape: Shape
) -> None:
    library = osu(kit)
    module = made(shape, library)
    models = OSU[kit].with_suffix(".v").read_text(encoding="latin-1")
    texts = {"cells.v": models, "dut.v": to_verilog(module), "tb.v": bench(module, shape, 50)}

    assert verdict(output := simulate(tmp_path, texts, "-gspecify"))[1] == 0, output


def test_the_bench_sees_a_lost_gate(tmp_path: Path) -> None:
    shape = PLAIN[1]
    module = made(shape)
    whole = gates_with_delays(module, 1)
    lost = whole.replace("l1_c_up, l1_a_up, l1_n)", "l1_c_up, l1_c_up, l1_n)")
    assert lost != whole
    texts = {"dut.v": lost, "tb.v": bench(module, shape, 200)}

    assert verdict(simulate(tmp_path, texts))[1] > 0


def test_the_bench_sees_a_hazard(tmp_path: Path) -> None:
    # D C + L C' as two products without the third: falls to 0 for a moment when C falls.
    shape = Shape(Kind.TWO_PORT)
    module = made(shape)
    hazard = f"""module {module.name} (D, C, I, A, Q); input D, C, I, A; output Q;
      wire cn, an, up, scan, hold; not #5 (cn, C); not #5 (an, A);
      nand #1 (up, D, C); nand #1 (scan, I, A); nand #1 (hold, Q, cn, an);
      nand #1 (Q, up, scan, hold); endmodule"""

    output = simulate(tmp_path, {"dut.v": hazard, "tb.v": bench(module, shape, 200)})

    assert verdict(output)[1] > 0


def test_a_kit_that_cannot_compose_gives_nothing() -> None:
    bare = read_library(
        [
            SourceText(
                "bare.lib",
                """library (bare) {
      cell (INV) { pin (A) { direction : input; } pin (Y) { direction : output; function : "!A"; } }
    }""",
            )
        ]
    )

    assert compose(bare, Shape(Kind.TWO_PORT)) is None
    with pytest.raises(ValueError, match="Q or QN"):
        compose(osu("osu035"), Shape(Kind.TWO_PORT, true_output=False))


def test_two_input_gates_alone_are_enough(tmp_path: Path) -> None:
    bare = read_library(
        [
            SourceText(
                "bare.lib",
                """library (bare) {
      cell (INV) { area : 1; pin (A) { direction : input; }
                   pin (Y) { direction : output; function : "!A"; } }
      cell (NAND) { area : 2; pin (A) { direction : input; } pin (B) { direction : input; }
                    pin (Y) { direction : output; function : "!(A B)"; } } }""",
            )
        ]
    )
    shape = Shape(Kind.DOUBLE, clear=0, preset=0, inverse_output=True)
    module = made(shape, bare)
    texts = {"dut.v": gates_with_delays(module, 3), "tb.v": bench(module, shape, 300)}

    assert {part.cell for part in module.parts} == {"INV", "NAND"}
    assert module.area == sum(1 if part.cell == "INV" else 2 for part in module.parts)
    assert verdict(output := simulate(tmp_path, texts))[1] == 0, output


def test_names_do_not_clash() -> None:
    module = made(Shape(Kind.DOUBLE))

    again = compose(osu("osu035"), Shape(Kind.DOUBLE), {module.name})

    assert again is not None
    assert again.name == f"{module.name}_2"
    assert renamed(module, {module.name, again.name}).name == f"{module.name}_3"
    assert f"module {again.name} (" in to_verilog(again)
    inner = {*module.wires(), *(name for name, _ in module.ports)}
    assert len({name.lower() for name in module.wires()}) == len(module.wires())
    assert not inner & {part.instance for part in module.parts}


@pytest.mark.parametrize(
    ("kit", "nand"),
    [
        ("sky130hd/sky130hd_tt.lib.gz", "nand2_1"),
        ("ihp-sg13g2/sg13g2_stdcell_typ_1p20V_25C.lib", "nand2_1"),
    ],
)
def test_larger_kits_compose_too(kit: str, nand: str) -> None:
    module = made(Shape(Kind.DOUBLE), read_library(read_sources([outside("libs", kit)])))

    assert any(part.cell.endswith(nand) for part in module.parts)
    assert module.area is not None
