"""Order of evaluation: levels of a directed graph, loops found and cut.

The level of a node is the longest way to it from a node without predecessors, in edges. Nodes on a
loop have no level; of each loop the node of lowest number is cut: edges that leave it are left out,
and the search goes on until no loop is left.
"""

from dataclasses import dataclass, field

import numpy as np
from scipy.sparse import coo_array
from scipy.sparse.csgraph import connected_components

from insertdft.netlist import Ids, Offsets


@dataclass(frozen=True, slots=True, eq=False)
class Levels:
    """Levels of a graph of ``count`` nodes.

    Attributes:
        level: Shape (count,), 0 for nodes without predecessors.
        cut: Nodes whose outgoing edges were left out, ascending.
        loops: Nodes of each strongly connected part that was met, ascending within a part. A part
            that needs several cuts is met again, smaller.
    """

    level: Ids
    cut: Ids
    loops: tuple[Ids, ...] = field(repr=False)


def levelize(count: int, tail: Ids, head: Ids) -> Levels:
    """Return the levels of the graph with edges ``tail[i] -> head[i]`` over ``count`` nodes."""
    kept = np.ones(len(tail), np.bool_)
    cuts: list[Ids] = []
    loops: list[Ids] = []
    while True:
        level, left = _longest_ways(count, tail[kept], head[kept])
        if not len(left):
            break
        parts = _strong_parts(count, tail[kept], head[kept], left)
        loops += parts
        now = np.array([part[0] for part in parts], np.int32)
        cuts.append(now)
        kept &= ~np.isin(tail, now)
    cut = np.sort(np.concatenate(cuts)) if cuts else np.zeros(0, np.int32)
    return Levels(level, cut.astype(np.int32), tuple(loops))


def members(start: Offsets, chosen: Ids | Offsets) -> Offsets:
    """Return the row numbers of the chosen entries of a CSR table, entry by entry."""
    first = start[chosen]
    counts = start[np.asarray(chosen, np.int64) + 1] - first
    ends = np.cumsum(counts)
    total = int(ends[-1]) if len(ends) else 0
    rows: Offsets = np.arange(total) + np.repeat(first - (ends - counts), counts)
    return rows


def grouped(keys: Ids, count: int) -> tuple[Offsets, Offsets]:
    """Return CSR start (count + 1,) and the positions of ``keys`` sorted by key, stable."""
    order = np.argsort(keys, kind="stable").astype(np.int64)
    start = np.zeros(count + 1, np.int64)
    np.cumsum(np.bincount(keys, minlength=count), out=start[1:])
    return start, order


def _longest_ways(count: int, tail: Ids, head: Ids) -> tuple[Ids, Ids]:
    """Return the level of every node that is reached, and the nodes that are not (on loops)."""
    start, order = grouped(tail, count)
    heads = head[order]
    waiting = np.bincount(head, minlength=count)
    level = np.zeros(count, np.int32)
    done = waiting == 0
    front = np.flatnonzero(done)
    depth = 0
    while len(front):
        depth += 1
        reached, times = np.unique(heads[members(start, front)], return_counts=True)
        waiting[reached] -= times
        front = reached[waiting[reached] == 0]
        level[front] = depth
        done[front] = True
    return level, np.flatnonzero(~done).astype(np.int32)


def _strong_parts(count: int, tail: Ids, head: Ids, left: Ids) -> list[Ids]:
    """Return the loops among the nodes ``left``, each ascending, by lowest node."""
    inside = np.zeros(count, np.bool_)
    inside[left] = True
    edges = inside[tail] & inside[head]
    number = np.full(count, -1, np.int64)
    number[left] = np.arange(len(left))
    rows, columns = number[tail[edges]], number[head[edges]]
    graph = coo_array((np.ones(len(rows), np.int8), (rows, columns)), shape=(len(left),) * 2)
    parts, label = connected_components(graph, directed=True, connection="strong")
    sizes = np.bincount(label, minlength=parts)
    on_itself = np.unique(label[rows[rows == columns]])
    looped = np.union1d(np.flatnonzero(sizes > 1), on_itself)
    start, order = grouped(label.astype(np.int32), parts)
    found = [left[np.sort(order[start[part] : start[part + 1]])] for part in looped.tolist()]
    return sorted(found, key=lambda part: int(part[0]))
