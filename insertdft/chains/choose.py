"""Choose which cells are converted, and how."""

from collections import defaultdict
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field, replace
from typing import NamedTuple

import numpy as np

from insertdft.chains.arrange import Cells
from insertdft.chains.regions import Hierarchy, copies
from insertdft.chains.wishes import Wishes
from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, Diagnostic, Severity
from insertdft.netlist import Ids
from insertdft.styles import Chooser, Conversion, Refusal
from insertdft.survey import LEFT_ALONE, Domain, Survey
from insertdft.survey.kept import matches, unmatched


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
        findings: One a cause, beyond the survey's.
    """

    cells: Cells
    groups: tuple[Group, ...]
    conversion: Ids
    conversions: list[Conversion]
    reasons: dict[int, str]
    findings: list[Diagnostic] = field(default_factory=list)


def choose_cells(survey: Survey, wishes: Wishes, layout: Hierarchy) -> Chosen:
    """Return the cells to convert, with their groups and conversions.

    Raises:
        DesignError: A pattern matches nothing.
    """
    design = survey.design
    chooser = Chooser(design, wishes.style)
    conversion = np.full(len(design.cell), -1, np.int32)
    refused: defaultdict[Refusal, list[int]] = defaultdict(list)
    wanted = survey.storage[survey.domain != LEFT_ALONE]
    for leaf in _included(design, wanted, wishes.include, refused):
        found = chooser.choose(leaf)
        if isinstance(found, Refusal):
            refused[found].append(leaf)
        else:
            conversion[leaf] = found
    _agree(layout, conversion, refused)
    leaves = np.flatnonzero(conversion >= 0).astype(np.int32)
    groups, group = _group(survey, chooser.conversions, conversion, leaves)
    conversions = _give_scan_clocks(layout, chooser.conversions, conversion, group, groups)
    bits = np.zeros(len(design.cell), np.int32)
    bits[leaves] = [conversions[at].bits for at in conversion[leaves].tolist()]
    reasons = dict(survey.reasons)
    reasons |= {leaf: refusal.slug for refusal, those in refused.items() for leaf in those}
    findings = [_refusal(design, refusal, those) for refusal, those in refused.items()]
    cells = Cells(leaves, group, bits)
    return Chosen(cells, groups, conversion, conversions, reasons, findings)


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
    quiet = refusal.slug in ("latch-not-scanned", "cell-kept")
    return Diagnostic(
        refusal.slug,
        Severity.NOTE if quiet else Severity.WARNING,
        refusal.message,
        design.span(leaves[0]),
        refusal.hint,
        names=tuple(design.name(leaf) for leaf in leaves),
    )
