"""Stuck-at coverage of random patterns: blocks of patterns, detected faults dropped.

One pattern loads the controlled states, sets the ports, looks at the output ports, captures once
and unloads the observed states. A fault counts as detected only where the fault-free and the faulty
value are both known and differ.
"""

from dataclasses import dataclass, field
from typing import Final

import numpy as np
import numpy.typing as npt

from insertdft.faults.access import Access
from insertdft.faults.collapse import FaultList
from insertdft.faults.network import Network, make_network
from insertdft.faults.observe import TOGETHER, Observed, observe
from insertdft.faults.sites import BLIND, PIN, PORT
from insertdft.netlist import Ids
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.words import BITS, ONES, Flags, Words, random_words

#: Words of the largest block, and of all values in it.
_WIDEST: Final = 16
_MOST_VALUES: Final = 4_000_000


@dataclass(frozen=True, slots=True, eq=False)
class Grade:
    """What a set of patterns detects, class by class of a ``FaultList``.

    Attributes:
        faults: The list.
        access: What was set and seen.
        patterns: Number of patterns.
        detected_at: Pattern (from 0) that first detects the class, -1 if none does.
        excited: Whether any pattern gave the line the value opposite to the fault's.
    """

    faults: FaultList
    access: Access
    patterns: int
    detected_at: Ids = field(repr=False)
    excited: Flags = field(repr=False)

    @property
    def detected(self) -> int:
        """Number of classes detected."""
        return int((self.detected_at >= 0).sum())

    @property
    def coverage(self) -> float:
        """Detected share of the collapsed faults, 0 to 1; 1 for an empty list."""
        return self.detected / self.faults.collapsed if self.faults.collapsed else 1.0

    def curve(self) -> npt.NDArray[np.float64]:
        """Return the coverage after 1, 2, ... patterns, shape (patterns,)."""
        hits = self.detected_at[self.detected_at >= 0]
        counts = np.bincount(hits, minlength=self.patterns)
        return np.cumsum(counts) / max(1, self.faults.collapsed)

    def undetected(self) -> Ids:
        """Return the classes not detected, ascending."""
        return np.flatnonzero(self.detected_at < 0).astype(np.int32)


def grade_random(
    faults: FaultList, access: Access, patterns: int, seed: int, chosen: Ids | None = None
) -> Grade:
    """Return what random patterns detect.

    Args:
        faults: Fault list of the access's circuit.
        access: What a test can set and see.
        patterns: Number of patterns, 0 or more.
        seed: Of the random generator; equal seeds give equal patterns for equal circuits.
        chosen: Classes to simulate (a sample); all if not given. Others count as not detected.
    """
    generator = np.random.default_rng(seed)
    grader = Grader(faults, access, chosen)
    done = 0
    for words in _block_sizes(patterns, access.circuit.slots):
        left = min(words * BITS, patterns - done)
        bits = random_words(generator, (len(access.free), words))
        grader.apply(bits, left)
        done += left
    return grader.result()


def grade_patterns(faults: FaultList, access: Access, bits: Words, patterns: int) -> Grade:
    """Return what given patterns detect: ``bits`` has a row for each slot of ``access.free``."""
    grader = Grader(faults, access)
    for begin in range(0, -(-patterns // BITS), _WIDEST):
        block = bits[:, begin : begin + _WIDEST]
        grader.apply(block, min(block.shape[1] * BITS, patterns - begin * BITS))
    return grader.result()


def sample(faults: FaultList, count: int, seed: int) -> Ids:
    """Return ``count`` classes chosen at random, ascending; all of them if there are no more."""
    if count >= faults.collapsed:
        return np.arange(faults.collapsed, dtype=np.int32)
    chosen = np.random.default_rng(seed).choice(faults.collapsed, count, replace=False)
    return np.sort(chosen).astype(np.int32)


def _block_sizes(patterns: int, slots: int) -> list[int]:
    """Return the words of each block: 1, 1, 2, 4, ... as most faults fall to the first patterns."""
    widest = max(1, min(_WIDEST, _MOST_VALUES // max(1, slots)))
    left = -(-patterns // BITS)
    sizes: list[int] = []
    while left > 0:
        size = min(widest, max(1, sum(sizes)), left)
        sizes.append(size)
        left -= size
    return sizes


class Grader:
    """Fault simulation block by block, remembering what is detected."""

    def __init__(
        self,
        faults: FaultList,
        access: Access,
        chosen: Ids | None = None,
        together: int = TOGETHER,
    ) -> None:
        """Start with nothing detected.

        Args:
            faults: Fault list of the access's circuit.
            access: What a test can set and see.
            chosen: Classes to simulate; all if not given.
            together: How many changes to follow at once; only speed depends on it.
        """
        self._together = together
        self._faults, self._access = faults, access
        self._network: Network = make_network(access)
        self._evaluator = Evaluator(access.circuit, 2 if len(access.unknown) else 1)
        self._patterns = 0
        self._detected_at = np.full(faults.collapsed, -1, np.int32)
        self._excited = np.zeros(faults.collapsed, np.bool_)
        waiting = np.arange(faults.collapsed) if chosen is None else chosen
        self._waiting = waiting.astype(np.int32)

    def apply(self, bits: Words, patterns: int) -> None:
        """Simulate one block.

        Args:
            bits: Shape (len(access.free), words).
            patterns: How many of its bits count, from the first.
        """
        values = self._evaluator.blank(bits.shape[1])
        self._evaluator.put(values, self._access.free, bits)
        for slot, value in self._access.held.items():
            self._evaluator.put(values, [slot], np.full((1, 1), ONES if value else 0, np.uint64))
        self._evaluator.run(values)
        self._drop(values, _first_bits(patterns, bits.shape[1]))
        self._patterns += patterns

    def result(self) -> Grade:
        """Return what was detected so far."""
        return Grade(
            self._faults,
            self._access,
            self._patterns,
            self._detected_at.copy(),
            self._excited.copy(),
        )

    def _drop(self, values: Words, mask: Words) -> None:
        sites = self._faults.sites
        fault = self._faults.first[self._waiting]
        site, stuck = np.divmod(fault, 2)
        at = np.where(
            sites.kind[site] == PIN, sites.circuit.edge_node[sites.edge[site]], sites.slot[site]
        )
        wanted = np.zeros(sites.circuit.slots, np.bool_)
        wanted[self._network.root[at]] = True
        found = observe(self._network, self._evaluator, values, wanted, self._together)
        opposite = _opposite(values, sites.slot[site], stuck) & mask
        seen = _seen(self._network, found, sites.kind[site], sites.slot[site], sites.edge[site])
        hits = opposite & seen
        self._excited[self._waiting[opposite.any(axis=-1)]] = True
        hit = hits.any(axis=-1)
        self._detected_at[self._waiting[hit]] = self._patterns + first_one(hits[hit])
        self._waiting = self._waiting[~hit]


def _opposite(values: Words, slots: Ids, stuck: Ids) -> Words:
    """Return where the line surely has the value that the fault forbids."""
    zero = values[1] if len(values) == 2 else np.bitwise_not(values[0])
    found: Words = np.where((stuck == 1)[:, None], zero[slots], values[0][slots])
    return found


def _seen(network: Network, found: Observed, kind: Ids, slot: Ids, edge: Ids) -> Words:
    seen = np.where((kind == PIN)[:, None], found.edge[edge], found.slot[slot])
    port = kind == PORT
    seen[port] = np.where(network.seen[slot[port]], ONES, np.uint64(0))[:, None]
    seen[kind == BLIND] = 0
    return seen


def _first_bits(count: int, words: int) -> Words:
    mask = np.zeros(words, np.uint64)
    mask[: count // BITS] = ONES
    if count % BITS:
        mask[count // BITS] = np.uint64((1 << (count % BITS)) - 1)
    return mask


def first_one(words: Words) -> Ids:
    """Return the number of the first 1 bit of each row; every row has one."""
    place = (words != 0).argmax(axis=-1)
    word = words[np.arange(len(words)), place]
    lowest = word & (~word + np.uint64(1))
    bit = np.zeros(len(words), np.int64)
    for step in (32, 16, 8, 4, 2, 1):
        high = lowest >= (np.uint64(1) << np.uint64(step))
        lowest = np.where(high, lowest >> np.uint64(step), lowest)
        bit += np.where(high, step, 0)
    found: Ids = (place * BITS + bit).astype(np.int32)
    return found
