"""Arrange convertible cells into chains, hierarchy and balance considered together."""

from collections import defaultdict
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.chains.balance import allot, deal
from insertdft.chains.regions import FixedSegment, Hierarchy, Item
from insertdft.netlist import Ids

#: How much finer the segments of repeated modules are made, at the most, for better balance.
FINEST: Final = 16
#: Imbalance that is not worth more ports: this share of the lower bound.
TOLERATED: Final = 0.01


@dataclass(frozen=True, slots=True, eq=False)
class Cells:
    """Convertible cells, each known by its flat leaf id.

    Attributes:
        leaves: Shape (c,), ascending.
        group: Shape (leaves of the design,), clock group of each convertible leaf, else -1.
        bits: Shape (leaves of the design,), shift cycles of each convertible leaf, else 0.
        followers: Leaves that come with a convertible leaf; they are not in ``leaves``.
    """

    leaves: Ids = field(repr=False)
    group: Ids = field(repr=False)
    bits: Ids = field(repr=False)
    followers: Mapping[int, tuple[int, ...]] = field(default_factory=dict, repr=False)


@dataclass(frozen=True, slots=True, eq=False)
class Arrangement:
    """Chains of the top region and the fixed segments of all others.

    Attributes:
        chains: (group, items) of each chain, groups together.
        fixed: Segments of each repeated module.
        lower_bound: No arrangement with as many chains can have a shorter longest chain.
        longest: Length of the longest chain.
    """

    chains: tuple[tuple[int, tuple[Item, ...]], ...]
    fixed: dict[str, tuple[FixedSegment, ...]]
    lower_bound: int
    longest: int


def arrange(cells: Cells, layout: Hierarchy, counts: Sequence[int]) -> Arrangement:
    """Return the arrangement with the fewest module ports that is balanced well.

    Args:
        cells: What goes into chains; at least one.
        layout: The hierarchy.
        counts: Number of chains of each group.
    """
    totals = np.bincount(
        cells.group[cells.leaves], weights=cells.bits[cells.leaves], minlength=len(counts)
    ).astype(int)
    bound = max(-(-int(total) // count) for total, count in zip(totals, counts, strict=True))
    best: Arrangement | None = None
    finer = 1
    while finer <= FINEST:
        found = _arrange(cells, layout, counts, max(1, -(-bound // finer)), bound)
        if best is None or found.longest < best.longest:
            best = found
        if best.longest <= bound + max(1, int(bound * TOLERATED)) or not layout.repeated:
            break
        finer *= 2
    if best is None:
        raise RuntimeError("no arrangement was tried")
    return best


def chain_counts(sizes: Sequence[int], chains: int | None, max_length: int | None) -> list[int]:
    """Return the number of chains of each group of ``sizes`` shift cycles.

    Raises:
        ValueError: Fewer chains than groups.
    """
    if max_length is not None:
        needed = [-(-size // max_length) for size in sizes]
        if chains is None or sum(needed) >= chains:
            return needed
    return allot(sizes, chains or len(sizes))


def _arrange(
    cells: Cells, layout: Hierarchy, counts: Sequence[int], piece: int, bound: int
) -> Arrangement:
    fixed: dict[str, tuple[FixedSegment, ...]] = {}
    for module in _inner_first(layout):
        fixed[module] = _fix(cells, layout, fixed, module, piece)
    by_group: defaultdict[int, list[Item]] = defaultdict(list)
    for item, groups in _items(cells, layout, fixed, layout.occurrences[0].module):
        by_group[groups[0]].append(item)
    chains: list[tuple[int, tuple[Item, ...]]] = []
    for group, count in enumerate(counts):
        items = by_group[group]
        dealt = deal([item.length for item in items], min(count, len(items)))
        chains += [(group, tuple(items[number] for number in chain)) for chain in dealt]
    longest = max(sum(item.length for item in items) for _, items in chains)
    return Arrangement(tuple(chains), fixed, bound, longest)


def _inner_first(layout: Hierarchy) -> list[str]:
    """Return repeated modules so that each comes after those instanced below it."""
    deepest = {module: max(places) for module, places in layout.places.items()}
    # Occurrences are in preorder: a module's last place comes before the places below it.
    return sorted(layout.repeated, key=lambda module: -deepest[module])


def _fix(
    cells: Cells,
    layout: Hierarchy,
    fixed: dict[str, tuple[FixedSegment, ...]],
    module: str,
    piece: int,
) -> tuple[FixedSegment, ...]:
    by_groups: defaultdict[tuple[int, ...], list[Item]] = defaultdict(list)
    for item, groups in _items(cells, layout, fixed, module):
        by_groups[groups].append(item)
    found: list[FixedSegment] = []
    for groups, items in by_groups.items():
        total = sum(item.length for item in items)
        for chain in deal([item.length for item in items], min(-(-total // piece), len(items))):
            chosen = tuple(items[number] for number in chain)
            found.append(FixedSegment(chosen, sum(item.length for item in chosen), groups))
    return tuple(found)


def _items(
    cells: Cells, layout: Hierarchy, fixed: dict[str, tuple[FixedSegment, ...]], module: str
) -> list[tuple[Item, tuple[int, ...]]]:
    """Return the items of a region in its first place, and their groups in all its places."""
    places = layout.places[module]
    base = places[0]
    found: list[tuple[Item, tuple[int, ...]]] = []
    shifts = [layout.occurrences[at].first - layout.occurrences[base].first for at in places]
    for occurrence, leaf in layout.items(base, cells.leaves):
        if leaf >= 0:
            groups = tuple(int(cells.group[leaf + shift]) for shift in shifts)
            behind = cells.followers.get(leaf, ())
            found.append((Item(occurrence, leaf, int(cells.bits[leaf]), -1, behind), groups))
        else:
            found += _inner_items(layout, fixed, places, occurrence)
    return found


def _inner_items(
    layout: Hierarchy,
    fixed: dict[str, tuple[FixedSegment, ...]],
    places: list[int],
    occurrence: int,
) -> list[tuple[Item, tuple[int, ...]]]:
    place = layout.occurrences[occurrence]
    number_of = {at: number for number, at in enumerate(layout.places[place.module])}
    mine = [number_of[occurrence + at - places[0]] for at in places]
    return [
        (
            Item(place.parent, number, segment.length, occurrence),
            tuple(segment.groups[at] for at in mine),
        )
        for number, segment in enumerate(fixed[place.module])
    ]
