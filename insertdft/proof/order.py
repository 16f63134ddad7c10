"""Order of evaluation of a graph with two operands a node; loops found and cut where it is best."""

from collections.abc import Callable
from typing import NamedTuple

import numpy as np
import numpy.typing as npt
from scipy.sparse import coo_array
from scipy.sparse.csgraph import connected_components

from insertdft.proof.aig import Lits
from insertdft.simulate.levels import grouped, members

Numbers = npt.NDArray[np.int64]
Flags = npt.NDArray[np.bool_]


class Order(NamedTuple):
    """Nodes level by level: level k is ``nodes[bounds[k]:bounds[k + 1]]``."""

    nodes: Lits
    bounds: Numbers


def order_nodes(left: Lits, right: Lits, cut_of: Callable[[Lits], Lits]) -> tuple[Order, Lits]:
    """Return the order, and the nodes that had to be made leaves.

    Args:
        left: First operands, literals; -1 for leaves.
        right: Second operands.
        cut_of: Given the nodes of all loops that are left, chooses which to cut; it must choose
            at least one of every loop sooner or later.
    """
    inner = np.flatnonzero(left >= 0)
    reads = np.concatenate((left[inner], right[inner])) >> 1
    readers = np.concatenate((inner, inner)).astype(np.int32)
    start, rows = grouped(reads.astype(np.int32), len(left))
    readers = readers[rows]
    done = left < 0
    stamp = np.zeros(len(left), np.int64)
    levels: list[Lits] = []
    cuts: list[Lits] = []
    front = np.flatnonzero(done).astype(np.int32)
    while True:
        while len(front):
            reached = readers[members(start, front)]
            ready = done[left[reached] >> 1] & done[right[reached] >> 1] & ~done[reached]
            reached = reached[ready]
            stamp[reached] = np.arange(len(reached))
            front = reached[stamp[reached] == np.arange(len(reached))]
            done[front] = True
            if len(front):
                levels.append(front.astype(np.int32))
        left_over = inner[~done[inner]]
        if not len(left_over):
            break
        front = cut_of(_on_loops(left, right, left_over))
        done[front] = True
        cuts.append(front.astype(np.int32))
    cut = np.concatenate(cuts) if cuts else np.zeros(0, np.int32)
    nodes = np.concatenate(levels) if levels else np.zeros(0, np.int32)
    bounds = np.cumsum([0, *(len(level) for level in levels)]).astype(np.int64)
    return Order(nodes, bounds), cut


def _on_loops(left: Lits, right: Lits, nodes: Lits | Numbers) -> Lits:
    """Return those of ``nodes`` that lie on a loop."""
    part, sizes = strong_parts(left, right, nodes)
    own = (left[nodes] >> 1 == nodes) | (right[nodes] >> 1 == nodes)
    found: Lits = nodes[(sizes[part] > 1) | own].astype(np.int32)
    return found


def strong_parts(left: Lits, right: Lits, nodes: Lits | Numbers) -> tuple[Numbers, Numbers]:
    """Return the strongly connected part of each of ``nodes``, and the size of each part."""
    number = np.full(len(left), -1, np.int64)
    number[nodes] = np.arange(len(nodes))
    tails = np.concatenate((left[nodes], right[nodes])) >> 1
    heads = np.concatenate((np.arange(len(nodes)), np.arange(len(nodes))))
    inside = number[tails] >= 0
    edges = np.ones(int(inside.sum()), np.int8)
    graph = coo_array((edges, (number[tails[inside]], heads[inside])), shape=(len(nodes),) * 2)
    count, part = connected_components(graph, directed=True, connection="strong")
    return part.astype(np.int64), np.bincount(part, minlength=count)
