"""What every latch of a design takes, when, and whose state that is: as columns."""

from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.design.flat import OUTPUT, Design
from insertdft.library.cell import Cell, Storage, StorageKind
from insertdft.library.expression import Expression
from insertdft.library.functions import literal
from insertdft.library.mission import one_state
from insertdft.netlist import FIRST_NET, OPEN, Ids, Offsets
from insertdft.simulate.paths import Walker
from insertdft.survey.wires import Flags, Wires, nets_of_rows, pin_ids, rows_of_pins

NONE: Final = -1


@dataclass(frozen=True, slots=True, eq=False)
class LatchColumns:
    """The latches of a design.

    ``k`` latches, ``w`` nets.

    Attributes:
        latches: Shape (k,), flat ids in hierarchical source order.
        clear: Shape (k,), whether the cell holds one latch that one net opens.
        data_net: Shape (k,), root net of the data, OPEN where it is unconnected or not one net.
        data_turned: Shape (k,), whether the state becomes the inverse of that net.
        enable_net: Shape (k,), root net of the enable, OPEN likewise.
        enable_turned: Shape (k,), whether the latch is open while that net is 0.
        source: Shape (k,), index of the latch whose state the data is, NONE for anything else.
        source_turned: Shape (k,), whether the state becomes the inverse of that latch's.
        shows: Shape (w,), index of the latch whose state (or its inverse) a net shows, NONE.
    """

    latches: Ids = field(repr=False)
    clear: Flags = field(repr=False)
    data_net: Ids = field(repr=False)
    data_turned: Flags = field(repr=False)
    enable_net: Ids = field(repr=False)
    enable_turned: Flags = field(repr=False)
    source: Ids = field(repr=False)
    source_turned: Flags = field(repr=False)
    shows: Ids = field(repr=False)

    def sinks(self, design: Design, wires: Wires) -> Offsets:
        """Return how many pins and ports each latch's state reaches through wires; shape (k,)."""
        rows = (design.pin_direction != OUTPUT) & (design.pin_net >= FIRST_NET) & ~wires.passing
        ports = [at.net for at in design.ports if at.direction != "input" and at.net >= FIRST_NET]
        nets = np.concatenate((design.pin_net[rows], np.array(ports, np.int32)))
        shown = self.shows[wires.root[nets]]
        return np.bincount(shown[shown != NONE], minlength=len(self.latches)).astype(np.int64)


def read_latches(walker: Walker, wires: Wires) -> LatchColumns:
    """Return the latches of the walker's design under its constants."""
    design = walker.design
    kinds = np.array([_is_latch(cell) for cell in design.cells], bool)
    latches = np.flatnonzero(kinds[design.cell]).astype(np.int32)
    count = len(latches)
    data, enable = np.full(count, OPEN, np.int32), np.full(count, OPEN, np.int32)
    data_turned, enable_turned = np.zeros(count, bool), np.zeros(count, bool)
    shows = np.full(design.net_count, NONE, np.int32)
    shows_turned = np.zeros(design.net_count, bool)
    for number in np.unique(design.cell[latches]).tolist():
        cell = design.cells[number]
        mine = np.flatnonzero(design.cell[latches] == number)
        if cell is None or len(cell.storage) != 1:
            continue
        storage = cell.storage[0]
        data[mine], data_turned[mine] = _nets(walker, latches[mine], storage.data)
        enable[mine], enable_turned[mine] = _nets(walker, latches[mine], _enable(storage))
        _show(design, cell, storage, (latches, mine), (shows, shows_turned))
    data, data_turned = _through(wires, data, data_turned)
    enable, enable_turned = _through(wires, enable, enable_turned)
    source = np.where(data >= 0, shows[np.maximum(data, 0)], NONE).astype(np.int32)
    return LatchColumns(
        latches=latches,
        clear=enable >= 0,
        data_net=data,
        data_turned=data_turned,
        enable_net=enable,
        enable_turned=enable_turned,
        source=source,
        source_turned=data_turned ^ shows_turned[np.maximum(data, 0)],
        shows=shows,
    )


def _is_latch(cell: Cell | None) -> bool:
    if cell is None or not cell.is_storage:
        return False
    return any(item.kind is StorageKind.LATCH for item in cell.storage)


def _enable(storage: Storage) -> Expression | None:
    return None if storage.clock_also is not None else storage.clock


def _nets(walker: Walker, instances: Ids, expression: Expression | None) -> tuple[Ids, Flags]:
    """Return the net that alone decides an expression of each instance, and whether inverted."""
    design = walker.design
    nothing = np.full(len(instances), OPEN, np.int32), np.zeros(len(instances), bool)
    if expression is None:
        return nothing
    found = literal(expression)
    if found is not None:
        pins = np.full(len(instances), pin_ids(design, [found[0]])[0], np.int32)
        nets = nets_of_rows(design, rows_of_pins(design, instances, pins))
        return nets, np.full(len(instances), found[1])
    nets, turned = nothing
    for at, instance in enumerate(instances.tolist()):
        decided = walker.net_and_parity(instance, expression)
        if decided is not None:
            nets[at], turned[at] = decided
    return nets, turned


def _show(
    design: Design,
    cell: Cell,
    storage: Storage,
    where: tuple[Ids, Offsets],
    shows: tuple[Ids, Flags],
) -> None:
    """Note the nets that show the state of the instances ``where`` of one cell."""
    latches, mine = where
    for pin in cell.outputs():
        own = literal(one_state(pin.function, storage)) if pin.function else None
        if own is None or own[0] != storage.state or pin.three_state is not None:
            continue
        pins = np.full(len(mine), pin_ids(design, [pin.name])[0], np.int32)
        nets = nets_of_rows(design, rows_of_pins(design, latches[mine], pins))
        there = nets >= FIRST_NET
        shows[0][nets[there]] = mine[there]
        shows[1][nets[there]] = own[1]


def _through(wires: Wires, nets: Ids, turned: Flags) -> tuple[Ids, Flags]:
    """Return nets and inversions at the far end of the wires."""
    inner = np.maximum(nets, 0)
    root = np.where(nets >= 0, wires.root[inner], nets).astype(np.int32)
    return root, turned ^ (wires.turned[inner] & (nets >= 0))
