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


class TableModel:
    """A state table ready to be stepped."""

    def __init__(self, table: StateTable) -> None:
        """Expand the rows once."""
        self.inputs = table.inputs
        self.nodes = table.nodes
        self._rows = expanded_rows(table)

    def step(
        self, before: Mapping[str, int], after: Mapping[str, int], nodes: Mapping[str, Value]
    ) -> dict[str, Value]:
        """Return the nodes one step after the inputs went from ``before`` to ``after``.

        Args:
            before: Value of each input until now.
            after: Value of each input from now on.
            nodes: Value of each node until now, None for unknown.
        """
        for row in self._rows:
            if self._matches(row, before, after, nodes):
                pairs = zip(self.nodes, row.following, strict=True)
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

    def _matches(
        self,
        row: Row,
        before: Mapping[str, int],
        after: Mapping[str, int],
        nodes: Mapping[str, Value],
    ) -> bool:
        inputs = zip(self.inputs, row.inputs, strict=True)
        current = zip(self.nodes, row.current, strict=True)
        return all(_input_fits(token, before[name], after[name]) for name, token in inputs) and all(
            _node_fits(token, nodes[name]) for name, token in current
        )


def _input_fits(token: str, before: int, after: int) -> bool:
    if token in ("L", "H"):
        return after == (token == "H")
    rose, fell = (before, after) == (0, 1), (before, after) == (1, 0)
    return {"R": rose, "F": fell, "~R": not rose, "~F": not fell}.get(token, True)


def _node_fits(token: str, value: Value) -> bool:
    return value == (token == "H") if token in ("L", "H") else True


def _following(token: str, value: Value) -> Value:
    if token == "N":
        return value
    return {"L": 0, "H": 1}.get(token)
