"""What a cell does while it is not being tested, in a form that two cells can be compared in."""

from collections.abc import Collection, Iterable, Mapping
from dataclasses import dataclass, replace
from typing import Final

from insertdft.library.cell import Cell, ScanRole, Storage, StorageKind, Style
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, negation
from insertdft.library.functions import choose, renamed, same, support

_NEVER: Final = Const(False)


@dataclass(frozen=True, slots=True, eq=False)
class Output:
    """One output in mission use.

    Attributes:
        function: Over inputs and state variables.
        three_state: High-impedance condition, never if not given.
    """

    function: Expression
    three_state: Expression


@dataclass(frozen=True, slots=True, eq=False)
class Mission:
    """Mission behaviour of a cell.

    Attributes:
        storage: With test pins at rest.
        outputs: Outputs for mission use.
        places: Input pin -> the places it matters in, of clock, data, async, out.
    """

    storage: tuple[Storage, ...]
    outputs: Mapping[str, Output]
    places: Mapping[str, frozenset[str]]


def mission_of(cell: Cell, role: ScanRole | None = None) -> Mission | None:
    """Return the mission behaviour of ``cell``; with ``role``, of a scan cell with scan at rest.

    None if the cell does not say enough (a state table without ``test_cell``).
    """
    test = cell.test_cell
    if role is not None and role.style is Style.MUX_D and role.scan_enable is not None:
        off: dict[str, Expression] = {role.scan_enable: Const(role.shift_value == 0)}
        functions = {pin.name: pin.function for pin in cell.outputs()}
        storage = tuple(_held(item, off) for item in cell.storage)
    elif role is not None and test is not None:
        off = {}
        storage = test.storage
        functions = {pin.name: test.functions.get(pin.name) for pin in cell.outputs()}
    else:
        off = {}
        storage = cell.storage
        functions = {pin.name: pin.function for pin in cell.outputs()}
    if role is not None and not storage:
        return None
    only = {item.pin for item in role.outputs if item.test_only} if role else set()
    outputs = {
        name: Output(renamed(function, off), renamed(cell.pins[name].three_state or _NEVER, off))
        for name, function in functions.items()
        if function is not None and name not in only
    }
    return Mission(storage, outputs, _places(cell, storage, outputs.values()))


def _held(storage: Storage, off: Mapping[str, Expression]) -> Storage:
    return replace(storage, data=None if storage.data is None else renamed(storage.data, off))


def _places(
    cell: Cell, storage: tuple[Storage, ...], outputs: Iterable[Output]
) -> dict[str, frozenset[str]]:
    found: dict[str, set[str]] = {}
    uses: list[tuple[str, Expression | None]] = []
    for item in storage:
        uses += [("clock", item.clock), ("clock", item.clock_also), ("data", item.data)]
        uses += [("async", item.clear), ("async", item.preset)]
    for output in outputs:
        uses += [("out", output.function), ("out", output.three_state)]
    for place, expression in uses:
        for name in support(expression) if expression is not None else ():
            if name in cell.pins:
                found.setdefault(name, set()).add(place)
    return {pin.name: frozenset(found[pin.name]) for pin in cell.inputs() if pin.name in found}


def states_renamed(storage: Storage, onto: Storage, *, inverted: bool) -> dict[str, Expression]:
    """Return what the state variables of ``storage`` are in those of ``onto``."""
    plain, inverse = Var(onto.state), Var(onto.state_inverted)
    if inverted:
        plain, inverse = inverse, plain
    return {storage.state: plain, storage.state_inverted: inverse}


def same_storage(
    first: Storage,
    second: Storage,
    values: Mapping[str, Expression],
    shown: Collection[str],
    *,
    inverted: bool,
) -> bool:
    """Return whether two storage elements behave alike.

    Args:
        first: The reference.
        second: Compared with it once its pins and states are replaced by ``values``.
        values: Pins and states of the second in terms of the first.
        shown: State variables of the first that outputs show.
        inverted: Whether the state of the second is the inverse of the first's.
    """

    def other(expression: Expression | None) -> Expression:
        return renamed(expression or _NEVER, values)

    data = None if second.data is None else one_state(other(second.data), first)
    if inverted and data is not None:
        data = negation(data)
    own = None if first.data is None else one_state(first.data, first)
    if (own is None) != (data is None) or first.kind is not second.kind:
        return False
    changed = replace(
        second,
        data=data,
        clock=other(second.clock),
        clear=other(second.clear),
        preset=other(second.preset),
    )
    if first.kind is StorageKind.LATCH and not (first.clock_also or second.clock_also):
        return _same_latch(replace(first, data=own), changed, inverted=inverted)
    variables = (first.state, first.state_inverted)
    return (
        same(first.clock or _NEVER, changed.clock or _NEVER)
        and same(first.clock_also or _NEVER, other(second.clock_also))
        and (own is None or data is None or same(own, data))
        and all(
            _same_forced(_forced(first, which), _forced(changed, which ^ inverted))
            for which in (0, 1)
            if variables[which] in shown
        )
    )


def one_state(expression: Expression, storage: Storage) -> Expression:
    """Return the expression with the inverted state variable written as the inverse."""
    return renamed(expression, {storage.state_inverted: Not(Var(storage.state))})


@dataclass(frozen=True, slots=True)
class _Forced:
    """When one state variable is forced: to 0, to 1, held as it is, or left open."""

    low: Expression
    high: Expression
    kept: Expression
    open: Expression


def _forced(storage: Storage, which: int) -> _Forced:
    """Return when clear and preset force state variable ``which`` (0 the state, 1 its inverse)."""
    clear, preset = storage.clear or _NEVER, storage.preset or _NEVER
    both = And((clear, preset))
    together = storage.clear_preset[which] or "X"

    def when(token: str) -> Expression:
        return both if together == token else _NEVER

    alone = (And((clear, negation(preset))), And((preset, negation(clear))))
    low, high = alone if which == 0 else (alone[1], alone[0])
    unknown = both if together not in ("L", "H", "N") else _NEVER
    return _Forced(Or((low, when("L"))), Or((high, when("H"))), when("N"), unknown)


def _same_forced(first: _Forced, second: _Forced) -> bool:
    """Return whether the second does as the first wherever the first does not leave it open."""
    known = negation(first.open)
    pairs = (
        (first.low, second.low),
        (first.high, second.high),
        (first.kept, second.kept),
        (_NEVER, second.open),
    )
    return all(same(And((known, one)), And((known, two))) for one, two in pairs)


def _same_latch(first: Storage, second: Storage, *, inverted: bool) -> bool:
    """Return whether two latches come to the same rest, for all inputs and both states."""
    one, two = _forced(first, 0), _forced(second, int(inverted))
    known = negation(one.open)
    pairs = ((_rest(first, one), _rest(second, two, first)), (_NEVER, two.open))
    return all(same(And((known, own)), And((known, other))) for own, other in pairs)


def _rest(latch: Storage, forced: _Forced, named: Storage | None = None) -> Expression:
    """Return the value at rest, over inputs and the state variable of ``named``."""
    state = Var((named or latch).state)
    enable = latch.clock or _NEVER
    free = choose(enable, latch.data or state, state)
    kept = choose(forced.kept, state, choose(forced.low, Const(False), free))
    return renamed(choose(forced.high, Const(True), kept), {})
