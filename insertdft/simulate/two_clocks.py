"""Scan cells that two clocks write, in a form that the cycle machine can run.

A clocked-scan cell takes mission data at one clock and shift data at another; an edge-triggered
cell of level-sensitive scan takes the one at an edge and the other while B is on. No single flip-
flop or latch is that. Each clock gets a storage element of its own here, and two *marks* that tell
which of the two was written last: a write at the first clock makes the marks equal, one at the
second makes them differ. It holds as long as the two clocks never act together, which is how a
tester drives them.
"""

from collections.abc import Mapping
from dataclasses import replace
from typing import Final

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, Pin, ScanRole, Storage, StorageKind, Style
from insertdft.library.expression import Expression, Not, Var, Xor, substitute
from insertdft.library.functions import choose
from insertdft.netlist import Ids
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.lowering import storages
from insertdft.simulate.state import Machine
from insertdft.simulate.words import ONES

_MISSION: Final = "$mission"
_SHIFTED: Final = "$shifted"
_FIRST: Final = "$first"
_MARKS: Final = ("$mark_1", "$mark_2")


def with_two_clock_cells(design: Design) -> Design:
    """Return the design with its two-clock cells rewritten; what is not understood stays."""
    return replace(design, cells=tuple(cell and _rewritten(cell) for cell in design.cells))


def start_marks(machine: Machine) -> None:
    """Give the marks of all two-clock cells a value; what the cells hold stays unknown.

    The clock ports must be at rest.
    """
    slots = machine.circuit.states.slot[mark_rows(machine.circuit)]
    machine.values[0, slots] = 0
    if len(machine.values) == 2:
        machine.values[1, slots] = ONES
    machine.settle()


def mark_rows(circuit: Circuit) -> Ids:
    """Return the rows of ``circuit.states`` that are marks."""
    states = circuit.states
    pairs = zip(states.instance.tolist(), states.storage.tolist(), strict=True)
    found = [
        row
        for row, (instance, number) in enumerate(pairs)
        if _is_mark(circuit.design.cell_of(instance), number)
    ]
    return np.array(found, np.int32)


def mission_copy(cell: Cell) -> int:
    """Return the storage of a two-clock cell that must agree with the shifted one, -1 if none."""
    names = [storage.state for storage in cell.storage]
    return names.index(_MISSION) if _MISSION in names else -1


def _is_mark(cell: Cell | None, number: int) -> bool:
    kept = storages(cell) if cell is not None else ()
    return number < len(kept) and kept[number].state in _MARKS


def _rewritten(cell: Cell) -> Cell:
    if cell.state_table is None or storages(cell):
        return cell
    for role in cell.scan:
        mission = _mission(cell, role)
        second = role.scan_clock if role.style is Style.CLOCKED_SCAN else role.clock_b
        if mission is not None and second is not None and role.bits == 1:
            return _as_two(cell, role, mission, second)
    return cell


def _mission(cell: Cell, role: ScanRole) -> Storage | None:
    """Return the one flip-flop that the cell is in mission use."""
    if cell.test_cell is None or len(cell.test_cell.storage) != 1:
        return None
    [storage] = cell.test_cell.storage
    is_flip_flop = storage.kind is StorageKind.FLIP_FLOP and storage.clock_also is None
    return storage if is_flip_flop and role.clock is not None else None


def _as_two(cell: Cell, role: ScanRole, mission: Storage, second: str) -> Cell:
    off = dict(role.off_values)
    shift: Expression = Var(role.scan_in)
    shift = Not(shift) if role.scan_in_inverted else shift
    extra: tuple[Storage, ...] = ()
    kind = StorageKind.FLIP_FLOP
    if role.style is Style.LSSD and role.clock_a is not None:
        extra = (_latch(mission, _FIRST, shift, _active(role.clock_a, off)),)
        shift, kind = Var(_FIRST), StorageKind.LATCH
    held = choose(Xor((Var(_MARKS[0]), Var(_MARKS[1]))), Var(_SHIFTED), Var(_MISSION))
    shown = {mission.state: held, mission.state_inverted: Not(held)}
    data = None if mission.data is None else substitute(mission.data, shown)
    first = replace(mission, state=_MISSION, state_inverted=_MISSION + "_n", data=data)
    scan = replace(
        first,
        kind=kind,
        state=_SHIFTED,
        state_inverted=_SHIFTED + "_n",
        data=shift,
        clock=_active(second, off),
    )
    marks = (_mark(first, 0, Var(_MARKS[1])), _mark(scan, 1, Not(Var(_MARKS[0]))))
    pins = {name: _pin(pin, cell, role, shown, held) for name, pin in cell.pins.items()}
    return replace(cell, state_table=None, storage=(first, scan, *extra, *marks), pins=pins)


def _active(pin: str, off: Mapping[str, int]) -> Expression:
    return Not(Var(pin)) if off.get(pin, 0) else Var(pin)


def _mark(like: Storage, number: int, data: Expression) -> Storage:
    """Return a storage element that is clocked as ``like`` is but never cleared or preset."""
    name = _MARKS[number]
    return replace(
        like,
        state=name,
        state_inverted=name + "_n",
        data=data,
        clear=None,
        preset=None,
        clear_preset=(None, None),
    )


def _latch(like: Storage, name: str, data: Expression, enable: Expression) -> Storage:
    return replace(
        like,
        kind=StorageKind.LATCH,
        state=name,
        state_inverted=name + "_n",
        data=data,
        clock=enable,
    )


def _pin(
    pin: Pin, cell: Cell, role: ScanRole, shown: Mapping[str, Expression], held: Expression
) -> Pin:
    if pin.direction not in ("output", "inout"):
        return pin
    function = cell.test_cell.functions.get(pin.name) if cell.test_cell else None
    if function is not None:
        return replace(pin, function=substitute(function, shown), internal_node=None)
    for output in role.outputs:
        if output.pin == pin.name:
            seen = Not(held) if output.inverted else held
            return replace(pin, function=seen, internal_node=None)
    return replace(pin, function=None, internal_node=None)
