"""Which net decides each net through everything that only passes it on, for all nets at once.

The same rule as ``simulate.paths``: a gate whose output depends on one input alone is a wire,
straight or inverted. Here every net is asked at once, by columns: buffers and inverters come from
the kinds of cells, gates that known constants turn into wires are looked at one by one.
"""

from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Final

import numpy as np
import numpy.typing as npt

from insertdft.design.flat import OUTPUT, Design
from insertdft.library.cell import Cell
from insertdft.library.functions import literal
from insertdft.netlist import OPEN, Ids, Offsets
from insertdft.simulate.paths import Walker, pin_and_parity

Flags = npt.NDArray[np.bool_]

#: Doublings until every walk has ended: a row of 2 ** 40 buffers is longer than any design.
_MOST_DOUBLINGS: Final = 40


@dataclass(frozen=True, slots=True, eq=False)
class Wires:
    """The wires of one design under one set of constants.

    ``w`` flat nets, ``m`` pin rows.

    Attributes:
        root: Shape (w,), net that decides each net; itself where logic, storage or a port does.
        turned: Shape (w,), whether the wires between invert.
        driver: Shape (w,), pin row that alone drives each net, -1 for none or several.
        passing: Shape (m,), whether the pin is the input of a wire.
    """

    root: Ids = field(repr=False)
    turned: Flags = field(repr=False)
    driver: Offsets = field(repr=False)
    passing: Flags = field(repr=False)


def find_wires(walker: Walker) -> Wires:
    """Return what decides every net of the walker's design under its constants."""
    design = walker.design
    driver = single_drivers(design)
    barred = np.zeros(design.net_count, bool)
    barred[list(walker.values)] = True
    barred[list(design.input_ports)] = True
    outputs, inputs, inverting = _wire_pins(walker, barred)
    goals = design.pin_net[outputs]
    use = (driver[goals] == outputs) & ~barred[goals] & (design.pin_net[inputs] >= 0)
    outputs, inputs, inverting = outputs[use], inputs[use], inverting[use]
    root = np.arange(design.net_count, dtype=np.int32)
    turned = np.zeros(design.net_count, bool)
    root[design.pin_net[outputs]] = design.pin_net[inputs]
    turned[design.pin_net[outputs]] = inverting
    passing = np.zeros(len(design.pin_net), bool)
    passing[inputs] = True
    root, turned = _to_the_end(root, turned)
    return Wires(root, turned, driver, passing)


def single_drivers(design: Design) -> Offsets:
    """Return the pin row that alone drives each net, -1 where none or several do."""
    drivers = design.drivers
    alone = np.diff(drivers.start) == 1
    found = np.full(design.net_count, -1, np.int64)
    found[alone] = drivers.rows[drivers.start[:-1][alone]]
    return found


def rows_of_pins(design: Design, instances: Ids | Offsets, pins: Ids) -> Offsets:
    """Return the pin row of one named pin of each instance, -1 where it is not connected.

    Args:
        design: The flat design.
        instances: Shape (k,), flat ids.
        pins: Shape (k,), ids into ``Design.pin_names``.
    """
    start, end = design.pin_start[instances], design.pin_start[instances + 1]
    found = np.full(len(instances), -1, np.int64)
    for step in range(int((end - start).max(initial=0))):
        rows = np.minimum(start + step, len(design.pin_name) - 1)
        hit = (start + step < end) & (design.pin_name[rows] == pins)
        found[hit] = rows[hit]
    return found


def nets_of_rows(design: Design, rows: Offsets) -> Ids:
    """Return the net of each pin row, OPEN for row -1."""
    nets = design.pin_net[np.maximum(rows, 0)]
    return np.where(rows < 0, np.int32(OPEN), nets).astype(np.int32)


def pin_ids(design: Design, names: Iterable[str]) -> list[int]:
    """Return the ids of pin names, -1 for a name that no instance connects."""
    known = {name: number for number, name in enumerate(design.pin_names)}
    return [known.get(name, -1) for name in names]


def _wire_pins(walker: Walker, known: Flags) -> tuple[Offsets, Offsets, Flags]:
    """Return output row, input row and inversion of every gate output that is a wire."""
    by_kind = _by_kind(walker.design)
    by_constant = _by_constant(walker, known)
    return (
        np.concatenate((by_kind[0], by_constant[0])),
        np.concatenate((by_kind[1], by_constant[1])),
        np.concatenate((by_kind[2], by_constant[2])),
    )


def _by_kind(design: Design) -> tuple[Offsets, Offsets, Flags]:
    """Return the wires that are buffers or inverters whatever is known."""
    rows = np.flatnonzero((design.pin_direction == OUTPUT) & (design.pin_net >= 0))
    instances = design.pin_instance[rows]
    width = len(design.pin_names)
    keys, where = np.unique(
        design.cell[instances].astype(np.int64) * width + design.pin_name[rows],
        return_inverse=True,
    )
    passed = [_passed(design, *divmod(key, width)) for key in keys.tolist()]
    pins = pin_ids(design, (found[0] for found in passed))
    pin_of = np.array(pins, np.int32)[where]
    turned = np.array([found[1] for found in passed], bool)[where]
    chosen = np.flatnonzero(pin_of >= 0)
    inputs = rows_of_pins(design, instances[chosen], pin_of[chosen])
    there = inputs >= 0
    return rows[chosen][there], inputs[there], turned[chosen][there]


def _passed(design: Design, cell_id: int, pin_id: int) -> tuple[str, bool]:
    """Return the input pin that an output follows, and whether inverted; no name if none."""
    cell = design.cells[cell_id]
    pin = cell.pins.get(design.pin_names[pin_id]) if is_gate(cell) and cell else None
    if pin is None or pin.function is None or pin.three_state is not None:
        return "", False
    return literal(pin.function) or ("", False)


def is_gate(cell: Cell | None) -> bool:
    """Return whether a cell is plain logic: known, no storage and no clock gate."""
    return cell is not None and not cell.is_storage and cell.clock_gate is None


def _by_constant(walker: Walker, known: Flags) -> tuple[Offsets, Offsets, Flags]:
    """Return the wires that are gates held open by constants."""
    design = walker.design
    held = np.zeros(design.net_count, bool)
    held[list(walker.values)] = True
    rows = np.flatnonzero((design.pin_direction != OUTPUT) & (design.pin_net >= 0))
    gates = np.array([is_gate(cell) for cell in design.cells], bool)
    instances = design.pin_instance[rows[held[design.pin_net[rows]]]]
    outputs: list[int] = []
    nets: list[int] = []
    turned: list[bool] = []
    for instance in np.unique(instances[gates[design.cell[instances]]]).tolist():
        first, last = design.pin_start[instance : instance + 2].tolist()
        for row in range(first, last):
            if design.pin_direction[row] != OUTPUT or known[design.pin_net[row]]:
                continue
            found = _held_open(walker, instance, row)
            if found is not None:
                outputs.append(row)
                nets.append(found[0])
                turned.append(found[1])
    return np.array(outputs, np.int64), np.array(nets, np.int64), np.array(turned, bool)


def _held_open(walker: Walker, instance: int, row: int) -> tuple[int, bool] | None:
    """Return the pin row that alone decides an output under the constants, and the inversion."""
    design = walker.design
    cell = design.cell_of(instance)
    pin = cell.pins[design.pin_names[int(design.pin_name[row])]] if cell else None
    if pin is None or pin.function is None or pin.three_state is not None:
        return None
    decided = pin_and_parity(design, instance, walker.literal(instance, pin.function))
    if decided is None:
        return None
    first, last = design.pin_start[instance : instance + 2].tolist()
    rows = (at for at in range(first, last) if design.pin_net[at] == decided[0] and at != row)
    found = next(rows, None)
    return None if found is None else (found, decided[1])


def _to_the_end(root: Ids, turned: Flags) -> tuple[Ids, Flags]:
    """Follow every net to the end of its wires, twice as far each time; loops stay where they are.

    A ring of inverters has no end; its nets, and those behind it, are their own roots.
    """
    first = root
    for _ in range(_MOST_DOUBLINGS):
        further = root[root]
        if np.array_equal(further, root):
            break
        turned = turned ^ turned[root]
        root = further
    # A ring whose length is a power of two comes to rest as well, at nets that still have wires.
    endless = first[root] != root
    own = np.arange(len(root), dtype=np.int32)
    return np.where(endless, own, root).astype(np.int32), turned & ~endless
