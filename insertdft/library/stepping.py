"""Storage found by experiment: a black box is stepped through all inputs and states.

State tables of Liberty and user-defined primitives of Verilog are such boxes. What comes out is the
same function for every input and every state; a box that is neither latch nor flip-flop gives
nothing.
"""

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import replace
from itertools import product
from typing import Final, NamedTuple, Protocol

from insertdft.library.cell import Storage, StorageKind
from insertdft.library.expression import Const, Expression, Not, Or, Var, negation
from insertdft.library.functions import (
    choose,
    cofactor,
    from_table,
    pruned,
    support,
    within,
)

Value = int | None

#: Larger boxes are left as they are.
MOST_INPUTS: Final = 9
MOST_NODES: Final = 3


class Steps(Protocol):
    """Something with inputs and state that can be stepped."""

    @property
    def inputs(self) -> tuple[str, ...]:
        """Names of the inputs."""

    @property
    def nodes(self) -> tuple[str, ...]:
        """Names of the state nodes."""

    def settle(
        self, before: Mapping[str, int], after: Mapping[str, int], nodes: Mapping[str, Value]
    ) -> dict[str, Value]:
        """Return the nodes at rest after the inputs changed; None for unknown."""


def patterns(names: Sequence[str]) -> Iterator[dict[str, int]]:
    """Yield every assignment of 0 and 1 to ``names``; the first name changes fastest."""
    for values in product((0, 1), repeat=len(names)):
        yield dict(zip(names, reversed(values), strict=True))


def storages_of(box: Steps, edges: tuple[str, ...]) -> tuple[Storage, ...]:
    """Return the storage elements that a box is, one a node; empty if it is something else.

    Args:
        box: What to step.
        edges: Inputs that it is sensitive to at an edge.
    """
    if len(box.inputs) > MOST_INPUTS or not 0 < len(box.nodes) <= MOST_NODES:
        return ()
    if not edges:
        return _latches(box)
    if len(edges) == 1 and len(box.nodes) == 1:
        found = _flip_flop(box, edges[0])
        return (found,) if found else ()
    return ()


def edge_inputs(box: Steps) -> tuple[str, ...]:
    """Return the inputs whose change does more than their new value alone would."""
    return tuple(name for name in box.inputs if _acts_at_edge(box, name))


def _acts_at_edge(box: Steps, name: str) -> bool:
    others = [item for item in box.inputs if item != name]
    for held in patterns(others):
        for nodes in patterns(box.nodes):
            for value in (0, 1):
                before, after = {**held, name: 1 - value}, {**held, name: value}
                moved, still = box.settle(before, after, nodes), box.settle(after, after, nodes)
                if any(moved[node] not in (None, still[node]) for node in box.nodes):
                    return True
    return False


def latch_of(
    following: Expression, state: str, inverse: str, inputs: Sequence[str]
) -> Storage | None:
    """Return the latch with a given next state, or None if it is none.

    A pin that alone forces a value, whatever the other pins, becomes clear or preset; the first
    found dominates.

    Args:
        following: Value at rest, over inputs and ``state``.
        state: Name of the state variable.
        inverse: Name for its inverse.
        inputs: Pins, in the order in which clear and preset are looked for.
    """
    rest = pruned(following)
    if state not in support(rest):
        return None
    found = take_out_forced(rest, inputs)
    rest = found.rest
    when0, when1 = cofactor(rest, state, 0), cofactor(rest, state, 1)
    if pruned(_and(when0, negation(when1))) != Const(False):
        return None  # it would oscillate
    enable = pruned(Or((when0, negation(when1))))
    if enable == Const(False) and not (found.clear or found.preset):
        return None
    return Storage(
        StorageKind.LATCH,
        state,
        inverse,
        1,
        within(when0, enable) if enable != Const(False) else None,
        enable if enable != Const(False) else None,
        clear=found.clear,
        preset=found.preset,
        clear_preset=found.together,
    )


class Forced(NamedTuple):
    """Pins that alone force a state: to 0, to 1, what both do, and what is left without them."""

    clear: Expression | None
    preset: Expression | None
    together: tuple[str | None, str | None]
    rest: Expression


def take_out_forced(following: Expression, inputs: Sequence[str]) -> Forced:
    """Return the pins that alone force the value of ``following``; the first found dominates."""
    forced: dict[bool, list[Expression]] = {False: [], True: []}
    dominant: bool | None = None
    rest, before = following, None
    while rest != before:
        before = rest
        for name, value in product(inputs, (0, 1)):
            held = cofactor(rest, name, value)
            if isinstance(held, Const) and name in support(rest):
                dominant = held.value if dominant is None else dominant
                forced[held.value].append(Var(name) if value else Not(Var(name)))
                rest = cofactor(rest, name, 1 - value)
    together = ("H", "L") if dominant else ("L", "H")
    both = together if all(forced.values()) else (None, None)
    return Forced(_any(forced[False]), _any(forced[True]), both, rest)


def _and(first: Expression, second: Expression) -> Expression:
    return negation(Or((negation(first), negation(second))))


def _any(parts: list[Expression]) -> Expression | None:
    if not parts:
        return None
    return parts[0] if len(parts) == 1 else Or(tuple(parts))


class _Rest(NamedTuple):
    """Where a box comes to rest: (nodes before, nodes at rest) by inputs."""

    inputs: dict[str, int]
    outcomes: list[tuple[dict[str, int], dict[str, Value]]]


def _latches(box: Steps) -> tuple[Storage, ...]:
    rests = [
        _Rest(own, [(nodes, box.settle(own, own, nodes)) for nodes in patterns(box.nodes)])
        for own in patterns(box.inputs)
    ]
    found = [_latch(box, node, rests) for node in box.nodes]
    kept = tuple(storage for storage in found if storage is not None)
    return kept if len(kept) == len(box.nodes) else ()


def _latch(box: Steps, node: str, rests: list[_Rest]) -> Storage | None:
    """Return the latch that a node is, over inputs alone or as a follower of another node."""
    names = [*box.inputs, node]
    ones = care = 0
    for pattern, rest in enumerate(rests):
        for state in (0, 1):
            values = {after[node] for before, after in rest.outcomes if before[node] == state}
            if values == {None}:
                continue
            if len(values) != 1:
                return _follower(box, node, rests)
            place = pattern | state << len(box.inputs)
            care |= 1 << place
            ones |= (values.pop() or 0) << place
    return latch_of(from_table(ones, names, care), node, f"!{node}", box.inputs)


def _follower(box: Steps, node: str, rests: list[_Rest]) -> Storage | None:
    """Return the latch that a node is while it also takes the state of another node."""
    forced: dict[int, list[Expression]] = {0: [], 1: []}
    together: tuple[str | None, str | None] = (None, None)
    while (found := _forcing_pin(box, node, rests)) is not None:
        name, level, value = found
        rests = [rest for rest in rests if rest.inputs[name] != level]
        if any(forced.values()) and not forced[value]:
            together = ("L", "H") if value else ("H", "L")
        forced[value].append(Var(name) if level else Not(Var(name)))
    for other in box.nodes:
        latch = None if other == node else _beside(box, node, other, rests)
        if latch is not None:
            clear, preset = _any(forced[0]), _any(forced[1])
            return replace(latch, clear=clear, preset=preset, clear_preset=together)
    return None


def _forcing_pin(box: Steps, node: str, rests: list[_Rest]) -> tuple[str, int, int] | None:
    """Return a pin, its level and the value that it alone forces on a node, or None."""
    for name, level in product(box.inputs, (0, 1)):
        values = {
            after[node]
            for rest in rests
            if rest.inputs[name] == level
            for _, after in rest.outcomes
        }
        if values in ({0}, {1}) and len({rest.inputs[name] for rest in rests}) == 2:
            return name, level, values.pop() or 0
    return None


def _beside(box: Steps, node: str, other: str, rests: list[_Rest]) -> Storage | None:
    """Return the latch that a node is over the inputs and the state of ``other`` at rest."""
    names = [*box.inputs, other, node]
    ones = care = 0
    for rest in rests:
        for before, after in rest.outcomes:
            beside, value = after[other], after[node]
            if beside is None or value is None:
                continue
            own = {**rest.inputs, other: beside, node: before[node]}
            place = sum(own[name] << bit for bit, name in enumerate(names))
            if care >> place & 1 and (ones >> place & 1) != value:
                return None
            care |= 1 << place
            ones |= value << place
    return latch_of(from_table(ones, names, care), node, f"!{node}", ())


def _flip_flop(box: Steps, clock: str) -> Storage | None:
    """Return the flip-flop that a box with one node and one edge is."""
    [node] = box.nodes
    forced: dict[int, int] = {0: 0, 1: 0}
    care = 0
    for pattern, own in enumerate(patterns(box.inputs)):
        values = {box.settle(own, own, {node: value})[node] for value in (0, 1)}
        care |= (values != {None}) << pattern
        if values in ({0}, {1}):
            forced[values.pop() or 0] |= 1 << pattern
    held = forced[0] | forced[1]
    for rising in (True, False):
        data = _edge_data(box, clock, held, rising=rising)
        if data is None or not _keeps(box, clock, held, rising=not rising):
            continue
        edge: Expression = Var(clock) if rising else Not(Var(clock))
        clear, preset, both = _asynchronous(box, forced, care)
        kind, name = StorageKind.FLIP_FLOP, f"!{node}"
        return Storage(kind, node, name, 1, data, edge, None, clear, preset, both)
    return None


def _asynchronous(
    box: Steps, forced: Mapping[int, int], care: int
) -> tuple[Expression | None, Expression | None, tuple[str | None, str | None]]:
    """Return clear, preset and what both do, as single pins where they are."""
    [node] = box.nodes
    low, high = (from_table(forced[value], box.inputs, care) for value in (0, 1))
    at_rest = choose(high, Const(True), choose(low, Const(False), Var(node)))
    found = take_out_forced(pruned(at_rest), box.inputs)
    if found.rest == Var(node):
        return found.clear, found.preset, found.together
    return _or_none(low), _or_none(high), (None, None)


def _or_none(expression: Expression) -> Expression | None:
    found = pruned(expression)
    return None if found == Const(False) else found


def _edge_data(box: Steps, clock: str, held: int, *, rising: bool) -> Expression | None:
    """Return the next state at an edge as a function of inputs and state, or None.

    ``held`` are the patterns of inputs in which set or reset decides.
    """
    [node] = box.nodes
    ones = care = 0
    for pattern, after in enumerate(patterns(box.inputs)):
        if after[clock] != int(rising) or held >> pattern & 1:
            continue
        before = {**after, clock: int(not rising)}
        for state in (0, 1):
            value = box.settle(before, after, {node: state})[node]
            if value is not None:
                place = pattern | state << len(box.inputs)
                care |= 1 << place
                ones |= value << place
    found = pruned(from_table(ones, [*box.inputs, node], care))
    return None if found == Var(node) else found


def _keeps(box: Steps, clock: str, held: int, *, rising: bool) -> bool:
    """Return whether an edge leaves the state alone wherever nothing forces it."""
    [node] = box.nodes
    for pattern, after in enumerate(patterns(box.inputs)):
        if after[clock] != int(rising) or held >> pattern & 1:
            continue
        before = {**after, clock: int(not rising)}
        if any(box.settle(before, after, {node: v})[node] not in (v, None) for v in (0, 1)):
            return False
    return True
