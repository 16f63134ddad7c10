"""Cells that the netlist, the library or the user wants left alone."""

from collections import defaultdict
from collections.abc import Iterable
from fnmatch import fnmatchcase
from itertools import islice
from typing import Final

from insertdft.diagnostics import DesignError, Diagnostic, Severity, nearest
from insertdft.netlist import Ids
from insertdft.netlist.names import plain, split_path
from insertdft.source import attributes
from insertdft.survey.verdict import Verdict

#: Attributes (IEEE 1364-2005, 3.8) that by common practice ask tools to leave an instance alone.
MARKS: Final = ("keep", "dont_touch", "DONT_TOUCH", "keep_instance")
OFF: Final = frozenset({"0", "false", "no", "1'b0", "1'h0", ""})


def find_kept(verdict: Verdict, storage: Ids, patterns: tuple[str, ...]) -> None:
    """Report the storage cells that attributes, ``dont_touch`` or ``patterns`` keep."""
    by_cause: defaultdict[str, list[int]] = defaultdict(list)
    for cell in storage.tolist():
        attribute = _attribute(verdict, cell)
        if attribute:
            by_cause[f"the netlist marks it `{attribute}`"].append(cell)
        described = verdict.design.cell_of(cell)
        if described is not None and described.dont_touch:
            by_cause[f"the library marks `{described.name}` dont_touch"].append(cell)
    for cause, cells in by_cause.items():
        verdict.leave_out(
            "cell-kept", cells, f"left alone: {cause}", "remove the mark to let it be converted"
        )
    _leave_out_by_pattern(verdict, storage, patterns)


def _attribute(verdict: Verdict, cell: int) -> str | None:
    found = attributes(verdict.design.module_of(cell), int(verdict.design.local[cell]))
    return next((mark for mark in MARKS if found.get(mark, "0").lower() not in OFF), None)


def _leave_out_by_pattern(verdict: Verdict, storage: Ids, patterns: tuple[str, ...]) -> None:
    if not patterns:
        return
    names = {cell: verdict.design.name(cell) for cell in storage.tolist()}
    missed: list[Diagnostic] = []
    for pattern in patterns:
        cells = [cell for cell, name in names.items() if matches(name, pattern)]
        if not cells:
            missed.append(unmatched(pattern, names.values()))
        verdict.leave_out(
            "cell-kept",
            cells,
            f"left alone: the pattern `{pattern}` names it",
            "take the pattern away to let it be converted",
            Severity.NOTE,
        )
    if missed:
        raise DesignError(missed)


def matches(name: str, pattern: str) -> bool:
    """Return whether a hierarchical name fits a shell pattern, with or without Verilog escapes."""
    return fnmatchcase(name, pattern) or fnmatchcase(unescaped(name), pattern)


def unescaped(name: str) -> str:
    """Return a hierarchical name as people write it, without backslashes and closing blanks."""
    return ".".join(map(plain, split_path(name))) if "\\" in name else name


def unmatched(pattern: str, names: Iterable[str]) -> Diagnostic:
    """Return the error that a pattern of the user matches no storage cell."""
    known = list(islice(names, 20_000))
    return Diagnostic(
        "pattern-unmatched",
        Severity.ERROR,
        f"pattern `{pattern}` matches no storage cell",
        hint=nearest(pattern, known)
        or "patterns match hierarchical names below the top, such as u_core.state_reg*",
    )
