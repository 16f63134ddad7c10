"""Twins are chosen by function and proved by truth table; every wrong one is refused."""

from dataclasses import replace

import pytest
from kits import cell, flip_flop, library, text

from insertdft.diagnostics import DesignError
from insertdft.library import Style, check_twin, read_library, same_function, scan_twins

SCAN = "SE SI + SE' {}"


def scan(name: str, mission: str, inputs: str, **more: str) -> str:
    """Text of a declared mux-D cell whose mission next state is ``mission``."""
    following = f"SE SI + SE' ({mission})"
    body = flip_flop(name, following, f"{inputs} SI SE", **more)
    return body.replace("pin (SI) {", "pin (SI) { nextstate_type : scan_in;").replace(
        "pin (SE) {", "pin (SE) { nextstate_type : scan_enable;"
    )


def names(body: str, plain: str = "P", style: Style = Style.MUX_D) -> list[str]:
    return [twin.cell for twin in scan_twins(library(body), plain, style)]


def test_twin_has_the_same_mission_function() -> None:
    body = (
        flip_flop("P", "D", "D R", clear="!R")
        + scan("GOOD", "D", "D R", clear="!R")
        + scan("PRESET", "D", "D R", preset="!R")
        + scan("HIGH", "D", "D R", clear="R")
        + scan("NONE", "D", "D")
        + scan("INVERTED", "!D", "D R", clear="!R")
        + scan("FALLING", "D", "D R", clear="!R").replace('"CK"', '"!CK"')
    )

    assert names(body) == ["GOOD"]


def test_pins_are_matched_by_function_when_names_differ() -> None:
    body = flip_flop("P", "D & E", "D E R", clear="!R") + scan(
        "S", "A & B", "X A B", clear="!X"
    ).replace("(Q)", "(OUT)").replace("(QN)", "(OUTN)")

    [twin] = scan_twins(library(body), "P", Style.MUX_D)

    assert dict(twin.pins) == {
        "D": "A", "E": "B", "R": "X", "CK": "CK", "Q": "OUT", "QN": "OUTN",
    }  # fmt: skip


def test_equal_names_win_where_several_assignments_serve() -> None:
    body = flip_flop("P", "A & B", "A B") + scan("S", "B & A", "B A")

    [twin] = scan_twins(library(body), "P", Style.MUX_D)

    assert (twin.pins["A"], twin.pins["B"]) == ("A", "B")


def test_swapped_outputs_are_followed() -> None:
    body = flip_flop("P", "D", "D") + scan("S", "D", "D").replace('"IQ"; }', '"X"; }').replace(
        '"IQN"; }', '"IQ"; }'
    ).replace('"X"; }', '"IQN"; }')

    [twin] = scan_twins(library(body), "P", Style.MUX_D)

    assert (twin.pins["Q"], twin.pins["QN"]) == ("QN", "Q")


def test_inverted_state_inside_is_no_difference() -> None:
    """``next_state : "!D"`` with the outputs crossed, set and reset named the other way round."""
    crossed = (
        scan("S", "D", "D R", preset="!R")
        .replace("SE SI + SE' (D)", "SE SI' + SE' (D')")
        .replace('"IQ"; }', '"X"; }')
        .replace('"IQN"; }', '"IQ"; }')
        .replace('"X"; }', '"IQN"; }')
    )
    body = flip_flop("P", "D", "D R", clear="!R") + crossed

    [twin] = scan_twins(library(body), "P", Style.MUX_D)

    assert twin.pins["Q"] == "Q"
    assert twin.role.scan_in_inverted
    assert next(item for item in twin.role.outputs if item.pin == "Q").inverted


def test_extra_pins_are_tied_inactive_and_such_twins_come_last() -> None:
    body = (
        flip_flop("P", "D", "D")
        + scan("A_RESET", "D", "D R", clear="!R")
        + scan("B_HIGH", "D", "D R", clear="R")
        + scan("C_ENABLE", "E D + E' IQ", "D E")
        + scan("Z_EXACT", "D", "D")
    )

    found = scan_twins(library(body), "P", Style.MUX_D)

    assert [(twin.cell, dict(twin.ties)) for twin in found] == [
        ("Z_EXACT", {}),
        ("A_RESET", {"R": 1}),
        ("B_HIGH", {"R": 0}),
        ("C_ENABLE", {"E": 1}),
    ]


BOTH = {"clear": "!R", "preset": "!S"}


@pytest.mark.parametrize(
    ("plain", "other", "fits"),
    [
        (("L", "H"), ("L", "H"), True),
        (("L", "H"), ("H", "L"), False),
        (("L", "H"), ("L", "L"), False),
        (("L", "L"), ("L", "H"), False),
        (("X", "X"), ("H", "L"), True),
        (("L", "H"), ("X", "X"), False),
        (("N", "N"), ("N", "N"), True),
    ],
)
def test_priority_of_set_and_reset_must_agree_where_it_is_given(
    plain: tuple[str, str], other: tuple[str, str], fits: bool
) -> None:
    def with_both(values: tuple[str, str]) -> dict[str, str]:
        return {**BOTH, "clear_preset_var1": values[0], "clear_preset_var2": values[1]}

    body = flip_flop("P", "D", "D R S", **with_both(plain)) + scan(
        "S", "D", "D R S", **with_both(other)
    )

    assert names(body) == (["S"] if fits else [])


def test_priority_written_into_the_conditions_is_the_same_function() -> None:
    body = flip_flop(
        "P", "D", "D R S", **BOTH, clear_preset_var1="L", clear_preset_var2="H"
    ) + scan("S", "D", "D R S", clear="!R", preset="!S R")

    assert names(body) == ["S"]


def test_cell_the_library_wants_unused_is_no_twin() -> None:
    body = flip_flop("P", "D", "D") + scan("S", "D", "D").replace(
        "area : 8;", "area : 8; dont_use : true;"
    )

    assert names(body) == []


def with_drive(body: str, area: float, load: float) -> str:
    body = body.replace("area : 8;", f"area : {area};")
    return body.replace("direction : output;", f"direction : output; max_capacitance : {load};")


def test_same_drive_goes_before_small_area_and_area_decides_between_equals() -> None:
    body = (
        with_drive(flip_flop("P", "D", "D"), 8, 0.2)
        + with_drive(scan("WEAK", "D", "D"), 9, 0.1)
        + with_drive(scan("LARGE", "D", "D"), 12, 0.21)
        + with_drive(scan("SMALL", "D", "D"), 11, 0.19)
        + with_drive(scan("STRONG", "D", "D"), 10, 0.8)
    )

    assert names(body) == ["SMALL", "LARGE", "WEAK", "STRONG"]


def with_delay(body: str, slope: float) -> str:
    table = f"""timing () {{ related_pin : "CK"; timing_type : rising_edge;
      cell_rise (load) {{ values ("1, {1 + slope}"); }} }}"""
    return body.replace("direction : output;", f"direction : output; {table}")


def test_drive_is_taken_from_the_delay_tables_where_no_limit_is_given() -> None:
    head = """lu_table_template (load) { variable_1 : total_output_net_capacitance;
      index_1 ("0, 1"); }"""
    body = (
        head
        + with_delay(flip_flop("P", "D", "D"), 2)
        + with_delay(scan("A", "D", "D"), 4)
        + with_delay(scan("B", "D", "D"), 2.1)
    )

    assert names(body) == ["B", "A"]


def test_drive_is_taken_from_the_name_where_nothing_else_tells() -> None:
    body = flip_flop("P_X2", "D", "D") + "".join(scan(f"S_X{n}", "D", "D") for n in (1, 2, 4))

    assert names(body, "P_X2") == ["S_X2", "S_X1", "S_X4"]


def test_twin_by_hand_comes_alone() -> None:
    body = flip_flop("P", "D", "D") + scan("A", "D", "D") + scan("B", "D", "D")

    chosen = read_library([text(body)], {"P": "B"})

    assert [twin.cell for twin in scan_twins(chosen, "P", Style.MUX_D)] == ["B"]


@pytest.mark.parametrize(
    ("mapping", "words"),
    [
        ({"P": "NOWHERE"}, "`NOWHERE`, which no library has"),
        ({"NOWHERE": "A"}, "`NOWHERE`, which no library has"),
        ({"P": "P2"}, "`P2`, which is no scan cell"),
        ({"P": "R"}, "`R` with scan off is another function than `P`"),
    ],
)
def test_twin_by_hand_that_does_not_fit_is_refused(mapping: dict[str, str], words: str) -> None:
    body = (
        flip_flop("P", "D", "D")
        + flip_flop("P2", "D", "D")
        + scan("A", "D", "D")
        + scan("R", "D", "D").replace('"CK"', '"!CK"')
    )

    with pytest.raises(DesignError) as caught:
        read_library([text(body)], mapping)

    [item] = caught.value.diagnostics
    assert item.slug == "cell-map-wrong"
    assert words in item.message
    assert item.hint


def test_check_of_a_twin_notices_every_planted_mistake() -> None:
    found = library(
        flip_flop("P", "D & E", "D E R S", **BOTH, clear_preset_var1="L", clear_preset_var2="H")
        + scan("X", "D & E", "D E R S T", **{**BOTH, "preset": "!S + !T"}, clear_preset_var1="L",
               clear_preset_var2="H")
    )  # fmt: skip
    plain, other = found.cells["P"], found.cells["X"]
    [twin] = scan_twins(found, "P", Style.MUX_D)
    assert check_twin(plain, other, twin)
    pins = dict(twin.pins)

    def swapped(one: str, two: str) -> dict[str, str]:
        return {**pins, one: pins[two], two: pins[one]}

    wrong = {
        "reset and set swapped": replace(twin, pins=swapped("R", "S")),
        "data and reset swapped": replace(twin, pins=swapped("D", "R")),
        "clock and data swapped": replace(twin, pins=swapped("CK", "D")),
        "outputs swapped": replace(twin, pins=swapped("Q", "QN")),
        "a pin lost": replace(twin, pins={k: v for k, v in pins.items() if k != "D"}),
        "an output lost": replace(twin, pins={k: v for k, v in pins.items() if k != "QN"}),
        "two pins on one": replace(twin, pins={**pins, "D": pins["E"]}),
        "the tie turned": replace(twin, ties={"T": 0}),
        "the tie lost": replace(twin, ties={}),
        "scan on": replace(twin, role=replace(twin.role, shift_value=0)),
    }
    for mistake, broken in wrong.items():
        assert not check_twin(plain, other, broken), mistake


LATCH = """cell ({name}) {{ latch (IQ, IQN) {{ {latch} }}
  pin (D) {{ direction : input; }} pin (G) {{ direction : input; }}
  pin (R) {{ direction : input; }}
  pin (Q) {{ direction : output; function : "IQ"; }} }}"""


@pytest.mark.parametrize(
    ("latch", "alike"),
    [
        ('enable : "G"; data_in : "D"; clear : "!R";', True),
        # The reset as part of enable and data comes to the same rest.
        ('enable : "G + !R"; data_in : "D R";', True),
        ('enable : "G"; data_in : "D G R"; clear : "!R";', True),
        ('enable : "!G"; data_in : "D"; clear : "!R";', False),
        ('enable : "G"; data_in : "!D"; clear : "!R";', False),
        ('enable : "G"; data_in : "D"; preset : "!R";', False),
        ('enable : "G"; data_in : "D R";', False),
    ],
)
def test_latches_are_alike_if_they_come_to_the_same_rest(latch: str, alike: bool) -> None:
    reference = cell(LATCH.format(name="X", latch='enable : "G"; data_in : "D"; clear : "!R";'))

    assert same_function(reference, cell(LATCH.format(name="X", latch=latch))) is alike


def test_three_state_condition_is_compared() -> None:
    body = """cell (X) {{ pin (A) {{ direction : input; }} pin (E) {{ direction : input; }}
      pin (Y) {{ direction : output; function : "A"; three_state : "{}"; }} }}"""

    assert same_function(cell(body.format("!E")), cell(body.format("(E)'")))
    assert not same_function(cell(body.format("!E")), cell(body.format("E")))
