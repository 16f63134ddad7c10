"""Pins of all instances of one cell at a time, as columns."""

from collections.abc import Iterator, Sequence
from typing import NamedTuple

import numpy as np

from insertdft.netlist import Ids, Offsets
from insertdft.simulate.levels import grouped, members


class PinRows(NamedTuple):
    """All instances of one cell.

    Attributes:
        cell: Id of the cell.
        instances: Shape (n,), ascending.
        rows: Pin name -> shape (n,), row of that pin of each instance, -1 where it is not named.
    """

    cell: int
    instances: Offsets
    rows: dict[str, Offsets]


def pins_by_cell(
    cell: Ids, pin_start: Offsets, pin_name: Ids, pin_names: Sequence[str], cells: int
) -> Iterator[PinRows]:
    """Yield every cell that has instances, by ascending id.

    Args:
        cell: Shape (n,), cell id of each instance.
        pin_start: Shape (n + 1,), pin rows of each instance.
        pin_name: Shape (m,), ids into ``pin_names``.
        pin_names: Names.
        cells: Number of cell ids.
    """
    start, order = grouped(cell, cells)
    for number in np.flatnonzero(np.diff(start)).tolist():
        instances = order[start[number] : start[number + 1]]
        rows = members(pin_start, instances)
        counts = pin_start[instances + 1] - pin_start[instances]
        owner = np.repeat(np.arange(len(instances)), counts)
        names = pin_name[rows]
        found: dict[str, Offsets] = {}
        for name in np.unique(names).tolist():
            here = names == name
            column = np.full(len(instances), -1, np.int64)
            column[owner[here]] = rows[here]
            found[pin_names[name]] = column
        yield PinRows(number, instances, found)
