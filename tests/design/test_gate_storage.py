"""Modules of gates that are latches are recognised by function, and nothing else is."""

import pytest
from designs import design_of, small_library

from insertdft.library.cell import StorageKind
from insertdft.library.expression import Not, Var, parse_expression
from insertdft.library.functions import same
from insertdft.styles.gates import to_verilog
from insertdft.styles.srl import Kind, Shape, compose

TOP = "module top(d, c, i, a, b, y); input d, c, i, a, b; output y;\n  {} u ({});\nendmodule\n"


def cell_of(shape: Shape):  # type: ignore[no-untyped-def]
    module = compose(small_library(), shape)
    assert module is not None
    pins = {"D": "d", "C": "c", "I": "i", "A": "a", "B": "b", "R": "d", "S": "d"}
    ports = [name for name, direction in module.ports if direction == "input"]
    listed = ", ".join(f".{name}({pins[name]})" for name in ports)
    design = design_of(to_verilog(module) + TOP.format(module.name, listed))
    return design, design.cells[int(design.cell[0])]


def test_a_two_port_latch_is_one_latch_open_under_either_clock() -> None:
    design, cell = cell_of(Shape(Kind.TWO_PORT))

    assert len(design.cell) == 1
    [latch] = cell.storage
    assert latch.kind is StorageKind.LATCH
    assert same(latch.clock, parse_expression("C + A"))
    assert cell.pins["Q"].function == Var(latch.state)


def test_a_double_latch_is_two_latches_in_their_order() -> None:
    _, cell = cell_of(Shape(Kind.DOUBLE, inverse_output=True))

    first, second = cell.storage
    assert same(first.clock, parse_expression("C + A"))
    assert (second.data, second.clock) == (Var(first.state), Var("B"))
    assert cell.pins["Q"].function == Var(second.state)
    assert cell.pins["QN"].function == Not(Var(second.state))


@pytest.mark.parametrize("level", [0, 1])
def test_set_and_reset_are_found(level: int) -> None:
    _, cell = cell_of(Shape(Kind.DOUBLE, clear=level))

    acts = Var("R") if level else Not(Var("R"))
    assert [latch.clear for latch in cell.storage] == [acts, acts]


def test_area_is_that_of_the_gates() -> None:
    _, cell = cell_of(Shape(Kind.TWO_PORT))

    assert cell.area == compose(small_library(), Shape(Kind.TWO_PORT)).area  # type: ignore[union-attr]


def test_logic_without_loops_stays_a_module() -> None:
    gates = "".join(f"  NAND2 g{n} (.A(n{n}), .B(a), .Y(n{n + 1}));\n" for n in range(5))
    text = f"module m(n0, a, n5); input n0, a; output n5;\n{gates}endmodule\n"
    design = design_of(text + "module top(x, y, z); input x, y; output z; m u (x, y, z); endmodule")

    assert len(design.cell) == 5


def test_a_ring_that_oscillates_is_no_latch() -> None:
    text = """
module m(a, y); input a; output y; wire p, q, r;
  NAND2 g0 (.A(a), .B(y), .Y(p)); INV g1 (.A(p), .Y(q));
  INV g2 (.A(q), .Y(r)); BUF g3 (.A(r), .Y(y));
endmodule
module top(x, z); input x; output z; m u (x, z); endmodule
"""
    assert len(design_of(text).cell) == 4
