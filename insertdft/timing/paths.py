"""What a designer asks of a ``Timing``: worst paths, clock rates, how many paths are near them."""

from dataclasses import dataclass, field
from typing import NamedTuple

import numpy as np

from insertdft.netlist import Ids
from insertdft.timing.analyse import FROM_PORTS, NEVER, Launch, Timing
from insertdft.timing.tables import Floats


class PathGroup(NamedTuple):
    """Paths from one clock edge to another.

    Attributes:
        launch: What starts them.
        capture: What they must come before.
        endpoints: Number of checks they reach.
        worst: Largest delay with setup, less the delay of the capturing clock.
        period: Clock period that the worst path needs, None where the two clocks differ or the
            paths start at ports. Half a period between opposite edges (duty cycle 1/2).
        check: The check with the worst path.
    """

    launch: Launch
    capture: Launch
    endpoints: int
    worst: float
    period: float | None
    check: int


class ClockRate(NamedTuple):
    """The fastest a clock can run.

    Attributes:
        clock: Port, or instance that makes it.
        period: In the library's time unit.
        rate_hz: Its inverse.
        group: The paths that decide.
    """

    clock: str
    period: float
    rate_hz: float
    group: PathGroup


class Step(NamedTuple):
    """One cell of a path.

    Attributes:
        instance: Its name.
        cell: Its library cell.
        input: Pin that the path enters by.
        net: Net that it drives.
        edge: RISE or FALL at its output.
        delay: Of this cell.
        arrival: At its output, from the start of the path's clock.
        slew: Transition time at its output.
        load: At its output.
    """

    instance: str
    cell: str
    input: str
    net: int
    edge: int
    delay: float
    arrival: float
    slew: float
    load: float


@dataclass(frozen=True, slots=True)
class TimingPath:
    """The worst path to one check from one launch.

    Attributes:
        launch: What starts it.
        capture: What it must come before.
        check: Index into ``Timing.checks``.
        endpoint: Name of the storage cell and its pin.
        steps: Cells from the start on; the first is the launching storage cell, if any.
        arrival: At the data pin.
        setup: Of the worse data edge.
        needed: Arrival and setup less the delay of the capturing clock.
    """

    launch: Launch
    capture: Launch
    check: int
    endpoint: str
    steps: tuple[Step, ...] = field(repr=False)
    arrival: float
    setup: float
    needed: float


def path_groups(timing: Timing) -> tuple[PathGroup, ...]:
    """Return all pairs of launch and capture that have paths, worst period first."""
    found: list[PathGroup] = []
    for number, capture in enumerate(timing.captures):
        checks = np.flatnonzero(timing.capture == number)
        for column, launch in enumerate(timing.launches):
            needed = timing.needed[checks, column]
            if not (needed > NEVER).any():
                continue
            at = int(needed.argmax())
            share = _share(launch, capture)
            found.append(
                PathGroup(
                    launch=launch,
                    capture=capture,
                    endpoints=int((needed > NEVER).sum()),
                    worst=float(needed[at]),
                    period=float(needed[at]) / share if share else None,
                    check=int(checks[at]),
                )
            )
    return tuple(sorted(found, key=lambda group: (-(group.period or 0.0), -group.worst)))


def clock_rates(timing: Timing) -> tuple[ClockRate, ...]:
    """Return the fastest rate of each clock that has paths of its own, slowest clock first."""
    worst: dict[str, PathGroup] = {}
    for group in path_groups(timing):
        if group.period is not None:
            worst.setdefault(group.launch.clock, group)
    unit = timing.wiring.design.library.time_unit_s
    return tuple(
        ClockRate(clock, group.period, 1.0 / (group.period * unit), group)
        for clock, group in worst.items()
        if group.period is not None and group.period > 0
    )


def worst_paths(
    timing: Timing, count: int, group: PathGroup | None = None
) -> tuple[TimingPath, ...]:
    """Return the worst path of each of the ``count`` worst endpoints.

    Args:
        timing: The analysis.
        count: At most so many.
        group: Paths of this group alone; by default all that are within one clock.
    """
    allowed = np.zeros(timing.needed.shape, np.bool_)
    for one in path_groups(timing) if group is None else (group,):
        if group is not None or one.period is not None:
            number = timing.captures.index(one.capture)
            allowed[timing.capture == number, timing.launches.index(one.launch)] = True
    needed = np.where(allowed, timing.needed, NEVER)
    if not needed.size:
        return ()
    column = needed.argmax(axis=1)
    best = needed[np.arange(len(needed)), column]
    order = np.argsort(-best, kind="stable")[:count]
    return tuple(
        trace(timing, int(check), int(column[check])) for check in order if best[check] > NEVER
    )


def trace(timing: Timing, check: int, column: int) -> TimingPath:
    """Return the worst path to ``check`` from ``timing.launches[column]``."""
    checks, wiring = timing.checks, timing.wiring
    data = int(checks.data[check])
    arrival = timing.arrival[[2 * data, 2 * data + 1], column]
    edge = int((arrival + timing.setup[check]).argmax())
    row = int(checks.row[check])
    name = wiring.instance_name(int(checks.instance[check]))
    return TimingPath(
        launch=timing.launches[column],
        capture=timing.captures[int(timing.capture[check])],
        check=check,
        endpoint=f"{name}.{wiring.pin_names[int(wiring.pin_name[row])]}",
        steps=_steps(timing, 2 * data + edge, column),
        arrival=float(arrival[edge]),
        setup=float(timing.setup[check, edge]),
        needed=float(timing.needed[check, column]),
    )


def to_ports(timing: Timing) -> tuple[tuple[str, Launch, float], ...]:
    """Return latest arrival at each output port bit and what starts it; none for still ports."""
    found: list[tuple[str, Launch, float]] = []
    for port in timing.wiring.design.ports:
        if port.direction == "input" or port.net < 0:
            continue
        late = timing.arrival[[2 * port.net, 2 * port.net + 1]].max(axis=0)
        column = int(late.argmax())
        if late[column] > NEVER:
            found.append((port.name, timing.launches[column], float(late[column])))
    return tuple(found)


def endpoint_needs(timing: Timing) -> Floats:
    """Return for each check the period its worst path within one clock needs, NEVER for none."""
    share = np.array(
        [
            [_share(launch, capture) or np.inf for launch in timing.launches]
            for capture in timing.captures
        ]
    ).reshape(len(timing.captures), len(timing.launches))
    with np.errstate(invalid="ignore"):
        periods = timing.needed / share[timing.capture]
    periods[~np.isfinite(share[timing.capture])] = NEVER
    found: Floats = periods.max(axis=1, initial=NEVER)
    return found


def histogram(timing: Timing, edges: Floats) -> Ids:
    """Return how many endpoints need a period within each interval of ``edges``."""
    needs = endpoint_needs(timing)
    counts, _ = np.histogram(needs[needs > NEVER], edges)
    return counts.astype(np.int32)


class Change(NamedTuple):
    """An endpoint before and after a change.

    Attributes:
        endpoint: Name of the storage cell.
        before: Period it needed.
        after: Period it needs.
    """

    endpoint: str
    before: float
    after: float


def changes(before: Timing, after: Timing) -> tuple[Change, ...]:
    """Return every storage cell's worst need before and after, most worsened first.

    Both must come from wirings of one design; cells that only one of them has are left out.
    """
    one, two = _by_instance(before), _by_instance(after)
    found = [
        Change(before.wiring.instance_name(instance), one[instance], two[instance])
        for instance in one
        if instance in two
    ]
    return tuple(sorted(found, key=lambda item: (item.before - item.after, item.endpoint)))


def _by_instance(timing: Timing) -> dict[int, float]:
    needs = endpoint_needs(timing)
    found: dict[int, float] = {}
    for instance, need in zip(timing.checks.instance.tolist(), needs.tolist(), strict=True):
        if need > NEVER:
            found[instance] = max(need, found.get(instance, NEVER))
    return found


def _share(launch: Launch, capture: Launch) -> float | None:
    """Return the part of a period between two edges, None where clocks differ."""
    if launch == FROM_PORTS or launch.clock != capture.clock:
        return None
    return 1.0 if launch.edge == capture.edge else 0.5


def _steps(timing: Timing, node: int, column: int) -> tuple[Step, ...]:
    arcs, wiring = timing.arcs, timing.wiring
    steps: list[Step] = []
    while True:
        best, came = -1, NEVER
        for arc in range(*timing.into[node].tolist()):
            offered = _offered(timing, arc, column)
            if offered > came:
                best, came = arc, offered
        if best < 0:
            return tuple(reversed(steps))
        instance, row = int(arcs.instance[best]), int(arcs.row[best])
        cell = wiring.cells[int(wiring.cell[instance])]
        steps.append(
            Step(
                instance=wiring.instance_name(instance),
                cell=cell.name if cell else "",
                input=wiring.pin_names[int(wiring.pin_name[row])],
                net=node // 2,
                edge=node % 2,
                delay=float(timing.delay[best]),
                arrival=float(came),
                slew=float(timing.slew[node]),
                load=float(timing.load[node // 2]),
            )
        )
        if arcs.launch[best]:
            return tuple(reversed(steps))
        node = int(arcs.tail[best])


def _offered(timing: Timing, arc: int, column: int) -> float:
    arcs, tail = timing.arcs, int(timing.arcs.tail[arc])
    if not arcs.launch[arc]:
        return float(timing.arrival[tail, column] + timing.delay[arc])
    if timing.launch_of_arc[arc] != column:
        return NEVER
    return float(timing.clock_arrival[tail] + timing.delay[arc])
