"""The ports of every latch: which data pin is taken under which clock pin, and who shows it.

A latch with two ports, as L1 has, takes system data under one clock and scan data under another;
rules about clocks and data hold for each port by itself.
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass, field
from itertools import product

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, Storage, StorageKind
from insertdft.library.expression import Const, Expression, substitute
from insertdft.library.functions import pruned, support
from insertdft.netlist import FIRST_NET, Ids, Offsets
from insertdft.survey.wires import nets_of_rows, pin_ids, rows_of_pins


@dataclass(frozen=True, slots=True)
class DataPin:
    """One data pin of a latch, and the clock pins that let it in."""

    pin: str
    clocks: tuple[str, ...]


@dataclass(frozen=True, slots=True, eq=False)
class LatchKind:
    """One latch of one kind of cell.

    Attributes:
        cell: Id into ``Design.cell_names``.
        storage: The latch.
        enables: Pins that its enable depends on.
        data: Its data pins.
        asynchronous: Pins of its set and reset.
        outputs: Output pins that its state decides, alone or with others.
        instances: Flat ids of the instances of the cell.
    """

    cell: int
    storage: Storage
    enables: tuple[str, ...]
    data: tuple[DataPin, ...]
    asynchronous: tuple[str, ...]
    outputs: tuple[str, ...]
    instances: Ids = field(repr=False)

    def nets(self, design: Design, pin: str) -> Ids:
        """Return the net of one pin of each instance, OPEN where unconnected."""
        pins = np.full(len(self.instances), pin_ids(design, [pin])[0], np.int32)
        return nets_of_rows(design, rows_of_pins(design, self.instances, pins))


def latch_kinds(design: Design) -> tuple[LatchKind, ...]:
    """Return every latch of every kind of cell in use, in the order of the cells' first use."""
    found: list[LatchKind] = []
    numbers, first = np.unique(design.cell, return_index=True)
    for number in numbers[np.argsort(first)].tolist():
        cell = design.cells[number]
        if cell is None or not cell.is_storage:
            continue
        instances = np.flatnonzero(design.cell == number).astype(np.int32)
        found += [
            _kind(number, cell, storage, instances)
            for storage in cell.storage
            if storage.kind is StorageKind.LATCH
        ]
    return tuple(found)


def _kind(number: int, cell: Cell, storage: Storage, instances: Ids) -> LatchKind:
    inputs = {pin.name for pin in cell.inputs()}
    enables = _pins(inputs, storage.clock, storage.clock_also)
    state = {storage.state, storage.state_inverted}
    return LatchKind(
        cell=number,
        storage=storage,
        enables=enables,
        data=tuple(_data(storage, enables, inputs)),
        asynchronous=_pins(inputs, storage.clear, storage.preset),
        outputs=tuple(
            pin.name
            for pin in cell.outputs()
            if pin.function is not None and state & set(support(pin.function))
        ),
        instances=instances,
    )


def _pins(inputs: set[str], *expressions: Expression | None) -> tuple[str, ...]:
    found: dict[str, None] = {}
    for expression in expressions:
        names = support(expression) if expression is not None else ()
        found.update(dict.fromkeys(name for name in names if name in inputs))
    return tuple(found)


def _data(storage: Storage, enables: Sequence[str], inputs: set[str]) -> Iterator[DataPin]:
    """Yield each data pin with the clock pins under which alone it is let in."""
    if storage.data is None:
        return
    letting: dict[str, dict[str, None]] = {}
    for clock in enables:
        for data in _let_in(storage, clock, enables):
            for pin in support(data):
                if pin in inputs and pin not in enables:
                    letting.setdefault(pin, {})[clock] = None
    for pin, clocks in letting.items():
        yield DataPin(pin, tuple(clocks))


def _let_in(storage: Storage, clock: str, enables: Sequence[str]) -> Iterator[Expression]:
    """Yield what the latch takes when ``clock`` alone turns it on, for all levels of the others."""
    if storage.clock is None or storage.data is None:
        return
    others = [name for name in enables if name != clock]
    for levels in product((False, True), repeat=len(others)):
        held: dict[str, Expression] = {
            name: Const(level) for name, level in zip(others, levels, strict=True)
        }
        low, high = (
            pruned(substitute(storage.clock, {**held, clock: Const(value)}))
            for value in (False, True)
        )
        if low != high:
            on = high == Const(True)
            yield pruned(substitute(storage.data, {**held, clock: Const(on)}))


def starts(design: Design, kind: LatchKind, chosen: Offsets) -> Iterator[int]:
    """Yield the nets that show the state of ``chosen`` (indices into ``kind.instances``)."""
    for pin in kind.outputs:
        yield from (net for net in kind.nets(design, pin)[chosen].tolist() if net >= FIRST_NET)
