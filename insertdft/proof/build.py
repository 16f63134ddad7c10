"""Second half of ``Design`` -> ``Circuit``: operands, buses, loops, columns of states."""

from dataclasses import dataclass, field

import numpy as np

from insertdft.design.flat import Design
from insertdft.proof.aig import Lits
from insertdft.proof.circuit import Buses, Circuit, Elements, TableBlock
from insertdft.proof.lay import BOX, BUS, PORT, Laid, Work, driven, lay_down
from insertdft.proof.loops import NetNodes, choose_cuts
from insertdft.proof.order import Order, order_nodes
from insertdft.proof.template import LOOP


@dataclass(slots=True, eq=False)
class _Graph:
    """Operands of all nodes, with room for more."""

    left: Lits
    right: Lits
    more: list[tuple[int, int]] = field(default_factory=list)

    def conj(self, one: int, other: int) -> int:
        self.more.append((one, other))
        return 2 * (len(self.left) + len(self.more) - 1)

    def disj(self, parts: list[int]) -> int:
        found = 0
        for part in parts:
            found = self.conj(found ^ 1, part ^ 1) ^ 1
        return found

    def settle(self) -> None:
        extra = np.array(self.more, np.int32).reshape(-1, 2)
        self.left = np.concatenate((self.left, extra[:, 0]))
        self.right = np.concatenate((self.right, extra[:, 1]))
        self.more.clear()


def make_circuit(design: Design) -> Circuit:
    """Return the graph of ``design``; every name that it gives a leaf is one of the design."""
    work = lay_down(design)
    for net in np.flatnonzero(work.is_bus).tolist():
        work.leaf(*_released(work, net))
    graph = _Graph(np.full(work.nodes, -1, np.int32), np.full(work.nodes, -1, np.int32))
    for laid in work.laid:
        _fill(graph, laid)
    buses = _join_buses(work, graph)
    graph.settle()
    order, cut = _cut_loops(work, graph)
    elements = [block for laid in work.laid for block in _elements(laid)]
    return Circuit(
        design=design,
        left=graph.left,
        right=graph.right,
        order=order.nodes,
        bounds=order.bounds,
        net=work.net,
        leaves=work.leaves,
        elements=_joined([*elements, cut]),
        tables=[_table(laid) for laid in work.laid if laid.table is not None],
        buses=buses,
        observed=tuple(_observed(work)),
        unsupported=tuple(work.unsupported),
    )


def _released(work: Work, net: int) -> tuple[str, str]:
    """Return the leaf that a bus shows while nobody drives it."""
    port = work.design.input_ports.get(net)
    return (PORT, port) if port is not None else (BUS, work.design.net_name(net))


def _fill(graph: _Graph, laid: Laid) -> None:
    for number, (one, other) in enumerate(laid.template.ands):
        own = laid.and_nodes(number)
        graph.left[own], graph.right[own] = laid.value(one), laid.value(other)
    for pin, first in laid.buffers.items():
        own = np.arange(first, first + laid.count)
        graph.left[own] = laid.value(laid.template.outputs[pin][0])
        graph.right[own] = 1


def _join_buses(work: Work, graph: _Graph) -> Buses:
    drivers, pulls = _bus_drivers(work)
    nets = np.flatnonzero(work.is_bus).tolist()
    lows: list[int] = []
    highs: list[int] = []
    for net in nets:
        pairs = drivers.get(net, [])
        high = graph.disj([graph.conj(drives, data) for data, drives in pairs])
        low = graph.disj([graph.conj(drives, data ^ 1) for data, drives in pairs])
        rest = 2 * work.leaves[_released(work, net)]
        if net in pulls and net not in work.design.input_ports:
            rest = pulls[net]
        idle = graph.conj(high ^ 1, low ^ 1)
        own = int(work.net[net]) >> 1
        graph.left[own] = graph.disj([high, graph.conj(idle, rest)])
        graph.right[own] = 1
        lows.append(low)
        highs.append(high)
    return Buses(tuple(nets), np.array(lows, np.int32), np.array(highs, np.int32))


def _bus_drivers(work: Work) -> tuple[dict[int, list[tuple[int, int]]], dict[int, int]]:
    """Return (data, drives) of the drivers of each bus, and the value that a pull gives it."""
    drivers: dict[int, list[tuple[int, int]]] = {}
    pulls: dict[int, int] = {}
    for laid in work.laid:
        name = work.design.cell_names[laid.pins.cell]
        for pin, (value, drives) in laid.template.outputs.items():
            nets, here = driven(work, laid.pins, pin)
            on_bus = work.is_bus[nets]
            if not on_bus.any():
                continue
            data, active = laid.value(value), laid.value(drives)
            for net, at in zip(nets[on_bus].tolist(), here[on_bus].tolist(), strict=True):
                if name in ("pullup", "pulldown"):
                    pulls[net] = int(name == "pullup")
                else:
                    drivers.setdefault(net, []).append((int(data[at]), int(active[at])))
    return drivers, pulls


def _cut_loops(work: Work, graph: _Graph) -> tuple[Order, Elements]:
    """Make the cut nodes of loops leaves; return the order of the rest, and them as states."""
    alone = work.driver >= 0
    nets = NetNodes(np.where(alone, work.net >> 1, -1).astype(np.int32), work.driver)

    def cut_of(on_loops: Lits) -> Lits:
        return choose_cuts(work.design, nets, graph.left, graph.right, on_loops)

    order, cut = order_nodes(graph.left, graph.right, cut_of)
    cut = np.sort(cut)
    copies = [graph.conj(int(graph.left[at]), int(graph.right[at])) for at in cut.tolist()]
    graph.settle()
    graph.left[cut] = -1
    graph.right[cut] = -1
    if len(cut):
        order, _ = order_nodes(graph.left, graph.right, _nothing_to_cut)
    by_node = np.full(len(graph.left), -1, np.int64)
    owned = np.flatnonzero(alone)[::-1]
    by_node[work.net[owned] >> 1] = owned  # the lowest net of a node is written last
    net = by_node[cut]
    instance = np.where(net >= 0, work.driver[np.maximum(net, 0)], -1)
    return order, Elements(
        instance=instance.astype(np.int64),
        state=np.zeros(len(cut), np.int64),
        kind=np.full(len(cut), LOOP, np.int64),
        leaf=cut.astype(np.int32),
        data=np.array(copies, np.int32),
        clock=np.ones(len(cut), np.int32),
        zero=np.zeros(len(cut), np.int32),
        one=np.zeros(len(cut), np.int32),
        unknown=np.zeros(len(cut), np.int32),
        net=net,
    )


def _nothing_to_cut(nodes: Lits) -> Lits:
    raise RuntimeError(f"{len(nodes)} nodes still lie on loops")


def _elements(laid: Laid) -> list[Elements]:
    instances = laid.pins.instances
    return [
        Elements(
            instance=instances,
            state=np.full(laid.count, number, np.int64),
            kind=np.full(laid.count, item.kind, np.int64),
            leaf=laid.leaves[item.state],
            data=laid.value(item.data),
            clock=laid.value(item.clock),
            zero=laid.value(item.zero),
            one=laid.value(item.one),
            unknown=laid.value(item.unknown),
            net=np.full(laid.count, -1, np.int64),
        )
        for number, item in enumerate(laid.template.storage)
    ]


def _joined(blocks: list[Elements]) -> Elements:
    def numbers(name: str) -> np.ndarray[tuple[int], np.dtype[np.int64]]:
        return np.concatenate([getattr(block, name) for block in blocks]).astype(np.int64)

    def lits(name: str) -> Lits:
        return np.concatenate([getattr(block, name) for block in blocks]).astype(np.int32)

    return Elements(
        instance=numbers("instance"),
        state=numbers("state"),
        kind=numbers("kind"),
        leaf=lits("leaf"),
        data=lits("data"),
        clock=lits("clock"),
        zero=lits("zero"),
        one=lits("one"),
        unknown=lits("unknown"),
        net=numbers("net"),
    )


def _table(laid: Laid) -> TableBlock:
    table = laid.table
    if table is None:
        raise ValueError("the cell has no state table")
    numbers = {name: number for number, name in enumerate(laid.template.variables, start=1)}
    inputs = [laid.place[numbers[name]] for name in table.inputs]
    nodes = [laid.leaves[name] for name in table.nodes]
    return TableBlock(table, laid.pins.instances, np.stack(inputs), np.stack(nodes))


def _observed(work: Work) -> list[tuple[int, str, int]]:
    """Return what black boxes read: their pins on nets that something else drives."""
    found: list[tuple[int, str, int]] = []
    for pins in work.boxes:
        for pin in pins.rows:
            nets, here = driven(work, pins, pin)
            for net, at in zip(nets.tolist(), here.tolist(), strict=True):
                own = work.leaves.get((BOX, work.pin_name(pins, at, pin)))
                if own != int(work.net[net]) >> 1:
                    found.append((int(pins.instances[at]), pin, int(work.net[net])))
    return found
