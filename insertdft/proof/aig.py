"""And-inverter graph as arrays, built a batch at a time and shared by everything that is compared.

A *literal* is ``2 * node + inverted``; node 0 is the constant, so literal 0 is false and 1 is true.
Equal functions of equal operands get equal literals (structural hashing), which alone settles most
of a comparison of two netlists that are alike. The graph and its hashing are common practice
(A. Kuehlmann, F. Krohm, "Equivalence checking using cuts and heaps", DAC 1997, from memory).
"""

from typing import Final

import numpy as np
import numpy.typing as npt

Lits = npt.NDArray[np.int32]
Words = npt.NDArray[np.uint64]

FALSE: Final = 0
TRUE: Final = 1

_MIX: Final = np.uint64(0x9E3779B97F4A7C15)


class Aig:
    """A growing graph; nodes are never removed and every operand comes before its node."""

    def __init__(self) -> None:
        """Hold the constant alone."""
        self.count = 1
        self._left = np.zeros(1 << 12, np.int32)
        self._right = np.zeros(1 << 12, np.int32)
        self._level = np.zeros(1 << 12, np.int32)
        self._left[0] = -1
        self._keys = np.zeros(1 << 13, np.int64)
        self._nodes = np.zeros(1 << 13, np.int32)
        self._claims = np.zeros(1 << 13, np.int32)
        self._ands = 0

    @property
    def left(self) -> Lits:
        """Shape (count,), first operand of each node; -1 for the constant and for variables."""
        return self._left[: self.count]

    @property
    def right(self) -> Lits:
        """Shape (count,), second operand of each node; -1 for variables."""
        return self._right[: self.count]

    @property
    def level(self) -> Lits:
        """Shape (count,), 0 for the constant and variables, else one above the operands."""
        return self._level[: self.count]

    def variables(self, count: int) -> Lits:
        """Return the literals of ``count`` new variables."""
        first = self._grow(count)
        self._left[first : self.count] = -1
        self._right[first : self.count] = -1
        return (np.arange(first, self.count, dtype=np.int32) << 1).astype(np.int32)

    def variable(self) -> int:
        """Return the literal of one new variable."""
        return int(self.variables(1)[0])

    def conj(self, one: Lits, other: Lits) -> Lits:
        """Return ``one AND other``, element by element."""
        low, high = np.minimum(one, other), np.maximum(one, other)
        # low is 0 or the inverse of high: false. low is 1 or equal to high: the other one.
        result = np.where((low == FALSE) | (low ^ 1 == high), FALSE, high).astype(np.int32)
        rest = np.flatnonzero((low > TRUE) & (low >> 1 != high >> 1))
        if len(rest):
            result[rest] = self._looked_into(low[rest], high[rest])
        return result

    def _looked_into(self, low: Lits, high: Lits) -> Lits:
        """Return the AND of different nodes, the operands of each being looked at.

        With x and y = p q: x y is y if x is p, and false if x is p inverted. With y = (p q)
        inverted: x y is x if x is p inverted, and x and not q if x is p.
        """
        found = np.full(len(low), -1, np.int32)
        for x, y in ((low, high), (high, low)):
            p, q = self._left[y >> 1], self._right[y >> 1]
            same, opposite = (p == x) | (q == x), (p == x ^ 1) | (q == x ^ 1)
            turned = (y & 1) == 1
            known = found >= 0
            found = np.where(~known & same & ~turned, y, found)
            found = np.where(~known & opposite & ~turned, FALSE, found)
            found = np.where(~known & opposite & turned, x, found)
            shorter = np.flatnonzero((found < 0) & same & turned)
            if len(shorter):
                other = np.where(p == x, q, p)[shorter] ^ 1
                found[shorter] = self.conj(x[shorter], other)
        left = np.flatnonzero(found < 0)
        if len(left):
            found[left] = self._hashed(low[left], high[left]) << 1
        answer: Lits = found.astype(np.int32)
        return answer

    def disj(self, one: Lits, other: Lits) -> Lits:
        """Return ``one OR other``."""
        found: Lits = self.conj(one ^ 1, other ^ 1) ^ 1
        return found

    def parity(self, one: Lits, other: Lits) -> Lits:
        """Return ``one XOR other``."""
        turned = (one ^ other) & 1
        one, other = one & ~1, other & ~1
        both, none = self.conj(one, other), self.conj(one ^ 1, other ^ 1)
        found: Lits = self.conj(both ^ 1, none ^ 1) ^ turned
        return found

    def choose(self, select: Lits, when1: Lits, when0: Lits) -> Lits:
        """Return ``select ? when1 : when0``."""
        chosen = self.disj(self.conj(select, when1), self.conj(select ^ 1, when0))
        found: Lits = np.where(when1 == when0, when1, chosen).astype(np.int32)
        return found

    def _hashed(self, low: Lits, high: Lits) -> Lits:
        """Return the node of each pair, made where there is none; pairs may repeat."""
        while self._ands + len(low) > len(self._keys) // 2:
            self._rehash()
        keys = (low.astype(np.int64) << 32) | high
        mask = np.uint64(len(self._keys) - 1)
        slots = _slots(keys, mask)
        nodes = np.zeros(len(keys), np.int32)
        open_ = np.arange(len(keys))
        while len(open_):
            at = slots[open_]
            free = open_[self._keys[at] == 0]
            if len(free):
                self._claim(free, keys, slots, low, high)
            hit = self._keys[at] == keys[open_]
            nodes[open_[hit]] = self._nodes[at[hit]]
            open_ = open_[~hit]
            slots[open_] = (slots[open_] + 1) & int(mask)
        return nodes

    def _claim(
        self,
        free: npt.NDArray[np.int64],
        keys: npt.NDArray[np.int64],
        slots: npt.NDArray[np.int64],
        low: Lits,
        high: Lits,
    ) -> None:
        """Give each free slot to one of the pairs that want it."""
        at = slots[free]
        self._claims[at] = free
        owners = free[self._claims[at] == free]
        first = self._grow(len(owners))
        made = np.arange(first, self.count, dtype=np.int32)
        self._left[first : self.count] = low[owners]
        self._right[first : self.count] = high[owners]
        operands = self._level[low[owners] >> 1], self._level[high[owners] >> 1]
        self._level[first : self.count] = np.maximum(*operands) + 1
        self._keys[slots[owners]] = keys[owners]
        self._nodes[slots[owners]] = made
        self._ands += len(owners)

    def _grow(self, count: int) -> int:
        first = self.count
        self.count += count
        if self.count > len(self._left):
            size = max(self.count, 2 * len(self._left))
            for name in ("_left", "_right", "_level"):
                old = getattr(self, name)
                new = np.zeros(size, np.int32)
                new[: len(old)] = old
                setattr(self, name, new)
        return first

    def _rehash(self) -> None:
        size = 2 * len(self._keys)
        used = np.flatnonzero(self._keys)
        keys, nodes = self._keys[used], self._nodes[used]
        self._keys = np.zeros(size, np.int64)
        self._nodes = np.zeros(size, np.int32)
        self._claims = np.zeros(size, np.int32)
        slots = _slots(keys, np.uint64(size - 1))
        open_ = np.arange(len(keys))
        while len(open_):
            at = slots[open_]
            free = self._keys[at] == 0
            self._claims[at[free]] = open_[free]
            placed = free & (self._claims[at] == open_)
            self._keys[at[placed]] = keys[open_[placed]]
            self._nodes[at[placed]] = nodes[open_[placed]]
            open_ = open_[~placed]
            slots[open_] = (slots[open_] + 1) & (size - 1)


def _slots(keys: npt.NDArray[np.int64], mask: np.uint64) -> npt.NDArray[np.int64]:
    mixed = keys.astype(np.uint64) * _MIX
    return ((mixed >> np.uint64(29)) & mask).astype(np.int64)


def cone(aig: Aig, roots: Lits) -> Lits:
    """Return the nodes that the literals ``roots`` depend on, themselves included, ascending."""
    seen = np.zeros(aig.count, np.bool_)
    front = np.unique(roots >> 1)
    seen[front] = True
    left, right = aig.left, aig.right
    while len(front):
        inner = front[left[front] >= 0]
        operands = np.concatenate((left[inner], right[inner])) >> 1
        front = np.unique(operands[~seen[operands]])
        seen[front] = True
    return np.flatnonzero(seen).astype(np.int32)


def simulate(aig: Aig, nodes: Lits, sources: Words, width: int) -> Words:
    """Return the values of ``nodes`` (a cone), shape (len(nodes), width).

    Args:
        aig: The graph.
        nodes: As ``cone`` returns them.
        sources: Values of the variables among ``nodes``, in order, shape (variables, width).
        width: Words a node.
    """
    place = np.zeros(aig.count, np.int32)
    place[nodes] = np.arange(len(nodes), dtype=np.int32)
    values = np.zeros((len(nodes), width), np.uint64)
    is_source = (aig.left[nodes] < 0) & (nodes > 0)
    values[is_source] = sources
    inner = np.flatnonzero(aig.left[nodes] >= 0)
    order = inner[np.argsort(aig.level[nodes[inner]], kind="stable")]
    levels = aig.level[nodes[order]]
    bounds = np.flatnonzero(np.diff(levels)) + 1
    for rows in np.split(order, bounds):
        if len(rows):
            one, other = aig.left[nodes[rows]], aig.right[nodes[rows]]
            values[rows] = _read(values, place, one) & _read(values, place, other)
    return values


def _read(values: Words, place: Lits, lits: Lits) -> Words:
    flip = (-(lits & 1).astype(np.int64)).astype(np.uint64)
    found: Words = values[place[lits >> 1]] ^ flip[:, None]
    return found


def read(values: Words, nodes: Lits, lits: Lits) -> Words:
    """Return the values of literals from ``simulate``'s result over ``nodes``."""
    rows = np.searchsorted(nodes, lits >> 1)
    flip = (-(lits & 1).astype(np.int64)).astype(np.uint64)
    found: Words = values[rows] ^ flip[:, None]
    return found
