"""Cells of a library found by what they do, never by name.

Every finder leaves out stand-ins, power-management cells and what the library wants unused, and
sorts by area, then name. Cells of unknown area (from Verilog models) come last, by the number that
ends the name.
"""

import math
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from itertools import permutations
from typing import Final

from insertdft.library.cell import Cell, Library, Pin, StorageKind
from insertdft.library.drive import drive_number
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor
from insertdft.library.functions import literal, pruned, same, support
from insertdft.library.mission import one_state


@dataclass(frozen=True, slots=True)
class Gate:
    """A cell with one output that is a gate over all its inputs.

    Attributes:
        cell: Name.
        inputs: Input pins, in the library's order.
        output: Output pin.
    """

    cell: str
    inputs: tuple[str, ...]
    output: str


@dataclass(frozen=True, slots=True)
class Mux:
    """A two-way multiplexer.

    Attributes:
        cell: Name.
        select: Pin that chooses.
        when0: Pin that passes while ``select`` is 0.
        when1: Pin that passes while ``select`` is 1.
        output: Output pin.
        inverted: Whether the output is the inverse of what passes.
    """

    cell: str
    select: str
    when0: str
    when1: str
    output: str
    inverted: bool


@dataclass(frozen=True, slots=True)
class Tie:
    """A cell output that is constant.

    Attributes:
        cell: Name.
        output: Output pin.
        value: 0 or 1.
    """

    cell: str
    output: str
    value: int


@dataclass(frozen=True, slots=True)
class Latch:
    """A level-sensitive latch without set or reset.

    Attributes:
        cell: Name.
        data: Data pin.
        enable: Enable pin.
        active: Level of ``enable`` that opens it.
        output: Output that shows the data as it is, or None.
        output_inverted: Output that shows the inverse, or None.
    """

    cell: str
    data: str
    enable: str
    active: int
    output: str | None
    output_inverted: str | None


@dataclass(frozen=True, slots=True)
class ClockGate:
    """An integrated clock-gate cell.

    Attributes:
        cell: Name.
        kind: ``clock_gating_integrated_cell`` as declared (``latch_posedge_precontrol``, ...).
        clock: Clock pin.
        enable: Enable pin.
        test: Test pin, or None.
        output: Gated clock.
    """

    cell: str
    kind: str
    clock: str
    enable: str
    test: str | None
    output: str


#: Gate kinds that ``find_gates`` knows.
_GATES: Final[dict[str, Callable[[tuple[Expression, ...]], Expression]]] = {
    "and": And,
    "nand": lambda parts: Not(And(parts)),
    "or": Or,
    "nor": lambda parts: Not(Or(parts)),
    "xor": Xor,
    "xnor": lambda parts: Not(Xor(parts)),
}


def find_buffers(library: Library) -> tuple[Gate, ...]:
    """Return the cells whose one output follows their one input."""
    return tuple(_followers(library, inverted=False))


def find_inverters(library: Library) -> tuple[Gate, ...]:
    """Return the cells whose one output is the inverse of their one input."""
    return tuple(_followers(library, inverted=True))


def find_gates(library: Library, kind: str, inputs: int) -> tuple[Gate, ...]:
    """Return the gates of ``kind`` (and, nand, or, nor, xor, xnor) with that many inputs.

    Raises:
        ValueError: The kind is unknown or there are fewer than two inputs.
    """
    if kind not in _GATES or inputs < 2:
        raise ValueError(f"no gate of kind {kind!r} with {inputs} inputs")
    found: list[Gate] = []
    for cell, output, function in _single_outputs(library):
        names = support(function)
        if len(names) != inputs or len(cell.inputs()) != inputs:
            continue
        if same(function, _GATES[kind](tuple(map(Var, names)))):
            ordered = tuple(pin.name for pin in cell.inputs())
            found.append(Gate(cell.name, ordered, output.name))
    return tuple(found)


def find_muxes(library: Library) -> tuple[Mux, ...]:
    """Return the two-way multiplexers, those that do not invert before those that do."""
    found: list[Mux] = []
    for cell, output, function in _single_outputs(library):
        if len(support(function)) == len(cell.inputs()) == 3:
            found += _mux(cell.name, output.name, function)
    return tuple(sorted(found, key=lambda mux: mux.inverted))


def _mux(cell: str, output: str, function: Expression) -> list[Mux]:
    for select, when0, when1 in permutations(support(function)):
        passed = Or((And((Var(select), Var(when1))), And((Not(Var(select)), Var(when0)))))
        for inverted in (False, True):
            if same(function, Not(passed) if inverted else passed):
                return [Mux(cell, select, when0, when1, output, inverted)]
    return []


def find_ties(library: Library, value: int) -> tuple[Tie, ...]:
    """Return the outputs that are constantly ``value``, of cells without inputs."""
    return tuple(
        Tie(cell.name, pin.name, value)
        for cell in _usable(library)
        if not cell.inputs()
        for pin in cell.outputs()
        if pin.function is not None and pruned(pin.function) == Const(value == 1)
    )


def find_latches(library: Library, active: int) -> tuple[Latch, ...]:
    """Return the plain latches that are open while their enable is ``active``."""
    found = (_latch(cell) for cell in _usable(library))
    return tuple(latch for latch in found if latch is not None and latch.active == active)


def _latch(cell: Cell) -> Latch | None:
    if len(cell.storage) != 1 or not cell.is_storage:
        return None
    item = cell.storage[0]
    if item.kind is not StorageKind.LATCH or item.clear or item.preset or item.clock_also:
        return None
    data = literal(item.data) if item.data else None
    enable = literal(item.clock) if item.clock else None
    if data is None or enable is None or len(cell.inputs()) != 2:
        return None
    shown: dict[bool, str] = {}
    for pin in cell.outputs():
        own = literal(one_state(pin.function, item)) if pin.function else None
        if own and own[0] == item.state and pin.three_state is None:
            shown.setdefault(own[1] ^ data[1], pin.name)
    if not shown:
        return None
    active = int(not enable[1])
    return Latch(cell.name, data[0], enable[0], active, shown.get(False), shown.get(True))


def find_clock_gates(library: Library) -> tuple[ClockGate, ...]:
    """Return the integrated clock-gate cells whose pins are declared."""
    found = map(clock_gate_of, _usable(library))
    return tuple(gate for gate in found if gate is not None)


def clock_gate_of(cell: Cell) -> ClockGate | None:
    """Return the declared pins of an integrated clock gate, None for any other cell."""
    pins = {pin.clock_gate_role: pin.name for pin in cell.pins.values()}
    if cell.clock_gate is None or not {"clock", "enable", "out"} <= pins.keys():
        return None
    return ClockGate(
        cell.name, cell.clock_gate, pins["clock"], pins["enable"], pins.get("test"), pins["out"]
    )


def _usable(library: Library) -> list[Cell]:
    cells = [
        cell
        for cell in library.cells.values()
        if not (cell.dont_use or cell.stand_in or cell.power_management)
    ]
    return sorted(cells, key=_size)


def _size(cell: Cell) -> tuple[float, float, int, str]:
    """Return the area; where it is unknown, the number that ends the name, then its length."""
    if cell.area is not None:
        return cell.area, 0.0, 0, cell.name
    return math.inf, drive_number(cell.name) or math.inf, len(cell.name), cell.name


def _single_outputs(library: Library) -> Iterator[tuple[Cell, Pin, Expression]]:
    """Yield the usable cells with one output that is a plain function of their inputs."""
    for cell in _usable(library):
        outputs = cell.outputs()
        if len(outputs) != 1 or cell.storage or cell.state_table or cell.clock_gate:
            continue
        output = outputs[0]
        if output.function is None or output.three_state or output.direction != "output":
            continue
        yield cell, output, pruned(output.function)


def _followers(library: Library, *, inverted: bool) -> Iterator[Gate]:
    for cell, output, function in _single_outputs(library):
        found = literal(function)
        if found is not None and found[1] is inverted and len(cell.inputs()) == 1:
            yield Gate(cell.name, (found[0],), output.name)
