"""How many chains each group gets, and which items go into which chain."""

import heapq
from collections.abc import Sequence
from itertools import pairwise


def allot(sizes: Sequence[int], chains: int) -> list[int]:
    """Return how many of ``chains`` each group gets so that the longest chain is shortest.

    Every group gets one; each further chain goes to the group whose chains are longest, which is
    optimal because a group's longest chain never grows when it is given one more.

    Args:
        sizes: Total length of each group in shift cycles, each 1 or more.
        chains: At least one a group.

    Raises:
        ValueError: Fewer chains than groups, or an empty group.
    """
    if chains < len(sizes) or min(sizes, default=1) < 1:
        raise ValueError(f"cannot give {chains} chains to groups of {list(sizes)}")
    counts = [1] * len(sizes)
    heap = [(-size, number) for number, size in enumerate(sizes)]
    heapq.heapify(heap)
    for _ in range(chains - len(sizes)):
        _, number = heap[0]
        counts[number] += 1
        heapq.heapreplace(heap, (-_up(sizes[number], counts[number]), number))
    return counts


def _up(total: int, parts: int) -> int:
    return -(-total // parts)


def deal(lengths: Sequence[int], chains: int) -> list[list[int]]:
    """Deal items that stand in a meaningful order into chains: short first, then neighbours near.

    Two ways are tried. *Cutting* keeps the order and cuts it where the longest piece comes out
    shortest. *Packing* gives the long items, longest first, to the shortest chain so far (R. L.
    Graham, "Bounds on multiprocessing timing anomalies", SIAM J. Appl. Math. 17(2), 1969) and
    levels the rest with unit items. The way with the shorter longest chain wins, the first on a
    tie. With unit items alone, longest and shortest chain differ by one at most.

    Args:
        lengths: Length of each item in shift cycles, 1 or more, in hierarchical order.
        chains: Number of chains, 1 or more.

    Returns:
        For each chain the indices of its items, ascending. Chains can be empty only if there are
        fewer items than chains.

    Raises:
        ValueError: ``chains`` or a length is below 1.
    """
    if chains < 1 or min(lengths, default=1) < 1:
        raise ValueError(f"need chains >= 1 and lengths >= 1, got {chains} and {list(lengths)}")
    if max(lengths, default=1) == 1:
        return _even_slices(list(range(len(lengths))), chains)
    cut = _cut(lengths, chains)
    packed = _pack(lengths, chains)
    return packed if _longest(lengths, packed) < _longest(lengths, cut) else cut


def _longest(lengths: Sequence[int], dealt: list[list[int]]) -> int:
    return max(sum(lengths[item] for item in chain) for chain in dealt)


def _even_slices(items: list[int], chains: int) -> list[list[int]]:
    size, more = divmod(len(items), chains)
    bounds = [number * size + min(number, more) for number in range(chains + 1)]
    return [items[low:high] for low, high in pairwise(bounds)]


def _cut(lengths: Sequence[int], chains: int) -> list[list[int]]:
    """Cut the order into at most ``chains`` runs whose longest is as short as cutting allows."""
    low, high = max(*lengths, _up(sum(lengths), chains)), sum(lengths)
    while low < high:
        middle = (low + high) // 2
        if len(_runs(lengths, middle)) <= chains:
            high = middle
        else:
            low = middle + 1
    runs = _runs(lengths, low)
    while len(runs) < min(chains, len(lengths)):
        widest = max(
            range(len(runs)), key=lambda number: (len(runs[number]) > 1, len(runs[number]))
        )
        half = len(runs[widest]) // 2
        runs[widest : widest + 1] = [runs[widest][:half], runs[widest][half:]]
    return runs + [[] for _ in range(chains - len(runs))]


def _runs(lengths: Sequence[int], limit: int) -> list[list[int]]:
    runs: list[list[int]] = []
    room = 0
    for item, length in enumerate(lengths):
        if length > room:
            runs.append([])
            room = limit
        runs[-1].append(item)
        room -= length
    return runs


def _pack(lengths: Sequence[int], chains: int) -> list[list[int]]:
    long_items = [item for item, length in enumerate(lengths) if length > 1]
    units = [item for item, length in enumerate(lengths) if length == 1]
    dealt: list[list[int]] = [[] for _ in range(chains)]
    heap = [(0, number) for number in range(chains)]
    for item in sorted(long_items, key=lambda at: (-lengths[at], at)):
        load, number = heap[0]
        dealt[number].append(item)
        heapq.heapreplace(heap, (load + lengths[item], number))
    loads = [sum(lengths[item] for item in chain) for chain in dealt]
    at = 0
    for number, share in enumerate(_level(loads, len(units))):
        dealt[number] = sorted(dealt[number] + units[at : at + share])
        at += share
    return dealt


def _level(loads: list[int], units: int) -> list[int]:
    """Return how many of ``units`` each load gets so that the loads come out as even as can be."""
    shares = [0] * len(loads)
    order = sorted(range(len(loads)), key=lambda number: (loads[number], number))
    level, filled = loads[order[0]], 0
    while filled < len(order) and units > 0:
        filled += 1
        below = order[:filled]
        room = loads[order[filled]] - level if filled < len(order) else units
        step = min(room, units // len(below))
        for number in below:
            shares[number] += step
        level, units = level + step, units - step * len(below)
        if step < room:
            for number in below[:units]:
                shares[number] += 1
            units = 0
    return shares
