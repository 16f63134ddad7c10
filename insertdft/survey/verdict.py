"""Collect findings: one a cause, with every cell it concerns."""

from collections.abc import Iterable

from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic, Severity


class Verdict:
    """Findings so far and the cells they keep out; the first reason of a cell stays."""

    def __init__(self, design: Design) -> None:
        """Start with nothing found."""
        self.design = design
        self.findings: list[Diagnostic] = []
        self.reasons: dict[int, str] = {}

    def leave_out(
        self,
        slug: str,
        cells: Iterable[int],
        message: str,
        hint: str,
        severity: Severity = Severity.WARNING,
    ) -> None:
        """Report one cause that keeps ``cells`` out; cells with an earlier reason are skipped."""
        fresh = [cell for cell in cells if cell not in self.reasons]
        if not fresh:
            return
        self.reasons.update(dict.fromkeys(fresh, slug))
        names = tuple(self.design.name(cell) for cell in fresh)
        span = self.design.span(fresh[0])
        self.findings.append(Diagnostic(slug, severity, message, span, hint, names=names))
