"""Where each storage cell's clock comes from, and whether a tester controls it."""

from collections import defaultdict
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from insertdft.design.flat import Design
from insertdft.library.cell import Storage, StorageKind
from insertdft.library.expression import Expression, Not, variables
from insertdft.netlist import Ids
from insertdft.simulate.paths import End, Source, Walker, pin_and_parity
from insertdft.survey.facts import Domain
from insertdft.survey.verdict import Verdict

SLUG: Final = "clock-not-controllable"


@dataclass(frozen=True, slots=True)
class Clocks:
    """Domains, and the domain of each storage cell that has one (flat id -> index)."""

    domains: tuple[Domain, ...]
    of: Mapping[int, int]


def find_clocks(walker: Walker, storage: Ids, verdict: Verdict) -> Clocks:
    """Trace every clock pin to its port; report those that reach none."""
    by_pin: defaultdict[tuple[int, bool, bool], list[int]] = defaultdict(list)
    unreadable: list[int] = []
    for cell in storage.tolist():
        pin = clock_pin(walker, cell)
        if pin is None:
            unreadable.append(cell)
        else:
            by_pin[pin].append(cell)
    _report_unreadable(walker.design, unreadable, verdict)
    numbers: dict[Domain, int] = {}
    of: dict[int, int] = {}
    for (net, inverted, level), cells in by_pin.items():
        source = walker.source(net)
        if source.end is not End.PORT:
            _report(walker.design, net, source, cells, verdict)
            continue
        active_low = source.inverted ^ inverted
        edge = ("low" if active_low else "high") if level else ("fall" if active_low else "rise")
        domain = Domain(walker.design.input_ports[source.net], edge)
        of.update(dict.fromkeys(cells, numbers.setdefault(domain, len(numbers))))
    return Clocks(tuple(numbers), of)


def clock_pin(walker: Walker, cell: int) -> tuple[int, bool, bool] | None:
    """Return (net, inverted, level-sensitive) of the one clock of a storage cell.

    None if the cell is described by a state table, has several clocks, or a clock that depends on
    more than one pin.
    """
    described = walker.design.cell_of(cell)
    if described is None or len(described.storage) != 1:
        return None
    storage = described.storage[0]
    if storage.clock is None or storage.clock_also is not None:
        return None
    found = _literal_pin(walker, cell, storage)
    return None if found is None else (*found, storage.kind is StorageKind.LATCH)


def _literal_pin(walker: Walker, cell: int, storage: Storage) -> tuple[int, bool] | None:
    clock = storage.clock
    if clock is None:
        return None
    literal: Expression = clock
    if len(variables(clock)) > 1 or (isinstance(clock, Not) and len(variables(clock)) != 1):
        literal = walker.literal(cell, clock)
    return pin_and_parity(walker.design, cell, literal)


def _report_unreadable(design: Design, cells: list[int], verdict: Verdict) -> None:
    by_kind: defaultdict[str, list[int]] = defaultdict(list)
    for cell in cells:
        by_kind[design.cell_name(cell)].append(cell)
    for kind, those in by_kind.items():
        verdict.leave_out(
            SLUG,
            those,
            f"cell `{kind}` has no single clock pin that the library describes",
            "give a library that describes its clock by clocked_on or enable",
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
