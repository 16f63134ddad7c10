"""State tables: reduced to a latch or flip-flop under constants, or stepped symbolically.

Rows are tried from the top; the first that matches holds, and where none does the next state is
unknown (as in ``insertdft.library.state_table``).
"""

from collections.abc import Mapping
from functools import lru_cache

import numpy as np

from insertdft.library.cell import StateTable, Storage
from insertdft.library.state_table import Row, expanded_rows, table_storages
from insertdft.proof.aig import FALSE, TRUE, Aig, Lits

#: Inputs whose value is known, with it.
Known = tuple[tuple[str, int], ...]


@lru_cache(maxsize=4096)
def reduced(table: StateTable, node: str, known: Known) -> Storage | None:
    """Return the latch or flip-flop that one node is while some inputs never change.

    Its expressions are over the other inputs and, for a latch that follows another node, that
    node. None if it is neither.
    """
    rows = [row for row in expanded_rows(table) if _possible(table, row, dict(known))]
    fixed = {name for name, _ in known}
    kept = [place for place, name in enumerate(table.inputs) if name not in fixed]
    nodes = [place for place, name in enumerate(table.nodes) if name in _needed(table, node, rows)]
    found = dict.fromkeys(
        (
            tuple(row.inputs[place] for place in kept),
            tuple(row.current[place] for place in nodes),
            tuple(row.following[place] for place in nodes),
        )
        for row in rows
    )
    small = StateTable(
        tuple(table.inputs[place] for place in kept),
        tuple(table.nodes[place] for place in nodes),
        tuple(found),
    )
    for tried in (small, _alone(small, node)):
        item = next((item for item in table_storages(tried) if item.state == node), None)
        if item is not None:
            return item
    return None


def _alone(table: StateTable, node: str) -> StateTable:
    """Return the table of one node, the other nodes being inputs."""
    own = table.nodes.index(node)
    others = [place for place in range(len(table.nodes)) if place != own]
    rows = [
        (
            (*inputs, *(current[place] for place in others)),
            (current[own],),
            (following[own],),
        )
        for inputs, current, following in table.rows
    ]
    names = (*table.inputs, *(table.nodes[place] for place in others))
    return StateTable(names, (node,), tuple(dict.fromkeys(rows)))


def _possible(table: StateTable, row: Row, known: Mapping[str, int]) -> bool:
    for name, token in zip(table.inputs, row.inputs, strict=True):
        if name in known and token in ("R", "F", "LH"[1 - known[name]]):
            return False
    return True


def _needed(table: StateTable, node: str, rows: list[Row]) -> set[str]:
    """Return the nodes that the next state of ``node`` may depend on, itself included."""
    looked_at = {
        name
        for row in rows
        for name, token in zip(table.nodes, row.current, strict=True)
        if token in ("L", "H")
    }
    return looked_at | {node}


def step(
    aig: Aig, table: StateTable, before: Lits, after: Lits, nodes: Lits
) -> tuple[Lits, Lits, Lits]:
    """Return one step of a table, for many instances, after its inputs changed.

    Args:
        aig: Where functions are made.
        table: The table.
        before: Shape (inputs, n), inputs until now.
        after: Shape (inputs, n), inputs from now on.
        nodes: Shape (nodes, n), state until now.

    Returns:
        Following state where it is known, and the condition that it is unknown, both of shape
        (nodes, n), and the condition that no row says anything, shape (n,), which is part of it.
    """
    count = nodes.shape[1]
    open_ = np.full(count, TRUE, np.int32)
    following = np.zeros_like(nodes)
    unknown = np.zeros_like(nodes)
    for row in expanded_rows(table):
        match = aig.conj(open_, _matches(aig, row, before, after, nodes))
        if (match == FALSE).all():
            continue
        open_ = aig.conj(open_, match ^ 1)
        for place, token in enumerate(row.following):
            if token in ("H", "N"):
                value = match if token == "H" else aig.conj(match, nodes[place])
                following[place] = aig.disj(following[place], value)
            elif token != "L":
                unknown[place] = aig.disj(unknown[place], match)
    for place in range(len(unknown)):
        unknown[place] = aig.disj(unknown[place], open_)
    return following, unknown, open_


def _matches(aig: Aig, row: Row, before: Lits, after: Lits, nodes: Lits) -> Lits:
    found = np.full(nodes.shape[1], TRUE, np.int32)
    for place, token in enumerate(row.inputs):
        if token != "-":
            found = aig.conj(found, _input_fits(aig, token, before[place], after[place]))
    for place, token in enumerate(row.current):
        if token in ("L", "H"):
            found = aig.conj(found, nodes[place] ^ int(token == "L"))
    return found


def _input_fits(aig: Aig, token: str, before: Lits, after: Lits) -> Lits:
    match token:
        case "H":
            return after
        case "L":
            return after ^ 1
        case "R":
            return aig.conj(before ^ 1, after)
        case "F":
            return aig.conj(before, after ^ 1)
        case "~R":
            return aig.conj(before ^ 1, after) ^ 1
        case "~F":
            return aig.conj(before, after ^ 1) ^ 1
        case _:
            return np.full_like(after, TRUE)
