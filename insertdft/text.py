"""Source text with places in it, and the only maker of new netlist text.

A file is decoded as latin-1, so an offset into ``text`` is a byte offset and any byte survives the
way through the tool.
"""

from bisect import bisect_right
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field
from typing import NamedTuple


@dataclass(frozen=True, slots=True, eq=False)
class SourceText:
    """One input file as text.

    Attributes:
        name: What the user calls it, shown in messages. Unique within a design.
        text: The content, one character a byte (latin-1).
    """

    name: str
    text: str = field(repr=False)

    def position(self, offset: int) -> tuple[int, int]:
        """Return line and column of ``offset``, both counted from 1."""
        line_start = self.text.rfind("\n", 0, offset) + 1
        return self.text.count("\n", 0, offset) + 1, offset - line_start + 1

    def line(self, offset: int) -> str:
        """Return the whole line that holds ``offset``, without its line end."""
        start = self.text.rfind("\n", 0, offset) + 1
        end = self.text.find("\n", offset)
        return self.text[start : len(self.text) if end < 0 else end].rstrip("\r")


@dataclass(frozen=True, slots=True)
class Span:
    """The characters ``start`` (included) to ``end`` (not included) of one source."""

    source: SourceText
    start: int
    end: int

    @property
    def text(self) -> str:
        """The characters themselves."""
        return self.source.text[self.start : self.end]

    @property
    def place(self) -> str:
        """``file:line:column`` of the first character."""
        line, column = self.source.position(self.start)
        return f"{self.source.name}:{line}:{column}"


class Splice(NamedTuple):
    """Replace the characters ``start`` to ``end`` of one source by ``text``; equal ends insert."""

    start: int
    end: int
    text: str
    why: str


@dataclass(frozen=True, slots=True)
class Patch:
    """All splices of one source, in any order; splices that touch the same offset keep theirs."""

    source: SourceText
    splices: tuple[Splice, ...]


def apply_splices(source: SourceText, splices: Iterable[Splice]) -> str:
    """Return the text of ``source`` with every splice done and all else byte for byte as it was.

    Insertions at one offset appear in the order given, before a replacement that starts there.

    Raises:
        RuntimeError: Two splices overlap, which is a defect of the stage that made them.
    """
    text = source.text
    parts: list[str] = []
    done = 0
    for splice in in_order(splices):
        if splice.start < done:
            line, column = source.position(splice.start)
            raise RuntimeError(f"overlapping splices at {source.name}:{line}:{column}: {splice}")
        parts.append(text[done : splice.start])
        parts.append(splice.text)
        done = splice.end
    parts.append(text[done:])
    return "".join(parts)


def in_order(splices: Iterable[Splice]) -> list[Splice]:
    """Return the splices sorted by place; equal places keep their order."""
    return sorted(splices, key=lambda splice: (splice.start, splice.end))


def undo_splices(written: str, splices: Sequence[Splice], source: SourceText) -> str:
    """Return ``written`` with every splice taken out again: the original, if nothing else changed.

    Only places and lengths come from the splices; what lies between them is taken from
    ``written``, and the replaced text from ``source``.
    """
    parts: list[str] = []
    done, shift = 0, 0
    for splice in in_order(splices):
        parts.append(written[done + shift : splice.start + shift])
        parts.append(source.text[splice.start : splice.end])
        shift += len(splice.text) - (splice.end - splice.start)
        done = splice.end
    parts.append(written[done + shift :])
    return "".join(parts)


class Lines:
    """Line numbers of many offsets of one source, without counting from the top each time."""

    def __init__(self, source: SourceText) -> None:
        """Find every line start once."""
        self._starts = [0]
        find, at = source.text.find, -1
        while (at := find("\n", at + 1)) >= 0:
            self._starts.append(at + 1)

    def position(self, offset: int) -> tuple[int, int]:
        """Return line and column of ``offset``, both counted from 1."""
        line = bisect_right(self._starts, offset)
        return line, offset - self._starts[line - 1] + 1
