"""Cells that two clocks write, run in the cycle machine against their own state tables."""

import random
from functools import cache

import pytest
from designs import design_of
from technologies import technology

from insertdft.library import Library
from insertdft.library.cell import Cell
from insertdft.library.expression import evaluate
from insertdft.library.state_table import TableModel
from insertdft.simulate.lowering import storages
from insertdft.simulate.state import Machine
from insertdft.simulate.two_clocks import start_marks, with_two_clock_cells


@cache
def demo() -> Library:
    return technology("demo").library()


def two_clock_cells() -> list[str]:
    return [cell.name for cell in demo().cells.values() if cell.state_table and not storages(cell)]


class Reference:
    """The cell's state table, stepped pin by pin from unknown states."""

    def __init__(self, cell: Cell, pins: dict[str, int]) -> None:
        assert cell.state_table is not None
        self.cell, self.pins = cell, dict(pins)
        self.model = TableModel(cell.state_table)
        self.nodes: dict[str, int | None] = dict.fromkeys(self.model.nodes)

    def set(self, pin: str, value: int) -> None:
        before, self.pins[pin] = dict(self.pins), value
        self.nodes = self.model.settle(before, self.pins, self.nodes)

    def outputs(self) -> dict[str, int | None]:
        found: dict[str, int | None] = {}
        for pin in self.cell.outputs():
            if pin.function is None:
                found[pin.name] = self.nodes[str(pin.internal_node)]
            elif any(value is None for value in self.nodes.values()):
                continue
            else:
                known = {name: value or 0 for name, value in self.nodes.items()}
                found[pin.name] = evaluate(pin.function, {**known, **self.pins}, 1)
        return found


class InDesign:
    """One instance of the cell, every pin a port of its own."""

    def __init__(self, name: str, pins: dict[str, int], clocks: dict[str, int]) -> None:
        cell = demo().cells[name]
        every = list(cell.pins)
        ports = ", ".join(f".{pin}({pin})" for pin in every)
        lines = [f"module top ({', '.join(every)});"]
        lines += [f"  {pin.direction} {pin.name};" for pin in cell.pins.values()]
        text = "\n".join([*lines, f"  {name} dut ({ports});", "endmodule", ""])
        self.machine = Machine(with_two_clock_cells(design_of(text, demo())))
        self.machine.force(clocks)
        start_marks(self.machine)
        self.machine.force(pins)

    def output(self, pin: str) -> int | None:
        one, zero = self.machine.port(pin)
        return 1 if one[0] & 1 else 0 if zero[0] & 1 else None


def run(name: str, wrong: str | None = None) -> int:
    """Return how many values were compared; ``wrong`` names a pin that the reference misses."""
    cell = demo().cells[name]
    chance = random.Random(name)  # noqa: S311
    clocks = dict(cell.scan[0].off_values)
    pins = {pin.name: clocks.get(pin.name, 1) for pin in cell.inputs()}
    reference, tested = Reference(cell, pins), InDesign(name, pins, clocks)
    compared = 0
    for _ in range(160):
        pin = chance.choice([*pins, *clocks])
        moves = [1 - clocks[pin], clocks[pin]] if pin in clocks else [chance.randint(0, 1)]
        for value in moves:
            tested.machine.force({pin: value})
            if pin != wrong:
                reference.set(pin, value)
        for output, value in reference.outputs().items():
            if value is not None:
                assert tested.output(output) == value, (name, output, pin)
                compared += 1
    return compared


def test_the_demo_library_has_such_cells_of_both_styles() -> None:
    styles = {demo().cells[name].scan[0].style.value for name in two_clock_cells()}

    assert styles == {"clocked-scan", "lssd"}


def test_every_cell_does_what_its_state_table_says() -> None:
    for name in two_clock_cells():
        assert run(name) > 100


@pytest.mark.parametrize("pin", ["D", "SI", "CK", "SCK"])
def test_a_reference_that_misses_a_pin_is_noticed(pin: str) -> None:
    with pytest.raises(AssertionError):
        run("two_clock_flop_w1", wrong=pin)


def test_without_the_rewriting_nothing_is_known() -> None:
    text = """module top (d, si, ck, sck, q); input d, si, ck, sck; output q;
    two_clock_flop_w1 f (.D(d), .SI(si), .CK(ck), .SCK(sck), .Q(q)); endmodule"""
    machine = Machine(design_of(text, demo()))
    machine.force({"d": 1, "si": 1, "ck": 0, "sck": 0})
    machine.pulse({"ck": 0})

    assert [int(rail[0]) for rail in machine.port("q")] == [0, 0]
