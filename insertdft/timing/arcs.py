"""Timing groups of the library laid over the cells of a design.

A *node* is one edge of one net: ``2 * net`` rising, ``2 * net + 1`` falling. An *arc* leads from
a node to a node with a delay table and a transition table.

What is left out: set and reset to output, three-state going off, hold, recovery, removal and pulse
width. A latch is taken as closed until it opens: its output starts at the opening edge, and its
data must be there by then, so no time is borrowed.
"""

from collections.abc import Iterator
from dataclasses import dataclass, field
from functools import lru_cache
from typing import Final, NamedTuple

import numpy as np

from insertdft.library import Arc, Cell, Pin, StorageKind, Table
from insertdft.library.expression import variables
from insertdft.netlist import FIRST_NET, Ids, Offsets
from insertdft.simulate.lowering import storages
from insertdft.simulate.pin_rows import PinRows, pins_by_cell
from insertdft.timing.tables import Floats, Stack, Stacker
from insertdft.timing.wiring import Wiring

RISE: Final = 0
FALL: Final = 1
EDGES: Final = ("rise", "fall")

_THROUGH: Final = {
    "combinational": (RISE, FALL),
    "combinational_rise": (RISE,),
    "combinational_fall": (FALL,),
    "three_state_enable": (RISE, FALL),
    "three_state_enable_rise": (RISE,),
    "three_state_enable_fall": (FALL,),
}
_CLOCKED: Final = {"rising_edge": RISE, "falling_edge": FALL}
_SETUP: Final = {"setup_rising": RISE, "setup_falling": FALL}


@dataclass(frozen=True, slots=True, eq=False)
class Arcs:
    """All arcs of a wiring.

    Attributes:
        tail: Node that an arc starts at.
        head: Node that it ends at.
        delay: Its delay table in ``delays``, -1 for none.
        slew: Its transition table in ``delays``, -1 for none.
        launch: Whether a clock edge starts it (clock pin to output of a storage cell).
        instance: Instance it goes through.
        row: Pin row of its input.
        delays: Tables over (input transition, output load).
    """

    tail: Ids = field(repr=False)
    head: Ids = field(repr=False)
    delay: Ids = field(repr=False)
    slew: Ids = field(repr=False)
    launch: Ids = field(repr=False)
    instance: Ids = field(repr=False)
    row: Ids = field(repr=False)
    delays: Stack = field(repr=False)


@dataclass(frozen=True, slots=True, eq=False)
class Checks:
    """All setup checks: data that must be there before a clock edge.

    Attributes:
        instance: Storage cell (or clock gate).
        row: Pin row of the data pin.
        data: Net of the data pin.
        clock: Net of the clock pin.
        edge: RISE or FALL of the clock net that the data must come before.
        latch: Whether it is a latch, measured at its opening edge with no setup time.
        rise: Setup table for rising data, -1 for none.
        fall: Setup table for falling data, -1 for none.
        constraints: Tables over (data transition, clock transition).
    """

    instance: Ids = field(repr=False)
    row: Ids = field(repr=False)
    data: Ids = field(repr=False)
    clock: Ids = field(repr=False)
    edge: Ids = field(repr=False)
    latch: Ids = field(repr=False)
    rise: Ids = field(repr=False)
    fall: Ids = field(repr=False)
    constraints: Stack = field(repr=False)


class _ArcOfCell(NamedTuple):
    related: str
    pin: str
    edge_in: int
    edge_out: int
    delay: Table | None
    slew: Table | None
    launch: bool


class _CheckOfCell(NamedTuple):
    pin: str
    clock: str
    edge: int
    latch: bool
    rise: Table | None
    fall: Table | None


def find_arcs(wiring: Wiring) -> tuple[Arcs, Checks]:
    """Return arcs and checks of all instances."""
    delays = Stacker("input_net_transition", "total_output_net_capacitance")
    constraints = Stacker("constrained_pin_transition", "related_pin_transition")
    arcs: list[tuple[Offsets, ...]] = []
    checks: list[tuple[Offsets, ...]] = []
    for pins in pins_by_cell(
        wiring.cell, wiring.pin_start, wiring.pin_name, wiring.pin_names, len(wiring.cells)
    ):
        cell = wiring.cells[pins.cell]
        if cell is not None:
            arcs += _lay_arcs(wiring, cell, pins, delays)
            checks += _lay_checks(wiring, cell, pins, constraints)
    tail, head, delay, slew, launch, instance, row = _columns(arcs, 7)
    laid = Arcs(tail, head, delay, slew, launch, instance, row, delays.stack())
    owner, pin, data, clock, edge, latch, rise, fall = _columns(checks, 8)
    return laid, Checks(owner, pin, data, clock, edge, latch, rise, fall, constraints.stack())


def pin_loads(wiring: Wiring) -> tuple[Floats, Ids]:
    """Return for each net the sum of the capacitances of its input pins, and their number."""
    load, sinks = np.zeros(wiring.net_count), np.zeros(wiring.net_count, np.int32)
    for pins in pins_by_cell(
        wiring.cell, wiring.pin_start, wiring.pin_name, wiring.pin_names, len(wiring.cells)
    ):
        cell = wiring.cells[pins.cell]
        for pin in cell.inputs() if cell else ():
            if pin.name in pins.rows:
                rows = pins.rows[pin.name]
                nets = wiring.pin_net[rows[rows >= 0]]
                nets = nets[nets >= FIRST_NET]
                load += np.bincount(nets, minlength=len(load)) * (pin.capacitance or 0.0)
                sinks += np.bincount(nets, minlength=len(sinks)).astype(np.int32)
    return load, sinks


def load_limits(wiring: Wiring) -> Floats:
    """Return for each net the largest load its weakest driver may have, infinity where not said."""
    limit = np.full(wiring.net_count, np.inf)
    for pins in pins_by_cell(
        wiring.cell, wiring.pin_start, wiring.pin_name, wiring.pin_names, len(wiring.cells)
    ):
        cell = wiring.cells[pins.cell]
        for pin in cell.outputs() if cell else ():
            if pin.max_capacitance is not None and pin.name in pins.rows:
                rows = pins.rows[pin.name]
                nets = wiring.pin_net[rows[rows >= 0]]
                np.minimum.at(limit, nets[nets >= FIRST_NET], pin.max_capacitance)
    return limit


def _columns(parts: list[tuple[Offsets, ...]], count: int) -> list[Ids]:
    empty = np.zeros(0, np.int64)
    return [
        np.concatenate([empty, *(part[column] for part in parts)]).astype(np.int32)
        for column in range(count)
    ]


def _lay_arcs(
    wiring: Wiring, cell: Cell, pins: PinRows, delays: Stacker
) -> Iterator[tuple[Offsets, ...]]:
    for arc in _arcs_of(cell):
        if arc.related not in pins.rows or arc.pin not in pins.rows:
            continue
        row = pins.rows[arc.related]
        tail, head = _nets(wiring, row), _nets(wiring, pins.rows[arc.pin])
        kept = np.flatnonzero((tail >= FIRST_NET) & (head >= FIRST_NET))
        yield (
            2 * tail[kept] + arc.edge_in,
            2 * head[kept] + arc.edge_out,
            np.full(len(kept), delays.add(arc.delay)),
            np.full(len(kept), delays.add(arc.slew)),
            np.full(len(kept), int(arc.launch)),
            pins.instances[kept],
            row[kept],
        )


def _lay_checks(
    wiring: Wiring, cell: Cell, pins: PinRows, constraints: Stacker
) -> Iterator[tuple[Offsets, ...]]:
    for check in _checks_of(cell):
        if check.pin not in pins.rows or check.clock not in pins.rows:
            continue
        row = pins.rows[check.pin]
        data, clock = _nets(wiring, row), _nets(wiring, pins.rows[check.clock])
        kept = np.flatnonzero((data >= FIRST_NET) & (clock >= FIRST_NET))
        yield (
            pins.instances[kept],
            row[kept],
            data[kept],
            clock[kept],
            np.full(len(kept), check.edge),
            np.full(len(kept), int(check.latch)),
            np.full(len(kept), constraints.add(check.rise)),
            np.full(len(kept), constraints.add(check.fall)),
        )


def _nets(wiring: Wiring, rows: Offsets) -> Offsets:
    found: Offsets = np.where(rows >= 0, wiring.pin_net[rows], -1).astype(np.int64)
    return found


@lru_cache(maxsize=4096)
def _arcs_of(cell: Cell) -> tuple[_ArcOfCell, ...]:
    return tuple(
        one
        for pin in cell.outputs()
        for arc in pin.arcs
        for related in arc.related
        for one in _edges_of(cell, pin, arc, related)
    )


def _edges_of(cell: Cell, pin: Pin, arc: Arc, related: str) -> Iterator[_ArcOfCell]:
    if arc.kind in _CLOCKED:
        for out in (RISE, FALL):
            yield from _one(arc, related, pin.name, _CLOCKED[arc.kind], out, launch=True)
    elif arc.kind in _THROUGH and _passes(cell, pin, related):
        for out in _THROUGH[arc.kind]:
            for edge_in in _edges_in(arc.sense, out):
                yield from _one(arc, related, pin.name, edge_in, out, launch=False)


def _one(
    arc: Arc, related: str, pin: str, edge_in: int, edge_out: int, *, launch: bool
) -> Iterator[_ArcOfCell]:
    delay = arc.tables.get(f"cell_{EDGES[edge_out]}")
    slew = arc.tables.get(f"{EDGES[edge_out]}_transition")
    if delay is not None or slew is not None:
        yield _ArcOfCell(related, pin, edge_in, edge_out, delay, slew, launch)


def _edges_in(sense: str | None, out: int) -> tuple[int, ...]:
    if sense == "positive_unate":
        return (out,)
    return (1 - out,) if sense == "negative_unate" else (RISE, FALL)


def _passes(cell: Cell, pin: Pin, related: str) -> bool:
    """Return whether a pin acts on an output without waiting for a clock."""
    if not storages(cell) and cell.state_table is None:
        return True
    if pin.function is not None and related in variables(pin.function):
        return True
    return cell.clock_gate is not None and bool(cell.pins[related].clock_gate_role == "clock")


@lru_cache(maxsize=4096)
def _checks_of(cell: Cell) -> tuple[_CheckOfCell, ...]:
    is_latch = cell.clock_gate is None and any(
        storage.kind is StorageKind.LATCH for storage in storages(cell)
    )
    found: list[_CheckOfCell] = []
    for pin in cell.inputs():
        for arc in pin.arcs:
            if arc.kind not in _SETUP:
                continue
            edge = _SETUP[arc.kind] ^ int(is_latch)
            rise, fall = arc.tables.get("rise_constraint"), arc.tables.get("fall_constraint")
            if is_latch:
                rise = fall = None
            found += [
                _CheckOfCell(pin.name, clock, edge, is_latch, rise, fall) for clock in arc.related
            ]
    return tuple(found)
