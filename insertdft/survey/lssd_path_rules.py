"""Rules 2 and 4, what may lead to the data and the clock pins of a latch; see ``lssd_rules``."""

from collections.abc import Iterator, Sequence

import numpy as np

from insertdft.netlist import Offsets
from insertdft.survey.cone import Reach, gates_between, walk
from insertdft.survey.latch_ports import LatchKind, starts
from insertdft.survey.lssd_model import Clocked, Group
from insertdft.survey.lssd_words import Witness, cells_named, route, spans_on


def clock_into_data(rules: Clocked) -> Iterator[Witness]:
    """Yield the breaks of rule 4."""
    for clock in rules.clocks:
        for kind in rules.kinds:
            for pin in (*(at.pin for at in kind.data), *kind.asynchronous):
                for latch, net in _hits(rules, kind, pin, rules.behind(clock)):
                    yield _break(
                        rules,
                        "lssd-clock-into-data",
                        (rules.behind(clock), net, latch),
                        f"clock port `{rules.port(clock)}` reaches pin `{pin}` of latch"
                        f" `{rules.design.name(latch)}`",
                        "let the clock feed clock pins and outputs only",
                    )


def same_phase(rules: Clocked) -> Iterator[Witness]:
    """Yield the breaks of rule 2: one forward walk a clock from all latches it opens."""
    for clock in rules.clocks:
        groups = [group for group in rules.groups if clock in group.opening.clocks]
        shown = [net for at in groups for net in starts(rules.design, at.kind, at.chosen)]
        reach = walk(rules.graph, shown)
        for group in groups:
            yield from _same_data(rules, group, clock, reach)
            yield from _own_clock(rules, group, clock, reach)


def _same_data(rules: Clocked, group: Group, clock: int, reach: Reach) -> Iterator[Witness]:
    """Yield latches that take under ``clock`` what latches of ``clock`` show."""
    design, port = rules.design, rules.port(clock)
    for data in group.kind.data:
        if not any(_depends(rules, group.nets[pin], clock) for pin in data.clocks):
            continue
        for latch, net in _hits(rules, group.kind, data.pin, reach, group.chosen):
            yield _break(
                rules,
                "lssd-same-phase-path",
                (reach, net, latch),
                f"latch `{_source(rules, reach, net)}` feeds pin `{data.pin}` of latch"
                f" `{design.name(latch)}`, and clock `{port}` opens both",
                "open one of them by another clock, or put a latch of another clock between",
            )


def _own_clock(rules: Clocked, group: Group, clock: int, reach: Reach) -> Iterator[Witness]:
    """Yield the enable of a group if latches of ``clock`` gate ``clock`` on the way to it."""
    design, port = rules.design, rules.port(clock)
    for pin, net in group.nets.items():
        if net < 0 or not reach.reached[net] or not _depends(rules, net, clock):
            continue
        first = group.first()
        many = f" and {len(group.chosen) - 1} more" if len(group.chosen) > 1 else ""
        yield _break(
            rules,
            "lssd-gates-own-clock",
            (reach, net, first),
            f"latch `{_source(rules, reach, net)}`, opened by clock `{port}`, gates that clock at"
            f" pin `{pin}` of latch `{design.name(first)}`{many}",
            "gate the clock with latches of another clock",
        )


def _depends(rules: Clocked, net: int, clock: int) -> bool:
    return net >= 0 and bool(rules.behind(clock).reached[net])


def _hits(
    rules: Clocked,
    kind: LatchKind,
    pin: str,
    reach: Reach,
    chosen: Offsets | None = None,
) -> Iterator[tuple[int, int]]:
    """Yield each latch (of ``chosen``) whose ``pin`` is reached, and the net there."""
    nets = kind.nets(rules.design, pin)
    there = np.flatnonzero((nets >= 0) & reach.reached[np.maximum(nets, 0)])
    if chosen is not None:
        there = np.intersect1d(there, chosen)
    yield from zip(kind.instances[there].tolist(), nets[there].tolist(), strict=True)


def _source(rules: Clocked, reach: Reach, net: int) -> str:
    """Return the name of the latch that a path to ``net`` starts at."""
    rows = rules.design.drivers.of(reach.path(net)[0])
    return rules.design.name(int(rules.design.pin_instance[rows[0]]))


def _break(
    rules: Clocked, slug: str, where: tuple[Reach, int, int], message: str, hint: str
) -> Witness:
    """Return a break with its path: what drives its start, the gates, the latch at its end."""
    reach, net, latch = where
    design = rules.design
    nets = reach.path(net)
    gates = gates_between(design, nets)
    first: Sequence[int] = [int(design.pin_instance[row]) for row in design.drivers.of(nets[0])]
    return Witness(
        slug,
        message + route(design, gates),
        hint,
        design.span(latch),
        cells_named(design, [*first, *gates, latch]),
        spans_on(design, gates),
    )
