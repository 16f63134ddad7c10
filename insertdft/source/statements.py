"""The scanner: one pattern cuts the text of a source into statements, and nothing is skipped.

Every match must start where the last one ended (``scanner(...).match``), so text that is not
understood cannot be passed over. The pattern itself answers what netlists are made of: instances
connected by name or by position, declarations with plain ranges, plain assigns. Everything else
comes out as a whole statement and goes to ``skeleton.py``.
"""

import re
from collections.abc import Iterator
from typing import Final

from insertdft.source.behaviour import BEHAVIOUR, end_of_block
from insertdft.source.complaints import Complaints, SyntaxStopError, word_at
from insertdft.source.draft import BATCH, Draft, Tables
from insertdft.source.preprocess import Macros, Prepared
from insertdft.source.skeleton import Skeleton
from insertdft.source.tokens import ATTRIBUTE, COMMENT, GAP, NAME, STRING
from insertdft.text import Span

_PARAMETERS: Final = rf'\((?:[^()"\\/`;]++|{STRING}|\((?:[^()"\\/`;]++|{STRING})*+\))*+\)'
#: Whether the body is what it should be is checked when it is taken apart, in ``draft.py``.
_NAMED: Final = r"\.(?:[^;\"/\\*`]++|\\\S++)*+"
_TERMS: Final = r"(?:[\w$\[\]:',\s]++|\\\S++)*+"
_NAMES: Final = rf"{NAME}\s*+(?:,\s*+{NAME}\s*+)*+"
_RANGE: Final = r"\[\s*+(?P<msb>-?\d++)\s*+:\s*+(?P<lsb>-?\d++)\s*+\]\s*+"
_SIDE: Final = r"(?:[\w$\[\]:',{}\s]++|\\\S++)*+"
#: Any text up to a semicolon that stands in no string, comment, attribute or escaped name.
_ANY: Final = (
    rf'(?:[^;"/\\(]++|{STRING}|{COMMENT}|{ATTRIBUTE}|\\\S++|/(?![/*])|\((?!\*)|\(\*(?=\s*+\)))*+'
)

STATEMENT: Final = re.compile(
    rf"""{GAP}(?:
    (?!(?:module|macromodule|function|task|primitive)\b)
    (?P<cell>{NAME})(?:\s*+(?P<parameters>\#\s*+{_PARAMETERS}))?+(?:\s*+(?P<instance>{NAME}))?+
        \s*+\(\s*+(?:(?P<named>{_NAMED});|(?P<terms>{_TERMS})\)\s*+;)
    |wire\s++(?P<wires>{_NAMES});
    |(?P<kind>input|output|inout|wire)\b\s*+(?:{_RANGE})?+(?P<names>{_NAMES});
    |assign\b(?P<left>{_SIDE})=(?P<right>{_SIDE});
    |(?P<endmodule>endmodule)\b
    |(?P<any>{_ANY});
    )""",
    re.ASCII | re.VERBOSE,
)
_REST: Final = re.compile(GAP)


def read_modules(
    prepared: Prepared, macros: Macros, tables: Tables, complaints: Complaints
) -> list[Draft]:
    """Return the modules of one source, not yet linked with each other."""
    reading = _Reading(prepared, macros, tables, complaints)
    try:
        reading.run()
    except SyntaxStopError:
        reading.close()
    return reading.drafts


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

    def close(self) -> None:
        """End the open module, if there is one."""
        self._open = None

    def _scan(self, start: int) -> int | None:
        """Read statements from ``start`` on; return where to go on, or None at the end.

        This is the loop that a million instances run through.
        """
        at = start
        draft = self._open
        for match in _statements(self._code, start):
            kind = match.lastgroup
            if draft is None or kind in ("endmodule", "any"):
                resume = self._general(match, draft)
                draft = self._open
                if resume is not None:
                    return resume
            elif kind in ("named", "terms"):
                draft.pending.append(match)
                if len(draft.pending) >= BATCH:
                    draft.flush()
            elif kind == "wires":
                draft.wires.append(match.span("wires"))
            elif kind == "names":
                self._skeleton.declare_plain(draft, match)
            else:
                draft.assign(match["left"], match["right"], match.start("left"))
            at = match.end()
        self._check_end(at)
        return None

    def _general(self, match: re.Match[str], draft: Draft | None) -> int | None:
        """Read a statement that changes the state or that the pattern does not answer.

        Returns:
            Where to go on, if not behind the statement.
        """
        start, end = _start(match), match.end()
        word = word_at(self._prepared.source, start)
        if word.text in BEHAVIOUR:
            self._complaints.error("netlist-behavioural", *_behaviour(word))
            return end_of_block(self._code, start)
        if word.text in ("module", "macromodule"):
            self._open_module(start, end)
        elif draft is None:
            self._outside(word)
        elif word.text == "endmodule":
            draft.flush()
            draft.body_end = start
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

    def _outside(self, word: Span) -> None:
        if word.text == ";":
            return
        self._complaints.error(
            "netlist-syntax",
            f"`{word.text}` stands outside of any module",
            word,
            "a netlist holds modules and nothing between them",
        )
        raise SyntaxStopError

    def _check_end(self, at: int) -> None:
        """Complain unless the text ends here, between two modules."""
        code, source = self._code, self._prepared.source
        gap = _REST.match(code, at)
        rest = gap.end() if gap else at
        if rest < len(code):
            opening = {"/*": "comment", "(*": "attribute"}.get(code[rest : rest + 2])
            what = f"this {opening}" if opening else "this statement"
            self._complaints.error(
                "netlist-truncated",
                f"the text ends within {what}",
                word_at(source, rest),
                "close it, or write the file again if it was cut off",
            )
        elif self._open is not None:
            self._no_end(self._open)


def _statements(code: str, start: int) -> Iterator[re.Match[str]]:
    """Yield statement after statement, each from where the last one ended."""
    scanner = STATEMENT.scanner(code, start)  # type: ignore[attr-defined] # not in typeshed
    return iter(scanner.match, None)


def _start(match: re.Match[str]) -> int:
    """Return the offset of the first word of a statement."""
    gap = _REST.match(match.string, match.start())
    return gap.end() if gap else match.start()


def _behaviour(word: Span) -> tuple[str, Span, str]:
    return (
        f"`{word.text}` describes behaviour, not structure",
        word,
        "give the netlist that synthesis writes, with library cells only",
    )
