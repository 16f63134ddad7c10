"""Which two system latches share a shift-register latch in the L1/L2* form.

In a single-latch design every system latch becomes an L1 and needs an L2 for shifting alone. The
L1/L2* form (S. DasGupta, P. Goel, R. G. Walther, T. W. Williams, ITC 1982, from memory) saves it:
a latch of another phase, given a second port, is the L2. Each pair saves one latch. As many pairs
as possible are made; among those, the nearest in the hierarchy, as the two are wired together.

Few latches are matched exactly (networkx, blossom algorithm). Many are paired bottom-up: inside
each module first, then what is left over one level up, always between the two phases with most
left; at the end pairs are opened where that makes room for two. Without forbidden pairs that makes
as many pairs as there can be, in time that grows with the number of latches.
"""

import heapq
from collections import defaultdict, deque
from collections.abc import Collection, Iterable, Iterator, Sequence
from dataclasses import dataclass, field
from typing import Final, NamedTuple

import networkx as nx

#: Latches that are matched exactly; the time grows with the third power.
MOST_EXACT: Final = 40
#: Partners that are tried for a latch whose nearest are forbidden.
_MOST_TRIES: Final = 64


class SystemLatch(NamedTuple):
    """A latch that could share a shift-register latch.

    Attributes:
        number: Its id, unique.
        path: Instance names from the top down to the module that holds it.
        phase: What opens it; latches of one phase are never paired.
    """

    number: int
    path: tuple[str, ...]
    phase: str


@dataclass(frozen=True, slots=True)
class Pairing:
    """Who shares.

    Attributes:
        pairs: Ids of (L1, L2*): the first of the phase that comes first among the latches given.
        unpaired: Ids of latches that need an L2 of their own.
    """

    pairs: tuple[tuple[int, int], ...] = field(repr=False)
    unpaired: tuple[int, ...] = field(repr=False)

    @property
    def saved(self) -> int:
        """Return how many L2 the pairs save."""
        return len(self.pairs)


def pair_latches(
    latches: Sequence[SystemLatch], forbidden: Collection[tuple[int, int]] = ()
) -> Pairing:
    """Return as many pairs of latches of different phases as possible, the nearest first.

    Args:
        latches: In source order.
        forbidden: Pairs of ids, in either order, that must not share (because they feed the same
            logic, for example: one load gives both the same value). With many latches and many
            such pairs the number of pairs may fall short of the largest possible.
    """
    barred = {frozenset(pair) for pair in forbidden}
    small = len(latches) <= MOST_EXACT
    found = _exact(latches, barred) if small else _bottom_up(latches, barred)
    return _in_order(latches, found)


def distance(one: SystemLatch, two: SystemLatch) -> int:
    """Return the number of steps up and down the hierarchy from one latch to the other."""
    common = 0
    for first, second in zip(one.path, two.path, strict=False):
        if first != second:
            break
        common += 1
    return len(one.path) + len(two.path) - 2 * common


_Barred = set[frozenset[int]]
_Pairs = Iterable[tuple[SystemLatch, SystemLatch]]


def _exact(latches: Sequence[SystemLatch], barred: _Barred) -> _Pairs:
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(len(latches)))
    graph.add_weighted_edges_from(
        (at, other, -distance(latches[at], latches[other]))
        for at in range(len(latches))
        for other in range(at + 1, len(latches))
        if _may(latches[at], latches[other], barred)
    )
    matched = nx.max_weight_matching(graph, maxcardinality=True)
    return [(latches[at], latches[other]) for at, other in matched]


def _may(one: SystemLatch, two: SystemLatch, barred: _Barred) -> bool:
    if one.phase == two.phase:
        return False
    return not barred or frozenset((one.number, two.number)) not in barred


def _bottom_up(latches: Sequence[SystemLatch], barred: _Barred) -> _Pairs:
    waiting: defaultdict[tuple[str, ...], list[SystemLatch]] = defaultdict(list)
    for latch in latches:
        waiting[latch.path].append(latch)
    by_depth: defaultdict[int, dict[tuple[str, ...], None]] = defaultdict(dict)
    for path in waiting:
        for depth in range(len(path) + 1):
            by_depth[depth][path[:depth]] = None
    pairs: list[tuple[SystemLatch, SystemLatch]] = []
    left: list[SystemLatch] = []
    for depth in sorted(by_depth, reverse=True):
        for path in by_depth[depth]:
            made, left = _pair_here(waiting.pop(path, []), barred)
            pairs += made
            if depth:
                waiting[path[:-1]] += left
    return _make_room(pairs, left, barred)


def _pair_here(
    latches: list[SystemLatch], barred: _Barred
) -> tuple[list[tuple[SystemLatch, SystemLatch]], list[SystemLatch]]:
    """Pair latches of one place, always from the two phases with most left."""
    by_phase: dict[str, deque[SystemLatch]] = {}
    for latch in latches:
        by_phase.setdefault(latch.phase, deque()).append(latch)
    heap = [(-len(those), order, phase) for order, (phase, those) in enumerate(by_phase.items())]
    heapq.heapify(heap)
    pairs: list[tuple[SystemLatch, SystemLatch]] = []
    left: list[SystemLatch] = []
    while len(heap) > 1:
        one, two = heapq.heappop(heap), heapq.heappop(heap)
        latch = by_phase[one[2]].popleft()
        partner = _take(by_phase[two[2]], latch, barred)
        if partner is None:
            left.append(latch)
        else:
            pairs.append((latch, partner))
        for _, order, phase in (one, two):
            if by_phase[phase]:
                heapq.heappush(heap, (-len(by_phase[phase]), order, phase))
    left += [latch for those in by_phase.values() for latch in those]
    return pairs, left


def _take(those: deque[SystemLatch], latch: SystemLatch, barred: _Barred) -> SystemLatch | None:
    """Take the first of ``those`` that may be paired with ``latch``, among a few."""
    for place in range(min(len(those), _MOST_TRIES)):
        if _may(latch, those[place], barred):
            found = those[place]
            del those[place]
            return found
    return None


def _make_room(
    pairs: list[tuple[SystemLatch, SystemLatch]], left: list[SystemLatch], barred: _Barred
) -> _Pairs:
    """Open pairs so that two latches left over find a partner each."""
    spare = deque(left)
    for pair in pairs:
        if len(spare) > 1:
            made = _split(pair, spare, barred)
            if made:
                yield from made
                continue
        yield pair


def _split(
    pair: tuple[SystemLatch, SystemLatch], spare: deque[SystemLatch], barred: _Barred
) -> list[tuple[SystemLatch, SystemLatch]]:
    first = _take(spare, pair[0], barred)
    if first is None:
        return []
    second = _take(spare, pair[1], barred)
    if second is None:
        spare.appendleft(first)
        return []
    return [(pair[0], first), (pair[1], second)]


def _in_order(latches: Sequence[SystemLatch], found: _Pairs) -> Pairing:
    place = {latch.number: at for at, latch in enumerate(latches)}
    phases = {phase: at for at, phase in enumerate(dict.fromkeys(latch.phase for latch in latches))}

    def sorted_pairs() -> Iterator[tuple[int, int]]:
        for pair in found:
            one, two = sorted(pair, key=lambda latch: phases[latch.phase])
            yield one.number, two.number

    pairs = sorted(sorted_pairs(), key=lambda pair: min(place[pair[0]], place[pair[1]]))
    paired = {number for pair in pairs for number in pair}
    unpaired = tuple(latch.number for latch in latches if latch.number not in paired)
    return Pairing(tuple(pairs), unpaired)
