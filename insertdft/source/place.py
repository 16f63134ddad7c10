"""Where exactly an instance's parts stand in the text, worked out again for those that are edited.

A million instances are read and a tenth of them edited, so the columns keep only where a statement
starts and ends. What an edit needs beyond that is found here, in a few microseconds an instance.
"""

import re
from dataclasses import dataclass
from typing import Final, NamedTuple

from insertdft.netlist import Module
from insertdft.netlist.names import canonical
from insertdft.source.tokens import ATTRIBUTE, COMMENT, GAP, NAME, STRING


class Connection(NamedTuple):
    """One connection of an instance, in the order written.

    Attributes:
        pin: Kept name of the pin (whole, without a bit index), ``#i`` by position.
        start: Offset of its ``.``; by position that of the expression.
        end: Offset behind its ``)``; by position behind the expression.
        expression_start: Offset of the expression.
        expression_end: Offset behind it; outer blanks do not belong to it.
        expression: Its text; empty for ``.A()``. An escaped name comes without its closing blank.
    """

    pin: str
    start: int
    end: int
    expression_start: int
    expression_end: int
    expression: str


@dataclass(frozen=True, slots=True)
class InstanceText:
    """The parts of one instance in the text of its module's source; all numbers are offsets.

    Attributes:
        cell: Start and end of the cell name, which all instances of the statement share.
        parameters: Start and end of ``#(...)``, shared as well; None if there are none.
        name: Start and end of the instance name; None for a nameless gate.
        index: Place within its statement, from 0.
        statement_size: How many instances the statement has.
        comma: Offset of the comma in front, None for the first of a statement.
        list_start: Offset behind the ``(`` of the connections.
        list_end: Offset of their ``)``.
        connections: In the order written.
        is_by_position: Whether they say no pin names.
        insert_at: Where further text can be put so that it follows the last connection.
        insert_prefix: What must stand before a further connection there: a comma, or nothing in
            an empty list.
    """

    cell: tuple[int, int]
    parameters: tuple[int, int] | None
    name: tuple[int, int] | None
    index: int
    statement_size: int
    comma: int | None
    list_start: int
    list_end: int
    connections: tuple[Connection, ...]
    is_by_position: bool
    insert_at: int
    insert_prefix: str


def locate(module: Module, instance: int) -> InstanceText:
    """Return the places of the parts of one instance."""
    starts = module.instance_start
    start = starts[instance]
    first = instance
    while first > 0 and starts[first - 1] == start:
        first -= 1
    last = instance
    while last + 1 < len(starts) and starts[last + 1] == start:
        last += 1
    code, source = module.code or module.source.text, module.source.text
    return _locate(code, source, int(start), instance - first, last - first + 1)


def attributes(module: Module, instance: int) -> dict[str, str]:
    """Return the attributes before the statement of an instance, values without quotes.

    An attribute that says no value has the value ``1`` (IEEE 1364-2005, 3.8).
    """
    code = module.code or module.source.text
    start, end = int(module.instance_before[instance]), int(module.instance_start[instance])
    if code.find("(*", start, end) < 0:
        return {}
    found: dict[str, str] = {}
    for part in _GAP_PART.finditer(code, start, end):
        if part["attribute"]:
            for item in _ATTRIBUTE_ITEM.finditer(part["attribute"], 2, len(part["attribute"]) - 2):
                value = item[2] or "1"
                found[canonical(item[1])] = value[1:-1] if value[0] == '"' else value.strip()
    return found


_GAP_PART: Final = re.compile(rf"\s++|{COMMENT}|(?P<attribute>{ATTRIBUTE})", re.ASCII)
_ATTRIBUTE_ITEM: Final = re.compile(rf"[\s,]*+({NAME})(?:\s*+=\s*+({STRING}|[^,\"]++))?+", re.ASCII)


def _nested(depth: int) -> str:
    """Return a pattern of text with balanced brackets."""
    inner = rf'[^()\[\]{{}},;\\/"]++|\\\S++|{STRING}|{COMMENT}|/'
    for _ in range(depth):
        inner = (
            rf'[^()\[\]{{}},;\\/"]++|\\\S++|{STRING}|{COMMENT}|/'
            rf"|\((?:{inner}|,)*+\)|\[(?:{inner}|,)*+\]|\{{(?:{inner}|,)*+\}}"
        )
    return rf"(?:{inner})*+"


_BALANCED: Final = _nested(3)
_HEAD: Final = re.compile(
    rf"(`?{NAME}){GAP}"
    rf"(?P<strength>\((?:supply|strong|pull|weak|highz)[01]\b[^()]*+\){GAP})?+"
    rf"(?P<parameters>\#\s*+(?:\((?:{_BALANCED},?+)*+\)|[\w.$`']++))?+",
    re.ASCII,
)
_OPENING: Final = re.compile(rf"{GAP}(?P<comma>,)?+{GAP}(?P<name>`?{NAME})?+{GAP}\(", re.ASCII)
_NAMED: Final = re.compile(
    rf"{GAP},?+{GAP}(\.)\s*+({NAME}){GAP}\(\s*+((?:[\w\[\]$']++|{_BALANCED}))(\))", re.ASCII
)
_TERM: Final = re.compile(rf"{GAP}({_BALANCED})(,?+)", re.ASCII)
_CLOSING: Final = re.compile(rf"{GAP}\)", re.ASCII)


def _locate(code: str, source: str, start: int, index: int, size: int) -> InstanceText:
    head = _HEAD.match(code, start)
    if head is None:
        raise RuntimeError(f"no instance at offset {start}")
    at = head.end()
    for _ in range(index):
        at = _connections(code, _opening(code, at).end())[1] + 1
    opening = _opening(code, at)
    connections, list_end = _connections(code, opening.end())
    insert_at = _insert_at(code, source, connections, list_end)
    return InstanceText(
        cell=head.span(1),
        parameters=head.span("parameters") if head["parameters"] else None,
        name=opening.span("name") if opening["name"] else None,
        index=index,
        statement_size=size,
        comma=opening.start("comma") if opening["comma"] else None,
        list_start=opening.end(),
        list_end=list_end,
        connections=connections,
        is_by_position=bool(connections) and connections[0].pin[0] == "#",
        insert_at=insert_at,
        insert_prefix=", " if connections else "",
    )


def _opening(code: str, at: int) -> re.Match[str]:
    opening = _OPENING.match(code, at)
    if opening is None:
        raise RuntimeError(f"no connections at offset {at}")
    return opening


def _connections(code: str, at: int) -> tuple[tuple[Connection, ...], int]:
    """Return the connections from ``at`` on, and the offset of the ``)`` behind them."""
    found: list[Connection] = []
    match = _NAMED.match(code, at)
    if match is None:
        return _by_position(code, at)
    while match is not None:
        text = match[3].rstrip()
        first = match.start(3)
        found.append(
            Connection(
                canonical(match[2]), match.start(1), match.end(), first, first + len(text), text
            )
        )
        at = match.end()
        match = _NAMED.match(code, at)
    return tuple(found), _closing(code, at)


def _by_position(code: str, at: int) -> tuple[tuple[Connection, ...], int]:
    found: list[Connection] = []
    closing = _CLOSING.match(code, at)
    if closing:
        return (), closing.end() - 1
    while term := _TERM.match(code, at):
        text = term[1].rstrip()
        first, end = term.start(1), term.start(1) + len(text)
        found.append(Connection(f"#{len(found)}", first, end, first, end, text))
        at = term.end()
        if not term[2]:
            break
    return tuple(found), _closing(code, at)


def _closing(code: str, at: int) -> int:
    closing = _CLOSING.match(code, at)
    if closing is None:
        raise RuntimeError(f"connections are not closed at offset {at}")
    return closing.end() - 1


def _insert_at(code: str, source: str, connections: tuple[Connection, ...], list_end: int) -> int:
    if not connections:
        return list_end
    end = connections[-1].end
    rest = source[end:list_end]
    if rest != code[end:list_end]:
        return list_end  # a directive stands there: what follows it must not depend on it
    if connections[-1].expression[:1] == "\\" and connections[-1].pin[0] == "#":
        return end + 1  # behind the blank that closes the name
    return end
