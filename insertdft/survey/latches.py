"""Latches of a design: pairs of master and slave, latches that stand alone, and what is irregular.

A pair is a master M and a slave S: the data of S is the state of M alone, through buffers and
inverters, and the two are never meant to be open together. It is the shift-register latch of E. B.
Eichelberger and T. W. Williams (DAC 1977) without its scan port: L1 and L2.
"""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field
from typing import Final, NamedTuple

import numpy as np

from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic
from insertdft.netlist import Ids
from insertdft.simulate.paths import Walker
from insertdft.survey.latch_columns import NONE, LatchColumns, read_latches
from insertdft.survey.latch_findings import Irregular, report
from insertdft.survey.latch_pair import LatchPair
from insertdft.survey.phases import Enable, NoPhase, Phase, find_phases
from insertdft.survey.verdict import Verdict
from insertdft.survey.wires import Flags, Wires, find_wires

#: Rounds in which pairs along a row of latches are settled: each settles one more stage.
_MOST_STAGES: Final = 64
#: Vote of a master whose data is logic or a port, against 1 of one whose data is a latch's state.
_STRONG: Final = 1 << 20


@dataclass(frozen=True, slots=True, eq=False)
class Latches:
    """All latches of a design.

    Attributes:
        pairs: Opened by two clock ports, in the order of their masters.
        one_clock: Opened by two levels of one port: flip-flops made of latches. No value of the
            port closes both, so LSSD needs their clock split first.
        singles: Flat ids of latches with a clock that belong to no pair, in source order.
        phase_of: Phase of each latch that has one, by flat id.
        unfit: Flat ids of latches that cannot be worked with, each named in a finding.
        findings: What is irregular, one a cause.
        reasons: Flat id -> slug of the finding that names it first.
    """

    pairs: tuple[LatchPair, ...] = field(repr=False)
    one_clock: tuple[LatchPair, ...] = field(repr=False)
    singles: tuple[int, ...] = field(repr=False)
    phase_of: dict[int, Phase] = field(repr=False)
    unfit: tuple[int, ...]
    findings: tuple[Diagnostic, ...]
    reasons: dict[int, str] = field(repr=False)

    def clock_ports(self) -> dict[str, int]:
        """Return every port that opens a latch with its value at rest, in order of first use."""
        found: dict[str, int] = {}
        for phase in self.phase_of.values():
            found.setdefault(phase.domain.port, int(phase.domain.edge == "low"))
        return found


def find_latches(walker: Walker, clocks: Iterable[str] = ()) -> Latches:
    """Return the latches of the walker's design, paired where they are pairs.

    Args:
        walker: The design with the constants of the mode to look at.
        clocks: Ports that are clocks, to tell them from gating signals; may stay empty.
    """
    wires = find_wires(walker)
    columns = read_latches(walker, wires)
    phases = _phases(walker, columns, clocks)
    verdict = Verdict(walker.design)
    usable = phases.ids != NONE
    edges = _edges(columns, usable, phases.ids, phases.table)
    chosen, copies = _choose(columns, edges.slaves, phases.ids)
    made = _pairs(walker.design, columns, wires, chosen, copies, phases.of_latch)
    taken = np.zeros(len(columns.latches), bool)
    taken[chosen] = taken[columns.source[chosen]] = True
    taken[[at for those in copies.values() for at in those]] = True
    singles = np.flatnonzero(~taken & usable)
    irregular = Irregular(edges.shared, singles, phases.of_latch, phases.troubles)
    report(walker, columns, made, irregular, verdict)
    latches = columns.latches.tolist()
    return Latches(
        pairs=tuple(pair for pair in made if not pair.one_clock),
        one_clock=tuple(pair for pair in made if pair.one_clock),
        singles=tuple(columns.latches[singles].tolist()),
        phase_of={
            latch: phase
            for latch, phase in zip(latches, phases.of_latch, strict=True)
            if phase is not None
        },
        unfit=tuple(columns.latches[~usable].tolist()),
        findings=tuple(verdict.findings),
        reasons=verdict.reasons,
    )


@dataclass(frozen=True, slots=True, eq=False)
class _Phases:
    """Phase of every latch.

    Attributes:
        table: Each phase once.
        ids: Shape (k,), ids into ``table``, NONE for a latch without one.
        of_latch: The same as values.
        troubles: Enable nets without a clock port, what is wrong, and the latches behind.
    """

    table: tuple[Phase, ...]
    ids: Ids
    of_latch: Sequence[Phase | None]
    troubles: list[tuple[int, str, list[int]]]


def _phases(walker: Walker, columns: LatchColumns, clocks: Iterable[str]) -> _Phases:
    keys = columns.enable_net.astype(np.int64) * 2 + columns.enable_turned
    unique, where = np.unique(np.where(columns.clear, keys, -1), return_inverse=True)
    enables = [Enable(key // 2, bool(key % 2)) for key in unique.tolist() if key >= 0]
    found = find_phases(walker, enables, clocks)
    table = tuple(dict.fromkeys(at for at in found.values() if isinstance(at, Phase)))
    number = {phase: at for at, phase in enumerate(table)}
    ids: list[int] = []
    troubles: list[tuple[int, str, list[int]]] = []
    for at, key in enumerate(unique.tolist()):
        phase = found[Enable(key // 2, bool(key % 2))] if key >= 0 else None
        ids.append(number[phase] if isinstance(phase, Phase) else NONE)
        if isinstance(phase, NoPhase):
            behind = columns.latches[where == at].tolist()
            troubles.append((key // 2, phase.why, behind))
    of_latch = np.array(ids, np.int32)[where]
    values = [table[at] if at >= 0 else None for at in of_latch.tolist()]
    return _Phases(table, of_latch, values, troubles)


class _Edges(NamedTuple):
    """Latches that take the state of one other latch.

    Attributes:
        slaves: Indices of those that may be its slave.
        shared: Indices of those that are open together with it.
    """

    slaves: Ids
    shared: Ids


def _edges(columns: LatchColumns, usable: Flags, ids: Ids, table: Sequence[Phase]) -> _Edges:
    """Return which latches may be slaves: of two phases, one is always the master's.

    The orientation is that of most masters whose own data is no latch's state.
    """
    source = columns.source
    direct = np.flatnonzero(usable & (source != NONE))
    direct = direct[usable[source[direct]] & (source[direct] != direct)]
    numbers = {domain: at for at, domain in enumerate(dict.fromkeys(at.domain for at in table))}
    domain = np.array([numbers[at.domain] for at in table] or [0], np.int32)
    first, second = domain[ids[source[direct]]], domain[ids[direct]]
    shared = direct[first == second]
    apart = first != second
    direct, first, second = direct[apart], first[apart], second[apart]
    votes = np.zeros((len(domain), len(domain)), np.int64)
    np.add.at(votes, (first, second), np.where(source[source[direct]] == NONE, _STRONG, 1))
    forward, backward = votes[first, second], votes[second, first]
    kept = (forward > backward) | ((forward == backward) & (first < second))
    return _Edges(direct[kept].astype(np.int32), shared.astype(np.int32))


def _choose(columns: LatchColumns, open_: Ids, ids: Ids) -> tuple[Ids, dict[int, tuple[int, ...]]]:
    """Return the slaves of the pairs, and further slaves in the same phase by slave.

    Along a row of latches of three phases or more, pairs are taken from its start.
    """
    source = columns.source
    settled = np.zeros(len(source), bool)
    accepted: list[Ids] = []
    for _ in range(_MOST_STAGES):
        is_slave = np.zeros(len(source), bool)
        is_slave[open_] = True
        ready = ~is_slave[source[open_]]
        if not ready.any():
            break
        fresh = open_[ready]
        accepted.append(fresh)
        settled[fresh] = True
        rest = open_[~ready]
        open_ = rest[~settled[source[rest]]]
    slaves = np.sort(np.concatenate(accepted)) if accepted else np.zeros(0, np.int32)
    _, first = np.unique(source[slaves], return_index=True)
    chosen = slaves[np.sort(first)]
    partner = np.full(len(source), NONE, np.int32)
    partner[source[chosen]] = chosen
    copies: dict[int, list[int]] = {}
    for extra in np.setdiff1d(slaves, chosen).tolist():
        slave = int(partner[source[extra]])
        if ids[slave] == ids[extra]:
            copies.setdefault(slave, []).append(extra)
    return chosen, {slave: tuple(those) for slave, those in copies.items()}


def _pairs(
    design: Design,
    columns: LatchColumns,
    wires: Wires,
    chosen: Ids,
    copies: dict[int, tuple[int, ...]],
    phases: Sequence[Phase | None],
) -> tuple[LatchPair, ...]:
    masters = columns.source[chosen]
    order = np.argsort(masters, kind="stable")
    chosen, masters = chosen[order], masters[order]
    expected = np.ones(len(chosen), np.int64)
    for at in np.flatnonzero(np.isin(chosen, list(copies))).tolist():
        expected[at] += len(copies[int(chosen[at])])
    used = columns.sinks(design, wires)[masters] > expected
    latch = columns.latches
    found: list[LatchPair] = []
    rows = zip(
        masters.tolist(),
        chosen.tolist(),
        columns.source_turned[chosen].tolist(),
        used.tolist(),
        latch[masters].tolist(),
        latch[chosen].tolist(),
        strict=True,
    )
    for at, slave, turned, elsewhere, master_id, slave_id in rows:
        opens, follows = phases[at], phases[slave]
        if opens is None or follows is None:
            raise RuntimeError(f"latch {master_id} or {slave_id} is paired without a phase")
        extra = tuple(latch[list(copies[slave])].tolist()) if slave in copies else ()
        found.append(LatchPair(master_id, slave_id, turned, opens, follows, elsewhere, extra))
    return tuple(found)
