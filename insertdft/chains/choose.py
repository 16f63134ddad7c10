"""Choose which cells are converted, and how."""

from collections import defaultdict
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field, replace
from typing import NamedTuple

import numpy as np

from insertdft.chains.arrange import Cells
from insertdft.chains.choose_lssd import LssdChoice, choose_lssd
from insertdft.chains.regions import Hierarchy, copies
from insertdft.chains.wishes import Wishes
from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, Diagnostic, Severity
from insertdft.netlist import Ids
from insertdft.styles import Chooser, Conversion, Refusal
from insertdft.survey import LEFT_ALONE, Domain, Survey
from insertdft.survey.kept import matches, unmatched
from insertdft.survey.look import is_latch


class Group(NamedTuple):
    """Cells that may share a chain.

    Attributes:
        style: Scan style of them all.
        domain: Clock port and edge; for LSSD, whose chains are shifted by A and B alone, None.
    """

    style: str
    domain: Domain | None

    @property
    def label(self) -> str:
        """A few words for messages."""
        return f"{self.style} {self.domain.label}" if self.domain else self.style


@dataclass(frozen=True, slots=True, eq=False)
class Chosen:
    """Cells to convert and why others are not.

    Attributes:
        cells: What goes into chains, by group.
        groups: By number.
        conversion: Shape (leaves,), index of the conversion of each leaf, -1 for none.
        conversions: What the indices mean.
        reasons: Leaf -> slug of what keeps it out.
        lssd: Positions of LSSD chains; empty if there are none.
        findings: One a cause, beyond the survey's.
    """

    cells: Cells
    groups: tuple[Group, ...]
    conversion: Ids
    conversions: list[Conversion]
    reasons: dict[int, str]
    lssd: LssdChoice
    findings: list[Diagnostic] = field(default_factory=list)


def choose_cells(survey: Survey, wishes: Wishes, layout: Hierarchy) -> Chosen:
    """Return the cells to convert, with their groups and conversions.

    Raises:
        DesignError: A pattern matches nothing.
    """
    design = survey.design
    refused: defaultdict[Refusal, list[int]] = defaultdict(list)
    chosen = _Conversions(np.full(len(design.cell), -1, np.int32))
    candidates = _candidates(survey, wishes)
    leaves = _included(design, candidates, wishes.include, refused)
    by_style = _styles(design, leaves, wishes)
    lssd = _choose_lssd(survey, by_style.pop("lssd", []), wishes, chosen, refused)
    for style, those in by_style.items():
        _choose_flip_flops(design, style, those, chosen, refused)
    conversion = chosen.of
    _agree(layout, conversion, refused)
    followers = {
        head: behind
        for head, behind in lssd.followers.items()
        if conversion[head] >= 0 and conversion[list(behind)].min() >= 0
    }
    heads = conversion >= 0
    heads[[leaf for behind in followers.values() for leaf in behind]] = False
    leaves_of_chains = np.flatnonzero(heads).astype(np.int32)
    groups, group = _group(survey, chosen.table, conversion, leaves_of_chains)
    conversions = _give_scan_clocks(layout, chosen.table, conversion, group, groups)
    bits = np.zeros(len(design.cell), np.int32)
    bits[leaves_of_chains] = [conversions[at].bits for at in conversion[leaves_of_chains].tolist()]
    reasons = {leaf: at for leaf, at in survey.reasons.items() if conversion[leaf] < 0}
    reasons |= {leaf: refusal.slug for refusal, those in refused.items() for leaf in those}
    findings = [_refusal(design, refusal, those) for refusal, those in refused.items()]
    cells = Cells(leaves_of_chains, group, bits, followers)
    findings += lssd.findings
    return Chosen(cells, groups, conversion, conversions, reasons, lssd, findings)


@dataclass(slots=True)
class _Conversions:
    """Conversions so far.

    Attributes:
        of: Shape (leaves,), index of the conversion of each leaf, -1 for none.
        table: What the indices mean.
    """

    of: Ids
    table: list[Conversion] = field(default_factory=list)


def _candidates(survey: Survey, wishes: Wishes) -> Ids:
    """Return the storage cells that nothing keeps out.

    A latch of an LSSD chain may have a clock that logic gates: only its shift clocks need not be.
    """
    free = survey.domain != LEFT_ALONE
    if wishes.style == "lssd" or wishes.latches == "lssd" or wishes.styles:
        gated = {at for at, slug in survey.reasons.items() if slug in _GATED_CLOCKS}
        latches = [at in gated and is_latch(survey.design, at) for at in survey.storage.tolist()]
        free = free | np.array(latches, bool)
    found: Ids = survey.storage[free]
    return found


_GATED_CLOCKS = frozenset({"clock-not-controllable"})


def _styles(design: Design, leaves: Iterable[int], wishes: Wishes) -> dict[str, list[int]]:
    """Return the cells of each style, in source order."""
    found: defaultdict[str, list[int]] = defaultdict(list)
    if not wishes.styles and wishes.latches == "as-style":
        return {wishes.style: list(leaves)}
    for leaf in leaves:
        style = wishes.style
        if wishes.latches == "lssd" and is_latch(design, leaf):
            style = "lssd"
        name = design.name(leaf) if wishes.styles else ""
        for pattern, other in wishes.styles:
            if matches(name, pattern):
                style = other
        found[style].append(leaf)
    return dict(found)


def _choose_lssd(
    survey: Survey,
    leaves: list[int],
    wishes: Wishes,
    chosen: _Conversions,
    refused: defaultdict[Refusal, list[int]],
) -> LssdChoice:
    if not leaves:
        return LssdChoice()
    held = {item.port: item.value for item in (*survey.held, *survey.set_resets)}
    pairs = zip(survey.storage.tolist(), survey.domain.tolist(), strict=True)
    falls = {number for number, at in enumerate(survey.domains) if at.edge == "fall"}
    falling = {leaf for leaf, domain in pairs if domain in falls}
    choice = choose_lssd(survey.design, leaves, held, wishes, falling)
    numbers: dict[int, int] = {}
    for leaf, conversion in choice.conversion.items():
        if id(conversion) not in numbers:
            numbers[id(conversion)] = len(chosen.table)
            chosen.table.append(conversion)
        chosen.of[leaf] = numbers[id(conversion)]
    for refusal, those in choice.refused.items():
        refused[refusal] += those
    return choice


def _choose_flip_flops(
    design: Design,
    style: str,
    leaves: list[int],
    chosen: _Conversions,
    refused: defaultdict[Refusal, list[int]],
) -> None:
    chooser = Chooser(design, style)
    base = len(chosen.table)
    for leaf in leaves:
        found = chooser.choose(leaf)
        if isinstance(found, Refusal):
            refused[found].append(leaf)
        else:
            chosen.of[leaf] = base + found
    chosen.table += chooser.conversions


def _group(
    survey: Survey, conversions: Sequence[Conversion], conversion: Ids, leaves: Ids
) -> tuple[tuple[Group, ...], Ids]:
    """Return the groups in order of style and domain, and the group of each leaf of the design."""
    domain = np.full(len(survey.design.cell), -1, np.int32)
    domain[survey.storage] = survey.domain
    keys = list(zip(domain[leaves].tolist(), conversion[leaves].tolist(), strict=True))
    found: dict[tuple[int, int], Group] = {}
    for at, number in sorted(set(keys)):
        style = conversions[number].style
        found[at, number] = Group(style, None if style == "lssd" else survey.domains[at])
    groups = tuple(dict.fromkeys(found.values()))
    number_of = {key: groups.index(group) for key, group in found.items()}
    group = np.full(len(survey.design.cell), -1, np.int32)
    group[leaves] = [number_of[key] for key in keys]
    return groups, group


def _give_scan_clocks(
    layout: Hierarchy,
    conversions: Sequence[Conversion],
    conversion: Ids,
    group: Ids,
    groups: Sequence[Group],
) -> list[Conversion]:
    """Give each group of clocked-scan cells a scan clock of its own; return all conversions.

    ``conversion`` is brought up to date. Where a module stands in places of several groups its
    text can name one scan clock only, so all groups share one then.
    """
    found = list(conversions)
    mine = [number for number, at in enumerate(groups) if at.style == "clocked-scan"]
    if len(mine) < 2:
        return found
    wanted = conversion.copy()
    for place, number in enumerate(mine, start=1):
        here = group == number
        for old in sorted(set(conversion[here].tolist())):
            pins = {pin: f"{net}/{place}" for pin, net in found[old].test_pins.items()}
            found.append(replace(found[old], test_pins=pins))
            wanted[here & (conversion == old)] = len(found) - 1
    if all((wanted[leaves] == wanted[leaves[0]]).all() for _, leaves in copies(layout)):
        conversion[:] = wanted
        return found
    return list(conversions)


def _included(
    design: Design, wanted: Ids, patterns: tuple[str, ...], refused: dict[Refusal, list[int]]
) -> Iterable[int]:
    leaves: list[int] = wanted.tolist()
    if not patterns:
        return leaves
    names = {leaf: design.name(leaf) for leaf in leaves}
    missed = [
        unmatched(pattern, names.values())
        for pattern in patterns
        if not any(matches(name, pattern) for name in names.values())
    ]
    if missed:
        raise DesignError(missed)
    kept = [leaf for leaf, name in names.items() if any(matches(name, at) for at in patterns)]
    chosen = set(kept)
    others = [leaf for leaf in names if leaf not in chosen]
    if others:
        refused[_NOT_INCLUDED] = others
    return kept


_NOT_INCLUDED = Refusal(
    "cell-kept", "left alone: no --include pattern names it", "name it to let it be converted"
)
_COPIES_DIFFER = Refusal(
    "module-copies-differ",
    "left alone: its module stands in several places and the cell cannot be converted in all",
    "mend the finding of the other copies, or give this place a module of its own",
)


def _agree(layout: Hierarchy, conversion: Ids, refused: dict[Refusal, list[int]]) -> None:
    """Convert an instance of a module that stands in several places in all of them or in none."""
    for _, leaves in copies(layout):
        found = conversion[leaves]
        differ = (found != found[0]).any(axis=0)
        lost = leaves[:, differ]
        dropped = lost[conversion[lost] >= 0]
        if len(dropped):
            refused[_COPIES_DIFFER] = [*refused.get(_COPIES_DIFFER, []), *dropped.tolist()]
        conversion[lost] = -1


def _refusal(design: Design, refusal: Refusal, leaves: Sequence[int]) -> Diagnostic:
    quiet = refusal.slug in ("latch-not-scanned", "cell-kept", "latch-copy")
    return Diagnostic(
        refusal.slug,
        Severity.NOTE if quiet else Severity.WARNING,
        refusal.message,
        design.span(leaves[0]),
        refusal.hint,
        names=tuple(design.name(leaf) for leaf in leaves),
    )
