"""The demo's library: Liberty and Verilog say the same, as the tables in tools do."""

import random
import subprocess
import sys
from collections.abc import Mapping
from itertools import product
from pathlib import Path

import pytest
from icarus import run_icarus
from technologies import DEMO, technology

from insertdft.library.cell import Cell, Storage, StorageKind, Style
from insertdft.library.expression import Expression, evaluate
from insertdft.library.functions import support
from insertdft.library.state_table import TableModel
from insertdft.library.twins import scan_twins

TOOLS = DEMO.parent.parent / "tools"
STEPS = 400
CELLS = technology("demo").library().cells


def changes(cell: Cell, seed: str) -> list[dict[str, int]]:
    """Inputs one after another, one pin changed at a time; set and reset soon go away again."""
    chance = random.Random(seed)  # noqa: S311
    now = {pin.name: 0 for pin in cell.inputs()}
    found = [dict(now)]
    for _ in range(STEPS):
        forcing = [name for name in ("RN", "SN") if now.get(name) == 0]
        pins = forcing if forcing and chance.random() < 0.7 else sorted(now)
        for flip in pins and [chance.choice(pins)]:  # a tie cell has none
            now[flip] = 1 - now[flip]
        found.append(dict(now))
    return found


Value = int | None


def known(expression: Expression, values: Mapping[str, Value]) -> Value:
    """Value of an expression if it is the same for all values of what is unknown."""
    used = support(expression)
    open_ = [name for name in used if values[name] is None]
    found = set()
    for filled in product((0, 1), repeat=len(open_)):
        given = {
            **{name: values[name] or 0 for name in used},
            **dict(zip(open_, filled, strict=True)),
        }
        found.add(evaluate(expression, given, 1))
    return found.pop() if len(found) == 1 else None


class ByGroups:
    """A cell as its ff and latch groups say, stepped; shares no code with the product's reader."""

    def __init__(self, storages: tuple[Storage, ...]) -> None:
        self.storages = storages
        self.states: dict[str, Value] = {item.state: None for item in storages}
        self.clocks: dict[str, Value] = {}

    def values(self, inputs: Mapping[str, int]) -> dict[str, Value]:
        turned = {
            item.state_inverted: None if (held := self.states[item.state]) is None else 1 - held
            for item in self.storages
        }
        return {**inputs, **self.states, **turned}

    def step(self, inputs: Mapping[str, int]) -> dict[str, Value]:
        before = self.values(inputs)
        for item in self.storages:
            assert item.clock is not None
            assert item.data is not None
            clock, last = known(item.clock, before), self.clocks.get(item.state)
            takes = clock == 1 and (item.kind is StorageKind.LATCH or last == 0)
            if takes:
                self.states[item.state] = known(item.data, before)
            if item.preset and known(item.preset, before):
                self.states[item.state] = 1
            if item.clear and known(item.clear, before):
                self.states[item.state] = 0
            self.clocks[item.state] = clock
        return self.values(inputs)


class ByTable:
    """A cell as its state table says."""

    def __init__(self, model: TableModel) -> None:
        self.model = model
        self.nodes: dict[str, Value] = dict.fromkeys(model.nodes)
        self.last: Mapping[str, int] | None = None

    def step(self, inputs: Mapping[str, int]) -> dict[str, Value]:
        self.nodes = self.model.settle(self.last or inputs, inputs, self.nodes)
        self.last = dict(inputs)
        return {**inputs, **self.nodes}


def expected(cell: Cell, inputs: list[dict[str, int]]) -> list[str]:
    """What the outputs show after each change, ``?`` where Liberty leaves it open."""
    by_table = cell.state_table is not None
    model = ByTable(TableModel(cell.state_table)) if by_table else ByGroups(cell.storage)  # type: ignore[arg-type]
    rows = []
    for now in inputs:
        values = model.step(now)
        row = ""
        for pin in cell.outputs():
            assert pin.function is not None, f"{cell.name}.{pin.name} has no function"
            off = known(pin.three_state, values) if pin.three_state else 0
            shown = known(pin.function, values)
            row += "z" if off else "?" if shown is None else str(shown)
        rows.append(row)
    return rows


def bench(cell: Cell, number: int) -> str:
    pins = [pin.name for pin in cell.inputs()]
    outs = [pin.name for pin in cell.outputs()]
    ports: dict[str, list[str]] = {}
    for kind, names in (("i", pins), ("o", outs)):
        for name in sorted(names, reverse=True):  # Q[3] before Q[0], as in a concatenation
            bits = ports.setdefault(name.partition("[")[0], [])
            bits.append(f"{kind}{number}[{names.index(name)}]")
    joined = ", ".join(f".{name}({{{', '.join(bits)}}})" for name, bits in ports.items())
    ins = f"  reg [0:{max(len(pins), 1) - 1}] i{number};" if pins else ""
    memory = f"  reg [0:{max(len(pins), 1) - 1}] m{number} [0:{STEPS}];"
    return f"""
{ins}
{memory}
  wire [0:{len(outs) - 1}] o{number};
  {cell.name} c{number} ({joined});
  initial begin
    #{number * (STEPS + 2) * 10};
    $readmemb("m{number}.txt", m{number});
    for (k{number} = 0; k{number} <= {STEPS}; k{number} = k{number} + 1) begin
      {f"i{number} = m{number}[k{number}];" if pins else ""}
      #10 $display("{number} %b", o{number});
    end
  end
  integer k{number};
"""


def test_liberty_and_verilog_of_every_cell_agree_step_by_step(tmp_path: Path) -> None:
    cells = list(CELLS.values())
    inputs = [changes(cell, cell.name) for cell in cells]
    for number, rows in enumerate(inputs):
        lines = ["".join(map(str, row.values())) or "0" for row in rows]
        (tmp_path / f"m{number}.txt").write_text("\n".join(lines), encoding="ascii")
    text = "module bench;\n" + "\n".join(bench(cell, n) for n, cell in enumerate(cells))
    (tmp_path / "bench.v").write_text(text + "endmodule\n", encoding="ascii")
    files = [tmp_path / "bench.v", DEMO / "demo_cells.v"]

    seen: list[list[str]] = [[] for _ in cells]
    for line in run_icarus(tmp_path, files, "bench"):
        number_, _, shown = line.partition(" ")
        if number_.isdigit():
            seen[int(number_)].append(shown)

    for cell, rows, shown_rows in zip(cells, inputs, seen, strict=True):
        wanted = expected(cell, rows)
        pairs = [
            (one, other, step)
            for step, (row, shown) in enumerate(zip(wanted, shown_rows, strict=True))
            for one, other in zip(row, shown, strict=True)
            if one != "?"
        ]
        assert len(pairs) > STEPS // 4, f"{cell.name} is compared {len(pairs)} times only"
        wrong = [f"step {step}: {other}, not {one}" for one, other, step in pairs if one != other]
        assert wrong == [], f"{cell.name}: {wrong[:3]}"


def test_the_committed_library_is_what_the_tool_makes(tmp_path: Path) -> None:
    subprocess.run([sys.executable, TOOLS / "make_demo.py", "--no-chip", tmp_path], check=True)

    for name in ("demo.lib", "demo_cells.v"):
        assert (tmp_path / name).read_bytes() == (DEMO / name).read_bytes()


PLAIN_FLOPS = [name for name in CELLS if name.startswith("flop") and "bank" not in name]


@pytest.mark.parametrize("style", list(Style))
def test_every_flip_flop_has_a_twin_of_its_own_kind(style: Style) -> None:
    library = technology("demo").library()
    prefix = {Style.MUX_D: "scan_", Style.CLOCKED_SCAN: "two_clock_", Style.LSSD: "srl_edge"}[style]

    for name in PLAIN_FLOPS:
        first = scan_twins(library, name, style)[0]

        wanted = prefix + (name.removeprefix("flop") if style is Style.LSSD else name)
        assert first.cell == wanted
        assert first.ties == {}


def test_every_arc_has_tables_and_every_pin_its_load() -> None:
    for cell in CELLS.values():
        assert cell.area, cell.name
        for pin in cell.inputs():
            assert pin.capacitance, f"{cell.name}.{pin.name}"
        for pin in cell.outputs():
            assert pin.max_capacitance, f"{cell.name}.{pin.name}"
            assert pin.arcs or not cell.inputs(), f"{cell.name}.{pin.name} has no arcs"
            for arc in pin.arcs:
                names = {"cell_rise", "cell_fall", "rise_transition", "fall_transition"}
                assert names <= set(arc.tables), f"{cell.name}.{pin.name} from {arc.related}"
                assert all(len(arc.tables[name].values) == 25 for name in names)
