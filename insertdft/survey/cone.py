"""The logic between storage: graphs over nets, cones and witness paths, by scipy.

An edge leads from a net to every net that a gate or clock gate makes of it. Storage, black boxes
and known constants are barriers; cones also stop at clock gates. The graph is structural: that a
gate has the input is enough, so a path found here may be one that no values ever open.
"""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from itertools import pairwise

import numpy as np
from scipy.sparse import csr_array
from scipy.sparse.csgraph import breadth_first_order

from insertdft.design.flat import OUTPUT, Design
from insertdft.library.cell import Cell
from insertdft.netlist import FIRST_NET, Ids, Offsets
from insertdft.survey.wires import is_gate


@dataclass(frozen=True, slots=True, eq=False)
class NetGraph:
    """Which nets a net feeds through one gate.

    Attributes:
        design: Whose nets.
        edges: Shape (w + 1, w + 1) as a matrix; node w is free for a walk from several nets.
    """

    design: Design
    edges: csr_array = field(repr=False)


@dataclass(frozen=True, slots=True, eq=False)
class Reach:
    """What a forward walk found.

    Attributes:
        reached: Shape (w,), whether a net is a start or behind one.
        before: Shape (w,), the net one gate before each net reached; -1 at a start.
    """

    reached: np.ndarray[tuple[int], np.dtype[np.bool_]] = field(repr=False)
    before: Ids = field(repr=False)

    def path(self, net: int) -> list[int]:
        """Return the nets from a start to ``net``."""
        nets = [net]
        while (net := int(self.before[net])) >= 0:
            nets.append(net)
        return nets[::-1]


def net_graph(design: Design, values: Mapping[int, int]) -> NetGraph:
    """Return the graph of the design's gates, without nets whose value is known."""
    gates = np.array([is_gate(at) or _is_clock_gate(at) for at in design.cells], bool)
    known = np.zeros(design.net_count, bool)
    known[list(values)] = True
    known[:FIRST_NET] = True
    use = (design.pin_net >= 0) & gates[design.cell[design.pin_instance]]
    use &= ~known[np.maximum(design.pin_net, 0)]
    ins = np.flatnonzero(use & (design.pin_direction != OUTPUT))
    outs = np.flatnonzero(use & (design.pin_direction == OUTPUT))
    first, second = _joined(design, ins, outs)
    # Each edge once: scipy's strongly connected components do not end on a matrix with repeats.
    size = design.net_count + 1
    edges = np.unique(first.astype(np.int64) * size + second)
    counts = np.bincount(edges // size, minlength=size)
    indptr = np.concatenate(([0], np.cumsum(counts))).astype(np.int32)
    return NetGraph(design, _matrix((edges % size).astype(np.int32), indptr))


def _is_clock_gate(cell: Cell | None) -> bool:
    return cell is not None and cell.clock_gate is not None


def _matrix(indices: Ids, indptr: Ids) -> csr_array:
    size = len(indptr) - 1
    return csr_array((np.ones(len(indices)), indices, indptr), shape=(size, size))


def _joined(design: Design, ins: Offsets, outs: Offsets) -> tuple[Ids, Ids]:
    """Return input net and output net of every such pair of one instance."""
    counts = np.bincount(design.pin_instance[outs], minlength=len(design.cell))
    start = np.concatenate(([0], np.cumsum(counts)))
    owners = design.pin_instance[ins]
    times = counts[owners]
    first = np.repeat(design.pin_net[ins], times)
    base = np.repeat(start[owners], times)
    within = np.arange(len(base)) - np.repeat(np.cumsum(times) - times, times)
    return first, design.pin_net[outs[base + within]]


def walk(graph: NetGraph, starts: Iterable[int]) -> Reach:
    """Return every net behind ``starts``, with a shortest path to each."""
    size = graph.design.net_count
    nets = np.array(sorted({net for net in starts if net >= FIRST_NET}), np.int32)
    reached = np.zeros(size, bool)
    before = np.full(size, -1, np.int32)
    if len(nets) == 0:
        return Reach(reached, before)
    order, previous = breadth_first_order(_with_start(graph, nets), size, directed=True)
    order = order[order < size]
    reached[order] = True
    before[order] = previous[order]
    before[before == size] = -1
    return Reach(reached, before)


def _with_start(graph: NetGraph, nets: Ids) -> csr_array:
    """Return the matrix with edges from its free node to ``nets``."""
    indptr = graph.edges.indptr.copy()
    indptr[-1] += len(nets)
    return _matrix(np.concatenate((graph.edges.indices, nets)), indptr)


def gates_between(design: Design, nets: Sequence[int]) -> list[int]:
    """Return the gates that lead along a row of nets, one a step."""
    found: list[int] = []
    for _, after in pairwise(nets):
        rows = design.drivers.of(after)
        found += [int(design.pin_instance[rows[0]])] if rows else []
    return found


@dataclass(frozen=True, slots=True)
class Cone:
    """Everything a net depends on, back to what is no plain gate.

    Attributes:
        net: Whose cone.
        gates: Instances, those nearer to the leaves first.
        leaves: Nets that ports, storage, clock gates or black boxes decide, in order of finding.
        cut: Whether the cone was larger than allowed and stops early.
    """

    net: int
    gates: tuple[int, ...]
    leaves: tuple[int, ...]
    cut: bool


def cone(design: Design, values: Mapping[int, int], net: int, most: int = 2000) -> Cone:
    """Return the cone of ``net``; loops inside are walked once."""
    order: list[int] = []
    leaves: dict[int, None] = {}
    seen: set[int] = set()
    stack: list[tuple[int, bool]] = [(net, False)]
    while stack and len(order) < most:
        at, ready = stack.pop()
        if ready:
            order.append(int(design.pin_instance[design.drivers.of(at)[0]]))
            continue
        if at in seen or at in values or at < FIRST_NET:
            continue
        seen.add(at)
        gate = _gate_behind(design, at)
        if gate < 0:
            leaves[at] = None
            continue
        stack.append((at, True))
        stack += [(inner, False) for inner in reversed(_inputs(design, gate))]
    return Cone(net, tuple(dict.fromkeys(order)), tuple(leaves), bool(stack))


def _gate_behind(design: Design, net: int) -> int:
    """Return the plain gate that alone drives ``net``, -1 if something else decides it."""
    drivers = design.drivers.of(net)
    if net in design.input_ports or len(drivers) != 1:
        return -1
    gate = int(design.pin_instance[drivers[0]])
    return gate if is_gate(design.cell_of(gate)) else -1


def _inputs(design: Design, gate: int) -> list[int]:
    first, last = design.pin_start[gate : gate + 2].tolist()
    kinds = design.pin_direction[first:last].tolist()
    nets = design.pin_net[first:last].tolist()
    return [net for net, kind in zip(nets, kinds, strict=True) if kind != OUTPUT and net >= 0]
