"""Which clock port, and which of its edges, stands behind each clock net."""

from collections.abc import Iterable, Mapping
from typing import NamedTuple

from insertdft.design.flat import Design
from insertdft.library import clock_gate_of
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import End, Source, Walker


class ClockSource(NamedTuple):
    """Where a clock net comes from.

    Attributes:
        name: Clock port bit; or, for a clock made inside, the name of the instance that makes it.
        inverted: Whether the net is the inverse of that.
        port: Whether it is a port.
    """

    name: str
    inverted: bool
    port: bool


def clock_sources(
    design: Design, nets: Iterable[int], held: Mapping[int, int]
) -> dict[int, ClockSource]:
    """Return the source of each clock net, through buffers, inverters and clock gates.

    A gate of several signals passes a clock when exactly one of its inputs comes from a port that
    other cells get as their clock.

    Args:
        design: The flat design.
        nets: Nets at clock pins, of the design.
        held: Values of nets (ports) that do not change.
    """
    walker = Walker(design, propagate(design, held))
    wanted = sorted(nets)
    plain = {net: _through_gates(walker, net) for net in wanted}
    ports = {source.net for source, _ in plain.values() if source.end is End.PORT}
    return {net: _named(walker, *plain[net], ports) for net in wanted}


def _through_gates(walker: Walker, net: int) -> tuple[Source, bool]:
    """Return where a walk ends that goes on through clock-gate cells, and the parity so far."""
    inverted = False
    seen: set[int] = set()
    while True:
        source = walker.source(net)
        inverted ^= source.inverted
        cell = walker.design.cell_of(source.instance) if source.instance >= 0 else None
        gate = clock_gate_of(cell) if cell is not None else None
        if gate is None or source.instance in seen:
            return source, inverted
        seen.add(source.instance)
        net = walker.design.pins(source.instance).get(gate.clock, -1)
        if net < 0:
            return source, inverted


def _named(walker: Walker, source: Source, inverted: bool, ports: set[int]) -> ClockSource:
    design = walker.design
    if source.end is End.PORT:
        return ClockSource(design.input_ports[source.net], inverted, port=True)
    if source.end is End.GATE:
        cell = design.cell_of(source.instance)
        inputs = {pin.name for pin in cell.inputs()} if cell else set()
        ends = [
            _through_gates(walker, net)
            for pin, net in design.pins(source.instance).items()
            if pin in inputs and net >= 0
        ]
        found = [(end, turned) for end, turned in ends if end.net in ports]
        if len(found) == 1:
            end, turned = found[0]
            return ClockSource(design.input_ports[end.net], inverted ^ turned, port=True)
    if source.instance >= 0:
        return ClockSource(design.name(source.instance), inverted, port=False)
    return ClockSource(design.net_name(source.net), inverted, port=False)
