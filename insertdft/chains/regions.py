"""Divide the hierarchy into regions: parts whose cells may be put into chains freely.

A module that one statement alone instances belongs to the region of its parent: its cells are
free to go into any chain, in any number of pieces. A module that several statements instance is
edited once for all of them, so it is a region of its own, with fixed segments that are alike in
every place it stands.
"""

from collections import defaultdict
from collections.abc import Iterator, Sequence
from dataclasses import dataclass, field
from typing import NamedTuple

import numpy as np

from insertdft.design.flat import Design, Occurrence
from insertdft.netlist import Ids


class Item(NamedTuple):
    """Something that goes into a chain as a whole: a cell, or a segment of an inner region.

    Attributes:
        occurrence: Where it stands, in the region's first place.
        number: Flat leaf instance, or index of the inner region's segment.
        length: Shift cycles.
        inner: Occurrence of the inner region, -1 for a cell.
        followers: Flat leaves that come with the cell, in order (the slave of a latch pair).
    """

    occurrence: int
    number: int
    length: int
    inner: int
    followers: tuple[int, ...] = ()


@dataclass(frozen=True, slots=True)
class FixedSegment:
    """A segment of a region that is not the top.

    Attributes:
        items: In shift order.
        length: Their sum.
        groups: Group of the segment in each place of the region, in order of occurrences.
    """

    items: tuple[Item, ...]
    length: int
    groups: tuple[int, ...]


@dataclass(frozen=True, slots=True, eq=False)
class Hierarchy:
    """The occurrences of a design, indexed for planning.

    Attributes:
        occurrences: Of the design.
        end: Shape (occurrences,), one past the last occurrence below each (preorder).
        leaf_end: Shape (occurrences,), one past the last leaf of each occurrence itself.
        places: Occurrences of each module, ascending.
        repeated: Modules that several statements instance.
    """

    occurrences: Sequence[Occurrence] = field(repr=False)
    end: Sequence[int] = field(repr=False)
    leaf_end: Sequence[int] = field(repr=False)
    places: dict[str, list[int]]
    repeated: frozenset[str]

    def items(self, place: int, convertible: Ids) -> Iterator[tuple[int, int]]:
        """Yield what the region at ``place`` holds, in hierarchical order.

        A convertible leaf comes as (occurrence, leaf), an inner region as (occurrence, -1).

        Args:
            place: Occurrence of the region's root.
            convertible: Shape (c,), flat leaves that will be converted, ascending.
        """
        at = place
        while at < self.end[place]:
            if at != place and self.occurrences[at].module in self.repeated:
                yield at, -1
                at = self.end[at]
                continue
            first, last = self.occurrences[at].first, self.leaf_end[at]
            low, high = np.searchsorted(convertible, (first, last))
            yield from ((at, leaf) for leaf in convertible[low:high].tolist())
            at += 1


def hierarchy(design: Design) -> Hierarchy:
    """Index the occurrences of ``design``."""
    occurrences = design.occurrences
    count = len(occurrences)
    end = list(range(1, count + 1))
    for number in range(count - 1, 0, -1):
        parent = occurrences[number].parent
        end[parent] = max(end[parent], end[number])
    leaf_end = [occurrences[number + 1].first for number in range(count - 1)]
    leaf_end.append(len(design.cell))
    places: defaultdict[str, list[int]] = defaultdict(list)
    statements: defaultdict[str, set[tuple[str, int]]] = defaultdict(set)
    for number, place in enumerate(occurrences):
        places[place.module].append(number)
        if place.parent >= 0:
            statements[place.module].add((occurrences[place.parent].module, place.instance))
    repeated = frozenset(module for module, by in statements.items() if len(by) > 1)
    return Hierarchy(occurrences, end, leaf_end, dict(places), repeated)


def copies(layout: Hierarchy) -> Iterator[tuple[str, Ids]]:
    """Yield each module that stands in several places, with its leaves by place.

    The second part has shape (places, leaves of the module itself): flat leaf ids, so that a
    column is one instance of the text in all its places.
    """
    for module, places in layout.places.items():
        if len(places) > 1:
            first = np.array([layout.occurrences[place].first for place in places])
            size = layout.leaf_end[places[0]] - layout.occurrences[places[0]].first
            yield module, (first[:, None] + np.arange(size)[None, :]).astype(np.int32)
