"""Behavioural stand-ins: marked as such, found as scan cells, model and stub alike."""

import random
import subprocess
from pathlib import Path

import pytest
from kits import library as kit_of
from kits import osu

from insertdft.library import Library, Style, check_twin, scan_twins
from insertdft.library.cell import StateTable
from insertdft.library.state_table import TableModel
from insertdft.styles.srl_fit import SrlKind, fit
from insertdft.styles.stand_ins import StandIn, StandInKind, stand_in, with_stand_ins

ENABLED = """cell (FE) { area : 9;
  ff (IQ, IQN) { next_state : "(E D) + (!E IQ)"; clocked_on : "CK"; clear : "R"; preset : "!S";
    clear_preset_var1 : H; clear_preset_var2 : L; }
  pin (D) { direction : input; } pin (E) { direction : input; } pin (CK) { direction : input; }
  pin (R) { direction : input; } pin (S) { direction : input; }
  pin (Q) { direction : output; function : "IQ"; }
  pin (QN) { direction : output; function : "IQN"; } }
  cell (LR) { area : 6; latch (IQ, IQN) { data_in : "D"; enable : "!G"; clear : "!R"; }
  pin (D) { direction : input; } pin (G) { direction : input; } pin (R) { direction : input; }
  pin (Q) { direction : output; function : "IQ"; } }"""

CASES = [
    ("osu", "DFFPOSX1", StandInKind.CLOCKED_SCAN),
    ("osu", "DFFNEGX1", StandInKind.CLOCKED_SCAN),
    ("osu", "DFFSR", StandInKind.CLOCKED_SCAN),
    ("osu", "DFFSR", StandInKind.DOUBLE),
    ("osu", "LATCH", StandInKind.FIRST),
    ("osu", "LATCH", StandInKind.SINGLE),
    ("own", "FE", StandInKind.CLOCKED_SCAN),
    ("own", "LR", StandInKind.SINGLE),
    ("own", "LR", StandInKind.FIRST),
]


def kit(name: str) -> Library:
    return osu("osu035") if name == "osu" else kit_of(ENABLED)


def made(library: Library, cell: str, kind: StandInKind) -> StandIn:
    found = stand_in(library.cells[cell], kind, library.cells)
    assert found is not None
    return found


@pytest.mark.parametrize(("name", "cell", "kind"), CASES)
def test_both_texts_and_the_cell_are_marked(name: str, cell: str, kind: StandInKind) -> None:
    found = made(kit(name), cell, kind)

    assert found.verilog.startswith("// STAND-IN")
    assert found.liberty.startswith("/* STAND-IN")
    assert found.cell.stand_in
    assert found.cell.area is None


@pytest.mark.parametrize(("name", "cell", "kind"), CASES)
def test_a_stand_in_is_found_as_the_scan_cell_of_what_it_stands_for(
    name: str, cell: str, kind: StandInKind
) -> None:
    found = made(kit(name), cell, kind)
    library = with_stand_ins(kit(name), [found])

    if kind is StandInKind.DOUBLE:
        fits = fit(library, library.cells[cell], [SrlKind.DOUBLE])
        assert fits[0].cell == found.cell.name
        return
    style = Style.CLOCKED_SCAN if kind is StandInKind.CLOCKED_SCAN else Style.LSSD
    [twin] = scan_twins(library, cell, style)
    assert twin.cell == found.cell.name
    assert check_twin(library.cells[cell], found.cell, twin)
    assert twin.ties == {}


@pytest.mark.parametrize(("name", "cell", "kind"), CASES)
def test_the_model_does_what_the_stub_says(
    tmp_path: Path, name: str, cell: str, kind: StandInKind
) -> None:
    found = made(kit(name), cell, kind)
    table = found.cell.state_table
    assert table is not None
    text = bench(found, table, 400)
    (tmp_path / "tb.v").write_text(f"`timescale 1ns/1ps\n{found.verilog}{text}", "latin-1")

    subprocess.run(["iverilog", "-g2005", "-o", "tb", "tb.v"], cwd=tmp_path, check=True)
    ran = subprocess.run(
        ["vvp", "-n", "tb"], cwd=tmp_path, capture_output=True, text=True, check=True
    )

    checks, _, bad, _ = ran.stdout.splitlines()[-1].split()
    assert int(bad) == 0, ran.stdout
    assert int(checks) > 300


def bench(found: StandIn, table: StateTable, steps: int) -> str:
    """A bench of random single changes, with what the state table makes of them."""
    model, role, chance = TableModel(table), found.cell.scan[0], random.Random(3)  # noqa: S311
    rests = dict(role.off_values)
    pins = {pin: rests.get(pin, 0) for pin in table.inputs}
    nodes: dict[str, int | None] = dict.fromkeys(table.nodes)
    clocks = [pin for pin in (role.clock, role.clock_a) if pin is not None]
    lines = ["module tb; integer checks = 0, bad = 0;"]
    lines += [f"  reg {pin} = {value};" for pin, value in pins.items()]
    outputs = [pin for pin in found.cell.outputs() if pin.internal_node]
    lines += [f"  wire {pin.name};" for pin in outputs]
    ports = ", ".join(f".{pin}({pin})" for pin in (*pins, *(pin.name for pin in outputs)))
    lines += [f"  {found.cell.name} dut ({ports});", "  initial begin #10;"]
    for _ in range(steps):
        pin = chance.choice(table.inputs)
        after = {**pins, pin: 1 - pins[pin]}
        on = [at for at in (*clocks, role.scan_clock) if at and after[at] != rests.get(at, 0)]
        if len(on) > 1 and role.clock_b not in on:
            continue
        nodes = model.settle(pins, after, nodes)
        pins = after
        lines.append(f"    {pin} = {after[pin]}; #10;")
        for output in outputs:
            value = nodes[output.internal_node or ""]
            if value is not None:
                lines.append(
                    f"    checks = checks + 1; if ({output.name} !== {value}) begin"
                    f' bad = bad + 1; $display("{pin}={after[pin]} {output.name}"); end'
                )
    lines += ['    $display("%0d checks, %0d bad", checks, bad); $finish; end endmodule']
    return "\n".join(lines) + "\n"


def test_what_cannot_be_read_has_no_stand_in() -> None:
    library = kit("own")

    assert stand_in(library.cells["FE"], StandInKind.FIRST) is None
    assert stand_in(library.cells["LR"], StandInKind.CLOCKED_SCAN) is None
    assert stand_in(library.cells["FE"], StandInKind.DOUBLE) is None
    assert stand_in(osu("osu035").cells["INVX1"], StandInKind.FIRST) is None


def test_new_pins_do_not_clash_with_old_ones() -> None:
    library = kit_of("""cell (X) { ff (IQ, IQN) { next_state : "SI"; clocked_on : "SCK"; }
      pin (SI) { direction : input; } pin (SCK) { direction : input; }
      pin (Q) { direction : output; function : "IQ"; } }""")

    found = made(library, "X", StandInKind.CLOCKED_SCAN)

    assert set(found.cell.pins) == {"SI", "SCK", "SI_2", "SCK_2", "Q"}
    assert found.cell.scan[0].scan_in == "SI_2"
