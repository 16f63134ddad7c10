"""Clocked-scan and LSSD roles, from latches and from state tables."""

import pytest
from kits import cell, library

from insertdft.library import Library, ScanOutput, ScanRole, Style

PINS = "".join(f"pin ({name}) {{ direction : input; }}\n" for name in ("D", "C", "I", "A", "B"))
TWO_PORT = 'data_in : "C D + A I"; enable : "C + A";'
PLAIN = """cell (LAT) { latch (IQ, IQN) { enable : "C"; data_in : "D"; }
  pin (D) { direction : input; } pin (C) { direction : input; }
  pin (Q) { direction : output; function : "IQ"; } }"""
TABLE = """statetable ("D C I A B", "M S") { table : "
    -   L -   L L : -   - : N   N  , H/L H -   L L : - - : H/L N , - L H/L H L : - - : H/L N ,
    -   L -   L H : H/L - : N  H/L , H/L H -   L H : - - : H/L H/L ,
    -   L H/L H H : -   - : H/L H/L"; }"""
SIGNALS = """pin (I) { direction : input; signal_type : test_scan_in; }
    pin (A) { direction : input; signal_type : test_scan_clock_a; }
    pin (B) { direction : input; signal_type : test_scan_clock_b; }"""
CLOCKED = """cell (X) { statetable ("D CK SI SCK", "IQ") { table : "
    H/L R - ~R : - : H/L , - ~R H/L R : - : H/L , - ~R - ~R : - : N"; }
  pin (D) { direction : input; } pin (SI) { direction : input; }
  pin (CK) { direction : input; } pin (SCK) { direction : input; }
  pin (Q) { direction : output; internal_node : "IQ"; }
  test_cell () { ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; }
    pin (SI) { direction : input; signal_type : test_scan_in; }
    pin (SCK) { direction : input; signal_type : test_scan_clock; }
    pin (Q) { direction : output; function : "IQ"; signal_type : test_scan_out; } } }"""


def role_of(found: Library) -> ScanRole:
    [role] = found.cells["X"].scan
    return role


def test_clocked_scan_cell_is_confirmed_by_its_table() -> None:
    role = role_of(library(CLOCKED))

    assert (role.style, role.data, role.scan_in) == (Style.CLOCKED_SCAN, "D", "SI")
    assert (role.clock, role.scan_clock, role.outputs) == ("CK", "SCK", (ScanOutput("Q", False),))
    assert role.off_values == (("CK", 0), ("SCK", 0))


def test_falling_scan_clock_rests_at_one() -> None:
    turned = CLOCKED.replace("H/L R : - : H/L , - ~R - ~R", "H/L F : - : H/L , - ~R - ~F").replace(
        "H/L R - ~R", "H/L R - ~F"
    )

    assert role_of(library(turned)).off_values == (("CK", 0), ("SCK", 1))


def test_inverted_scan_input_is_seen_in_the_table() -> None:
    turned = CLOCKED.replace("- ~R H/L R : - : H/L", "- ~R H/L R : - : L/H")

    role = role_of(library(turned))
    assert (role.scan_in_inverted, role.outputs) == (True, (ScanOutput("Q", False),))


@pytest.mark.parametrize(
    ("right", "wrong"),
    [
        ("- ~R H/L R : - : H/L", "- ~R H/L R : - : N"),
        ("- ~R H/L R : - : H/L", "H/L ~R - R : - : H/L"),
        ("H/L R - ~R : - : H/L", "H/L R - ~R : - : H"),
        ('next_state : "D"', 'next_state : "!D"'),
        ("test_scan_clock;", "test_scan_clock_a;"),
    ],
)
def test_clocked_scan_cell_whose_table_belies_it_is_reported(right: str, wrong: str) -> None:
    found = library(CLOCKED.replace(right, wrong))

    # A wrong clock name alone leaves a cell that shifts, as another style.
    roles = [role.style for role in found.cells["X"].scan]
    assert Style.CLOCKED_SCAN not in roles
    assert roles or [item.slug for item in found.diagnostics] == ["scan-role-wrong"]


def srl(storage: str, outputs: str, test: str = "") -> str:
    return f"cell (X) {{ {storage} {PINS} {outputs} {test} }}"


LATCHES = f"""latch (M, MN) {{ {TWO_PORT} }} latch (S, SN) {{ data_in : "M"; enable : "B"; }}"""
L1 = 'pin (L1) { direction : output; function : "M"; }'
BOTH = L1 + ' pin (L2) { direction : output; function : "S"; }'
L1_NODE = 'pin (L1) { direction : output; internal_node : "M"; }'
L2_NODE = 'pin (L2) { direction : output; internal_node : "S"; }'
NODES = L1_NODE + L2_NODE
SINGLE = f"""test_cell () {{ latch (IQ, IQN) {{ enable : "C"; data_in : "D"; }} {SIGNALS}
    pin (L1) {{ direction : output; function : "IQ"; }}
    pin (L2) {{ direction : output; signal_type : test_scan_out; test_output_only : true; }} }}"""


@pytest.mark.parametrize(("storage", "outputs"), [(LATCHES, BOTH), (TABLE, NODES)])
def test_shift_register_latch_is_found_in_latches_and_in_a_table(
    storage: str, outputs: str
) -> None:
    role = role_of(library(srl(storage, outputs, SINGLE)))

    assert (role.style, role.data, role.scan_in) == (Style.LSSD, "D", "I")
    assert (role.clock, role.clock_a, role.clock_b) == ("C", "A", "B")
    assert role.outputs == (ScanOutput("L2", False, True),)
    assert role.off_values == (("C", 0), ("A", 0), ("B", 0))


def test_undeclared_ports_are_told_apart_by_the_plain_latch() -> None:
    role = role_of(library(PLAIN + srl(LATCHES, BOTH)))

    assert (role.data, role.clock, role.scan_in, role.clock_a) == ("D", "C", "I", "A")


def test_undeclared_ports_without_a_plain_latch_stay_unknown() -> None:
    assert library(srl(LATCHES, BOTH)).cells["X"].scan == ()


def test_latch_of_two_ports_alone_is_l1_without_l2() -> None:
    role = role_of(library(PLAIN + srl(f"latch (M, MN) {{ {TWO_PORT} }}", L1)))

    assert (role.clock_a, role.clock_b, role.outputs) == ("A", None, (ScanOutput("L1", False),))


def test_active_low_and_inverting_ports_are_read_off_the_function() -> None:
    storage = """latch (M, MN) { data_in : "C' D + C I'"; enable : "C' + A'"; }
        latch (S, SN) { data_in : "MN"; enable : "B'"; }"""

    role = role_of(library(PLAIN + srl(storage, BOTH)))

    assert role.scan_in_inverted
    assert role.outputs == (ScanOutput("L2", True, True),)
    assert role.off_values == (("C", 1), ("A", 1), ("B", 1))


def test_l2_with_its_own_system_port_is_named() -> None:
    storage = f"""latch (M, MN) {{ {TWO_PORT} }}
        latch (S, SN) {{ data_in : "B M + C2 D2"; enable : "B + C2"; }}"""
    more = " pin (D2) { direction : input; } pin (C2) { direction : input; }"

    role = role_of(library(PLAIN + srl(storage, BOTH + more)))

    assert (role.clock_b, role.data_2, role.clock_2) == ("B", "D2", "C2")
    assert ScanOutput("L2", False) in role.outputs


def test_edge_clock_with_shift_clocks_is_confirmed_by_pulsing() -> None:
    storage = """statetable ("D CK I A B", "M S") { table : "
        - - H/L H L : - - : H/L N , - - - L H : H/L - : N H/L ,
        H/L R - L L : - - : H/L H/L , - ~R - L L : - - : N N"; }"""
    test = f"""test_cell () {{ ff (IQ, IQN) {{ next_state : "D"; clocked_on : "CK"; }} {SIGNALS}
        pin (L2) {{ direction : output; function : "IQ"; }} }}"""
    body = srl(storage, L2_NODE, test)

    role = role_of(library(body.replace("(C)", "(CK)")))

    assert (role.style, role.clock, role.clock_a, role.clock_b) == (Style.LSSD, "CK", "A", "B")


def test_cell_of_declarations_alone_is_believed() -> None:
    body = f"""cell (X) {{ {PINS} pin (L2) {{ direction : output; }}
        test_cell () {{ {SIGNALS}
          ff (IQ, IQN) {{ next_state : "D"; clocked_on : "C"; clocked_on_also : "B"; }}
          pin (L2) {{ direction : output; function : "IQ"; signal_type : test_scan_out; }} }} }}"""

    [role] = cell(body).scan

    assert (role.style, role.clock_a, role.clock_b) == (Style.LSSD, "A", "B")


@pytest.mark.parametrize(
    "storage",
    [
        'latch (M, MN) { data_in : "D"; enable : "C + A"; }',
        'latch (M, MN) { data_in : "C D + A I"; enable : "C A"; }',
        'latch (M, MN) { data_in : "C D + A D"; enable : "C + A"; }',
        'latch (M, MN) { data_in : "D"; enable : "C"; }',
    ],
)
def test_latch_without_two_ports_has_no_role(storage: str) -> None:
    assert library(PLAIN + srl(storage, L1)).cells["X"].scan == ()
