"""Collect what is wrong with a netlist, then stop: a user mends ten things more gladly at once."""

from collections import Counter
from typing import Final

from insertdft.diagnostics import DesignError, Diagnostic, Severity, error, errors
from insertdft.text import SourceText, Span

#: Reports of one kind before the rest is only counted.
CAP: Final = 50


class Complaints:
    """Everything found so far, at most ``CAP`` of one slug."""

    def __init__(self) -> None:
        """Start with nothing."""
        self._found: list[Diagnostic] = []
        self._count: Counter[str] = Counter()

    def add(self, item: Diagnostic) -> None:
        """Keep one more, unless there are enough of its kind."""
        self._count[item.slug] += 1
        if self._count[item.slug] <= CAP:
            self._found.append(item)

    def error(self, slug: str, message: str, span: Span | None, hint: str | None = None) -> None:
        """Keep one more error."""
        self.add(error(slug, message, span, hint))

    def stop_if_any(self) -> None:
        """End here if output is forbidden.

        Raises:
            DesignError: With everything found, and a count of what is not shown.
        """
        if errors(self._found):
            raise DesignError(self.found())

    def found(self) -> tuple[Diagnostic, ...]:
        """Return everything found, in the order found, with a note where some are left out."""
        rest = [
            Diagnostic(
                slug,
                Severity.NOTE,
                f"{count - CAP} more of this kind are not shown",
            )
            for slug, count in self._count.items()
            if count > CAP
        ]
        return (*self._found, *rest)


class SyntaxStopError(Exception):
    """A source cannot be read past this place; what it is has been reported."""


def word_at(source: SourceText, offset: int) -> Span:
    """Return the span of the word (or the one character) at ``offset``."""
    text = source.text
    end = offset
    while end < len(text) and (text[end].isalnum() or text[end] in "_$\\`"):
        end += 1
    return Span(source, offset, max(end, min(offset + 1, len(text))))
