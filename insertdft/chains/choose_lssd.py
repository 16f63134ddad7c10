"""Choose LSSD conversions: which latches and flip-flops make a position, and how."""

from collections import defaultdict
from collections.abc import Callable, Collection, Sequence
from dataclasses import dataclass, field

from insertdft.chains.pairing import SystemLatch, pair_latches
from insertdft.chains.wishes import Wishes
from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic
from insertdft.library.cell import Cell
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import Walker
from insertdft.styles import Conversion, Refusal
from insertdft.styles.lssd import (
    first_latch,
    flip_flop,
    second_latch,
    single_latch,
    slave_latch,
)
from insertdft.survey.latch_pair import LatchPair
from insertdft.survey.latches import Latches, find_latches


@dataclass(slots=True)
class LssdChoice:
    """Positions of LSSD chains.

    Attributes:
        conversion: Leaf -> conversion.
        followers: Leaf at the head of a position -> the leaf that is its L2.
        refused: Why others have none.
        capture: System clock ports with their rest values, in the order they capture.
        shift_b: Ports beside the new B that open L2 while shifting, with their rest values.
        findings: What is irregular about the latches.
        saved: Number of L2 that L1/L2* saved.
    """

    conversion: dict[int, Conversion] = field(default_factory=dict)
    followers: dict[int, tuple[int, ...]] = field(default_factory=dict)
    refused: defaultdict[Refusal, list[int]] = field(default_factory=lambda: defaultdict(list))
    capture: dict[str, int] = field(default_factory=dict)
    shift_b: dict[str, int] = field(default_factory=dict)
    findings: tuple[Diagnostic, ...] = ()
    saved: int = 0


_APART = Refusal(
    "latch-pair-apart",
    "left alone: the master latch and its slave stand in different modules",
    "keep a latch pair within one module",
)
_GATED = Refusal(
    "shift-clock-gated",
    "left alone: logic can keep the slave's clock off while the chain shifts",
    "gate the master's clock instead, or hold the port that opens the gate with --hold",
)
_LATE = Refusal(
    "negative-edge-in-lssd",
    "left alone: it takes data at the falling edge, and its clock at rest would leave C on",
    "keep its edge with --flip-flops edge, or give it a clock port of its own",
)
_COPY = Refusal(
    "latch-copy",
    "left alone: it copies the state of a latch pair that is in a chain",
    "nothing; its data can be seen and set through the pair",
)


class _Makers:
    """Conversions by kind of cell, each made once so that equal ones are one value."""

    def __init__(self, design: Design, wishes: Wishes) -> None:
        self._design = design
        self._wishes = wishes
        self._made: dict[tuple[str, str], Conversion | Refusal] = {}
        self._taken = {*design.netlist.modules, *design.netlist.cell_names, *design.library.cells}

    def first(self, leaf: int) -> Conversion | Refusal:
        return self._make(
            "first", leaf, lambda cell: first_latch(self._design.library, cell, self._taken)
        )

    def second(self, leaf: int) -> Conversion | Refusal:
        return self._make(
            "second", leaf, lambda cell: second_latch(self._design.library, cell, self._taken)
        )

    def single(self, leaf: int) -> Conversion | Refusal:
        return self._make(
            "single", leaf, lambda cell: single_latch(self._design.library, cell, self._taken)
        )

    def slave(self, leaf: int, inverted: bool) -> Conversion | Refusal:
        return self._make(f"slave {inverted}", leaf, lambda cell: slave_latch(cell, inverted))

    def flip_flop(self, leaf: int) -> Conversion | Refusal:
        form = self._wishes.flip_flops
        return self._make(
            "flip-flop", leaf, lambda cell: flip_flop(self._design.library, cell, form, self._taken)
        )

    def _make(
        self, kind: str, leaf: int, make: Callable[[Cell], Conversion | Refusal]
    ) -> Conversion | Refusal:
        cell = self._design.cell_of(leaf)
        if cell is None:
            raise ValueError(f"leaf {leaf} is a black box")
        key = (kind, cell.name)
        if key not in self._made:
            self._made[key] = make(cell)
        return self._made[key]


def choose_lssd(
    design: Design,
    leaves: Sequence[int],
    held: dict[str, int],
    wishes: Wishes,
    falling: Collection[int],
) -> LssdChoice:
    """Return the positions that the given latches and flip-flops make.

    Args:
        design: The design.
        leaves: Storage cells that are to be LSSD, in source order.
        held: Ports with the values they have in test.
        wishes: The user's.
        falling: Leaves that take data at the falling edge of their clock port.
    """
    choice = LssdChoice()
    wanted = set(leaves)
    nets = {design.port_nets[port]: value for port, value in held.items()}
    walker = Walker(design, propagate(design, nets))
    latches = find_latches(walker)
    choice.findings = latches.findings
    makers = _Makers(design, wishes)
    for pair in (*latches.pairs, *latches.one_clock):
        if pair.master in wanted and pair.slave in wanted:
            _choose_pair(design, makers, pair, choice)
            wanted -= {pair.master, pair.slave, *pair.copies}
    singles = [leaf for leaf in latches.singles if leaf in wanted]
    _choose_singles(design, makers, latches, singles, choice, wishes.star)
    wanted -= set(singles)
    for leaf in leaves:
        if leaf in wanted:
            late = leaf in falling and wishes.flip_flops == "two-phase"
            _keep(choice, leaf, _LATE if late else makers.flip_flop(leaf))
    return choice


def _choose_pair(design: Design, makers: _Makers, pair: LatchPair, choice: LssdChoice) -> None:
    both = [pair.master, pair.slave]
    if design.occurrence[pair.master] != design.occurrence[pair.slave]:
        choice.refused[_APART] += both
        return
    if pair.slave_phase.gated:
        choice.refused[_GATED] += both
        return
    first = makers.first(pair.master)
    if isinstance(first, Refusal):
        choice.refused[first] += both
        return
    inverted = pair.inverted ^ first.taps[0].inverted
    second = makers.slave(pair.slave, inverted)
    if isinstance(second, Refusal):
        choice.refused[second] += both
        return
    choice.conversion |= {pair.master: first, pair.slave: second}
    choice.followers[pair.master] = (pair.slave,)
    if pair.copies:
        choice.refused[_COPY] += pair.copies
    _note(choice.capture, pair.master_phase.domain.port, pair.master_phase.domain.edge)
    _note(choice.shift_b, pair.slave_phase.domain.port, pair.slave_phase.domain.edge)


def _note(ports: dict[str, int], port: str, edge: str) -> None:
    ports.setdefault(port, int(edge in ("low", "fall")))


def _choose_singles(
    design: Design,
    makers: _Makers,
    latches: Latches,
    singles: list[int],
    choice: LssdChoice,
    star: bool,
) -> None:
    rest = _share(design, makers, latches, singles, choice) if star else singles
    for leaf in rest:
        _keep(choice, leaf, makers.single(leaf))
    for leaf in singles:
        if leaf in choice.conversion:
            domain = latches.phase_of[leaf].domain
            _note(choice.capture, domain.port, domain.edge)


def _share(
    design: Design,
    makers: _Makers,
    latches: Latches,
    singles: list[int],
    choice: LssdChoice,
) -> list[int]:
    """Let latches of one place share positions; return those that stand alone."""
    by_place: defaultdict[int, list[SystemLatch]] = defaultdict(list)
    for leaf in singles:
        phase = latches.phase_of[leaf].domain.label
        by_place[int(design.occurrence[leaf])].append(SystemLatch(leaf, (), phase))
    alone: list[int] = []
    for those in by_place.values():
        found = pair_latches(those)
        alone += found.unpaired
        for first, second in found.pairs:
            one = makers.first(first)
            two = makers.second(second)
            if isinstance(one, Refusal) or isinstance(two, Refusal):
                alone += [first, second]
                continue
            choice.conversion |= {first: one, second: two}
            choice.followers[first] = (second,)
            choice.saved += 1
    return sorted(alone)


def _keep(choice: LssdChoice, leaf: int, found: Conversion | Refusal) -> None:
    if isinstance(found, Refusal):
        choice.refused[found].append(leaf)
    else:
        choice.conversion[leaf] = found
