"""Which clock port opens each latch, at which level, and whether logic gates it on the way."""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from typing import NamedTuple

from insertdft.design.flat import Design
from insertdft.library.finders import clock_gate_of
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import End, Source, Walker
from insertdft.survey.clocks import what
from insertdft.survey.cone import cone
from insertdft.survey.facts import Domain


class Phase(NamedTuple):
    """When a latch is open.

    Attributes:
        domain: Port and level (``high`` or ``low``).
        gated: Whether logic on the way can keep it closed.
    """

    domain: Domain
    gated: bool

    @property
    def label(self) -> str:
        """``c1 (high, gated)``, for messages."""
        words = f"{self.domain.edge}, gated" if self.gated else self.domain.edge
        return f"{self.domain.port} ({words})"


class NoPhase(NamedTuple):
    """Why no clock port opens a latch.

    Attributes:
        why: The fact in words, to stand behind "the enable net ...".
    """

    why: str


@dataclass(frozen=True, slots=True)
class Enable:
    """The root net of an enable, and whether the latch is open while that net is 0."""

    net: int
    turned: bool


def find_phases(
    walker: Walker,
    enables: Sequence[Enable],
    clocks: Iterable[str] = (),
) -> dict[Enable, Phase | NoPhase]:
    """Return the phase of every enable.

    An enable that comes straight from a port (through buffers, inverters, held gates) has that
    port as its clock. One behind logic has the port that can close it whatever else happens: with
    that port at rest the enable is off in every state. If several ports can, the one that is a
    clock elsewhere is it, or the ones named in ``clocks``.

    Args:
        walker: The design under its constants.
        enables: Each once.
        clocks: Ports that the user says are clocks.
    """
    found: dict[Enable, Phase | NoPhase] = {}
    behind: list[tuple[Enable, Source]] = []
    for enable in enables:
        source = walker.source(enable.net)
        if source.end is End.PORT:
            port = walker.design.input_ports[source.net]
            level = "low" if source.inverted ^ enable.turned else "high"
            found[enable] = Phase(Domain(port, level), gated=False)
        else:
            behind.append((enable, source))
    named = tuple(clocks) or tuple(
        dict.fromkeys(at.domain.port for at in found.values() if isinstance(at, Phase))
    )
    rest = _Rest(walker)
    for enable, source in behind:
        found[enable] = _gated(walker, rest, enable, source, named)
    return found


class _Rest:
    """Values of the design with one port at rest, worked out once a port and value."""

    def __init__(self, walker: Walker) -> None:
        self._walker = walker
        self._seen: dict[tuple[int, int], Mapping[int, int]] = {}

    def value(self, net: int, port: int, level: int) -> int | None:
        key = (port, level)
        if key not in self._seen:
            held = {**self._walker.values, port: level}
            self._seen[key] = with_clock_gates(self._walker.design, held)
        return self._seen[key].get(net)


def with_clock_gates(design: Design, held: Mapping[int, int]) -> dict[int, int]:
    """Return the known nets as ``propagate`` does, clock-gate cells at rest with their clock.

    A gate for the rising edge holds its output at 0 while its clock is 0, one for the falling edge
    at 1 while its clock is 1, whatever its enable says.
    """
    values = propagate(design, held)
    gates = _gates(design)
    while True:
        fresh = {
            out: rest
            for clock, out, rest in gates
            if values.get(clock) == rest and out not in values
        }
        if not fresh:
            return values
        values = propagate(design, {**values, **fresh})


def _gates(design: Design) -> list[tuple[int, int, int]]:
    """Return clock net, output net and value at rest of every clock-gate instance."""
    found: list[tuple[int, int, int]] = []
    for number, cell in enumerate(design.cells):
        gate = clock_gate_of(cell) if cell is not None else None
        if gate is None:
            continue
        rest = 1 if "negedge" in gate.kind else 0
        for instance in (design.cell == number).nonzero()[0].tolist():
            pins = design.pins(instance)
            clock, out = pins.get(gate.clock, -1), pins.get(gate.output, -1)
            if clock >= 0 and out >= 0:
                found.append((clock, out, rest))
    return found


def _gated(
    walker: Walker, rest: _Rest, enable: Enable, source: Source, named: Sequence[str]
) -> Phase | NoPhase:
    design = walker.design
    ports = _ports_behind(walker, source.net)
    likely = [port for port in ports if design.input_ports[port] in named]
    closing = _closing(rest, enable, likely) or _closing(rest, enable, ports)
    if len({port for port, _ in closing}) == 1:
        port, level = closing[0]
        return Phase(Domain(design.input_ports[port], "low" if level else "high"), gated=True)
    if closing:
        words = " and ".join(f"`{design.input_ports[port]}`" for port, _ in closing)
        return NoPhase(f"can be kept off by each of {words}, so that no one of them is its clock")
    return NoPhase(f"comes from no clock port: it is decided by {what(design, source)}")


def _closing(rest: _Rest, enable: Enable, ports: Sequence[int]) -> list[tuple[int, int]]:
    """Return ports and values that keep an enable off in every state."""
    return [
        (port, level)
        for port in ports
        for level in (0, 1)
        if rest.value(enable.net, port, level) == int(enable.turned)
    ]


def _ports_behind(walker: Walker, net: int) -> list[int]:
    """Return the nets of the input ports that a net depends on, also through clock gates."""
    design = walker.design
    found: dict[int, None] = {}
    waiting, seen = [net], set[int]()
    while waiting:
        at = waiting.pop()
        if at in seen:
            continue
        seen.add(at)
        for leaf in cone(design, walker.values, at).leaves:
            if leaf in design.input_ports:
                found[leaf] = None
            else:
                waiting += _clock_of_gate(design, leaf)
    return list(found)


def _clock_of_gate(design: Design, net: int) -> list[int]:
    drivers = design.drivers.of(net)
    if len(drivers) != 1:
        return []
    instance = int(design.pin_instance[drivers[0]])
    cell = design.cell_of(instance)
    gate = clock_gate_of(cell) if cell is not None else None
    clock = design.pins(instance).get(gate.clock, -1) if gate else -1
    return [clock] if clock >= 0 else []
