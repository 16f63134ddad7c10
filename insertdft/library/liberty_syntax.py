"""Liberty text -> a tree of groups, as fast as a regular expression runs.

The tree keeps places, not copies: a value is a pair of offsets into the text, read when asked for.
Groups that nobody here needs (power, noise, current source models) are stepped over in one match.
"""

import re
from dataclasses import dataclass, field
from typing import Final

from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.text import SourceText, Span

Place = tuple[int, int]

_STRING: Final = r'"(?:[^"\\]++|\\.)*+"'
_COMMENT: Final = r"/\*.*?\*/|//[^\n]*+"
_SPACE: Final = rf"(?:[\s;\\]++|{_COMMENT})*+"
_BLANK: Final = rf"(?:[\s\\]++|{_COMMENT})*+"
_WORD: Final = r'(?:[^\s;{}"/()\\]|/(?![*/]))++'
_VALUE: Final = rf"(?:{_STRING}|{_WORD}(?:[ \t]*+(?:\([^()\n]*+\)|{_WORD}))*+)"
_ARGUMENTS: Final = rf'(?:[^()"/]++|{_STRING}|{_COMMENT}|/)*+'

#: One statement: simple attribute (1, 2), complex attribute or group (3, 4, 5 for the brace), or
#: the end of a group (6).
_STATEMENT: Final = re.compile(
    rf"{_SPACE}(?:([A-Za-z_]\w*+){_BLANK}:{_BLANK}({_VALUE})"
    rf"|([A-Za-z_]\w*+){_BLANK}\(({_ARGUMENTS})\){_BLANK}(\{{)?"
    r"|(\}))",
    re.DOTALL,
)
_SIMPLE, _COMPLEX, _GROUP, _END = 2, 4, 5, 6
_TRAILING: Final = re.compile(rf"{_SPACE}\Z", re.DOTALL)
_SKIP_SPACE: Final = re.compile(_SPACE, re.DOTALL)


def _body(depth: int) -> str:
    inner = rf"|\{{{_body(depth - 1)}\}}" if depth else ""
    return rf'(?:[^{{}}"/]++|{_STRING}|{_COMMENT}|/{inner})*+'


#: The rest of a group after its opening brace, its closing brace included.
_REST_OF_GROUP: Final = re.compile(_body(5) + r"\}", re.DOTALL)
_ARGUMENT: Final = re.compile(rf'({_STRING})|([^\s,"\\]++)|{_COMMENT}', re.DOTALL)

#: Groups that are read; all others are stepped over.
KEPT: Final = frozenset(
    """library cell pin bus bundle type ff latch ff_bank latch_bank statetable test_cell pg_pin
    timing lu_table_template wire_load cell_rise cell_fall rise_transition fall_transition
    rise_constraint fall_constraint retaining_rise retaining_fall rise_propagation
    fall_propagation""".split()
)


@dataclass(slots=True, eq=False)
class Group:
    """One group, ``kind (args) { ... }``.

    Attributes:
        source: The file.
        kind: ``cell``, ``pin``, ...
        start: Offset of the first character of ``kind``.
        args: Where the text between its parentheses stands.
        simple: Simple attributes, where the value of each stands; of equal names the last.
        complex: Complex attributes, where the text between the parentheses stands.
        groups: Groups inside, in order.
        end: Offset after its closing brace.
    """

    source: SourceText
    kind: str
    start: int
    args: Place
    simple: dict[str, Place] = field(default_factory=dict)
    complex: dict[str, Place] = field(default_factory=dict)
    groups: list["Group"] = field(default_factory=list)
    end: int = 0

    @property
    def names(self) -> tuple[str, ...]:
        """Arguments of the group, unquoted."""
        return self._arguments(self.args)

    @property
    def name(self) -> str:
        """First argument, or an empty text."""
        names = self.names
        return names[0] if names else ""

    def text(self, attribute: str) -> str | None:
        """Return the value of a simple attribute without its quotes, or None."""
        place = self.simple.get(attribute)
        return None if place is None else unquote(self.source.text[place[0] : place[1]])

    def number(self, attribute: str) -> float | None:
        """Return the value of a simple attribute as a number, or None if it is none."""
        text = self.text(attribute)
        try:
            return None if text is None else float(text)
        except ValueError:
            return None

    def flag(self, attribute: str) -> bool:
        """Return whether a simple attribute is true."""
        text = self.text(attribute)
        return text is not None and text.strip().lower() == "true"

    def arguments(self, attribute: str) -> tuple[str, ...] | None:
        """Return the arguments of a complex attribute, unquoted, or None if it is missing."""
        place = self.complex.get(attribute)
        return None if place is None else self._arguments(place)

    def all_of(self, *kinds: str) -> list["Group"]:
        """Return the groups inside that are of one of ``kinds``."""
        return [group for group in self.groups if group.kind in kinds]

    def span(self, attribute: str | None = None) -> Span:
        """Return the place of an attribute's value, or of the group's head."""
        if attribute is None:
            return Span(self.source, self.start, self.args[1] + 1)
        start, end = self.simple.get(attribute) or self.complex[attribute]
        return Span(self.source, start, end)

    def _arguments(self, place: Place) -> tuple[str, ...]:
        found = _ARGUMENT.finditer(self.source.text, *place)
        return tuple(unquote(match[0]) for match in found if match.lastindex)


def unquote(text: str) -> str:
    """Return a value without its quotes, line continuations and escaped quotes resolved."""
    if text[:1] != '"':
        return text
    inner = text[1:-1]
    if "\\" in inner:
        inner = re.sub(r"\\\r?\n", " ", inner).replace('\\"', '"')
    return inner


def parse(source: SourceText) -> list[Group]:
    """Return the top groups (``library``) of a Liberty file.

    Raises:
        DesignError: ``library-syntax`` with the place, or ``library-unsupported``.
    """
    text, match = source.text, _STATEMENT.match
    root = Group(source, "", 0, (0, 0))
    open_groups = [root]
    group, at = root, 0
    while found := match(text, at):
        at = found.end()
        kind = found.lastindex
        if kind == _SIMPLE:
            group.simple[found[1]] = found.span(2)
        elif kind == _GROUP:
            inner = Group(source, found[3], found.start(3), found.span(4))
            skipped = None if found[3] in KEPT else _REST_OF_GROUP.match(text, at)
            if skipped:
                at = skipped.end()
            else:
                group.groups.append(inner)
                open_groups.append(inner)
                group = inner
        elif kind == _COMPLEX:
            _complex(group, found)
        else:
            group.end = at
            if len(open_groups) == 1:
                raise DesignError([_fault(source, at - 1, "`}` closes nothing")])
            open_groups.pop()
            group = open_groups[-1]
    _expect_end(source, at, open_groups)
    return root.groups


def _complex(group: Group, found: re.Match[str]) -> None:
    if found[3] == "include_file":
        span = Span(group.source, found.start(3), found.end(4) + 1)
        hint = "give the included file beside this one, and take the statement out of a copy"
        message = f"the library includes another file, {found[4].strip()}"
        raise DesignError([error("library-unsupported", message, span, hint)])
    group.complex[found[3]] = found.span(4)


def _expect_end(source: SourceText, at: int, open_groups: list[Group]) -> None:
    if len(open_groups) == 1 and _TRAILING.match(source.text, at):
        return
    if quote := _runaway_string(source.text, at):
        raise DesignError([_fault(source, quote, "a quoted text is not closed")])
    if _TRAILING.match(source.text, at):
        kind, start = open_groups[-1].kind, open_groups[-1].start
        raise DesignError([_fault(source, start, f"the text ends inside this `{kind}` group")])
    start = _after_space(source.text, at)
    word = re.compile(r"\S{1,30}").match(source.text, start)
    shown = word[0] if word else source.text[start : start + 1]
    raise DesignError([_fault(source, start, f"cannot read `{shown}` as a statement")])


def _after_space(text: str, at: int) -> int:
    found = _SKIP_SPACE.match(text, at)
    return found.end() if found else at


def _runaway_string(text: str, until: int) -> int | None:
    """Return where a quoted text starts that swallowed statements, or None.

    A text that spans lines without a continuation and holds ``{`` or ``;`` was not meant so.
    """
    for found in re.finditer(rf'{_STRING}|{_COMMENT}|"', text, re.DOTALL):
        if found.start() > until + 200:
            return None
        inside = found[0]
        if inside == '"':
            return found.start()
        if inside[0] == '"' and "\n" in inside and ("{" in inside or ";" in inside):
            return found.start()
    return None


def _fault(source: SourceText, at: int, message: str) -> Diagnostic:
    end = min(at + 1, len(source.text))
    hint = "mend the file at this place; a brace, quote or bracket may be missing just before it"
    return error("library-syntax", message, Span(source, at, end), hint)
