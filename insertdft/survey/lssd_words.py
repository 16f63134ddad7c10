"""Breaks of a rule in words: the offending path, cell by cell."""

from collections import Counter
from collections.abc import Iterable, Iterator, Sequence
from typing import Final, NamedTuple

from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic, Severity
from insertdft.text import Span

#: Cells of a path that a message spells out; ``names`` has them all.
_SHOWN: Final = 6


class Witness(NamedTuple):
    """One break of a rule; fields as in ``Diagnostic``."""

    slug: str
    message: str
    hint: str
    span: Span
    names: tuple[str, ...]
    also: tuple[tuple[Span, str], ...]


def capped(found: Iterable[Witness], most: int) -> Iterator[Diagnostic]:
    """Yield the breaks as findings, at most ``most`` of a slug, then one that counts the rest."""
    counts: Counter[str] = Counter()
    last: dict[str, Witness] = {}
    for item in found:
        counts[item.slug] += 1
        last[item.slug] = item
        if counts[item.slug] <= most:
            yield Diagnostic(
                item.slug,
                Severity.WARNING,
                item.message,
                item.span,
                item.hint,
                item.also,
                item.names,
            )
    for slug, count in counts.items():
        if count > most:
            words = f"{count - most} more breaks of this rule are not listed one by one"
            yield Diagnostic(
                slug, Severity.WARNING, words, last[slug].span, "mend those listed, then look again"
            )


def route(design: Design, gates: Sequence[int]) -> str:
    """Return the gates of a path as the end of a message, empty if there are none."""
    if not gates:
        return ""
    words = [f"`{design.name(gate)}` ({design.cell_name(gate)})" for gate in gates[:_SHOWN]]
    more = f" and {len(gates) - _SHOWN} more" if len(gates) > _SHOWN else ""
    return ": through " + ", ".join(words) + more


def spans_on(design: Design, gates: Sequence[int]) -> tuple[tuple[Span, str], ...]:
    """Return the place of every gate of a path."""
    return tuple((design.span(gate), f"through `{design.name(gate)}`") for gate in gates)


def cells_named(design: Design, cells: Iterable[int]) -> tuple[str, ...]:
    """Return hierarchical names."""
    return tuple(map(design.name, cells))
