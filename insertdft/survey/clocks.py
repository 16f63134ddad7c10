"""Where each storage cell's clock comes from, and whether a tester controls it."""

from collections import defaultdict
from dataclasses import dataclass
from typing import Final, NamedTuple

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, StorageKind
from insertdft.library.expression import Not, Var, as_literal, variables
from insertdft.netlist import Ids
from insertdft.simulate.paths import End, Source, Walker
from insertdft.survey.facts import Domain
from insertdft.survey.grouping import by_net
from insertdft.survey.verdict import Verdict

SLUG: Final = "clock-not-controllable"


@dataclass(frozen=True, slots=True)
class Clocks:
    """Domains, and the storage cells (flat ids) of each."""

    domains: tuple[Domain, ...]
    cells: tuple[tuple[int, ...], ...]


def find_clocks(walker: Walker, storage: Ids, verdict: Verdict) -> Clocks:
    """Trace every clock pin to its port; report those that reach none."""
    by_pin = _by_clock_pin(walker, storage, verdict)
    found: defaultdict[Domain, list[int]] = defaultdict(list)
    for (net, inverted, level), cells in by_pin.items():
        source = walker.source(net)
        if source.end is not End.PORT:
            _report(walker.design, net, source, cells, verdict)
            continue
        active_low = source.inverted ^ inverted
        edge = ("low" if active_low else "high") if level else ("fall" if active_low else "rise")
        domain = Domain(walker.design.input_ports[source.net], edge)
        found[domain] += cells
    return Clocks(tuple(found), tuple(map(tuple, found.values())))


class ClockPin(NamedTuple):
    """The one clock of a storage cell: pin, whether its inverse acts, whether by level."""

    pin: str
    inverted: bool
    level: bool


def clock_pin(cell: Cell) -> ClockPin | None:
    """Return the clock pin of a cell whose every storage element has the same.

    None if the cell is described by a state table, has several clocks, or a clock that depends on
    more than one pin.
    """
    clocks = {(at.clock, at.clock_also, at.kind) for at in cell.storage}
    if len(clocks) != 1:
        return None
    clock, also, kind = clocks.pop()
    if clock is None or also is not None:
        return None
    literal = as_literal(clock, variables(clock))
    inner = literal.part if isinstance(literal, Not) else literal
    if not isinstance(inner, Var):
        return None
    return ClockPin(inner.name, isinstance(literal, Not), kind is StorageKind.LATCH)


def _by_clock_pin(
    walker: Walker, storage: Ids, verdict: Verdict
) -> dict[tuple[int, bool, bool], list[int]]:
    """Return the cells of each (net, inverted, level), in order of the first cell."""
    design = walker.design
    found: defaultdict[tuple[int, bool, bool], list[int]] = defaultdict(list)
    unreadable: list[int] = []
    kinds = design.cell[storage]
    for kind in dict.fromkeys(kinds.tolist()):
        cells = storage[kinds == kind]
        described = design.cells[kind]
        clock = clock_pin(described) if described else None
        if clock is None:
            unreadable += cells.tolist()
            continue
        nets = design.nets_at(clock.pin)[cells]
        unreadable += cells[nets < 0].tolist()
        for net, those in by_net(cells, nets).items():
            found[net, clock.inverted, clock.level] += those
    _report_unreadable(design, unreadable, verdict)
    return dict(sorted(found.items(), key=lambda item: item[1][0]))


def _report_unreadable(design: Design, cells: list[int], verdict: Verdict) -> None:
    by_kind: defaultdict[str, list[int]] = defaultdict(list)
    for cell in cells:
        by_kind[design.cell_name(cell)].append(cell)
    for kind, those in by_kind.items():
        verdict.leave_out(
            SLUG,
            those,
            f"cell `{kind}` has no single clock pin that is described and connected",
            "connect it, or give a library that describes its clock by clocked_on or enable",
        )


def _report(design: Design, net: int, source: Source, cells: list[int], verdict: Verdict) -> None:
    verdict.leave_out(
        SLUG,
        cells,
        f"clock net `{design.net_name(net)}` does not come from an input port:"
        f" it is decided by {what(design, source)}",
        "hold the ports that open its path with --hold PORT=VALUE, or clock it from a port in test",
    )


def what(design: Design, source: Source) -> str:
    """Return in words what a walk ended at."""
    if source.end in (End.STORAGE, End.GATE, End.BLACK_BOX):
        name, cell = design.name(source.instance), design.cell_name(source.instance)
        return f"{source.end.value}, `{name}` ({cell})"
    if source.end is End.CONSTANT:
        return "a constant"
    return f"{source.end.value} (net `{design.net_name(source.net)}`)"
