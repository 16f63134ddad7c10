"""What fault simulation needs to know about a circuit once: who reads what, and where cones join.

A slot that exactly one edge reads and that the tester does not see is a *link*: what happens to it
is decided by its one reader. Any other slot is a *root*: the end of a region without fan-out. A
root that several edges read and nobody sees is *joint*: only simulation tells whether a change
there arrives.
"""

from dataclasses import dataclass, field

import numpy as np

from insertdft.faults.access import Access
from insertdft.netlist import Ids, Offsets
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.levels import grouped
from insertdft.simulate.words import Flags


@dataclass(frozen=True, slots=True, eq=False)
class Network:
    """Readers of every slot.

    Attributes:
        circuit: The circuit.
        seen: Slots that the tester sees.
        use_start: Shape (slots + 1,): edges that read slot i are
            ``use_edge[use_start[i]:use_start[i + 1]]``.
        use_edge: Edges by slot.
        link: The one edge that reads a link, -1 for roots.
        root: Root of the region of each slot.
        joint: Whether a slot is a joint root.
        next_level: Lowest level that reads a slot; one more than the depth if none does.
        last_level: Highest level that reads it; 0 if none does.
        edge_input: Which input of its node an edge is.
        group_of: Index of the group of each slot, -1 for sources.
        level_start: Slots of level L are ``level_start[L]:level_start[L + 1]``.
    """

    circuit: Circuit
    seen: Flags = field(repr=False)
    use_start: Offsets = field(repr=False)
    use_edge: Offsets = field(repr=False)
    link: Ids = field(repr=False)
    root: Ids = field(repr=False)
    joint: Flags = field(repr=False)
    next_level: Ids = field(repr=False)
    last_level: Ids = field(repr=False)
    edge_input: Ids = field(repr=False)
    group_of: Ids = field(repr=False)
    level_start: Offsets = field(repr=False)


def make_network(access: Access) -> Network:
    """Return the readers and regions of a circuit under the given access."""
    circuit, seen = access.circuit, access.seen
    start, order = grouped(circuit.edge_slot, circuit.slots)
    uses = np.diff(start)
    is_link = (uses == 1) & ~seen
    link = np.full(circuit.slots, -1, np.int32)
    link[is_link] = order[start[:-1][is_link]]
    reader_level = circuit.level[circuit.edge_node]
    next_level = np.full(circuit.slots, circuit.depth + 1, np.int32)
    last_level = np.zeros(circuit.slots, np.int32)
    np.minimum.at(next_level, circuit.edge_slot, reader_level)
    np.maximum.at(last_level, circuit.edge_slot, reader_level)
    level_start = np.searchsorted(circuit.level, np.arange(circuit.depth + 2)).astype(np.int64)
    return Network(
        circuit=circuit,
        seen=seen,
        use_start=start,
        use_edge=order,
        link=link,
        root=_roots(circuit, link, level_start),
        joint=(uses > 1) & ~seen,
        next_level=next_level,
        last_level=last_level,
        edge_input=_edge_inputs(circuit),
        group_of=_groups_of(circuit),
        level_start=level_start,
    )


def _roots(circuit: Circuit, link: Ids, level_start: Offsets) -> Ids:
    root = np.arange(circuit.slots, dtype=np.int32)
    for level in range(circuit.depth, -1, -1):
        slots = np.arange(level_start[level], level_start[level + 1])
        slots = slots[link[slots] >= 0]
        root[slots] = root[circuit.edge_node[link[slots]]]
    return root


def _edge_inputs(circuit: Circuit) -> Ids:
    found = np.zeros(len(circuit.edge_slot), np.int32)
    for group in circuit.groups:
        arity, count = group.inputs.shape
        edges = slice(group.first_edge, group.first_edge + arity * count)
        found[edges] = np.repeat(np.arange(arity), count)
    return found


def _groups_of(circuit: Circuit) -> Ids:
    found = np.full(circuit.slots, -1, np.int32)
    for number, group in enumerate(circuit.groups):
        found[group.first : group.end] = number
    return found
