"""Mux-D roles: found by function in any writing, decided by declarations where it is ambiguous."""

from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st
from kits import cell, flip_flop, library

from insertdft.diagnostics import Severity
from insertdft.library import ScanOutput, Style
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, columns
from insertdft.library.functions import from_table
from insertdft.library.scan_mux import shifts

HINTS = """test_cell () { ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; }
    pin (SI) { direction : input; signal_type : test_scan_in; }
    pin (SE) { direction : input; signal_type : test_scan_enable; }
    pin (Q) { direction : output; function : "IQ"; } }"""


def declared(body: str, hints: str = HINTS) -> str:
    """Put a test_cell into the last cell of ``body``."""
    at = body.rindex("}")
    return body[:at] + hints + body[at:]


WRITINGS = [
    "SE ? SI : D",
    "(SE SI) + (SE' D)",
    "(D & !SE) | (SI & SE)",
    "((SE' + SI) (SE + D))",
    "!((SE & !SI) | (!SE & !D))",
    "D ^ (SE & (D ^ SI))",
    "SE SI + SE' D + SI D",
    "(SE * SI + !SE * D) * (D + SE)",
    "(SE' D)'' + (SE' + SI')'",
    "SI ^ ((SE') (SI ^ D))",
]


@pytest.mark.parametrize("written", WRITINGS[1:])
def test_scan_mux_is_recognised_in_any_writing(written: str) -> None:
    [role] = cell(declared(flip_flop("X", written, "D SI SE"))).scan

    assert (role.style, role.scan_in, role.scan_enable, role.shift_value, role.data) == (
        Style.MUX_D, "SI", "SE", 1, "D",
    )  # fmt: skip
    assert (role.scan_in_inverted, role.clock, role.off_values) == (False, "CK", (("CK", 0),))
    assert role.outputs == (ScanOutput("Q", False), ScanOutput("QN", True))


def random_writing(draw: st.DrawFn, function: Expression) -> str:
    """Spell an expression with operators and brackets chosen at random."""

    def spell(part: Expression) -> str:
        match part:
            case Const(value):
                return str(int(value))
            case Var(name):
                return draw(st.sampled_from([name, f"({name})", f"!!{name}", f"{name}''"]))
            case Not(inner):
                text = spell(inner)
                return draw(st.sampled_from([f"!({text})", f"({text})'"]))
            case And(parts) if draw(st.booleans()):
                return "(" + draw(st.sampled_from([" & ", "*", " "])).join(map(spell, parts)) + ")"
            case And(parts):
                return "!(" + " + ".join(spell(Not(part)) for part in parts) + ")"
            case Or(parts) if draw(st.booleans()):
                return "(" + draw(st.sampled_from([" | ", "+"])).join(map(spell, parts)) + ")"
            case Or(parts):
                return "(" + " ".join(spell(Not(part)) for part in parts) + ")'"
        raise AssertionError(part)

    return spell(function)


@st.composite
def muxes(draw: st.DrawFn) -> tuple[str, int, bool, bool]:
    """A writing of the scan mux, with shift value, inverted scan-in and inverted data."""
    d, si, se = columns(3)
    ones = 255
    value, turn_in, turn_data = draw(st.tuples(st.integers(0, 1), st.booleans(), st.booleans()))
    chosen = se if value else se ^ ones
    table = chosen & (si ^ ones * turn_in) | (chosen ^ ones) & (d ^ ones * turn_data)
    order = draw(st.permutations(["D", "SI", "SE"]))
    reordered = 0
    for pattern in range(8):
        values = {name: pattern >> i & 1 for i, name in enumerate(order)}
        place = values["D"] | values["SI"] << 1 | values["SE"] << 2
        reordered |= (table >> place & 1) << pattern
    return random_writing(draw, from_table(reordered, order)), value, turn_in, turn_data


@given(muxes())
def test_random_writings_of_the_scan_mux_are_recognised(
    drawn: tuple[str, int, bool, bool],
) -> None:
    written, value, turn_in, turn_data = drawn
    hints = HINTS.replace('"D"', '"!D"' if turn_data else '"D"')

    [role] = cell(declared(flip_flop("X", written, "D SI SE"), hints)).scan

    assert (role.scan_in, role.scan_enable, role.data) == ("SI", "SE", "D")
    assert (role.shift_value, role.scan_in_inverted) == (value, turn_in)


def is_shift(table: int, names: tuple[str, ...]) -> bool:
    """Look for a scan enable pattern by pattern, without any of the product's functions."""
    count = len(names)

    def value(pattern: int) -> int:
        return table >> pattern & 1

    for s in range(count):
        for v in (0, 1):
            shifting = [p for p in range(1 << count) if p >> s & 1 == v]
            mission = [p for p in range(1 << count) if p >> s & 1 != v]
            for x in range(count):
                follows = {value(p) ^ (p >> x & 1) for p in shifting}
                if x == s or len(follows) != 1:
                    continue
                free = all(value(p) == value(p ^ 1 << x) for p in mission)
                if free and len({value(p) for p in mission}) == 2:
                    return True
    return False


@pytest.mark.parametrize("table", range(256))
def test_function_of_three_inputs_shifts_only_if_brute_force_says_so(table: int) -> None:
    names = ("A", "B", "C")
    following = from_table(table, names)
    body = flip_flop("X", "A", "A B C")
    found = cell(body)
    storage = found.storage[0]
    changed = replace(found, storage=(replace(storage, data=following),))

    assert bool(shifts(changed)) == is_shift(table, names)


@given(st.integers(0, 2**16 - 1))
def test_random_function_of_four_inputs_shifts_only_if_brute_force_says_so(table: int) -> None:
    names = ("A", "B", "C", "E")
    found = cell(flip_flop("X", "A", "A B C E"))
    storage = replace(found.storage[0], data=from_table(table, names))

    assert bool(shifts(replace(found, storage=(storage,)))) == is_shift(table, names)


@pytest.mark.parametrize(
    ("name", "following", "inputs"),
    [
        ("enable", "(E D) + (E' IQ)", "D E"),
        ("synchronous reset", "D R", "D R"),
        ("toggle", "T ^ IQ", "T"),
        ("reset over scan", "R (SE SI + SE' D)", "D SI SE R"),
        ("and-or", "A B + C", "A B C"),
        ("three ways", "SE SI + SE' (SI D)", "D SI SE"),
    ],
)
def test_function_that_only_looks_like_scan_has_no_role(
    name: str, following: str, inputs: str
) -> None:
    assert shifts(cell(flip_flop("X", following, inputs))) == [], name


def test_scan_enable_that_overrides_the_data_enable_is_found_without_declarations() -> None:
    """As SkyWater's sedfxtp: shift wins over hold."""
    [role] = cell(flip_flop("X", "(D&DE&!SCE) | (IQ&!DE&!SCE) | (SCD&SCE)", "D DE SCD SCE")).scan

    assert (role.scan_in, role.scan_enable, role.data) == ("SCD", "SCE", None)


def test_shape_alone_decides_by_the_data_pin_of_plain_flip_flops() -> None:
    found = library(flip_flop("PLAIN", "D", "D") + flip_flop("X", "SE SI + SE' D", "D SI SE"))

    [role] = found.cells["X"].scan
    assert (role.scan_in, role.data) == ("SI", "D")
    assert found.cells["PLAIN"].scan == ()


def test_shape_alone_without_a_plain_flip_flop_decides_nothing() -> None:
    assert cell(flip_flop("X", "S A + S' B", "A B S")).scan == ()


def test_undeclared_data_mux_stays_plain_where_the_library_declares_scan() -> None:
    found = library(
        flip_flop("MUXED", "S D + S' B", "D B S")
        + declared(flip_flop("X", "SE SI + SE' D", "D SI SE"))
    )

    assert found.cells["MUXED"].scan == ()
    assert found.cells["X"].scan != ()


@pytest.mark.parametrize(
    "hints",
    [
        """pin (D) { nextstate_type : data; } pin (SI) { nextstate_type : scan_in; }
        pin (SE) { nextstate_type : scan_enable; }""",
        "pin (SI) { signal_type : test_scan_in; } pin (SE) { signal_type : test_scan_enable; }",
    ],
)
def test_declarations_of_the_cells_own_pins_count(hints: str) -> None:
    body = """cell (X) { ff (IQ, IQN) { next_state : "SE SI + SE' D"; clocked_on : "CK"; }
      PINS pin (CK) { direction : input; } pin (Q) { direction : output; function : "IQ"; } }"""
    pins = hints.replace("{", "{ direction : input;")
    if "(D)" not in pins:
        pins += " pin (D) { direction : input; }"

    [role] = cell(body.replace("PINS", pins)).scan

    assert (role.scan_in, role.data) == ("SI", "D")


def test_nextstate_type_data_on_every_pin_says_nothing() -> None:
    """Some kits declare ``data`` on the scan pins as well; the function goes before it."""
    body = flip_flop("PLAIN", "D", "D") + flip_flop("X", "SE SI + SE' D", "D SI SE")
    body = body.replace("{ direction : input; }", "{ direction : input; nextstate_type : data; }")

    [role] = library(body).cells["X"].scan

    assert (role.scan_in, role.scan_enable) == ("SI", "SE")


def test_test_cell_without_signal_types_tells_the_mission_data() -> None:
    hints = 'test_cell () { ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; } }'

    [role] = cell(declared(flip_flop("X", "SE SI + SE' D", "D SI SE"), hints)).scan

    assert (role.scan_in, role.data) == ("SI", "D")


def test_declaration_that_the_function_belies_is_reported() -> None:
    found = library(declared(flip_flop("X", "SE' SI + SE D + R", "D SI SE R")))

    assert found.cells["X"].scan == ()
    [warning] = found.diagnostics
    assert (warning.slug, warning.severity) == ("scan-role-wrong", Severity.WARNING)
    assert "`SI` test_scan_in" in warning.message


def test_cell_with_only_a_test_cell_gets_the_function_it_declares() -> None:
    found = cell(
        f"""cell (X) {{ pin (D) {{ direction : input; }} pin (SI) {{ direction : input; }}
        pin (SE) {{ direction : input; }} pin (CK) {{ direction : input; }}
        pin (Q) {{ direction : output; }}
        {HINTS.replace("test_scan_enable", "test_scan_enable_inverted")} }}"""
    )

    [role] = found.scan
    assert (role.scan_in, role.scan_enable, role.shift_value, role.data) == ("SI", "SE", 0, "D")
    assert found.pins["Q"].function == Var("IQ")


def test_cell_with_only_an_inverted_output_shows_the_inverse() -> None:
    body = declared(flip_flop("X", "SE SI + SE' D", "D SI SE")).replace(
        'pin (Q) { direction : output; function : "IQ"; }', "", 1
    )

    [role] = cell(body).scan

    assert role.outputs == (ScanOutput("QN", True),)


def test_output_for_scan_alone_comes_first() -> None:
    gated = 'pin (SO) { direction : output; function : "IQ SE"; }'
    body = declared(flip_flop("X", "SE SI + SE' D", "D SI SE"), gated + HINTS)

    [role] = cell(body).scan

    assert role.outputs[0] == ScanOutput("SO", False, True)


@pytest.mark.parametrize(("clock", "off"), [("CK", 0), ("!CK", 1)])
def test_clock_rests_before_its_active_edge(clock: str, off: int) -> None:
    body = declared(flip_flop("X", "SE SI + SE' D", "D SI SE"))

    [role] = cell(body.replace('clocked_on : "CK"', f'clocked_on : "{clock}"')).scan

    assert role.off_values == (("CK", off),)


CHAINED = """
  cell (X) { area : 20;
    ff (A, AN) { next_state : "SE SI + SE' D0"; clocked_on : "CK"; }
    ff (B, BN) { next_state : "SE AN + SE' D1"; clocked_on : "CK"; }
    pin (D0) { direction : input; } pin (D1) { direction : input; }
    pin (SI) { direction : input; nextstate_type : scan_in; }
    pin (SE) { direction : input; nextstate_type : scan_enable; }
    pin (CK) { direction : input; }
    pin (Q0) { direction : output; function : "A"; }
    pin (Q1) { direction : output; function : "B"; } }
"""


def test_cell_of_two_bits_is_one_segment_with_its_inversion() -> None:
    [role] = cell(CHAINED).scan

    assert (role.bits, role.scan_in, role.scan_in_inverted, role.data) == (2, "SI", True, None)
    assert role.outputs == (ScanOutput("Q1", False),)


@pytest.mark.parametrize(("start", "last"), [("Q[0]", "Q[1]"), ("Q[1]", "Q[0]")])
def test_bank_with_a_scan_start_pin_is_linked_from_that_end(start: str, last: str) -> None:
    found = cell(
        f"""type (two) {{ bit_width : 2; bit_from : 1; bit_to : 0; downto : true; }}
        cell (X) {{ ff_bank (IQ, IQN, 2) {{ next_state : "SE SI + SE' D"; clocked_on : "CK"; }}
        bus (D) {{ bus_type : two; direction : input; }}
        pin (SI) {{ direction : input; nextstate_type : scan_in; }}
        pin (SE) {{ direction : input; nextstate_type : scan_enable; }}
        pin (CK) {{ direction : input; }}
        bus (Q) {{ bus_type : two; direction : output; function : "IQ";
                   scan_start_pin : "{start}"; }} }}"""
    )

    [role] = found.scan
    assert (role.bits, role.scan_in) == (2, "SI")
    assert role.outputs == (ScanOutput(last, False),)


def test_bank_with_a_scan_input_for_each_bit_is_no_single_segment() -> None:
    found = cell(
        """type (two) { bit_width : 2; bit_from : 1; bit_to : 0; downto : true; }
        cell (X) { ff_bank (IQ, IQN, 2) { next_state : "SE SI + SE' D"; clocked_on : "CK"; }
        bus (D) { bus_type : two; direction : input; }
        bus (SI) { bus_type : two; direction : input; nextstate_type : scan_in; }
        pin (SE) { direction : input; nextstate_type : scan_enable; }
        pin (CK) { direction : input; }
        bus (Q) { bus_type : two; direction : output; function : "IQ"; } }"""
    )

    assert found.scan == ()
