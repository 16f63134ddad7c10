"""The splices of one statement of instances: other cells, other pins, more pins."""

import re
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Final

from insertdft.netlist import Module
from insertdft.source import Connection, InstanceText, locate
from insertdft.text import Splice

PIN_NAME: Final = re.compile(r"\.\s*([A-Za-z_][\w$]*|\\\S+)", re.ASCII)


@dataclass(slots=True)
class InstanceEdit:
    """What one instance becomes.

    Attributes:
        cell: Its new cell, None to keep the old one.
        renamed: Pins whose name changes, old -> new.
        pins: Pin (by its new name) -> text of what it connects to.
        beside: Items that stand behind its statement.
        order: How a connection list by position goes on: the names of further ports.
        positions: How it begins: pin names of a library cell, empty for a module.
    """

    cell: str | None = None
    renamed: Mapping[str, str] = field(default_factory=dict)
    pins: dict[str, str] = field(default_factory=dict)
    beside: list[str] = field(default_factory=list)
    order: Sequence[str] = ()
    positions: Sequence[str] = ()


def statement_mates(module: Module, number: int) -> range:
    """Return all instances of the statement that ``number`` belongs to."""
    starts = module.instance_start
    first, end = number, number + 1
    while first > 0 and starts[first - 1] == starts[number]:
        first -= 1
    while end < len(starts) and starts[end] == starts[number]:
        end += 1
    return range(first, end)


def statement_splices(
    module: Module, numbers: Sequence[int], edits: Mapping[int, InstanceEdit], cell: str
) -> list[Splice]:
    """Return the splices of one statement.

    Args:
        module: The module.
        numbers: All instances of the statement, in order.
        edits: Edits by instance; at least one of the statement's.
        cell: Cell that the statement names.
    """
    splices: list[Splice] = []
    written = cell
    for number in numbers:
        edit = edits.get(number)
        if edit is None and len(numbers) == 1:
            continue
        text = locate(module, number)
        wanted = (edit.cell if edit else None) or cell
        splices += _cell_splices(module, text, written, wanted)
        written = wanted
        if edit is not None:
            name = module.instance_names[number]
            splices += _pin_splices(module, text, edit, f"`{name}` joins a chain")
    beside = [line for number in numbers if number in edits for line in edits[number].beside]
    if beside:
        at = int(module.instance_end[numbers[0]])
        added = "".join(f"\n  {line}" for line in beside)
        splices.append(Splice(at, at, added, "parts of composed scan cells"))
    return splices


def _cell_splices(
    module: Module, text: InstanceText, written: str, wanted: str
) -> Iterator[Splice]:
    """Yield what makes the instance one of ``wanted``, after the statement said ``written``."""
    if text.comma is None:
        if wanted != written:
            yield Splice(*text.cell, wanted, "scan cell")
    elif wanted != written:
        shared = text.parameters
        parameters = " " + module.source.text[slice(*shared)] if shared else ""
        again = f";\n  {wanted}{parameters}"
        yield Splice(text.comma, text.comma + 1, again, "a statement of its own")


def _pin_splices(
    module: Module, text: InstanceText, edit: InstanceEdit, why: str
) -> Iterator[Splice]:
    missing = dict(edit.pins)
    by_position = text.is_by_position and bool(text.connections)
    if by_position and not edit.positions:
        yield _more_positions(text, edit, why)
        return
    for place, connection in enumerate(text.connections):
        old = edit.positions[place] if by_position else connection.pin
        new = edit.renamed.get(old, old)
        value = missing.pop(new, None)
        if by_position:
            yield from _name_it(connection, new, value, why)
        else:
            yield from _named_splices(module.source.text, connection, new, value, why)
    if missing:
        gap = _gap(module.source.text, text)
        listed = f",{gap}".join(f".{pin}({value})" for pin, value in missing.items())
        lead = text.insert_prefix.rstrip() + gap if text.connections else ""
        yield Splice(text.insert_at, text.insert_at, lead + listed, why)


def _named_splices(
    source: str, connection: Connection, new: str, value: str | None, why: str
) -> Iterator[Splice]:
    if new != connection.pin:
        match = PIN_NAME.match(source, connection.start)
        if match is None:
            raise RuntimeError(f"no pin name at offset {connection.start}")
        yield Splice(*match.span(1), new, why)
    if value is not None:
        yield Splice(connection.expression_start, connection.expression_end, value, why)


def _name_it(connection: Connection, pin: str, value: str | None, why: str) -> Iterator[Splice]:
    """Yield what turns a connection by position into one by name."""
    start, end = connection.expression_start, connection.expression_end
    if value is not None:
        yield Splice(start, end, f".{pin}({value})", why)
        return
    blank = " " if "\\" in connection.expression else ""
    yield Splice(start, start, f".{pin}(", why)
    yield Splice(end, end, f"{blank})", why)


def _more_positions(text: InstanceText, edit: InstanceEdit, why: str) -> Splice:
    """Return the splice that goes on with a connection list by position."""
    given = len(text.connections)
    values = [edit.pins.get(name, "") for name in edit.order]
    listed = ", ".join(values[given:])
    return Splice(text.insert_at, text.insert_at, text.insert_prefix + listed, why)


def _gap(source: str, text: InstanceText) -> str:
    """Return what stands between connections: a line break with indent, or a blank."""
    if not text.connections:
        return " "
    at = text.connections[-1].start
    before = at
    while before > 0 and source[before - 1] in " \t":
        before -= 1
    return source[before - 1 : at] if source[before - 1] == "\n" else " "
