"""Nodes being collected, and their sorting into a ``Circuit``'s order."""

from dataclasses import dataclass, field
from itertools import pairwise
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from insertdft.library.expression import Expression, Var, substitute, variables
from insertdft.netlist import CONST0, Ids, Offsets
from insertdft.simulate.circuit import Function, Group
from insertdft.simulate.levels import Levels, levelize

Slots = npt.NDArray[np.int64]


class Signal(NamedTuple):
    """One variable of a cell's expressions, for all instances of the cell.

    Attributes:
        slots: Shape (n,), where its value stands.
        rows: Shape (n,), its pin rows, -1 where it is no pin.
    """

    slots: Slots
    rows: Slots


class _Chunk(NamedTuple):
    function: int
    outputs: Slots
    inputs: Slots  # (arity, n)
    instances: Slots
    rows: Slots
    edge_rows: Slots  # (arity, n)


@dataclass(slots=True, eq=False)
class Draft:
    """Nodes with slots as they come; the first slots are the nets.

    Attributes:
        slots: Number of slots given out.
        functions: Distinct functions by expression, in order of appearance.
    """

    slots: int
    functions: dict[Function, int] = field(default_factory=dict)
    _chunks: list[_Chunk] = field(default_factory=list)

    def fresh(self, count: int) -> Slots:
        """Return new slots."""
        self.slots += count
        return np.arange(self.slots - count, self.slots, dtype=np.int64)

    def add(
        self,
        expression: Expression,
        signals: dict[str, Signal],
        outputs: Slots,
        instances: Slots,
        rows: Slots,
    ) -> None:
        """Add one node for each output slot, over the variables of ``expression``."""
        if not len(outputs):
            return
        names = variables(expression)
        function = self._number(expression, names)
        none = np.full(len(outputs), -1, np.int64)
        used = [signals[name] for name in names] or [Signal(np.full_like(none, CONST0), none)]
        self._chunks.append(
            _Chunk(
                function,
                outputs,
                np.stack([signal.slots for signal in used]),
                instances,
                rows,
                np.stack([signal.rows for signal in used]),
            )
        )

    def _number(self, expression: Expression, names: tuple[str, ...]) -> int:
        renamed = substitute(expression, {name: Var(str(i)) for i, name in enumerate(names)})
        function = Function(renamed, max(1, len(names)))
        return self.functions.setdefault(function, len(self.functions))

    def sort(self) -> "Sorted":
        """Return everything in order of evaluation."""
        return _sort(self, _table(self._chunks))


class Sorted(NamedTuple):
    """What ``Circuit`` needs, with ``place`` telling where each drafted slot went.

    Columns beside ``groups`` are shaped as in ``Circuit``.
    """

    place: Ids
    first_node: int
    slots: int
    groups: tuple[Group, ...]
    level: Ids
    node_instance: Ids
    node_row: Ids
    edge_slot: Ids
    edge_node: Ids
    edge_row: Ids
    cut_slots: Ids
    loops: tuple[tuple[int, ...], ...]


class _Table(NamedTuple):
    """All nodes as columns; inputs of node i are rows ``start[i]:start[i + 1]``."""

    function: Slots
    output: Slots
    instance: Slots
    row: Slots
    start: Offsets
    input: Slots
    input_row: Slots


def _table(chunks: list[_Chunk]) -> _Table:
    def join(parts: list[Slots]) -> Slots:
        return np.concatenate(parts) if parts else np.zeros(0, np.int64)

    counts = [np.full(len(chunk.outputs), len(chunk.inputs)) for chunk in chunks]
    return _Table(
        function=join([np.full(len(chunk.outputs), chunk.function) for chunk in chunks]),
        output=join([chunk.outputs for chunk in chunks]),
        instance=join([chunk.instances for chunk in chunks]),
        row=join([chunk.rows for chunk in chunks]),
        start=np.concatenate(([0], np.cumsum(join(counts)))).astype(np.int64),
        input=join([chunk.inputs.T.ravel() for chunk in chunks]),
        input_row=join([chunk.edge_rows.T.ravel() for chunk in chunks]),
    )


def _sort(draft: Draft, table: _Table) -> Sorted:
    reader = np.repeat(table.output, np.diff(table.start))
    levels = levelize(draft.slots, table.input.astype(np.int32), reader.astype(np.int32))
    inputs, total = _read_cuts_elsewhere(table.input, levels, draft.slots)
    level = levels.level[table.output]
    order = np.lexsort((table.function, level))
    place, first_node = _places(total, table.output[order])
    groups, rows = _groups(table, order, level, place[inputs], first_node)
    by_slot = np.zeros(total, np.int32)
    by_slot[first_node:] = level[order]
    return Sorted(
        place=place,
        first_node=first_node,
        slots=total,
        groups=groups,
        level=by_slot,
        node_instance=_behind_sources(table.instance[order], first_node),
        node_row=_behind_sources(table.row[order], first_node),
        edge_slot=place[inputs][rows].astype(np.int32),
        edge_node=place[reader][rows].astype(np.int32),
        edge_row=table.input_row[rows].astype(np.int32),
        cut_slots=place[draft.slots : total],
        loops=_instances_on(levels, table, draft.slots),
    )


def _read_cuts_elsewhere(inputs: Slots, levels: Levels, slots: int) -> tuple[Slots, int]:
    """Give each cut node a source slot of its own that its readers read instead."""
    if not len(levels.cut):
        return inputs, slots
    instead = np.arange(slots, dtype=np.int64)
    instead[levels.cut] = np.arange(slots, slots + len(levels.cut))
    return instead[inputs], slots + len(levels.cut)


def _places(total: int, outputs: Slots) -> tuple[Ids, int]:
    is_node = np.zeros(total, np.bool_)
    is_node[outputs] = True
    first_node = total - len(outputs)
    place = np.zeros(total, np.int32)
    place[~is_node] = np.arange(first_node)
    place[outputs] = np.arange(first_node, total)
    return place, first_node


def _groups(
    table: _Table, order: Offsets, level: Ids, inputs: Ids, first_node: int
) -> tuple[tuple[Group, ...], Offsets]:
    """Return the groups, and the row of ``table.input`` of each edge in order."""
    key_level, key_function = level[order], table.function[order]
    fresh = np.flatnonzero((np.diff(key_level) != 0) | (np.diff(key_function) != 0)) + 1
    bounds = [0, *fresh.tolist(), len(order)] if len(order) else [0]
    groups: list[Group] = []
    rows: list[Offsets] = []
    edge = 0
    for begin, end in pairwise(bounds):
        first_row = table.start[order[begin:end]]
        arity = int(table.start[order[begin] + 1] - first_row[0])
        edges = first_row[None, :] + np.arange(arity)[:, None]
        groups.append(
            Group(
                function=int(key_function[begin]),
                level=int(key_level[begin]),
                first=first_node + begin,
                end=first_node + end,
                inputs=inputs[edges],
                first_edge=edge,
            )
        )
        rows.append(edges.ravel())
        edge += edges.size
    return tuple(groups), np.concatenate(rows) if rows else np.zeros(0, np.int64)


def _behind_sources(values: Slots, first_node: int) -> Ids:
    found = np.full(first_node + len(values), -1, np.int32)
    found[first_node:] = values
    return found


def _instances_on(levels: Levels, table: _Table, slots: int) -> tuple[tuple[int, ...], ...]:
    instance = np.full(slots, -1, np.int64)
    instance[table.output] = table.instance
    found = (np.unique(instance[loop]) for loop in levels.loops)
    return tuple(tuple(one[one >= 0].tolist()) for one in found)
