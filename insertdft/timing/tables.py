"""Many two-dimensional tables looked up at once: bilinear inside, carried on straight outside.

A table of one axis, or of one value, is a table that does not depend on the rest. Axes come in the
order the caller wants, whatever the library wrote; an axis that is only numbered counts in the
order written. Of a third axis the first entry is taken.

Source: Liberty, nonlinear delay model; bilinear interpolation and extrapolation as its reference
manual has it (from memory). Checked in tests/timing against scipy's interpolator.
"""

from collections.abc import Sequence
from dataclasses import dataclass, field
from math import prod

import numpy as np
import numpy.typing as npt

from insertdft.library import Table
from insertdft.netlist import Ids

Floats = npt.NDArray[np.float64]

#: Axis names that mean the same thing.
_SAME: dict[str, str] = {
    "input_transition_time": "input_net_transition",
}


@dataclass(frozen=True, slots=True, eq=False)
class Stack:
    """Tables of different sizes, padded to one.

    Attributes:
        first: Shape (tables, a), values of the first axis, padded with infinity.
        second: Shape (tables, b), values of the second axis, padded with infinity.
        first_size: Shape (tables,), entries of the first axis, 1 or more.
        second_size: Shape (tables,), entries of the second axis.
        values: Shape (tables, a, b), padded with 0.
    """

    first: Floats = field(repr=False)
    second: Floats = field(repr=False)
    first_size: Ids = field(repr=False)
    second_size: Ids = field(repr=False)
    values: Floats = field(repr=False)

    def look_up(self, table: Ids, first: Floats, second: Floats) -> Floats:
        """Return the value of each ``table`` at (``first``, ``second``), all shaped alike.

        A table number of -1 gives 0.
        """
        known = np.maximum(table, 0)
        i, s = _place(self.first[known], self.first_size[known], first)
        j, t = _place(self.second[known], self.second_size[known], second)
        # A single entry has no next one; its weight is 0, so any will do.
        i2, j2 = i + (self.first_size[known] > 1), j + (self.second_size[known] > 1)
        low = self.values[known, i, j] * (1 - t) + self.values[known, i, j2] * t
        high = self.values[known, i2, j] * (1 - t) + self.values[known, i2, j2] * t
        found: Floats = np.where(table >= 0, low * (1 - s) + high * s, 0.0)
        return found


def _place(axis: Floats, size: Ids, value: Floats) -> tuple[Ids, Floats]:
    """Return the interval of ``axis`` to use for each value, and how far along it the value is."""
    rows = np.arange(len(value))
    interval = np.clip((axis <= value[:, None]).sum(axis=1) - 1, 0, np.maximum(size - 2, 0))
    low = axis[rows, interval]
    high = axis[rows, np.minimum(interval + 1, size - 1)]
    width = np.where(size > 1, high - low, 1.0)
    return interval.astype(np.int32), np.where(size > 1, (value - low) / width, 0.0)


class Stacker:
    """Tables collected one by one into a ``Stack``, each object once."""

    def __init__(self, first_axis: str, second_axis: str) -> None:
        """Take the names of the axes in the order of look-ups."""
        self._axes = (first_axis, second_axis)
        self._tables: list[tuple[Floats, Floats, Floats]] = []
        self._number: dict[int, int] = {}
        self._kept: list[Table] = []  # keeps ids alive

    def add(self, table: Table | None) -> int:
        """Return the number of a table, -1 for none or one without values."""
        if table is None or not table.values:
            return -1
        if id(table) not in self._number:
            self._number[id(table)] = len(self._tables)
            self._kept.append(table)
            self._tables.append(_two_axes(table, self._axes))
        return self._number[id(table)]

    def stack(self) -> Stack:
        """Return all tables."""
        tables = self._tables or [(np.zeros(1), np.zeros(1), np.zeros((1, 1)))]
        a = max(len(first) for first, _, _ in tables)
        b = max(len(second) for _, second, _ in tables)
        firsts = np.full((len(tables), a), np.inf)
        seconds = np.full((len(tables), b), np.inf)
        values = np.zeros((len(tables), a, b))
        for number, (first, second, inside) in enumerate(tables):
            firsts[number, : len(first)] = first
            seconds[number, : len(second)] = second
            values[number, : len(first), : len(second)] = inside
        return Stack(
            firsts,
            seconds,
            np.array([len(first) for first, _, _ in tables], np.int32),
            np.array([len(second) for _, second, _ in tables], np.int32),
            values,
        )


def _two_axes(table: Table, axes: tuple[str, str]) -> tuple[Floats, Floats, Floats]:
    sizes = [len(index) for index in table.indices]
    if prod(sizes) != len(table.values):
        sizes = [1]  # a scalar, or text that does not add up: its first value
    values = np.array(table.values[: prod(sizes)]).reshape(sizes)
    places = _axis_places(table.axes[: len(sizes)], axes) if table.axes else (None, None)
    picked = [place for place in places if place is not None]
    others = [place for place in range(values.ndim) if place not in picked]
    plane = values.transpose(*picked, *others)
    while plane.ndim > len(picked):
        plane = plane[..., 0]
    index = [np.zeros(1) if place is None else np.array(table.indices[place]) for place in places]
    return index[0], index[1], plane.reshape(len(index[0]), len(index[1]))


def _axis_places(written: Sequence[str], axes: tuple[str, str]) -> tuple[int | None, int | None]:
    """Return where each wanted axis stands among those written, None where it does not."""
    names = [_SAME.get(name, name) for name in written]
    numbered = [name.startswith("index_") for name in names]
    first, second = (names.index(axis) if axis in names else None for axis in axes)
    if first is None and second is None and numbered and all(numbered):
        return 0, 1 if len(names) > 1 else None
    return first, second
