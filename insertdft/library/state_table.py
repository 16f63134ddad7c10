"""State tables of Liberty, evaluated.

Rows are tried from the top and the first that matches holds. ``H/L`` and ``L/H`` make two rows of
one, with the first sides of all such tokens and with the second sides. A combination that no row
covers gives an unknown (Liberty Reference Manual, "statetable"; the order of rows is from memory).
"""

from collections.abc import Mapping
from functools import lru_cache
from typing import Final, NamedTuple

from insertdft.library.cell import StateTable, Storage
from insertdft.library.stepping import Value, storages_of

#: Steps until a level-sensitive table must be at rest.
_MOST_STEPS: Final = 8


class Row(NamedTuple):
    """One row without ``/`` tokens."""

    inputs: tuple[str, ...]
    current: tuple[str, ...]
    following: tuple[str, ...]


def expanded_rows(table: StateTable) -> tuple[Row, ...]:
    """Return the rows with each ``H/L`` row written as two."""
    rows: list[Row] = []
    for parts in table.rows:
        both = any("/" in token for part in parts for token in part)
        rows += [
            Row(*(tuple(_side(token, side) for token in part) for part in parts))
            for side in ((0, 1) if both else (0,))
        ]
    return tuple(rows)


def _side(token: str, side: int) -> str:
    return token.split("/")[side] if "/" in token else token


def edge_inputs(table: StateTable) -> tuple[str, ...]:
    """Return the inputs that the table is sensitive to at an edge."""
    return tuple(
        name
        for position, name in enumerate(table.inputs)
        if any(row[0][position].strip("~") in ("R", "F") for row in table.rows)
    )


@lru_cache(maxsize=256)
def table_storages(table: StateTable) -> tuple[Storage, ...]:
    """Return the latches or the flip-flop that a table is; empty if it is neither."""
    return storages_of(TableModel(table), edge_inputs(table))


class _Mask(NamedTuple):
    """A row as bit masks over inputs and over nodes.

    Attributes:
        cared: Inputs whose level matters.
        level: Their level.
        rise: Inputs that must rise; ``fall`` those that must fall.
        fall: See ``rise``.
        no_rise: Inputs that must not rise; ``no_fall`` those that must not fall.
        no_fall: See ``no_rise``.
        nodes: Nodes whose value matters; it must then be known.
        state: Their value.
    """

    cared: int
    level: int
    rise: int
    fall: int
    no_rise: int
    no_fall: int
    nodes: int
    state: int


def _mask(row: Row) -> _Mask:
    def where(tokens: tuple[str, ...], *wanted: str) -> int:
        return sum(1 << place for place, token in enumerate(tokens) if token in wanted)

    inputs, current = row.inputs, row.current
    return _Mask(
        where(inputs, "L", "H"),
        where(inputs, "H"),
        where(inputs, "R"),
        where(inputs, "F"),
        where(inputs, "~R"),
        where(inputs, "~F"),
        where(current, "L", "H"),
        where(current, "H"),
    )


class TableModel:
    """A state table ready to be stepped."""

    def __init__(self, table: StateTable) -> None:
        """Expand the rows once."""
        self.inputs = table.inputs
        self.nodes = table.nodes
        self._rows = [(_mask(row), row.following) for row in expanded_rows(table)]

    def step(
        self, before: Mapping[str, int], after: Mapping[str, int], nodes: Mapping[str, Value]
    ) -> dict[str, Value]:
        """Return the nodes one step after the inputs went from ``before`` to ``after``.

        Args:
            before: Value of each input until now.
            after: Value of each input from now on.
            nodes: Value of each node until now, None for unknown.
        """
        old, new = _bits(self.inputs, before), _bits(self.inputs, after)
        known = sum(1 << place for place, n in enumerate(self.nodes) if nodes[n] is not None)
        state = sum(1 << place for place, n in enumerate(self.nodes) if nodes[n])
        for mask, following in self._rows:
            if _matches(mask, old, new, known, state):
                pairs = zip(self.nodes, following, strict=True)
                return {name: _following(token, nodes[name]) for name, token in pairs}
        return dict.fromkeys(self.nodes)

    def settle(
        self, before: Mapping[str, int], after: Mapping[str, int], nodes: Mapping[str, Value]
    ) -> dict[str, Value]:
        """Return the nodes at rest after a change of inputs; unknown what does not come to rest."""
        found = self.step(before, after, nodes)
        for _ in range(_MOST_STEPS):
            following = self.step(after, after, found)
            if following == found:
                return found
            found = following
        return dict.fromkeys(self.nodes)


def _bits(names: tuple[str, ...], values: Mapping[str, int]) -> int:
    word = 0
    for place, name in enumerate(names):
        word |= values[name] << place
    return word


def _matches(mask: _Mask, old: int, new: int, known: int, state: int) -> bool:
    rose, fell = new & ~old, old & ~new
    return (
        new & mask.cared == mask.level
        and rose & mask.rise == mask.rise
        and fell & mask.fall == mask.fall
        and not (rose & mask.no_rise or fell & mask.no_fall)
        and mask.nodes & known == mask.nodes
        and state & mask.nodes == mask.state
    )


def _following(token: str, value: Value) -> Value:
    if token == "N":
        return value
    return {"L": 0, "H": 1}.get(token)
