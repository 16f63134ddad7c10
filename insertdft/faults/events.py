"""Changes at joint roots followed forward, many roots at once, level by level.

Each root is changed alone, in all patterns of a block. An *event* is a slot that differs from the
fault-free value for one root; events of all roots at one level are evaluated together, function by
function. A root is done when nothing differs any more, or when all that differs is one slot that
nothing has read yet and for which it is known already in which patterns a change is seen: then the
rest is looked up (its dominator, found as it happens).

Source: parallel-pattern single-fault propagation, J. A. Waicukauski et al., ITC 1985; regions
without fan-out and stems apart, H. K. Lee, D. S. Ha, ITC 1991 (both from memory). Checked in
tests/faults against simulation of one fault at a time.
"""

from dataclasses import dataclass, field
from itertools import pairwise
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from insertdft.faults.network import Network
from insertdft.netlist import Ids
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.circuit import Group
from insertdft.simulate.levels import members
from insertdft.simulate.words import Flags, Rails, Words, differs, inverse, selected

Longs = npt.NDArray[np.int64]


class Known(NamedTuple):
    """Slots for which it is known in which patterns a change is seen.

    Attributes:
        valid: Shape (slots,).
        seen: Shape (slots, words), meaningful where valid.
    """

    valid: Flags
    seen: Words


def follow(
    network: Network, evaluator: Evaluator, values: Words, roots: Ids, known: Known
) -> Words:
    """Return for each root the patterns in which its change is seen, shape (roots, words).

    Args:
        network: Readers of every slot.
        evaluator: Functions.
        values: Fault-free values.
        roots: Slots to change.
        known: What is known already about other slots.
    """
    work = _Wave(network, evaluator, values, known, len(roots))
    start = tuple(rail[roots] for rail in values)
    numbers = np.arange(len(roots), dtype=np.int64)
    work.add(numbers, roots.astype(np.int64), inverse(start))
    for level in range(1, network.circuit.depth + 1):
        if level in work.waiting:
            work.step(level)
    return work.detected


@dataclass(slots=True, eq=False)
class _Wave:
    network: Network
    evaluator: Evaluator
    values: Words
    known: Known
    roots: int
    detected: Words = field(init=False)
    finished: Flags = field(init=False)
    #: Level -> (events, edges) that wait there.
    waiting: dict[int, list[tuple[Longs, Longs]]] = field(default_factory=dict)
    _live: Longs = field(init=False)
    _root: "_Column" = field(init=False)
    _slot: "_Column" = field(init=False)
    _value: list["_Column"] = field(init=False)

    def __post_init__(self) -> None:
        words = self.values.shape[-1]
        self.detected = np.zeros((self.roots, words), np.uint64)
        self.finished = np.zeros(self.roots, np.bool_)
        self._live = np.zeros(0, np.int64)
        self._root = _Column(np.zeros(2 * self.roots + 64, np.int64))
        self._slot = _Column(np.zeros(2 * self.roots + 64, np.int64))
        shape = (2 * self.roots + 64, words)
        self._value = [_Column(np.zeros(shape, np.uint64)) for _ in self.values]

    def add(self, root: Longs, slot: Longs, value: Rails) -> None:
        """Enter events; their readers wait at their levels."""
        events = self._root.extend(root)
        self._slot.extend(slot)
        for column, rail in zip(self._value, value, strict=True):
            column.extend(rail)
        self._live = np.concatenate((self._live, events))
        start = self.network.use_start
        edges = self.network.use_edge[members(start, slot)]
        readers = np.repeat(events, start[slot + 1] - start[slot])
        level = self.network.circuit.level[self.network.circuit.edge_node[edges]]
        order = np.argsort(level, kind="stable")
        level, edges, readers = level[order], edges[order], readers[order]
        bounds = np.flatnonzero(np.diff(level, prepend=-1)).tolist()
        for begin, end in pairwise([*bounds, len(level)]):
            here = self.waiting.setdefault(int(level[begin]), [])
            here.append((readers[begin:end], edges[begin:end]))

    def step(self, level: int) -> None:
        """Evaluate everything that waits at one level."""
        parts = self.waiting.pop(level)
        events = np.concatenate([part[0] for part in parts])
        edges = np.concatenate([part[1] for part in parts])
        going = ~self.finished[self._root.data[events]]
        events, edges = events[going], edges[going]
        if len(events):
            self._evaluate(events, edges)
        self._finish(level)

    def _evaluate(self, events: Longs, edges: Longs) -> None:
        circuit = self.network.circuit
        node = circuit.edge_node[edges].astype(np.int64)
        key = node * self.roots + self._root.data[events]
        order = np.argsort(key, kind="stable")
        events, edges, key = events[order], edges[order], key[order]
        fresh = np.diff(key, prepend=-1) != 0
        row = np.cumsum(fresh) - 1
        node, root = np.divmod(key[fresh], self.roots)
        group = self.network.group_of[node]
        bounds = [*np.flatnonzero(np.diff(group, prepend=-1)).tolist(), len(group)]
        first_edge = np.searchsorted(row, bounds).tolist()
        found: list[tuple[Longs, Longs, Rails]] = []
        for (begin, end), (low, high) in zip(pairwise(bounds), pairwise(first_edge), strict=True):
            changed = self._changed(
                circuit.groups[int(group[begin])],
                node[begin:end],
                root[begin:end],
                (events[low:high], edges[low:high], row[low:high] - begin),
            )
            found.append(changed)
        rails = zip(*(part[2] for part in found), strict=True)
        self.add(
            np.concatenate([part[0] for part in found]),
            np.concatenate([part[1] for part in found]),
            tuple(np.concatenate(rail) for rail in rails),
        )

    def _changed(
        self, group: Group, node: Longs, root: Longs, wrong: tuple[Longs, Longs, Longs]
    ) -> tuple[Longs, Longs, Rails]:
        """Return root, slot and value of the nodes of one group that change."""
        inputs = [
            [rail[slots] for rail in self.values] for slots in group.inputs[:, node - group.first]
        ]
        events, edges, row = wrong
        place = self.network.edge_input[edges]
        for number, rails in enumerate(inputs):
            here = np.flatnonzero(place == number)
            for rail, column in zip(rails, self._value, strict=True):
                rail[row[here]] = column.data[events[here]]
        result = self.evaluator.steps[group.function]([tuple(rails) for rails in inputs])
        good = tuple(rail[node] for rail in self.values)
        seen = self.network.seen[node]
        if seen.any():
            np.bitwise_or.at(self.detected, root[seen], differs(result, good)[seen])
        result = selected(self.detected[root], good, result)
        change = result[0] ^ good[0]
        for one, two in zip(result[1:], good[1:], strict=True):
            change = change | (one ^ two)
        kept = change.any(axis=-1)
        return root[kept], node[kept], tuple(rail[kept] for rail in result)

    def _finish(self, level: int) -> None:
        """Close the roots of which nothing is left, or one slot whose fate is known."""
        live = self._live
        root = self._root.data[live]
        last = self.network.last_level[self._slot.data[live]]
        going = (last > level) & ~self.finished[root]
        live, root = live[going], root[going]
        count = np.bincount(root, minlength=self.roots)
        slot = self._slot.data[live]
        alone = (
            (count[root] == 1) & self.known.valid[slot] & (self.network.next_level[slot] > level)
        )
        events, single = live[alone], slot[alone]
        if len(events):
            wrong = tuple(column.data[events] for column in self._value)
            good = tuple(rail[single] for rail in self.values)
            self.detected[root[alone]] |= differs(wrong, good) & self.known.seen[single]
            self.finished[root[alone]] = True
        self._live = live[~alone]


class _Column:
    """An array that grows."""

    __slots__ = ("_count", "data")

    def __init__(self, data: npt.NDArray[np.int64] | Words) -> None:
        self.data = data
        self._count = 0

    def extend(self, rows: npt.NDArray[np.int64] | Words) -> Longs:
        """Append rows; return their numbers."""
        begin, end = self._count, self._count + len(rows)
        if end > len(self.data):
            larger = np.zeros((max(end, 2 * len(self.data)), *self.data.shape[1:]), self.data.dtype)
            larger[:begin] = self.data[:begin]
            self.data = larger
        self.data[begin:end] = rows
        self._count = end
        return np.arange(begin, end, dtype=np.int64)
