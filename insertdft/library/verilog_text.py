"""Text of Verilog cell models: conditional parts chosen, comments blanked, modules cut out.

Everything that is taken out is replaced by blanks, so an offset stays an offset into the file.
"""

import re
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

from insertdft.text import SourceText, Span

#: Macros taken as defined: model files offer a purely functional branch under this name (common
#: practice of open kits).
DEFINED: Final = frozenset({"FUNCTIONAL"})

_LEXEME: Final = re.compile(
    r"""(?P<comment>//[^\n]*+|/\*.*?\*/)|"(?:[^"\\\n]|\\.)*+"|\\\S++"""
    r"""|(?P<attribute>\(\*(?!\s*\)).*?\*\))|`(?P<word>\w++)""",
    re.DOTALL,
)
_CONDITIONS: Final = frozenset(("ifdef", "ifndef", "elsif", "else", "endif"))
_LINE: Final = re.compile(r"(?:[^\n\\]|\\.)*+", re.DOTALL)
_NAME: Final = re.compile(r"\s*(\w+)")
_WHOLE_LINE: Final = frozenset(
    """timescale define undef default_nettype include line resetall pragma
    unconnected_drive nounconnected_drive suppress_faults nosuppress_faults enable_portfaults
    disable_portfaults delay_mode_path delay_mode_unit delay_mode_zero delay_mode_distributed
    celldefine endcelldefine""".split()
)
_UNIT: Final = re.compile(
    r"\b(module|macromodule|primitive)\s++((?:[A-Za-z_][\w$]*+)|\\\S++)(.*?)\bend(?:module|primitive)\b",
    re.DOTALL,
)
_SPECIFY: Final = re.compile(r"\bspecify\b(.*?)\bendspecify\b", re.DOTALL)
_DELAY: Final = re.compile(
    r"#\s*+(?:[\d.]++|\(\s*+(?!\.)[^()]*+(?:\([^()]*+\)[^()]*+)*+\)|[A-Za-z_]\w*+)"
)
_DELAYED: Final = re.compile(r"\$(?:setuphold|recrem)\s*\(((?:[^()]|\([^()]*\))*)\)")
_EVENT_EDGE: Final = re.compile(r"\b(?:posedge|negedge|edge\s*\[[^\]]*\])\s*")


@dataclass(frozen=True, slots=True, eq=False)
class Unit:
    """One module or primitive.

    Attributes:
        source: Its file.
        name: As written.
        is_primitive: Whether it is a user-defined primitive.
        text: From ``module`` to ``endmodule``, comments, delays and specify blocks blanked.
        start: Offset of its first character.
        delayed: Delayed signal -> signal, as ``$setuphold`` and ``$recrem`` connect them.
    """

    source: SourceText
    name: str
    is_primitive: bool
    text: str
    start: int
    delayed: tuple[tuple[str, str], ...]

    @property
    def span(self) -> Span:
        """The head up to the name."""
        end = self.source.text.find(self.name, self.start) + len(self.name)
        return Span(self.source, self.start, end)


def units_of(sources: Sequence[SourceText]) -> list[Unit]:
    """Return the modules and primitives of all files, macros carried from file to file."""
    defined = set(DEFINED)
    found: list[Unit] = []
    for source in sources:
        text = _prepared(source.text, defined)
        found += [_unit(source, match) for match in _UNIT.finditer(text)]
    return found


def _unit(source: SourceText, match: re.Match[str]) -> Unit:
    text = match[0]
    delayed: list[tuple[str, str]] = []
    for block in _SPECIFY.finditer(text):
        delayed += _delayed_signals(block[1])
    text = _SPECIFY.sub(_blank, text)
    primitive = match[1] == "primitive"
    if not primitive:
        text = _DELAY.sub(_blank, text)
    return Unit(source, match[2], primitive, text, match.start(), tuple(delayed))


def _blank(match: re.Match[str]) -> str:
    return re.sub(r"[^\n]", " ", match[0])


def _delayed_signals(block: str) -> list[tuple[str, str]]:
    """Return what timing checks connect: their last two arguments follow the first two."""
    found: list[tuple[str, str]] = []
    for check in _DELAYED.finditer(block):
        arguments = [part.strip() for part in check[1].split(",")]
        events = [_EVENT_EDGE.sub("", part.split("&&&")[0]).strip() for part in arguments[:2]]
        found += [
            (name, event) for name, event in zip(arguments[7:9], events, strict=False) if name
        ]
    return found


def _prepared(text: str, defined: set[str]) -> str:
    """Return the text with comments, directives, macros and inactive parts blanked."""
    parts: list[str] = []
    active = [True]
    taken = [True]
    done = at = 0
    while (match := _LEXEME.search(text, at)) is not None:
        at = match.end()
        word = match["word"]
        if match["comment"] or match["attribute"]:
            parts += _kept(text[done : match.start()], active[-1]), _kept(match[0], False)
            done = at
        elif word is not None:
            parts.append(_kept(text[done : match.start()], active[-1]))
            at = _directive_end(text, match)
            if word in _CONDITIONS:
                _condition(text, match, active, taken, defined)
            elif active[-1]:
                _define(text, match, defined)
            parts.append(_kept(text[match.start() : at], False))
            done = at
    parts.append(_kept(text[done:], active[-1]))
    return "".join(parts)


def _kept(text: str, keep: bool) -> str:
    return text if keep else re.sub(r"[^\n]", " ", text)


def _directive_end(text: str, match: re.Match[str]) -> int:
    word = match["word"]
    if word in _WHOLE_LINE:
        line = _LINE.match(text, match.end())
        return line.end() if line else match.end()
    if word in ("ifdef", "ifndef", "elsif"):
        name = _NAME.match(text, match.end())
        return name.end() if name else match.end()
    return match.end()


def _condition(
    text: str, match: re.Match[str], active: list[bool], taken: list[bool], defined: set[str]
) -> None:
    """Follow one conditional directive.

    ``active`` tells for each open level whether its text counts, ``taken`` whether some branch of
    it already did.
    """
    word = match["word"]
    name = _NAME.match(text, match.end())
    known = name is not None and name[1] in defined
    if word in ("ifdef", "ifndef"):
        holds = known == (word == "ifdef")
        taken.append(holds)
        active.append(active[-1] and holds)
    elif len(active) == 1:
        return  # an `else` or `endif` of nothing
    elif word == "endif":
        active.pop()
        taken.pop()
    else:
        holds = not taken[-1] and (word == "else" or known)
        active[-1] = active[-2] and holds
        taken[-1] = taken[-1] or holds


def _define(text: str, match: re.Match[str], defined: set[str]) -> None:
    name = _NAME.match(text, match.end())
    if name is None:
        return
    if match["word"] == "define":
        defined.add(name[1])
    elif match["word"] == "undef":
        defined.discard(name[1])
