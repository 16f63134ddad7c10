"""What is irregular about the latches of a design, in words, one finding a cause."""

from collections import defaultdict
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field
from typing import Final

from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic, Severity
from insertdft.netlist import FIRST_NET, Ids, Offsets
from insertdft.simulate.paths import Walker
from insertdft.survey.cone import cone
from insertdft.survey.facts import Domain
from insertdft.survey.latch_columns import NONE, LatchColumns
from insertdft.survey.latch_pair import LatchPair
from insertdft.survey.phases import Phase
from insertdft.survey.verdict import Verdict

#: Gates in front of a latch that are searched for several masters.
_MOST_GATES: Final = 64

OWN_L2: Final = "it can still be scanned: choose a variant that gives it an L2 of its own"


@dataclass(frozen=True, slots=True, eq=False)
class Irregular:
    """What the pairing left over; indices are those of ``LatchColumns``.

    Attributes:
        open_together: Latches that take the state of one that is open at the same time.
        singles: Latches with a clock and without a partner.
        phases: Phase of every latch.
        troubles: Enable nets without a clock port, what is wrong, flat ids of latches behind.
    """

    open_together: Ids = field(repr=False)
    singles: Offsets = field(repr=False)
    phases: Sequence[Phase | None] = field(repr=False)
    troubles: Sequence[tuple[int, str, list[int]]]


def report(
    walker: Walker,
    columns: LatchColumns,
    pairs: Sequence[LatchPair],
    irregular: Irregular,
    verdict: Verdict,
) -> None:
    """Report everything irregular: first what cannot be worked with, then what is good to know."""
    _report_troubles(columns, irregular, verdict)
    _report_one_clock(pairs, verdict)
    _report_open_together(columns, irregular, verdict)
    _report_slaves(pairs, verdict)
    _report_singles(walker, columns, pairs, irregular, verdict)
    used = [pair.master for pair in pairs if pair.master_used]
    _note(
        verdict,
        "latch-master-used",
        Severity.NOTE,
        used,
        "the output of the master also feeds logic, so that L1 and L2 are both system outputs",
        "nothing has to be done; the path out of L1 is tested too",
    )


def _report_troubles(columns: LatchColumns, irregular: Irregular, verdict: Verdict) -> None:
    by_kind: defaultdict[str, list[int]] = defaultdict(list)
    for latch in columns.latches[~columns.clear].tolist():
        by_kind[verdict.design.cell_name(latch)].append(latch)
    for kind, those in by_kind.items():
        verdict.leave_out(
            "latch-unclear", those, _unclear(verdict.design, kind, those[0]), _UNCLEAR_HINT
        )
    for net, why, latches in irregular.troubles:
        verdict.leave_out(
            "clock-not-controllable",
            latches,
            f"latch enable net `{verdict.design.net_name(net)}` {why}",
            "hold the ports that open its path with --hold PORT=VALUE, or clock it from a port"
            " in test",
        )


_UNCLEAR_HINT: Final = (
    "use single latches there, or hold the ports that leave one enable with --hold PORT=VALUE"
)


def _unclear(design: Design, kind: str, latch: int) -> str:
    cell = design.cell_of(latch)
    count = len(cell.storage) if cell else 0
    if count > 1:
        return f"latch cell `{kind}` holds {count} latches and stays as it is"
    return f"latch cell `{kind}` is opened by no single net: its enable is open or has several pins"


def _report_one_clock(pairs: Sequence[LatchPair], verdict: Verdict) -> None:
    by_port: defaultdict[str, list[int]] = defaultdict(list)
    for pair in pairs:
        if pair.one_clock:
            by_port[pair.master_phase.domain.port] += [pair.master, pair.slave]
    for port, latches in by_port.items():
        verdict.leave_out(
            "latch-pair-one-clock",
            latches,
            f"port `{port}` opens the masters at one level and their slaves at the other, so that"
            " no value of it closes both",
            "split the clock into two ports that do not overlap, or have a clock splitter put in",
        )


def _report_open_together(columns: LatchColumns, irregular: Irregular, verdict: Verdict) -> None:
    by_phase: defaultdict[Domain, list[int]] = defaultdict(list)
    for at in irregular.open_together.tolist():
        phase = irregular.phases[at]
        if phase is not None:
            by_phase[phase.domain].append(at)
    for domain, those in by_phase.items():
        first = int(columns.latches[those[0]])
        before = int(columns.latches[columns.source[those[0]]])
        _note(
            verdict,
            "latch-open-together",
            Severity.WARNING,
            columns.latches[those].tolist(),
            f"latch `{verdict.design.name(first)}` takes the state of"
            f" `{verdict.design.name(before)}` while both are open, under {domain.label}: data"
            " races through",
            "open the second one by another clock",
        )


def _report_slaves(pairs: Sequence[LatchPair], verdict: Verdict) -> None:
    _note(
        verdict,
        "latch-several-slaves",
        Severity.NOTE,
        [pair.master for pair in pairs if pair.copies],
        "the master has several slaves in one phase; the first becomes L2, the others hold the"
        " same state and stay as they are",
        "nothing has to be done",
    )
    by_port: defaultdict[str, list[int]] = defaultdict(list)
    for pair in pairs:
        if pair.slave_phase.gated:
            by_port[pair.slave_phase.domain.port].append(pair.slave)
    for port, slaves in by_port.items():
        _note(
            verdict,
            "latch-clock-gated",
            Severity.WARNING,
            slaves,
            f"clock `{port}` of the slaves is gated by logic, and L2 must open whenever a chain"
            " shifts",
            "hold the ports that keep the gate open in test with --hold PORT=VALUE, or move the"
            " gating to the master's clock",
        )


def _report_singles(
    walker: Walker,
    columns: LatchColumns,
    pairs: Sequence[LatchPair],
    irregular: Irregular,
    verdict: Verdict,
) -> None:
    """Report latches without a partner: halves of pairs where there are pairs, else plain facts."""
    masters = {pair.master_phase.domain for pair in pairs}
    slaves = {pair.slave_phase.domain for pair in pairs}
    halves: defaultdict[tuple[str, Domain], list[int]] = defaultdict(list)
    several: list[tuple[int, list[int]]] = []
    for at in irregular.singles.tolist():
        phase = irregular.phases[at]
        if phase is None:
            continue
        if phase.domain in slaves:
            sources = _masters_behind(walker, columns, at, irregular.phases, masters)
            if len(sources) > 1:
                several.append((at, sources))
                continue
            halves["slave without a master", phase.domain].append(at)
        elif phase.domain in masters:
            halves["master without a slave", phase.domain].append(at)
        else:
            halves["", phase.domain].append(at)
    _report_several(columns, several, verdict)
    for (kind, domain), those in halves.items():
        latches = columns.latches[those].tolist()
        if kind:
            _report_half(kind, domain, latches, verdict)
        else:
            _report_alone(domain, latches, verdict)


def _report_half(kind: str, domain: Domain, latches: list[int], verdict: Verdict) -> None:
    many = f"{len(latches)} latches are each" if len(latches) > 1 else "a latch is"
    _note(
        verdict,
        "latch-half-pair",
        Severity.WARNING,
        latches,
        f"{many} half a pair: a {kind}, under {domain.label}",
        f"complete the pair; {OWN_L2}",
    )


def _report_alone(domain: Domain, latches: list[int], verdict: Verdict) -> None:
    _note(
        verdict,
        "latch-alone",
        Severity.NOTE,
        latches,
        f"{len(latches)} latches under {domain.label} stand alone, as in a single-latch design",
        OWN_L2,
    )


def _masters_behind(
    walker: Walker,
    columns: LatchColumns,
    at: int,
    phases: Sequence[Phase | None],
    masters: Iterable[Domain],
) -> list[int]:
    """Return the latches of a master's phase that a latch's data is made of."""
    net = int(columns.data_net[at])
    if net < FIRST_NET:
        return []
    found: dict[int, None] = {}
    for leaf in cone(walker.design, walker.values, net, _MOST_GATES).leaves:
        source = int(columns.shows[leaf])
        phase = phases[source] if source != NONE else None
        if phase is not None and phase.domain in masters:
            found[source] = None
    return list(found)


def _report_several(
    columns: LatchColumns, several: list[tuple[int, list[int]]], verdict: Verdict
) -> None:
    if not several:
        return
    design = verdict.design
    at, sources = several[0]
    names = [f"`{design.name(int(columns.latches[source]))}`" for source in sources[:4]]
    more = f" and {len(sources) - 4} more" if len(sources) > 4 else ""
    _note(
        verdict,
        "latch-several-masters",
        Severity.WARNING,
        columns.latches[[at for at, _ in several]].tolist(),
        f"latch `{design.name(int(columns.latches[at]))}` takes its data from logic over several"
        f" masters, {', '.join(names)}{more}, and is no slave of one",
        f"move the logic in front of one master; {OWN_L2}",
    )


def _note(
    verdict: Verdict, slug: str, severity: Severity, cells: list[int], message: str, hint: str
) -> None:
    """Report without keeping the cells out."""
    if cells:
        names = tuple(map(verdict.design.name, cells))
        span = verdict.design.span(cells[0])
        verdict.findings.append(Diagnostic(slug, severity, message, span, hint, names=names))
