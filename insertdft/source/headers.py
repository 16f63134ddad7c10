"""Module headers: names listed or directions in the list, parameters, ports under another name."""

import re
from typing import Final

from insertdft.netlist import Header
from insertdft.netlist.names import canonical
from insertdft.source.by_grammar import ByGrammar
from insertdft.source.draft import Draft
from insertdft.source.grammar import Node
from insertdft.source.odd_statements import declare_nodes
from insertdft.source.tokens import NAME, Token, matching, split_commas

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
    name = words[1] if len(words) > 1 and words[1].kind == "name" else None
    draft.name = canonical(name.text) if name else ""
    words[0] = words[0]._replace(text="module")
    opening = _port_list(by, words)
    closing = by.closing(words, opening) if opening else -1
    if opening:
        words[opening + 1 : closing] = _unrename(by, draft, words[opening + 1 : closing])
        closing = matching(words, opening)
    tree = by.parse(words)
    is_ansi = any(type(port).__name__ == "Ioport" for port in tree.ports)
    draft.header = Header(
        ansi=is_ansi,
        list_end=words[closing].start if opening else None,
        list_empty=not tree.ports,
        end=end,
        name_end=words[1].end,
    )
    for parameter in tree.paramlist.params:
        draft.parameter_names.update(canonical(item.name) for item in parameter.list)
    for port in tree.ports:
        _read_port(by, draft, port)


def _port_list(by: ByGrammar, words: list[Token]) -> int:
    """Return the index of the ``(`` of the port list, 0 if there is none."""
    at = 2
    if len(words) > 3 and words[2].text == "#":
        at = by.closing(words, 3) + 1
    return at if at < len(words) and words[at].text == "(" else 0


def _unrename(by: ByGrammar, draft: Draft, words: list[Token]) -> list[Token]:
    """Replace ports like ``.p(net)`` by ``net``; the grammar has no rule for them."""
    changed: list[Token] = []
    for part in split_commas(words):
        if changed:
            changed.append(Token("operator", ",", part[0].start if part else 0, 0))
        if part and part[0].text == ".":
            part = _renamed(by, draft, part)  # noqa: PLW2901
        changed += part
    return changed


def _renamed(by: ByGrammar, draft: Draft, part: list[Token]) -> list[Token]:
    if len(part) != 5 or part[3].kind != "name":
        by.refuse(part[0].start, "this port is not one whole net", "name one net in the list")
    draft.renamed[canonical(part[3].text)] = canonical(part[1].text)
    return [part[3]]


def _read_port(by: ByGrammar, draft: Draft, port: Node) -> None:
    if type(port).__name__ != "Ioport":
        draft.port_names.append((canonical(port.name), port.lineno))
        return
    first, second = port.first, port.second
    draft.port_names.append((canonical(first.name), first.lineno))
    kinds = [first] if second is None else [first, second]
    declare_nodes(by, draft, kinds, "wire")
