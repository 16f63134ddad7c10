"""Static timing: transitions, delays and latest arrivals over a whole wiring.

Graph-based: of several transitions at a node the slowest counts for all paths through it. Wires
have capacitance and no resistance. One corner, early and late alike.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field, replace
from itertools import pairwise
from types import MappingProxyType
from typing import Final, NamedTuple

import numpy as np

from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.netlist import FIRST_NET, Ids, Offsets
from insertdft.simulate.levels import levelize
from insertdft.timing.arcs import FALL, RISE, Arcs, Checks, find_arcs, load_limits, pin_loads
from insertdft.timing.clocks import ClockSource, clock_sources
from insertdft.timing.tables import Floats
from insertdft.timing.wiring import Wiring

NEVER: Final = -np.inf


@dataclass(frozen=True, slots=True)
class Assumptions:
    """What the library and the netlist do not say, in library units.

    Attributes:
        wire_per_sink: Capacitance of wire for each input pin on a net; if None, the median
            capacitance of the library's input pins (an assumption of ours: wire weighs as much as
            the pin it leads to).
        port_load: Load of an output port.
        input_slew: Transition time at input ports.
        clock_slew: Transition time of ideal clocks at the clock pins.
        ideal_clocks: Whether clocks reach all pins at time 0; else they go through the cells of
            the clock network.
    """

    wire_per_sink: float | None = None
    port_load: float = 0.0
    input_slew: float = 0.0
    clock_slew: float = 0.0
    ideal_clocks: bool = True


class Launch(NamedTuple):
    """What starts paths: an edge of a clock, or the input ports (clock is then "").

    Attributes:
        clock: Port, or instance that makes the clock.
        edge: RISE or FALL of it.
        port: Whether the clock is a port.
    """

    clock: str
    edge: int
    port: bool


#: Paths from input ports, which are taken to change at time 0.
FROM_PORTS: Final = Launch("", RISE, port=False)


@dataclass(frozen=True, slots=True, eq=False)
class Timing:
    """Arrivals of a wiring, in the library's time unit.

    Attributes:
        wiring: What was analysed.
        assumptions: With every value filled in.
        arcs: Arcs that took part, in order of evaluation; those into one node side by side.
        into: Shape (nodes, 2), first and last-plus-one arc into each node.
        launch_of_arc: Index into ``launches``, -1 for arcs that no clock edge starts.
        checks: Setup checks.
        launches: What starts paths; FROM_PORTS is the last.
        capture: Index into ``captures`` of the clock edge of each check.
        captures: Clock edges that end paths.
        load: Load of each net, in the library's capacitive unit.
        slew: Shape (nodes,), slowest transition, NEVER where nothing arrives.
        delay: Shape (arcs,), NEVER where nothing arrives.
        clock_arrival: Shape (nodes,), arrival of clocks, NEVER elsewhere.
        arrival: Shape (nodes, launches), latest arrival.
        setup: Shape (checks, 2), setup time for rising and falling data.
        needed: Shape (checks, launches), arrival and setup less the delay of the capturing clock;
            NEVER where no path arrives.
        looped: Nodes on combinational loops that were cut.
        untimed: Instances without any timing table.
        overloaded: Nets with more load than the library allows their driver; delays there are
            carried on beyond the tables. Many of them mean that the netlist is not buffered yet.
    """

    wiring: Wiring = field(repr=False)
    assumptions: Assumptions
    arcs: Arcs = field(repr=False)
    into: Ids = field(repr=False)
    launch_of_arc: Ids = field(repr=False)
    checks: Checks = field(repr=False)
    launches: tuple[Launch, ...]
    capture: Ids = field(repr=False)
    captures: tuple[Launch, ...]
    load: Floats = field(repr=False)
    slew: Floats = field(repr=False)
    delay: Floats = field(repr=False)
    clock_arrival: Floats = field(repr=False)
    arrival: Floats = field(repr=False)
    setup: Floats = field(repr=False)
    needed: Floats = field(repr=False)
    looped: int
    untimed: int
    overloaded: int


def analyse(
    wiring: Wiring, assumptions: Assumptions, held: Mapping[str, int] = MappingProxyType({})
) -> Timing:
    """Return the timing of a wiring.

    Args:
        wiring: Cells and nets.
        assumptions: What nothing else says.
        held: Input port bits that do not move in mission use, with their value (only the clock
            trees are followed under these values; paths from these ports are left out).

    Raises:
        DesignError: No cell of the design has a delay table.
    """
    filled = _filled(wiring, assumptions)
    arcs, checks = find_arcs(wiring)
    if not len(arcs.tail):
        raise DesignError([_no_tables()])
    graph = _Graph(wiring, arcs, checks, filled)
    load = _loads(wiring, filled)
    sources = _sources(graph, wiring, held)
    starts = _clock_starts(graph, wiring, sources)
    ports = _data_ports(wiring, starts, held)
    slew, delay = _transitions(graph, load, filled, ports, starts)
    clocks = _clock_arrivals(graph, delay, starts)
    launches, of_arc = _launches(graph.arcs, sources)
    arrival = _arrivals(graph, delay, clocks, of_arc, len(launches), ports)
    captures, capture = _captures(checks, sources)
    setup = _setups(checks, slew)
    return Timing(
        wiring=wiring,
        assumptions=filled,
        arcs=graph.arcs,
        into=graph.into,
        launch_of_arc=of_arc,
        checks=checks,
        launches=launches,
        capture=capture,
        captures=captures,
        load=load,
        slew=slew,
        delay=delay,
        clock_arrival=clocks,
        arrival=arrival,
        setup=setup,
        needed=_needed(checks, arrival, setup, clocks),
        looped=graph.looped,
        untimed=_untimed(wiring, arcs),
        overloaded=int((load > load_limits(wiring)).sum()),
    )


class _Graph:
    """Arcs in order of evaluation, those into ideal clock nets and out of cut loops left out."""

    def __init__(
        self, wiring: Wiring, arcs: Arcs, checks: Checks, assumptions: Assumptions
    ) -> None:
        nodes = 2 * wiring.net_count
        self.nodes = nodes
        self.is_clock = np.zeros(wiring.net_count, np.bool_)
        self.is_clock[arcs.tail[arcs.launch == 1] // 2] = True
        self.is_clock[checks.clock] = True
        self.ideal = assumptions.ideal_clocks
        kept = np.ones(len(arcs.tail), np.bool_)
        if assumptions.ideal_clocks:
            kept &= ~self.is_clock[arcs.head // 2]
        levels = levelize(nodes, arcs.tail[kept], arcs.head[kept])
        kept &= ~np.isin(arcs.tail, levels.cut)
        self.looped = sum(len(loop) for loop in levels.loops)
        level = levels.level[arcs.head]
        order = np.lexsort((arcs.head, level))
        order = order[kept[order]]
        self.arcs = _taken(arcs, order)
        bounds = np.flatnonzero(np.diff(level[order], prepend=-1)).tolist()
        self.steps = [slice(a, b) for a, b in pairwise([*bounds, len(order)])]
        first = np.flatnonzero(np.diff(self.arcs.head, prepend=-1))
        self.into = np.zeros((nodes, 2), np.int32)
        self.into[self.arcs.head[first], 0] = first
        self.into[self.arcs.head[first], 1] = [*first[1:], len(order)] if len(first) else first


def _taken(arcs: Arcs, order: Offsets) -> Arcs:
    return Arcs(
        tail=arcs.tail[order],
        head=arcs.head[order],
        delay=arcs.delay[order],
        slew=arcs.slew[order],
        launch=arcs.launch[order],
        instance=arcs.instance[order],
        row=arcs.row[order],
        delays=arcs.delays,
    )


def _filled(wiring: Wiring, assumptions: Assumptions) -> Assumptions:
    if assumptions.wire_per_sink is not None:
        return assumptions
    capacitances = [
        pin.capacitance
        for cell in wiring.design.library.cells.values()
        for pin in cell.inputs()
        if pin.capacitance
    ]
    wire = float(np.median(capacitances)) if capacitances else 0.0
    return replace(assumptions, wire_per_sink=wire)


def _loads(wiring: Wiring, assumptions: Assumptions) -> Floats:
    load, sinks = pin_loads(wiring)
    outputs = [port.net for port in wiring.design.ports if port.direction != "input"]
    np.add.at(load, outputs, assumptions.port_load)
    return load + sinks * (assumptions.wire_per_sink or 0.0) + wiring.extra_load


def _sources(graph: _Graph, wiring: Wiring, held: Mapping[str, int]) -> dict[int, ClockSource]:
    design = wiring.design
    nets = np.flatnonzero(graph.is_clock).tolist()
    values = {design.port_nets[name]: value for name, value in held.items()}
    found = clock_sources(design, (net for net in nets if net < design.net_count), values)
    added = (net for net in nets if net >= design.net_count)
    return found | {
        net: ClockSource(f"(added net {net})", inverted=False, port=False) for net in added
    }


def _clock_starts(graph: _Graph, wiring: Wiring, sources: Mapping[int, ClockSource]) -> Ids:
    """Return the nets where clocks start at time 0: all clock nets if ideal, else their ports."""
    if graph.ideal:
        return np.flatnonzero(graph.is_clock).astype(np.int32)
    names = sorted({source.name for source in sources.values() if source.port})
    return np.array([wiring.design.port_nets[name] for name in names], np.int32)


def _data_ports(wiring: Wiring, starts: Ids, held: Mapping[str, int]) -> Ids:
    """Return the nets of input ports that move and are no clocks."""
    nets = [
        port.net
        for port in wiring.design.ports
        if port.direction != "output" and port.name not in held
    ]
    found = np.setdiff1d(np.array(nets, np.int32), starts)
    return found[found >= FIRST_NET].astype(np.int32)


def _transitions(
    graph: _Graph, load: Floats, assumptions: Assumptions, ports: Ids, starts: Ids
) -> tuple[Floats, Floats]:
    """Return the slowest transition of each node and the delay of each arc."""
    arcs = graph.arcs
    slew = np.full(graph.nodes, NEVER)
    for edge in (RISE, FALL):
        slew[2 * ports + edge] = assumptions.input_slew
        slew[2 * starts + edge] = assumptions.clock_slew
    delay = np.full(len(arcs.tail), NEVER)
    for step in graph.steps:
        given, head = slew[arcs.tail[step]], arcs.head[step]
        known = given > NEVER
        at, out = np.where(known, given, 0.0), load[head // 2]
        found = np.maximum(arcs.delays.look_up(arcs.slew[step], at, out), 0.0)
        took = arcs.delays.look_up(arcs.delay[step], at, out)
        delay[step] = np.where(known, took, NEVER)
        _raise(slew, head, np.where(known, found, NEVER))
    return slew, delay


def _raise(values: Floats, heads: Ids, offered: Floats) -> None:
    """Raise ``values`` at ``heads`` (equal ones side by side) to the largest on offer."""
    first = np.flatnonzero(np.diff(heads, prepend=-1))
    best = np.maximum.reduceat(offered, first, axis=0)
    values[heads[first]] = np.maximum(values[heads[first]], best)


def _clock_arrivals(graph: _Graph, delay: Floats, starts: Ids) -> Floats:
    """Return when clocks arrive; those made inside the design start at 0 where they are used."""
    arrival = np.full(graph.nodes, NEVER)
    arrival[2 * starts] = arrival[2 * starts + 1] = 0.0
    arcs = graph.arcs
    if not graph.ideal:
        moving = np.where(arcs.launch == 1, NEVER, delay)
        for step in graph.steps:
            _raise(arrival, arcs.head[step], arrival[arcs.tail[step]] + moving[step])
    made = np.flatnonzero(graph.is_clock)
    for edge in (RISE, FALL):
        late = arrival[2 * made + edge]
        arrival[2 * made + edge] = np.where(late == NEVER, 0.0, late)
    return arrival


def _launches(arcs: Arcs, sources: Mapping[int, ClockSource]) -> tuple[tuple[Launch, ...], Ids]:
    """Return what starts paths, and which of them each arc belongs to (-1 for no launch)."""
    nodes = np.unique(arcs.tail[arcs.launch == 1]).tolist()
    of_node = {node: _edge_of(sources[node // 2], node % 2) for node in nodes}
    launches = (*sorted(set(of_node.values())), FROM_PORTS)
    number = {launch: i for i, launch in enumerate(launches)}
    by_node = np.full(int(arcs.tail.max(initial=0)) + 1, -1, np.int32)
    for node, launch in of_node.items():
        by_node[node] = number[launch]
    return launches, np.where(arcs.launch == 1, by_node[arcs.tail], -1).astype(np.int32)


def _edge_of(source: ClockSource, edge: int) -> Launch:
    return Launch(source.name, edge ^ int(source.inverted), source.port)


def _arrivals(
    graph: _Graph, delay: Floats, clocks: Floats, of_arc: Ids, launches: int, ports: Ids
) -> Floats:
    arcs = graph.arcs
    arrival = np.full((graph.nodes, launches), NEVER)
    arrival[2 * ports, -1] = arrival[2 * ports + 1, -1] = 0.0
    start = np.flatnonzero(of_arc >= 0)
    np.maximum.at(
        arrival, (arcs.head[start], of_arc[start]), clocks[arcs.tail[start]] + delay[start]
    )
    moving = np.where(of_arc >= 0, NEVER, delay)
    for step in graph.steps:
        offered = arrival[arcs.tail[step]] + moving[step][:, None]
        _raise(arrival, arcs.head[step], offered)
    return arrival


def _captures(checks: Checks, sources: Mapping[int, ClockSource]) -> tuple[tuple[Launch, ...], Ids]:
    nodes, place = np.unique(2 * checks.clock + checks.edge, return_inverse=True)
    of_node = [_edge_of(sources[node // 2], node % 2) for node in nodes.tolist()]
    captures = tuple(sorted(set(of_node)))
    number = np.array([captures.index(capture) for capture in of_node], np.int32)
    return captures, number[place] if len(number) else place.astype(np.int32)


def _setups(checks: Checks, slew: Floats) -> Floats:
    """Return setup times for rising and falling data; 0 where data or clock never move."""
    clock = np.maximum(slew[2 * checks.clock + checks.edge], 0.0)
    found = np.zeros((len(checks.data), 2))
    for edge, table in ((RISE, checks.rise), (FALL, checks.fall)):
        data = np.maximum(slew[2 * checks.data + edge], 0.0)
        found[:, edge] = checks.constraints.look_up(table, data, clock)
    return found


def _needed(checks: Checks, arrival: Floats, setup: Floats, clocks: Floats) -> Floats:
    late = [arrival[2 * checks.data + edge] + setup[:, edge, None] for edge in (RISE, FALL)]
    capturing = clocks[2 * checks.clock + checks.edge]
    found: Floats = np.maximum(late[RISE], late[FALL]) - capturing[:, None]
    return found


def _untimed(wiring: Wiring, arcs: Arcs) -> int:
    timed = np.zeros(len(wiring.cell), np.bool_)
    timed[arcs.instance] = True
    return int((~timed).sum())


def _no_tables() -> Diagnostic:
    return error(
        "timing-no-tables",
        "no cell of the design has a delay table",
        hint="give a library characterised with NLDM tables (`cell_rise`, `rise_transition`, ...)",
    )
