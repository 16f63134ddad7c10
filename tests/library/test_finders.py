"""Cells are found by function, whatever they are called."""

import pytest
from kits import library

from insertdft.library import (
    ClockGate,
    Gate,
    Latch,
    Library,
    Mux,
    Tie,
    find_buffers,
    find_clock_gates,
    find_gates,
    find_inverters,
    find_latches,
    find_muxes,
    find_ties,
    primitive_cell,
)
from insertdft.library.expression import Const, parse_expression, truth_table


def gate(name: str, function: str, inputs: str, more: str = "", area: float = 1) -> str:
    pins = "".join(f"pin ({pin}) {{ direction : input; }}" for pin in inputs.split())
    return (
        f"cell ({name}) {{ area : {area}; {pins} "
        f'pin (Y) {{ direction : output; function : "{function}"; {more} }} }}'
    )


def kit() -> Library:
    return library(
        gate("NAND_BY_NAME", "A", "A", area=3)
        + gate("B_SMALL", "A A", "A", area=2)
        + gate("A_SMALL", "A''", "A", area=2)
        + gate("UNUSED", "A", "A").replace("area", "dont_use : true; area")
        + gate("ISOLATE", "A", "A").replace("area", "is_isolation_cell : true; area")
        + gate("TRI", "A", "A E", 'three_state : "!E";')
        + gate("I", "A'", "A")
        + gate("X1", "!(A & B)", "A B")
        + gate("X2", "A' + B'", "B A", area=2)
        + gate("HALF", "A'", "A B")
        + gate("M", "(S' P) + (S R) + P R", "P R S")
        + gate("MI", "!((C U) + (!C V))", "U V C")
        + gate("ONE", "1", "")
        + gate("NAMED_LOW", "A + A'", "A")
    )


def test_buffers_and_inverters_are_found_by_function_smallest_first() -> None:
    assert [item.cell for item in find_buffers(kit())] == ["A_SMALL", "B_SMALL", "NAND_BY_NAME"]
    assert find_inverters(kit()) == (Gate("I", ("A",), "Y"),)


def test_gates_are_found_in_any_writing() -> None:
    assert find_gates(kit(), "nand", 2) == (
        Gate("X1", ("A", "B"), "Y"),
        Gate("X2", ("B", "A"), "Y"),
    )
    assert find_gates(kit(), "nor", 2) == ()


@pytest.mark.parametrize(
    ("kind", "function"),
    [
        ("and", "A B C"), ("nand", "(A B C)'"), ("or", "A + B + C"), ("nor", "!(A + B + C)"),
        ("xor", "A ^ B ^ C"), ("xnor", "!(A ^ B ^ C)"),
    ],
)  # fmt: skip
def test_each_kind_of_gate_is_found_and_no_other(kind: str, function: str) -> None:
    found = library(gate("G", function, "A B C"))

    kinds = ("and", "nand", "or", "nor", "xor", "xnor")
    assert [item for item in kinds if find_gates(found, item, 3)] == [kind]
    assert find_gates(found, kind, 2) == ()


@pytest.mark.parametrize(("kind", "inputs"), [("mux", 3), ("and", 1)])
def test_unknown_gate_is_a_misuse(kind: str, inputs: int) -> None:
    with pytest.raises(ValueError, match="no gate"):
        find_gates(kit(), kind, inputs)


def test_muxes_have_roles_and_those_that_invert_come_last() -> None:
    assert find_muxes(kit()) == (
        Mux("M", "S", "P", "R", "Y", False),
        Mux("MI", "C", "V", "U", "Y", True),
    )


def test_ties_are_cells_without_inputs() -> None:
    assert find_ties(kit(), 1) == (Tie("ONE", "Y", 1),)
    assert find_ties(kit(), 0) == ()


def latch(name: str, enable: str, data: str, more: str = "", outputs: str = "Q") -> str:
    shown = {"Q": "IQ", "QN": "IQN"}
    pins = "".join(
        f'pin ({o}) {{ direction : output; function : "{shown[o]}"; }}' for o in outputs.split()
    )
    return f"""cell ({name}) {{ area : 1; latch (IQ, IQN) {{ enable : "{enable}";
      data_in : "{data}"; {more} }} pin (D) {{ direction : input; }}
      pin (G) {{ direction : input; }} {pins} }}"""


def test_latches_are_found_by_level_and_polarity() -> None:
    found = library(
        latch("HIGH", "G", "D", outputs="Q QN")
        + latch("LOW", "!G", "D")
        # Double inversion: the data is inverted and the inverse is shown.
        + latch("TURNED", "G", "!D", outputs="QN")
        + latch("RESET", "G", "D", 'clear : "D";')
        + latch("FEEDS", "G", "D G")
    )

    assert find_latches(found, 1) == (
        Latch("HIGH", "D", "G", 1, "Q", "QN"),
        Latch("TURNED", "D", "G", 1, "QN", None),
    )
    assert find_latches(found, 0) == (Latch("LOW", "D", "G", 0, "Q", None),)


GATED = """cell ({name}) {{ area : 1; {more}
  latch (IQ, IQN) {{ enable : "{enable}"; data_in : "{data}"; }}
  pin (CK) {{ direction : input; {clock} }} pin (EN) {{ direction : input; {en} }}
  pin (TE) {{ direction : input; {te} }}
  pin (G) {{ direction : output; function : "{function}"; {out} }} }}"""


def gated(name: str, enable: str, data: str, function: str) -> str:
    return GATED.format(
        name=name, enable=enable, data=data, function=function,
        more="", clock="", en="", te="", out="",
    )  # fmt: skip


def test_declared_clock_gate_is_as_declared() -> None:
    body = GATED.format(
        name="ICG", enable="!CK", data="EN + TE", function="CK IQ",
        more='clock_gating_integrated_cell : "latch_posedge_precontrol";',
        clock="clock_gate_clock_pin : true;", en="clock_gate_enable_pin : true;",
        te="clock_gate_test_pin : true;", out="clock_gate_out_pin : true;",
    )  # fmt: skip
    found = library(body)

    assert find_clock_gates(found) == (
        ClockGate("ICG", "latch_posedge_precontrol", "CK", "EN", "TE", "G"),
    )
    assert not found.cells["ICG"].is_storage


def test_undeclared_clock_gates_are_found_by_function() -> None:
    found = library(
        gated("A_PLAIN", "!CK", "EN", "CK IQ")
        + gated("B_INVERTING", "!CK", "!EN", "CK IQN")
        + gated("C_FALLING", "CK", "EN", "CK + IQN")
        + gated("D_BEFORE", "!CK", "EN + TE", "CK IQ")
        + gated("E_AFTER", "!CK", "EN", "CK (IQ + TE)")
    )

    assert find_clock_gates(found) == (
        ClockGate("A_PLAIN", "latch_posedge", "CK", "EN", None, "G"),
        ClockGate("B_INVERTING", "latch_posedge", "CK", "EN", None, "G"),
        ClockGate("C_FALLING", "latch_negedge", "CK", "EN", None, "G"),
        ClockGate("D_BEFORE", "latch_posedge_precontrol", "CK", "EN", "TE", "G"),
        ClockGate("E_AFTER", "latch_posedge_postcontrol", "CK", "EN", "TE", "G"),
    )


@pytest.mark.parametrize(
    ("enable", "data", "function"),
    [
        ("CK", "EN", "CK IQ"),  # open while the clock is on: it would glitch
        ("!CK", "EN", "IQ"),
        ("!CK", "EN", "CK + IQ"),
        ("!CK", "EN TE", "CK IQ"),
        ("CK", "!EN", "CK + IQN"),
    ],
)
def test_latch_that_does_not_hold_a_clock_is_no_clock_gate(
    enable: str, data: str, function: str
) -> None:
    found = library(gated("X", enable, data, function))

    assert find_clock_gates(found) == ()
    assert found.cells["X"].is_storage


@pytest.mark.parametrize(
    ("kind", "pins", "function"),
    [
        ("and", 3, "A B"), ("nand", 3, "!(A B)"), ("or", 3, "A + B"), ("nor", 3, "!(A + B)"),
        ("xor", 3, "A ^ B"), ("xnor", 3, "!(A ^ B)"), ("buf", 2, "A"), ("not", 2, "!A"),
        ("nand", 2, "!A"),
    ],
)  # fmt: skip
def test_gate_primitive_has_the_function_of_its_name(kind: str, pins: int, function: str) -> None:
    found = primitive_cell(kind, pins).pins["#0"].function

    assert found is not None
    wanted = parse_expression(function)
    inputs = ["A", "B"][: pins - 1]
    assert truth_table(found, [f"#{n}" for n in range(1, pins)]) == truth_table(wanted, inputs)


@pytest.mark.parametrize(
    ("kind", "function", "closed"),
    [
        ("bufif1", "A", "!E"), ("bufif0", "A", "E"), ("notif1", "!A", "!E"), ("notif0", "!A", "E"),
    ],
)  # fmt: skip
def test_three_state_primitive_closes_when_it_is_not_enabled(
    kind: str, function: str, closed: str
) -> None:
    pin = primitive_cell(kind, 3).pins["#0"]

    assert pin.function is not None
    assert pin.three_state is not None
    assert truth_table(pin.function, ["#1"]) == truth_table(parse_expression(function), ["A"])
    assert truth_table(pin.three_state, ["#2"]) == truth_table(parse_expression(closed), ["E"])


def test_buffer_primitive_may_have_several_outputs() -> None:
    found = primitive_cell("not", 4)

    assert [pin.name for pin in found.outputs()] == ["#0", "#1", "#2"]
    assert [pin.name for pin in found.inputs()] == ["#3"]


def test_pull_is_weak_and_constant() -> None:
    pin = primitive_cell("pullup", 1).pins["#0"]

    assert (pin.function, pin.three_state) == (Const(True), Const(False))


@pytest.mark.parametrize(("kind", "pins"), [("nmos", 3), ("and", 1), ("bufif1", 2)])
def test_what_is_no_primitive_is_a_misuse(kind: str, pins: int) -> None:
    with pytest.raises(ValueError, match="primitive"):
        primitive_cell(kind, pins)
