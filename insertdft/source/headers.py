"""Module headers: names listed or directions in the list, parameters, ports under another name."""

import re
from typing import Final

from insertdft.netlist import Header
from insertdft.netlist.names import canonical
from insertdft.source.by_grammar import ByGrammar
from insertdft.source.declarations import DIRECTIONS
from insertdft.source.draft import Draft
from insertdft.source.odd_statements import Prefix, read_declared, split_prefix
from insertdft.source.tokens import NAME, Token, split_commas

_NAMES: Final = rf"{NAME}\s*+(?:,\s*+{NAME}\s*+)*+"
_HEADER: Final = re.compile(
    rf"(?:macro)?module\s++({NAME})\s*+(?:(\()\s*+((?:{_NAMES})?+)(\))\s*+)?+;", re.ASCII
)
_WORD: Final = re.compile(NAME, re.ASCII)


def read_header(by: ByGrammar, draft: Draft, start: int, end: int) -> None:
    """Read a module header, from ``module`` to its ``;``."""
    draft.start = start
    plain = _HEADER.fullmatch(by.code, start, end)
    if plain is None:
        _read_odd(by, draft, start, end)
    else:
        _read_plain(draft, by.code, plain)


def _read_plain(draft: Draft, code: str, match: re.Match[str]) -> None:
    draft.name = canonical(match[1])
    for name in _WORD.finditer(code, *match.span(3)) if match[2] else ():
        draft.port_names.append((canonical(name[0]), name.start()))
    draft.header = Header(
        ansi=False,
        list_end=match.start(4) if match[2] else None,
        list_empty=not match[3],
        end=match.end(),
        name_end=match.end(1),
    )


def _read_odd(by: ByGrammar, draft: Draft, start: int, end: int) -> None:
    words = by.words(start, end)
    words[0] = words[0]._replace(text="module")
    if len(words) > 1 and words[1].kind == "name":
        draft.name = canonical(words[1].text)
    opening = _port_list(by, words)
    closing = by.closing(words, opening) if opening else 0
    ports = _Ports(by, draft)
    names = ports.names(words[opening + 1 : closing]) if opening else []
    tree = by.parse([*words[: opening + 1], *names, *words[closing:]] if opening else words)
    draft.header = Header(
        ansi=ports.is_ansi,
        list_end=words[closing].start if opening else None,
        list_empty=not tree.ports,
        end=end,
        name_end=words[1].end,
    )
    draft.port_names = [(canonical(port.name), port.lineno) for port in tree.ports]
    for parameter in tree.paramlist.params:
        draft.parameter_names.update(canonical(item.name) for item in parameter.list)
    ports.declare()


def _port_list(by: ByGrammar, words: list[Token]) -> int:
    """Return the index of the ``(`` of the port list, 0 if there is none."""
    at = 2
    if len(words) > 3 and words[2].text == "#":
        at = by.closing(words, 3) + 1
    return at if at < len(words) and words[at].text == "(" else 0


class _Ports:
    """The ports of one list, each brought down to the name of its net.

    Attributes:
        is_ansi: Whether directions stand in the list.
    """

    def __init__(self, by: ByGrammar, draft: Draft) -> None:
        self.is_ansi = False
        self._by = by
        self._draft = draft
        self._declared: list[tuple[Prefix, list[Token]]] = []

    def names(self, words: list[Token]) -> list[Token]:
        """Return the list with nothing but names in it."""
        names: list[Token] = []
        at = words[0].start if words else 0
        for part in split_commas(words):
            names += [*self._name(part), Token("operator", ",", at, at)]
            at = part[-1].end if part else at
        return names[:-1]

    def declare(self) -> None:
        """Enter what the list itself declares."""
        for prefix, name in self._declared:
            read_declared(self._by, self._draft, prefix, name)

    def _name(self, part: list[Token]) -> list[Token]:
        if part and part[0].text == ".":
            if len(part) != 5 or part[3].kind != "name":
                fact = "this port is not one whole net"
                self._by.refuse(part[0].start, fact, "name one net in the list")
            self._draft.renamed[canonical(part[3].text)] = canonical(part[1].text)
            return [part[3]]
        if part and part[0].text in DIRECTIONS:
            self.is_ansi = True
            prefix, name = split_prefix(self._by, part)
        elif self.is_ansi and self._declared:
            # A name alone is declared like the port before it (IEEE 1364-2005, 12.3.4).
            prefix, name = self._declared[-1][0], part
        else:
            # More than a name is for the grammar to refuse, but for a kind of net in front.
            if len(part) > 1:
                self._by.no_verilog(part[1].start)
            return part
        self._declared.append((prefix, name))
        return name[:1]
