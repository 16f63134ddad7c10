"""State tables that are latches or flip-flops, written as such.

What the table says is compared with what latches would do for every input and every state, so the
result is the same function. Tables that are neither (two edge clocks, say) stay tables.
"""

from typing import Final, NamedTuple

from insertdft.library.cell import StateTable, Storage, StorageKind
from insertdft.library.expression import Const, Expression, Not, Var
from insertdft.library.functions import from_table, pruned
from insertdft.library.state_table import TableModel, Value, edge_inputs, patterns

#: Larger tables are left as they are.
MOST_INPUTS: Final = 8
MOST_NODES: Final = 3


def storages_of(table: StateTable) -> tuple[Storage, ...]:
    """Return the storage elements that a table is, one a node; empty if it is something else."""
    if len(table.inputs) > MOST_INPUTS or not 0 < len(table.nodes) <= MOST_NODES:
        return ()
    edges = edge_inputs(table)
    if not edges:
        return _latches(table)
    if len(edges) == 1 and len(table.nodes) == 1:
        return _flip_flop(table, edges[0])
    return ()


class _Rest(NamedTuple):
    """Where a level-sensitive table comes to rest: (nodes before, nodes at rest) by inputs."""

    inputs: dict[str, int]
    outcomes: list[tuple[dict[str, int], dict[str, Value]]]


def _latches(table: StateTable) -> tuple[Storage, ...]:
    model = TableModel(table)
    rests = [
        _Rest(own, [(nodes, model.settle(own, own, nodes)) for nodes in patterns(table.nodes)])
        for own in patterns(table.inputs)
    ]
    found = [_latch(table, node, rests) for node in table.nodes]
    kept = tuple(storage for storage in found if storage is not None)
    return kept if len(kept) == len(table.nodes) else ()


def _latch(table: StateTable, node: str, rests: list[_Rest]) -> Storage | None:
    """Return the latch that a node is: open where it does not keep its value."""
    driven: list[tuple[int, _Rest]] = []
    kept = unknown = 0
    for pattern, rest in enumerate(rests):
        values = [after[node] for _, after in rest.outcomes]
        if all(value is None for value in values):
            unknown |= 1 << pattern
        elif all(before[node] == after[node] for before, after in rest.outcomes):
            kept |= 1 << pattern
        else:
            driven.append((pattern, rest))
    data = _from_inputs(table, node, driven) or _from_node(table, node, driven)
    if data is None:
        return None
    opened = sum(1 << pattern for pattern, _ in driven)
    enable = from_table(opened, table.inputs, opened | kept)
    return Storage(StorageKind.LATCH, node, f"!{node}", 1, data, pruned(enable))


def _from_inputs(
    table: StateTable, node: str, driven: list[tuple[int, _Rest]]
) -> Expression | None:
    ones = care = 0
    for pattern, rest in driven:
        values = {after[node] for _, after in rest.outcomes}
        if len(values) != 1:
            return None
        care |= 1 << pattern
        ones |= (1 << pattern) if values == {1} else 0
    return pruned(from_table(ones, table.inputs, care))


def _from_node(table: StateTable, node: str, driven: list[tuple[int, _Rest]]) -> Expression | None:
    for other in table.nodes:
        for inverted in (0, 1):
            if other != node and all(
                after[other] is not None and after[node] == (after[other] or 0) ^ inverted
                for _, rest in driven
                for _, after in rest.outcomes
            ):
                return Not(Var(other)) if inverted else Var(other)
    return None


def _flip_flop(table: StateTable, clock: str) -> tuple[Storage, ...]:
    """Return the flip-flop that a table with one node and one edge is."""
    [node] = table.nodes
    model = TableModel(table)
    forced: dict[int, int] = {0: 0, 1: 0}
    for pattern, own in enumerate(patterns(table.inputs)):
        values = {model.settle(own, own, {node: value})[node] for value in (0, 1)}
        if values in ({0}, {1}):
            forced[values.pop() or 0] |= 1 << pattern
    for rising in (True, False):
        data = _edge_data(model, clock, rising=rising)
        if data is not None and _keeps(model, clock, forced, rising=not rising):
            edge: Expression = Var(clock) if rising else Not(Var(clock))
            clear, preset = (_or_none(from_table(forced[v], table.inputs)) for v in (0, 1))
            return (
                Storage(
                    StorageKind.FLIP_FLOP,
                    node,
                    f"!{node}",
                    1,
                    data,
                    edge,
                    clear=clear,
                    preset=preset,
                ),
            )
    return ()


def _or_none(expression: Expression) -> Expression | None:
    found = pruned(expression)
    return None if found == Const(False) else found


def _edge_data(model: TableModel, clock: str, *, rising: bool) -> Expression | None:
    """Return the next state at an edge as a function of inputs and state, or None."""
    [node] = model.table.nodes
    others = [name for name in model.table.inputs if name != clock]
    names = [*others, node]
    ones = care = 0
    for pattern, own in enumerate(patterns(names)):
        state = own.pop(node)
        before, after = {**own, clock: int(not rising)}, {**own, clock: int(rising)}
        if model.settle(after, after, {node: state})[node] != state:
            continue  # set or reset holds it
        value = model.settle(before, after, {node: state})[node]
        if value is not None:
            care |= 1 << pattern
            ones |= value << pattern
    found = pruned(from_table(ones, names, care))
    return None if found == Var(node) else found


def _keeps(model: TableModel, clock: str, forced: dict[int, int], *, rising: bool) -> bool:
    """Return whether the other edge leaves the state alone."""
    [node] = model.table.nodes
    others = [name for name in model.table.inputs if name != clock]
    held = {
        tuple(own.values())
        for pattern, own in enumerate(patterns(model.table.inputs))
        if (forced[0] | forced[1]) >> pattern & 1
    }
    for own in patterns(others):
        before, after = {**own, clock: int(not rising)}, {**own, clock: int(rising)}
        ends = tuple(after[name] for name in model.table.inputs)
        if ends in held:
            continue
        if any(model.settle(before, after, {node: v})[node] not in (v, None) for v in (0, 1)):
            return False
    return True
