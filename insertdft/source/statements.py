"""The scanner: one pattern cuts the text of a source into statements, and nothing is skipped.

Every match must start where the last one ended (``scanner(...).match``), so text that is not
understood cannot be passed over. The pattern itself answers what netlists are made of: instances
connected by name or by position, declarations with plain ranges, plain assigns. Everything else
comes out as a whole statement and goes to ``skeleton.py``.
"""

import re
from collections import defaultdict
from collections.abc import Iterator
from contextlib import suppress
from itertools import islice
from operator import attrgetter
from typing import Final

from insertdft.source.behaviour import BEHAVIOUR, end_of_block
from insertdft.source.complaints import Complaints, SyntaxStopError, word_at
from insertdft.source.draft import Draft, Tables
from insertdft.source.patterns import (
    ASSIGN,
    ASSIGNED,
    DECLARED,
    END,
    NAMED,
    ODD,
    REST,
    STATEMENT,
    WIRES,
)
from insertdft.source.preprocess import Macros, Prepared
from insertdft.source.skeleton import Skeleton
from insertdft.text import Span

_KIND: Final = attrgetter("lastindex")

#: Statements read at once.
BATCH: Final = 4096


def read_modules(
    prepared: Prepared, macros: Macros, tables: Tables, complaints: Complaints
) -> list[Draft]:
    """Return the modules of one source, not yet linked with each other.

    A module that is not read to its end is left out; there is a complaint about it.
    """
    reading = _Reading(prepared, macros, tables, complaints)
    with suppress(SyntaxStopError):
        reading.run()
    return [draft for draft in reading.drafts if draft.is_closed]


class _Reading:
    """One pass over one source.

    Attributes:
        drafts: The modules met so far, the open one included.
    """

    def __init__(
        self, prepared: Prepared, macros: Macros, tables: Tables, complaints: Complaints
    ) -> None:
        self.drafts: list[Draft] = []
        self._prepared = prepared
        self._code = prepared.code
        self._tables = tables
        self._complaints = complaints
        self._skeleton = Skeleton(prepared, macros, complaints)
        self._open: Draft | None = None

    def run(self) -> None:
        at: int | None = 0
        while at is not None:
            at = self._scan(at)

    def _scan(self, start: int) -> int | None:
        """Read statements from ``start`` on; return where to go on, or None at the end."""
        at = start
        statements = _statements(self._code, start)
        while chunk := list(islice(statements, BATCH)):
            resume = self._read(chunk)
            if resume is not None:
                return resume
            at = chunk[-1].end()
        self._check_end(at)
        return None

    def _read(self, chunk: list[re.Match[str]]) -> int | None:
        """Read some statements; return where to go on, if not behind the last."""
        kinds = list(map(_KIND, chunk))
        if kinds.count(NAMED) == len(chunk) and self._open is not None:
            self._open.add_plain(chunk)
            return None
        done = 0
        for place in [place for place, kind in enumerate(kinds) if kind >= END]:
            self._read_bulk(chunk[done:place], kinds[done:place])
            resume = self._read_one(chunk[place])
            if resume is not None:
                return resume
            done = place + 1
        self._read_bulk(chunk[done:], kinds[done:])
        return None

    def _read_bulk(self, chunk: list[re.Match[str]], kinds: list[int]) -> None:
        """Read statements that patterns answer, all of one module.

        Declarations come first, though reading does not depend on it: names that are met before
        their declaration cost more.
        """
        if not chunk:
            return
        draft = self._open
        if draft is None:
            raise self._outside(word_at(self._prepared.source, _start(chunk[0])))
        if kinds.count(NAMED) == len(chunk):
            draft.add_plain(chunk)
            return
        of_kind = defaultdict[int, list[re.Match[str]]](list)
        for match, kind in zip(chunk, kinds, strict=True):
            of_kind[ODD if kind == NAMED else kind].append(match)
        if of_kind[WIRES]:
            draft.add_wires(of_kind[WIRES])
        for match in of_kind[DECLARED]:
            self._skeleton.declare_plain(draft, match)
        if of_kind[ODD]:
            draft.add_mixed(of_kind[ODD])
        for match in of_kind[ASSIGNED]:
            sides = ASSIGN.match(self._code, match.start(ASSIGNED))
            if sides:
                draft.assign(sides[1], sides[2], sides.start())

    def _read_one(self, match: re.Match[str]) -> int | None:
        """Read a statement that changes the state or that the pattern does not answer.

        Returns:
            Where to go on, if not behind the statement.
        """
        draft = self._open
        start, end = _start(match), match.end()
        word = word_at(self._prepared.source, start)
        if word.text in BEHAVIOUR:
            self._complaints.error("netlist-behavioural", *_behaviour(word))
            return end_of_block(self._code, start)
        if word.text in ("module", "macromodule"):
            self._open_module(start, end)
        elif draft is None:
            if word.text != ";":
                raise self._outside(word)
        elif word.text == "endmodule":
            draft.close(start)
            self._skeleton.drop_delays(draft)
            self._open = None
        elif word.text != ";":
            self._skeleton.read(draft, match.start(), start, end)
        return None

    def _open_module(self, start: int, end: int) -> None:
        if self._open is not None:
            self._no_end(self._open)
        draft = Draft(self._prepared, self._tables, self._skeleton)
        self._skeleton.read_header(draft, start, end)
        self._open = draft
        self.drafts.append(draft)

    def _no_end(self, draft: Draft) -> None:
        source = self._prepared.source
        self._complaints.error(
            "netlist-truncated",
            f"module `{draft.name}` has no `endmodule`",
            word_at(source, draft.start),
            "the file may have been cut off; write it again",
        )

    def _outside(self, word: Span) -> SyntaxStopError:
        self._complaints.error(
            "netlist-syntax",
            f"`{word.text}` stands outside of any module",
            word,
            "a netlist holds modules and nothing between them",
        )
        return SyntaxStopError()

    def _check_end(self, at: int) -> None:
        """Complain unless the text ends here, between two modules."""
        code = self._code
        gap = REST.match(code, at)
        rest = gap.end() if gap else at
        if rest < len(code):
            self._not_understood(rest)
        elif self._open is not None:
            self._no_end(self._open)

    def _not_understood(self, rest: int) -> None:
        code, word = self._code, word_at(self._prepared.source, rest)
        if code.startswith("(*", rest) and code.find("*)", rest) >= 0:
            self._complaints.error(
                "netlist-syntax",
                "this attribute is not understood",
                word,
                'write it like `(* name = 1, other = "text" *)`',
            )
            return
        opening = {"/*": "comment", "(*": "attribute"}.get(code[rest : rest + 2], "statement")
        self._complaints.error(
            "netlist-truncated",
            f"the text ends within this {opening}",
            word,
            "close it, or write the file again if it was cut off",
        )


def _statements(code: str, start: int) -> Iterator[re.Match[str]]:
    """Yield statement after statement, each from where the last one ended."""
    scanner = STATEMENT.scanner(code, start)  # type: ignore[attr-defined] # not in typeshed
    return iter(scanner.match, None)


def _start(match: re.Match[str]) -> int:
    """Return the offset of the first word of a statement."""
    gap = REST.match(match.string, match.start())
    return gap.end() if gap else match.start()


def _behaviour(word: Span) -> tuple[str, Span, str]:
    return (
        f"`{word.text}` describes behaviour, not structure",
        word,
        "give the netlist that synthesis writes, with library cells only",
    )
