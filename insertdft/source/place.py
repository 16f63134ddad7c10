"""Where exactly an instance's parts stand in the text, worked out again for those that are edited.

A million instances are read and a tenth of them edited, so the columns keep only where a statement
starts and ends. What an edit needs beyond that is found here, in a few microseconds an instance.
"""

import re
from typing import Final, NamedTuple

from insertdft.netlist import Module
from insertdft.netlist.names import canonical
from insertdft.source.tokens import ATTRIBUTE, COMMENT, GAP, NAME, STRING, TOKEN


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


class InstanceText(NamedTuple):
    """The parts of one instance in the text of its module's source; all numbers are offsets.

    Attributes:
        cell: Start and end of the cell name, which all instances of the statement share.
        parameters: Start and end of ``#(...)``, shared as well (of a gate, its delay), or None.
        name: Start and end of the instance name; None for a nameless gate.
        place: Place within its statement, from 0.
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
    place: int
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
    start = starts.item(instance)
    first, after = instance, instance + 1
    while first > 0 and starts.item(first - 1) == start:
        first -= 1
    while after < len(starts) and starts.item(after) == start:
        after += 1
    code, source = module.code or module.source.text, module.source.text
    return _locate(code, source, start, instance - first, after - first)


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


_STRENGTH: Final = r"(?:supply|strong|pull|weak|highz)[01]\b"
#: What can stand between a cell name and the instance name.
_HEAD: Final = re.compile(
    rf"(`?{NAME}){GAP}(?:(?P<parameters>\#)|(?P<strength>\(\s*+{_STRENGTH}))?+"
)
_OPENING: Final = re.compile(rf"{GAP}(?P<comma>,)?+{GAP}(?P<name>`?{NAME})?+{GAP}\(", re.ASCII)
#: A connection by name to a name, one bit, a constant or nothing: nearly all are of this kind.
_PLAIN: Final = re.compile(
    rf"""\s*+,?+\s*+(\.)\s*+({NAME})\s*+\(
    \s*+((?:[\w$':]++(?:\[[\d:]++\])?+|\\\S++(?:\s++\[[\d:]++\])?+)?+)\s*+\)""",
    re.ASCII | re.VERBOSE,
)
_NAMED: Final = re.compile(rf"{GAP},?+{GAP}(\.){GAP}({NAME}){GAP}\({GAP}", re.ASCII)
_DELAY: Final = re.compile(rf"{GAP}(?:\d[\w.']*+|`?{NAME})", re.ASCII)
_PAREN: Final = re.compile(rf"{GAP}\(", re.ASCII)
_CLOSING: Final = re.compile(rf"{GAP}\)", re.ASCII)
_SKIP: Final = re.compile(GAP)
#: Whatever matters for where an expression ends.
_MARK: Final = re.compile(rf"{COMMENT}|{STRING}|\\\S++|[()\[\]{{}},]", re.ASCII)


def _locate(code: str, source: str, start: int, place: int, size: int) -> InstanceText:
    head = _HEAD.match(code, start)
    if head is None:
        raise RuntimeError(f"no instance at offset {start}")
    at, parameters = head.end(1), None
    if head.lastindex != 1:
        at, parameters = _behind_parameters(code, head)
    for _ in range(place):
        at = _connections(code, _opening(code, at).end())[1] + 1
    opening = _opening(code, at)
    connections, list_end = _connections(code, opening.end())
    insert_at = _insert_at(code, source, connections, list_end)
    return InstanceText(
        cell=head.span(1),
        parameters=parameters,
        name=opening.span("name") if opening["name"] else None,
        place=place,
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


def _behind_parameters(code: str, head: re.Match[str]) -> tuple[int, tuple[int, int] | None]:
    """Return the offset behind strength, delay or parameters, and the span of the latter."""
    at = head.start("strength")
    if at >= 0:
        at = _SKIP.match(code, _behind_bracket(code, at + 1)).end()  # type: ignore[union-attr]
        if code[at] != "#":
            return at, None
    else:
        at = head.start("parameters")
    opening = _PAREN.match(code, at + 1)
    delay = _DELAY.match(code, at + 1)
    if opening:
        end = _behind_bracket(code, opening.end())
    elif delay:
        end = delay.end()
    else:
        raise RuntimeError(f"no parameters at offset {at}")
    return end, (at, end)


def _behind_bracket(code: str, at: int) -> int:
    """Return the offset behind the bracket that closes the one before ``at``."""
    while code[at - 1] != ")" or at == 0:
        at = _expression_end(code, at) + 1
    return at


def _expression_end(code: str, at: int) -> int:
    """Return the offset of the comma or bracket that ends the expression from ``at`` on."""
    depth = 0
    for mark in _MARK.finditer(code, at):
        text = mark[0]
        if text in ")]}" and depth == 0:
            return mark.start()
        if text == "," and depth == 0:
            return mark.start()
        depth += (text in "([{") - (text in ")]}")
    raise RuntimeError(f"no end of the expression at offset {at}")


def _connections(code: str, at: int) -> tuple[tuple[Connection, ...], int]:
    """Return the connections from ``at`` on, and the offset of the ``)`` behind them."""
    found: list[Connection] = []
    while True:
        match = _PLAIN.match(code, at)
        if match is not None:
            name, text = match.group(2, 3)
            pin = canonical(name) if name[0] == "\\" else name
            first, end = match.span(3)
            found.append(Connection(pin, match.start(1), match.end(), first, end, text))
            at = match.end()
            continue
        match = _NAMED.match(code, at)
        if match is None:
            break
        end = _expression_end(code, match.end())
        first, last = _trimmed(code, match.end(), end)
        text = code[first:last]
        pin = canonical(match[2])
        found.append(Connection(pin, match.start(1), end + 1, first, last, text))
        at = end + 1
    return (tuple(found), _closing(code, at)) if found else _by_position(code, at)


def _trimmed(code: str, start: int, end: int) -> tuple[int, int]:
    """Return the span of the expression in a stretch of text, without blanks and comments."""
    last = start
    for word in TOKEN.finditer(code, start, end):
        if word.lastgroup != "gap":
            last = word.end()
    return start, last


def _by_position(code: str, at: int) -> tuple[tuple[Connection, ...], int]:
    found: list[Connection] = []
    closing = _CLOSING.match(code, at)
    if closing:
        return (), closing.end() - 1
    while not found or code[at - 1] == ",":
        start = _SKIP.match(code, at).end()  # type: ignore[union-attr]
        end = _expression_end(code, start)
        first, last = _trimmed(code, start, end)
        found.append(Connection(f"#{len(found)}", first, last, first, last, code[first:last]))
        at = end + 1
    return tuple(found), at - 1


def _closing(code: str, at: int) -> int:
    closing = _CLOSING.match(code, at)
    if closing is None:
        raise RuntimeError(f"connections are not closed at offset {at}")
    return closing.end() - 1


def _insert_at(code: str, source: str, connections: tuple[Connection, ...], list_end: int) -> int:
    if not connections:
        return list_end
    end = connections[-1].end
    if code is not source and source[end:list_end] != code[end:list_end]:
        return list_end  # a directive stands there: what follows it must not depend on it
    if connections[-1].pin[0] == "#" and connections[-1].expression.rpartition("\\")[1]:
        # The last name may be an escaped one, whose closing blank stands outside of it.
        return end + 1 if source[end].isspace() else end
    return end
