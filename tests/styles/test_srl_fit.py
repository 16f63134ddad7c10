"""Which shift-register latch can take the place of a plain cell."""

from functools import cache
from pathlib import Path

import pytest
from kits import library as kit_of
from kits import osu

import insertdft
from insertdft.library import Style, read_library, scan_twins
from insertdft.library.cell import Library
from insertdft.source import read_sources
from insertdft.styles.srl_fit import (
    Fit,
    SrlKind,
    find_scan_latches,
    find_srls,
    find_two_port_latches,
    fit,
)

LATCH = """cell (X) {{ area : 5;
  latch (IQ, IQN) {{ enable : "{enable}"; data_in : "{data}"; {more} }}
  pin (D) {{ direction : input; }} pin (G) {{ direction : input; }} pin (R) {{ direction : input; }}
  pin (S) {{ direction : input; }} {outputs} }}
  cell (INV) {{ area : 1; pin (A) {{ direction : input; }}
    pin (Y) {{ direction : output; function : "!A"; }} }}
  cell (NAND) {{ area : 2; pin (A) {{ direction : input; }} pin (B) {{ direction : input; }}
    pin (Y) {{ direction : output; function : "!(A B)"; }} }}"""
Q = 'pin (Q) { direction : output; function : "IQ"; }'
QN = 'pin (QN) { direction : output; function : "IQN"; }'


@cache
def demo() -> Library:
    return read_library(read_sources([Path(insertdft.__file__).parent / "demo" / "demo.lib"]))


def composed(enable: str = "G", data: str = "D", more: str = "", outputs: str = Q) -> Fit | None:
    library = kit_of(LATCH.format(enable=enable, data=data, more=more, outputs=outputs))
    found = fit(library, library.cells["X"], [SrlKind.FIRST])
    assert len(found) <= 1
    return found[0] if found else None


def test_cells_are_found_by_role() -> None:
    kinds = {at.cell: at.kind for at in find_scan_latches(demo())}

    assert kinds["srl_first_w1"] is SrlKind.FIRST
    assert kinds["srl_single_w1"] is SrlKind.SINGLE
    assert kinds["srl_double_w1"] is SrlKind.DOUBLE
    assert kinds["srl_star_w1"] is SrlKind.STAR
    assert kinds["srl_edge_w1"] is SrlKind.EDGE
    assert {at.cell for at in find_two_port_latches(demo())} >= {"srl_first_w1", "srl_first_r_w1"}
    assert "srl_first_w1" not in {at.cell for at in find_srls(demo())}
    assert find_scan_latches(osu("osu035")) == ()


def test_a_latch_takes_the_library_cell_and_else_the_composed_one() -> None:
    latch = demo().cells["latch_w1"]

    first, *_, last = fit(demo(), latch, [SrlKind.FIRST])

    assert (first.cell, first.module) == ("srl_first_w1", None)
    assert first.pins == {"D": "D", "G": "C", "Q": "L1", "QN": "L1N"}
    assert first.test_pins == {"A": "clk_a"}
    assert last.module is not None
    assert last.pins == {"D": "D", "G": "C", "Q": "Q", "QN": "QN"}


def test_a_single_latch_shifts_out_of_l2() -> None:
    found = fit(demo(), demo().cells["latch_w1"], [SrlKind.SINGLE])

    assert (found[0].cell, [tap.pin for tap in found[0].taps]) == ("srl_single_w1", ["L2"])
    assert found[0].test_pins == {"A": "clk_a", "B": "clk_b"}
    assert [(tap.pin, tap.test_only) for tap in found[-1].taps] == [("L2", True)]


def test_a_flip_flop_keeps_its_edge_or_gets_two_phases() -> None:
    flop = demo().cells["flop_w1"]

    edge = fit(demo(), flop, [SrlKind.EDGE])[0]
    double = fit(demo(), flop, [SrlKind.DOUBLE])

    assert (edge.cell, edge.pins["CK"]) == ("srl_edge_w1", "CK")
    assert (double[0].cell, double[0].pins["CK"], double[0].ties) == ("srl_double_w1", "C", {})
    assert double[-1].module is not None


def test_a_clock_that_mission_needs_is_never_tied() -> None:
    twins = scan_twins(demo(), "flop_w1", Style.LSSD)

    assert twins
    assert not any("B" in twin.ties for twin in twins)


def test_a_falling_edge_is_told() -> None:
    found = fit(demo(), demo().cells["flop_n_w1"], [SrlKind.DOUBLE])

    assert {at.falling for at in found} == {True}
    assert {at.cell for at in found} >= {"srl_double_w1"}


def test_next_states_of_several_pins_are_not_composed() -> None:
    found = fit(demo(), demo().cells["flop_e_w1"], [SrlKind.DOUBLE])

    assert found == ()


@pytest.mark.parametrize("name", ["DFFPOSX1", "DFFNEGX1", "DFFSR", "LATCH"])
def test_every_storage_cell_of_a_plain_kit_can_be_composed(name: str) -> None:
    cells = osu("osu035")
    kinds = [SrlKind.FIRST, SrlKind.SINGLE, SrlKind.DOUBLE]

    found = fit(cells, cells.cells[name], kinds, {"srl_double", "srl_two_port"})

    assert found
    for at in found:
        assert at.module is not None
        ports = {port for port, _ in at.module.ports}
        assert set(at.pins) == set(cells.cells[name].pins)
        assert {*at.pins.values(), at.scan_in, *at.test_pins} | {
            tap.pin for tap in at.taps
        } == ports
        assert at.cell not in ("srl_double", "srl_two_port")


def test_levels_of_clock_set_and_reset_are_kept() -> None:
    found = composed(enable="!G", more='clear : "!R"; preset : "S"; clear_preset_var1 : H;')

    assert found is not None
    assert found.module is not None
    assert found.cell == "srl_two_port_low_r0_s1_s_first"
    assert found.pins == {"D": "D", "G": "C", "R": "R", "S": "S", "Q": "Q"}


def test_an_inverted_data_pin_turns_outputs_sets_and_resets() -> None:
    found = composed(data="!D", more='clear : "R";')

    assert found is not None
    assert found.pins == {"D": "D", "G": "C", "R": "S", "Q": "QN"}
    assert found.cell == "srl_two_port_s1_qn"
    assert found.scan_in_inverted
    assert [(tap.pin, tap.inverted) for tap in found.taps] == [("QN", False)]


@pytest.mark.parametrize(
    "parts",
    [
        {"data": "D S"},
        {"enable": "G S"},
        {"more": 'clear : "R S";'},
        {"outputs": 'pin (Q) { direction : output; function : "IQ S"; }'},
        {"outputs": 'pin (Q) { direction : output; function : "IQ"; three_state : "S"; }'},
        {"outputs": Q + 'pin (Z) { direction : output; function : "IQ"; }'},
        {
            "outputs": Q + QN,
            "more": 'clear : "R"; preset : "S"; clear_preset_var1 : L; clear_preset_var2 : L;',
        },
        {"more": 'clear : "R"; preset : "S"; clear_preset_var1 : N;'},
    ],
)
def test_what_gates_cannot_do_alike_is_refused(parts: dict[str, str]) -> None:
    assert composed(**parts) is None
