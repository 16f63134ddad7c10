"""User-defined primitives of Verilog (IEEE 1364-2005, clause 8): their tables read and stepped.

Only 0 and 1 are looked at; rows about ``x`` serve simulators. An input that does nothing but spoil
the output (a notifier) is left out.
"""

import re
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from insertdft.library.cell import Storage
from insertdft.library.expression import Expression
from insertdft.library.functions import from_table, pruned
from insertdft.library.stepping import Value, edge_inputs, patterns, storages_of
from insertdft.library.verilog_text import Unit

_HEAD: Final = re.compile(r"\bprimitive\s+(?:\\\S+|[\w$]+)\s*\((.*?)\)\s*;", re.DOTALL)
_TABLE: Final = re.compile(r"\btable\b(.*?)\bendtable\b", re.DOTALL)
_WORD: Final = re.compile(r"\\\S+|[A-Za-z_][\w$]*")
_TOKEN: Final = re.compile(r"\(\s*([01xXbB?])\s*([01xXbB?])\s*\)|([01xXbB?rRfFpPnN*\-])")
_EDGES: Final = {"r": "01", "f": "10", "p": "01", "n": "10", "*": "??"}
#: The state variable of every sequential primitive; no identifier is written like it.
STATE: Final = "(state)"
_MOST_INPUTS: Final = 12

#: One entry of a row: allowed values before and after; both empty signs that nothing may match.
Entry = tuple[str, str]


@dataclass(frozen=True, slots=True)
class Row:
    """One row: entries of the inputs, the state it asks for (``?`` if none), what follows."""

    inputs: tuple[Entry, ...]
    edge: int | None
    state: str
    following: str


@dataclass(frozen=True, slots=True)
class Primitive:
    """What a user-defined primitive is.

    Attributes:
        inputs: Input names in the order of connection, after the output.
        function: Over ``inputs``, if it is combinational.
        storage: Over ``inputs`` and ``STATE``, if it is sequential.
    """

    inputs: tuple[str, ...]
    function: Expression | None
    storage: Storage | None


def read_primitive(unit: Unit) -> Primitive | None:
    """Return what a primitive is, or None if its table is neither gate, latch nor flip-flop."""
    head, table = _HEAD.search(unit.text), _TABLE.search(unit.text)
    if head is None or table is None:
        return None
    names = [
        word for word in _WORD.findall(head[1]) if word not in ("output", "input", "reg", "wire")
    ]
    inputs = tuple(names[1:])
    rows = _rows(table[1], len(inputs))
    if rows is None:
        return None
    spoils = {i for i in range(len(inputs)) if _only_spoils(rows, i)}
    used = tuple(name for i, name in enumerate(inputs) if i not in spoils)
    if len(used) > _MOST_INPUTS:
        return None
    kept = [_without(row, spoils) for row in rows if row.following not in "xX"]
    if all(row.state == "" for row in rows):
        return Primitive(inputs, _gate(used, kept), None)
    box = _Box(used, tuple(kept))
    found = storages_of(box, edge_inputs(box))
    return Primitive(inputs, None, found[0]) if found else None


def _rows(text: str, count: int) -> list[Row] | None:
    rows: list[Row] = []
    for line in text.split(";"):
        if not line.strip():
            continue
        parts = [_TOKEN.findall(part) for part in line.split(":")]
        if (
            len(parts) not in (2, 3)
            or len(parts[0]) != count
            or any(len(p) != 1 for p in parts[1:])
        ):
            return None
        entries = [_entry(*token) for token in parts[0]]
        moving = [i for i, (_, is_edge) in enumerate(entries) if is_edge]
        if len(moving) > 1:
            return None
        state = parts[1][0][2] if len(parts) == 3 else ""
        inputs = tuple(entry for entry, _ in entries)
        rows.append(Row(inputs, moving[0] if moving else None, state, parts[-1][0][2]))
    return rows


def _entry(before: str, after: str, single: str) -> tuple[Entry, bool]:
    """Return the values before and after that a token allows, and whether it is an edge."""
    if before:
        return (_values(before), _values(after)), True
    edge = _EDGES.get(single.lower())
    if edge is not None:
        return (_values(edge[0]), _values(edge[1])), True
    return ("01", _values(single)), False


def _values(symbol: str) -> str:
    """Return the binary values that a symbol stands for; none for ``x``."""
    return {"0": "0", "1": "1", "b": "01", "?": "01"}.get(symbol.lower(), "")


def _only_spoils(rows: list[Row], position: int) -> bool:
    """Return whether an input matters in no row but those that end in ``x``."""
    some = any(row.edge == position for row in rows)
    return some and all(
        row.following in "xX" or (row.inputs[position] == ("01", "01") and row.edge != position)
        for row in rows
    )


def _without(row: Row, spoils: set[int]) -> Row:
    inputs = tuple(entry for i, entry in enumerate(row.inputs) if i not in spoils)
    edge = row.edge
    if edge is not None:
        edge -= sum(1 for i in spoils if i < edge)
    return Row(inputs, edge, row.state, row.following)


def _gate(names: tuple[str, ...], rows: list[Row]) -> Expression:
    ones = care = 0
    for pattern, values in enumerate(patterns(names)):
        bits = [str(value) for value in values.values()]
        for row in rows:
            if all(bit in after for bit, (_, after) in zip(bits, row.inputs, strict=True)):
                care |= 1 << pattern
                ones |= int(row.following) << pattern
                break
    return pruned(from_table(ones, names, care))


class _Box:
    """A sequential primitive under the interface of ``Steps``; its state is called ``STATE``."""

    def __init__(self, inputs: tuple[str, ...], rows: tuple[Row, ...]) -> None:
        self.inputs = inputs
        self.nodes = (STATE,)
        # Level-sensitive rows come before edge-sensitive ones (IEEE 1364-2005, 8.6).
        self._levels = [row for row in rows if row.edge is None]
        self._edges = [row for row in rows if row.edge is not None]
        self._rests: dict[str, tuple[Value, Value]] = {}

    def settle(
        self, before: Mapping[str, int], after: Mapping[str, int], nodes: Mapping[str, Value]
    ) -> dict[str, Value]:
        state = nodes[STATE]
        old = "".join(str(before[name]) for name in self.inputs)
        new = "".join(str(after[name]) for name in self.inputs)
        if state is None:
            return {STATE: None}
        if old == new:
            return {STATE: self._rest(new)[state]}
        return {STATE: self._moved(old, new, state)}

    def _moved(self, old: str, new: str, state: int) -> Value:
        """Return the state after one input changed; None if no row speaks of it."""
        moved = [place for place in range(len(new)) if old[place] != new[place]]
        if len(moved) != 1:
            return None
        rows = [*self._levels, *(row for row in self._edges if row.edge == moved[0])]
        for row in rows:
            if _fits(row, old, new, str(state)):
                return state if row.following == "-" else int(row.following)
        return None

    def _rest(self, values: str) -> tuple[Value, Value]:
        """Return the state at rest, coming from state 0 and from state 1.

        Where no level-sensitive row decides, what the edges that lead here agree on does: some
        primitives write a latch as the edges of its data and of its enable.
        """
        if values not in self._rests:
            self._rests[values] = (self._still(values, 0), self._still(values, 1))
        return self._rests[values]

    def _still(self, values: str, state: int) -> Value:
        for row in self._levels:
            if _fits(row, values, values, str(state)):
                return state if row.following == "-" else int(row.following)
        arrivals = {
            (before, self._moved(_turned(values, place), values, before))
            for place in range(len(values))
            for before in (0, 1)
        }
        known = {(before, after) for before, after in arrivals if after is not None}
        if not known:
            return None
        ends = {after for _, after in known}
        return ends.pop() if len(ends) == 1 and {b for b, _ in known} == {0, 1} else state


def _turned(values: str, place: int) -> str:
    other = "1" if values[place] == "0" else "0"
    return values[:place] + other + values[place + 1 :]


def _fits(row: Row, old: str, new: str, state: str) -> bool:
    if state not in _values(row.state):
        return False
    return all(
        after in allowed[1] and (i != row.edge or before in allowed[0])
        for i, (before, after, allowed) in enumerate(zip(old, new, row.inputs, strict=True))
    )
