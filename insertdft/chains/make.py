"""Make the plan: what is converted, into how many chains, in which order."""

from collections.abc import Sequence

import numpy as np

from insertdft.chains.arrange import arrange, chain_counts
from insertdft.chains.assemble import assemble
from insertdft.chains.choose import Chosen, choose_cells
from insertdft.chains.plan import Plan
from insertdft.chains.regions import hierarchy
from insertdft.chains.segments import lay_segments
from insertdft.chains.wishes import Wishes
from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, Diagnostic, Severity, error
from insertdft.survey import Survey


def make_plan(survey: Survey, wishes: Wishes) -> tuple[Plan, tuple[Diagnostic, ...]]:
    """Return the plan, and what it had to leave alone beyond the survey's findings.

    Raises:
        DesignError: There is no storage cell, none can be converted, the number of chains does
            not fit, or a name for a port is taken.
        ValueError: A wish is out of range.
    """
    _check(wishes)
    design = survey.design
    if len(survey.storage) == 0:
        raise DesignError([_no_storage(design)])
    layout = hierarchy(design)
    chosen = choose_cells(survey, wishes, layout)
    if len(chosen.cells.leaves) == 0:
        raise DesignError([_nothing_left(design), *survey.findings, *chosen.findings])
    counts = _counts(chosen, wishes)
    arrangement = arrange(chosen.cells, layout, counts)
    segments = lay_segments(design, layout, arrangement, chosen.conversion)
    plan = assemble(survey, wishes, chosen, arrangement, segments)
    return plan, tuple(chosen.findings)


def _check(wishes: Wishes) -> None:
    if wishes.chains is not None and wishes.chains < 1:
        raise ValueError(f"chains must be 1 or more, got {wishes.chains}")
    if wishes.max_length is not None and wishes.max_length < 1:
        raise ValueError(f"max_length must be 1 or more, got {wishes.max_length}")
    if wishes.connect not in ("buffer", "assign"):
        raise ValueError(f"connect must be buffer or assign, got {wishes.connect!r}")


def _counts(chosen: Chosen, wishes: Wishes) -> list[int]:
    """Return the number of chains of each group."""
    cells = chosen.cells
    weights = cells.bits[cells.leaves]
    sizes = np.bincount(cells.group[cells.leaves], weights).astype(int).tolist()
    labels = [group.label for group in chosen.groups]
    if wishes.chains is not None:
        if wishes.chains < len(sizes):
            raise DesignError([_too_few(labels, sizes, wishes.chains)])
        if wishes.chains > len(cells.leaves):
            raise DesignError([_too_many(len(cells.leaves), wishes.chains)])
    counts = chain_counts(sizes, wishes.chains, wishes.max_length)
    for group, count in enumerate(counts):
        counts[group] = min(count, int((cells.group[cells.leaves] == group).sum()))
    return counts


def _no_storage(design: Design) -> Diagnostic:
    cells = zip(design.cell_names, design.cells, strict=True)
    unknown = [name for name, cell in cells if cell is None and name not in design.netlist.modules]
    return Diagnostic(
        "no-storage",
        Severity.ERROR,
        f"`{design.netlist.top}` holds no storage cell, so there is nothing to scan",
        hint="check that the library given is the one the netlist was mapped to"
        if unknown
        else "a combinational netlist needs no scan",
        names=tuple(unknown),
    )


def _nothing_left(design: Design) -> Diagnostic:
    return error(
        "nothing-to-convert",
        f"no storage cell of `{design.netlist.top}` can be converted",
        hint="the findings below say what keeps them out",
    )


def _too_few(labels: Sequence[str], sizes: Sequence[int], chains: int) -> Diagnostic:
    groups = ", ".join(f"{label}: {size}" for label, size in zip(labels, sizes, strict=True))
    return error(
        "chains-too-few",
        f"{chains} chains are asked for, but cells of {len(sizes)} clock and edge groups are kept"
        f" in chains of their own ({groups})",
        hint=f"ask for {len(sizes)} chains or more",
    )


def _too_many(cells: int, chains: int) -> Diagnostic:
    return error(
        "chains-too-many",
        f"{chains} chains are asked for, but only {cells} cells can be put into them",
        hint=f"ask for {cells} chains or fewer",
    )
