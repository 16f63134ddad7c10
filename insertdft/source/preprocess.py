"""Compiler directives: what is read, what is left out, what a macro stands for.

The text itself is never rewritten. Directives and branches that are not taken become blanks in a
copy of the same length, so an offset means the same place in both; uses of macros stay and are
replaced when tokens are made. A text without a grave accent is its own copy.

Source: IEEE 1364-2005, clause 19; ```delay_mode_path`` and the like are from memory.
"""

import re
from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from typing import Final, NamedTuple

from insertdft.diagnostics import nearest
from insertdft.source.complaints import Complaints
from insertdft.source.tokens import COMMENT, NAME, STRING, TOKEN
from insertdft.text import SourceText, Span


class NetType(NamedTuple):
    """From ``offset`` on, undeclared names become nets of this ``kind`` (or none at all)."""

    offset: int
    kind: str


@dataclass(frozen=True, slots=True, eq=False)
class Prepared:
    """A source without its directives.

    Attributes:
        source: As it came.
        code: The same length; directives and untaken branches are blanks.
        net_types: Where ```default_nettype`` changes, ascending, ``wire`` at offset 0.
    """

    source: SourceText
    code: str = field(repr=False)
    net_types: tuple[NetType, ...]

    def net_type(self, offset: int) -> str:
        """Return the kind of net that an undeclared name becomes at ``offset``."""
        return [item.kind for item in self.net_types if item.offset <= offset][-1]


class Macros:
    """What is defined so far, in all sources read so far.

    Attributes:
        bodies: What each macro stands for, also of those that are undefined again.
        active: Those defined at this point of the text.
    """

    def __init__(self, defines: Mapping[str, str]) -> None:
        """Start with what the user defines."""
        self.bodies = dict(defines)
        self.active = set(defines)


def prepare(source: SourceText, macros: Macros, complaints: Complaints) -> Prepared:
    """Return the text without directives; add what it defines to ``macros``."""
    lone = _LONE_RETURN.search(source.text) if "\r" in source.text else None
    if lone:
        complaints.error(
            "netlist-syntax",
            "a carriage return stands without a line feed",
            Span(source, lone.start(), lone.end()),
            "save the text with usual line ends; readers differ on where a comment ends here",
        )
    if "`" not in source.text:
        return Prepared(source, source.text, (NetType(0, "wire"),))
    reading = _Reading(source, macros, complaints)
    reading.run()
    return Prepared(source, reading.code(), tuple(reading.net_types))


_LONE_RETURN: Final = re.compile(r"\r(?!\n)")
#: The first three may hold accents that mean nothing.
_ACCENT: Final = re.compile(
    rf"{COMMENT}|{STRING}|\\\S++|`(?P<word>{NAME})?|(?P<open>/\*)", re.ASCII
)
_LINE: Final = re.compile(r"(?:[^\n\\]++|\\(?s:.))*+")
_ARGUMENT: Final = re.compile(rf"[ \t]*+({NAME})", re.ASCII)
_NOT_LINE_END: Final = re.compile(r"[^\n]")
_DEFINITION: Final = re.compile(rf"[ \t]*+({NAME})(\(?)((?s:.*))", re.ASCII)
_TIMESCALE: Final = re.compile(r"\s*+10{0,2}\s*+[munpf]?s\s*+/\s*+10{0,2}\s*+[munpf]?s\b")
_VERSION: Final = re.compile(r'[ \t]*+"1364-[\w-]+"', re.ASCII)

#: Directives that say nothing about structure; the rest of their line goes with them.
_WHOLE_LINE: Final = frozenset("line pragma".split())
#: The same without arguments.
_ONE_WORD: Final = frozenset(
    """celldefine endcelldefine nounconnected_drive end_keywords suppress_faults
    nosuppress_faults enable_portfaults disable_portfaults delay_mode_path delay_mode_unit
    delay_mode_zero delay_mode_distributed""".split()
)
_PAIRS: Final = "every `ifdef has one `endif, and at most one `else before it"
_NAME: Final = "write the name of a macro behind it"
_KIND: Final = "write `wire` or `none`"
_KINDS: Final = frozenset("wire tri tri0 tri1 wand triand wor trior trireg uwire none".split())


@dataclass(slots=True)
class _Branch:
    """One open ```ifdef``.

    Attributes:
        start: Offset of its first directive.
        outer: Whether the text around it is read.
        taken: Whether a branch was already taken.
        since: Offset from which text is left out now, or None while it is read.
        has_else: Whether its ```else`` was met.
    """

    start: int
    outer: bool
    taken: bool
    since: int | None
    has_else: bool = False


class _Reading:
    """One pass over one source."""

    def __init__(self, source: SourceText, macros: Macros, complaints: Complaints) -> None:
        self.source = source
        self.text = source.text
        self.macros = macros
        self.complaints = complaints
        self.net_types = [NetType(0, "wire")]
        self._branches: list[_Branch] = []
        self._blanks: list[tuple[int, int]] = []

    def run(self) -> None:
        """Find every directive; nothing behind the last accent needs a look."""
        at, end = 0, self.text.rfind("`") + 1
        while match := _ACCENT.search(self.text, at):
            if match.start() >= end:
                break
            at = match.end()
            if match["word"] is not None:
                at = self._directive(match["word"], match.start(), at)
            elif match["open"]:
                hint = "close it, or write the file again if it was cut off"
                self._wrong("netlist-truncated", "a comment has no end", match.start(), at, hint)
            elif match[0] == "`":
                self._wrong(
                    "directive-unknown",
                    "a grave accent stands alone",
                    match.start(),
                    at,
                    "take it out",
                )
        for branch in self._branches:
            self._wrong(
                "netlist-truncated",
                "a conditional part has no `endif",
                branch.start,
                branch.start + 1,
                "add the missing `endif line",
            )

    def code(self) -> str:
        """Return the text with blanks for all that is not read."""
        parts: list[str] = []
        done = 0
        for start, end in sorted(self._blanks):
            if end <= done:
                continue
            parts.append(self.text[done:start])
            parts.append(_NOT_LINE_END.sub(" ", self.text[max(start, done) : end]))
            done = end
        parts.append(self.text[done:])
        return "".join(parts)

    @property
    def _active(self) -> bool:
        return not self._branches or self._branches[-1].since is None

    def _directive(self, word: str, start: int, end: int) -> int:
        """Act on one directive; return where to go on."""
        action = _ACTIONS.get(word)
        if action is not None and (self._active or word in _CONDITIONS):
            stop = action(self, start, end)
            self._blanks.append((start, stop))
            return stop
        if not self._active:
            return end
        if word in _WHOLE_LINE:
            stop = _LINE.match(self.text, end).end()  # type: ignore[union-attr]
            self._blanks.append((start, stop))
            return stop
        if word in _ONE_WORD:
            self._blanks.append((start, end))
        elif word not in self.macros.active:
            self._unknown(word, start, end)
        return end

    def _unknown(self, word: str, start: int, end: int) -> None:
        known = [*self.macros.bodies, *_ACTIONS, *_WHOLE_LINE, *_ONE_WORD]
        hint = nearest(word, known) or "define the macro, or take the directive out"
        self._wrong("directive-unknown", f"``{word}` is not defined", start, end, hint)

    def _wrong(
        self, slug: str, message: str, start: int, end: int, hint: str | None = None
    ) -> None:
        self.complaints.error(slug, message, Span(self.source, start, end), hint)

    def _argument(self, start: int, end: int) -> tuple[str, int]:
        """Return the name that a directive needs, and the offset behind it."""
        match = _ARGUMENT.match(self.text, end)
        if match is None:
            word = self.text[start:end]
            self._wrong("netlist-syntax", f"`{word}` needs a name on its line", start, end, _NAME)
            return "", end
        return match[1], match.end()

    # Each of the following acts on one directive and returns the offset behind it.

    def ifdef(self, start: int, end: int) -> int:
        name, stop = self._argument(start, end)
        self._open(start, stop, taken=name in self.macros.active)
        return stop

    def ifndef(self, start: int, end: int) -> int:
        name, stop = self._argument(start, end)
        self._open(start, stop, taken=name not in self.macros.active)
        return stop

    def _open(self, start: int, stop: int, *, taken: bool) -> None:
        outer = self._active
        reads = outer and taken
        self._branches.append(_Branch(start, outer, taken, None if reads else stop))

    def elsif(self, start: int, end: int) -> int:
        name, stop = self._argument(start, end)
        self._next_branch(start, stop, wanted=name in self.macros.active)
        return stop

    def otherwise(self, start: int, end: int) -> int:
        self._next_branch(start, end, wanted=True)
        if self._branches:
            self._branches[-1].has_else = True
        return end

    def _next_branch(self, start: int, stop: int, *, wanted: bool) -> None:
        if not self._branches or self._branches[-1].has_else:
            fact = "this branch belongs to no open `ifdef"
            self._wrong("netlist-syntax", fact, start, stop, _PAIRS)
            return
        branch = self._branches[-1]
        self._close_blank(branch, start)
        reads = branch.outer and wanted and not branch.taken
        branch.taken = branch.taken or wanted
        branch.since = None if reads else stop

    def endif(self, start: int, end: int) -> int:
        if not self._branches:
            self._wrong("netlist-syntax", "this `endif closes no `ifdef", start, end, _PAIRS)
        else:
            self._close_blank(self._branches.pop(), start)
        return end

    def _close_blank(self, branch: _Branch, end: int) -> None:
        if branch.since is not None:
            self._blanks.append((branch.since, end))

    def define(self, start: int, end: int) -> int:
        stop = _LINE.match(self.text, end).end()  # type: ignore[union-attr]
        match = _DEFINITION.match(self.text, end, stop)
        if match is None:
            self._wrong("netlist-syntax", "`define needs a name", start, stop, _NAME)
        elif match[2]:
            self._wrong(
                "netlist-unsupported",
                f"macro `{match[1]}` has arguments",
                start,
                stop,
                "write out what it stands for; only plain constants are read",
            )
        else:
            self._keep(match[1], _plain_body(match[3]), start, stop)
        return stop

    def _keep(self, name: str, body: str, start: int, stop: int) -> None:
        known = self.macros.bodies.get(name)
        if known is not None and known != body:
            self._wrong(
                "netlist-unsupported",
                f"macro `{name}` is defined twice, as `{known}` and as `{body}`",
                start,
                stop,
                "give the two meanings two names",
            )
        elif "`" in body or not all(_is_plain(word) for word in _words(body)):
            self._wrong(
                "netlist-unsupported",
                f"macro `{name}` does not stand for a plain constant or name",
                start,
                stop,
                "write out what it stands for where it is used",
            )
        self.macros.bodies.setdefault(name, body)
        self.macros.active.add(name)

    def undef(self, start: int, end: int) -> int:
        name, stop = self._argument(start, end)
        self.macros.active.discard(name)
        return stop

    def include(self, start: int, end: int) -> int:
        stop = _LINE.match(self.text, end).end()  # type: ignore[union-attr]
        self._wrong(
            "netlist-unsupported",
            "the netlist includes another file",
            start,
            stop,
            "name that file on the command line as well and take this line out",
        )
        return stop

    def unconnected_drive(self, start: int, end: int) -> int:
        stop = _LINE.match(self.text, end).end()  # type: ignore[union-attr]
        self._wrong(
            "netlist-unsupported",
            "unconnected pins are given a value here",
            start,
            stop,
            "connect the pins that need a value to a constant",
        )
        return stop

    def default_nettype(self, start: int, end: int) -> int:
        kind, stop = self._argument(start, end)
        if kind and kind not in _KINDS:
            self._wrong("netlist-syntax", f"`{kind}` is no kind of net", start, stop, _KIND)
        self.net_types.append(NetType(start, kind))
        return stop

    def resetall(self, start: int, end: int) -> int:
        self.net_types.append(NetType(start, "wire"))
        return end

    def timescale(self, start: int, end: int) -> int:
        match = _TIMESCALE.match(self.text, end)
        if match is None:
            hint = "write it like `timescale 1ns / 1ps"
            self._wrong("netlist-syntax", "`timescale needs two times", start, end, hint)
        return match.end() if match else end

    def begin_keywords(self, start: int, end: int) -> int:
        match = _VERSION.match(self.text, end)
        if match is None:
            self._wrong(
                "netlist-unsupported",
                "the keywords of another language version are asked for",
                start,
                end,
                "only those of IEEE 1364 are read",
            )
        return match.end() if match else end


_Action = Callable[[_Reading, int, int], int]
_ACTIONS: Final[Mapping[str, _Action]] = {
    "ifdef": _Reading.ifdef,
    "ifndef": _Reading.ifndef,
    "elsif": _Reading.elsif,
    "else": _Reading.otherwise,
    "endif": _Reading.endif,
    "define": _Reading.define,
    "undef": _Reading.undef,
    "include": _Reading.include,
    "default_nettype": _Reading.default_nettype,
    "resetall": _Reading.resetall,
    "unconnected_drive": _Reading.unconnected_drive,
    "timescale": _Reading.timescale,
    "begin_keywords": _Reading.begin_keywords,
}
_CONDITIONS: Final = frozenset("ifdef ifndef elsif else endif".split())


def _plain_body(text: str) -> str:
    """Return the body of a definition without comments and continued line ends."""
    return re.sub(COMMENT, " ", text.replace("\\\n", " ").replace("\\\r\n", " ")).strip()


def _words(body: str) -> list[re.Match[str] | None]:
    words: list[re.Match[str] | None] = []
    at = 0
    while at < len(body):
        match = TOKEN.match(body, at)
        words.append(match)
        at = match.end() if match else len(body)
    return words


def _is_plain(word: re.Match[str] | None) -> bool:
    return word is not None and (word.lastgroup != "operator" or word[0] not in ";")
