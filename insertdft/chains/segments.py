"""From arranged items to the segments of every module they pass through."""

from collections import defaultdict
from collections.abc import Iterator, Sequence
from itertools import groupby
from typing import NamedTuple

from insertdft.chains.arrange import Arrangement
from insertdft.chains.plan import CELL, SEGMENT, Element
from insertdft.chains.regions import Hierarchy, Item
from insertdft.design.flat import Design
from insertdft.netlist import Ids


class _Step(NamedTuple):
    """An item and the child of the current occurrence that leads to it (-1: it is here)."""

    child: int
    item: Item


def lay_segments(
    design: Design, layout: Hierarchy, arrangement: Arrangement, conversion: Ids
) -> dict[str, list[tuple[Element, ...]]]:
    """Return the segments of each module, those of the top being the chains in order.

    Args:
        design: The design.
        layout: Its hierarchy.
        arrangement: What goes into which chain.
        conversion: Shape (leaves,), index of the conversion of each leaf.
    """
    builder = _Builder(design, layout, conversion)
    for module, segments in arrangement.fixed.items():
        for segment in segments:
            builder.lay(layout.places[module][0], segment.items)
    for _, items in arrangement.chains:
        builder.lay(0, items)
    return dict(builder.segments)


class _Builder:
    """Segments so far, and how to add one."""

    def __init__(self, design: Design, layout: Hierarchy, conversion: Ids) -> None:
        self.segments: defaultdict[str, list[tuple[Element, ...]]] = defaultdict(list)
        self._design = design
        self._layout = layout
        self._conversion = conversion

    def lay(self, occurrence: int, items: Sequence[Item]) -> int:
        """Add the segment of ``items`` to the module at ``occurrence``; return its index."""
        module = self._layout.occurrences[occurrence].module
        steps = (_Step(self._towards(occurrence, item.occurrence), item) for item in items)
        elements: list[Element] = []
        for child, run in groupby(steps, key=lambda step: step.child):
            here = [step.item for step in run]
            if child < 0:
                elements += [element for item in here for element in self._elements(item)]
            else:
                elements.append(Element(self._name(child), self.lay(child, here), SEGMENT))
        self.segments[module].append(tuple(elements))
        return len(self.segments[module]) - 1

    def _towards(self, occurrence: int, goal: int) -> int:
        found = -1
        while goal != occurrence:
            found, goal = goal, self._layout.occurrences[goal].parent
        return found

    def _elements(self, item: Item) -> Iterator[Element]:
        if item.inner >= 0:
            yield Element(self._name(item.inner), item.number, SEGMENT)
            return
        for leaf in (item.number, *item.followers):
            module = self._design.module_of(leaf)
            name = module.instance_names[int(self._design.local[leaf])]
            yield Element(name, int(self._conversion[leaf]), CELL)

    def _name(self, occurrence: int) -> str:
        place = self._layout.occurrences[occurrence]
        parent = self._layout.occurrences[place.parent].module
        return self._design.netlist.modules[parent].instance_names[place.instance]
