"""Functions of a library cell as and-nodes over its own pins and states, made once a cell.

Local literals are ``2 * node + inverted``: node 0 is the constant, then come the variables, then
the and-nodes in order.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field
from functools import lru_cache, reduce
from typing import Final

from insertdft.library.cell import Cell, Storage, StorageKind
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor, negation

FLIP_FLOP: Final = 0
LATCH: Final = 1
LOOP: Final = 2
TABLE: Final = 3

_NEVER: Final = Const(False)
#: Variables of this beginning stand for values that nothing gives.
FREE: Final = "$free:"


@dataclass(frozen=True, slots=True)
class StateTemplate:
    """One storage element of a cell; functions are local literals.

    Attributes:
        state: Name of its variable.
        kind: FLIP_FLOP or LATCH.
        data: What it takes.
        clock: Rising edge takes data, or open while true.
        zero: Forced to 0.
        one: Forced to 1.
        unknown: Forced to a value that the library leaves open.
    """

    state: str
    kind: int
    data: int
    clock: int
    zero: int
    one: int
    unknown: int


@dataclass(frozen=True, slots=True)
class Template:
    """A cell as local and-nodes.

    Attributes:
        variables: Pins, states and free values; variable i is node ``i + 1``.
        states: Which of them are states: of storage elements, or nodes of the state table.
        ands: Operands of the and-nodes, of node ``len(variables) + 1`` on.
        outputs: Output pin -> (value, "drives"); the second is 1 for plain outputs.
        dark: Output pins that no function is known of.
        storage: Elements, in the cell's order; empty for a cell with a state table.
        unsupported: Why the cell cannot be reasoned about, or None.
    """

    variables: tuple[str, ...]
    states: tuple[str, ...]
    ands: tuple[tuple[int, int], ...]
    outputs: Mapping[str, tuple[int, int]]
    dark: tuple[str, ...]
    storage: tuple[StateTemplate, ...]
    unsupported: str | None = None


@dataclass(slots=True)
class _Maker:
    numbers: dict[str, int]
    ands: list[tuple[int, int]] = field(default_factory=list)
    known: dict[tuple[int, int], int] = field(default_factory=dict)

    def conj(self, one: int, other: int) -> int:
        low, high = sorted((one, other))
        if low == 0 or low ^ 1 == high:
            return 0
        if low in (1, high):
            return high
        if (low, high) not in self.known:
            self.ands.append((low, high))
            self.known[low, high] = 2 * (len(self.numbers) + len(self.ands))
        return self.known[low, high]

    def parity(self, one: int, other: int) -> int:
        both, none = self.conj(one, other), self.conj(one ^ 1, other ^ 1)
        return self.conj(both ^ 1, none ^ 1)

    def literal(self, expression: Expression) -> int:
        match expression:
            case Const(value):
                return int(value)
            case Var(name):
                return 2 * self.numbers[name]
            case Not(part):
                return self.literal(part) ^ 1
            case And(parts):
                return reduce(self.conj, map(self.literal, parts))
            case Or(parts):
                return reduce(self.conj, (self.literal(part) ^ 1 for part in parts)) ^ 1
            case Xor(parts):
                return reduce(self.parity, map(self.literal, parts))


@lru_cache(maxsize=4096)
def make_template(cell: Cell) -> Template:
    """Return the template of a library cell."""
    table = cell.state_table
    states = table.nodes if table else tuple(item.state for item in cell.storage)
    names = list(dict.fromkeys((*(pin.name for pin in cell.inputs()), *states)))
    storage = () if table else cell.storage
    inverse = {item.state_inverted: _inverse(item) for item in storage}
    free = [f"{FREE}{name}" for name in inverse]
    maker = _Maker({name: number for number, name in enumerate([*names, *free], start=1)})
    outputs, dark = _outputs(maker, cell, inverse)
    return Template(
        variables=(*names, *free),
        states=states,
        outputs=outputs,
        dark=dark,
        storage=tuple(_element(maker, item, inverse) for item in storage),
        ands=tuple(maker.ands),
        unsupported=_unsupported(storage),
    )


def _unsupported(storage: tuple[Storage, ...]) -> str | None:
    for item in storage:
        if item.clock_also is not None:
            return "its slave has a clock of its own (clocked_on_also)"
        if item.kind is StorageKind.FLIP_FLOP and (item.data is None or item.clock is None):
            return "its flip-flop lacks data or clock"
    return None


def _inverse(item: Storage) -> Expression:
    """Return what the second state variable is, in terms of the first."""
    plain = Not(Var(item.state))
    if item.clear is None or item.preset is None:
        return plain
    both = And((item.clear, item.preset))
    token = item.clear_preset[1]
    if token == "N" or (token, item.clear_preset[0]) in (("L", "H"), ("H", "L")):
        return plain
    together: Expression = Var(f"{FREE}{item.state_inverted}")
    if token in ("L", "H"):
        together = Const(token == "H")
    return Or((And((both, together)), And((negation(both), plain))))


def _outputs(
    maker: _Maker, cell: Cell, inverse: Mapping[str, Expression]
) -> tuple[dict[str, tuple[int, int]], tuple[str, ...]]:
    found: dict[str, tuple[int, int]] = {}
    dark: list[str] = []
    for pin in cell.outputs():
        function = pin.function
        if function is None and pin.internal_node in maker.numbers:
            function = Var(str(pin.internal_node))
        if function is None or not _known(maker, function, inverse):
            dark.append(pin.name)
            continue
        closed = pin.three_state
        drives = maker.literal(_plain(closed, inverse)) ^ 1 if closed is not None else 1
        found[pin.name] = (maker.literal(_plain(function, inverse)), drives)
    return found, tuple(dark)


def _known(maker: _Maker, expression: Expression, inverse: Mapping[str, Expression]) -> bool:
    match expression:
        case Var(name):
            return name in maker.numbers or name in inverse
        case Not(part):
            return _known(maker, part, inverse)
        case And(parts) | Or(parts) | Xor(parts):
            return all(_known(maker, part, inverse) for part in parts)
        case Const():
            return True


def _plain(expression: Expression, inverse: Mapping[str, Expression]) -> Expression:
    """Return the expression with second state variables written out."""
    match expression:
        case Const():
            return expression
        case Var(name):
            return inverse.get(name, expression)
        case Not(part):
            return Not(_plain(part, inverse))
        case And(parts):
            return And(tuple(_plain(part, inverse) for part in parts))
        case Or(parts):
            return Or(tuple(_plain(part, inverse) for part in parts))
        case Xor(parts):
            return Xor(tuple(_plain(part, inverse) for part in parts))


def _element(maker: _Maker, item: Storage, inverse: Mapping[str, Expression]) -> StateTemplate:
    def literal(expression: Expression | None, otherwise: Expression) -> int:
        return maker.literal(_plain(expression or otherwise, inverse))

    state = 2 * maker.numbers[item.state]
    clear, preset = literal(item.clear, _NEVER), literal(item.preset, _NEVER)
    both = maker.conj(clear, preset)
    zero, one = maker.conj(clear, preset ^ 1), maker.conj(preset, clear ^ 1)
    unknown = 0
    match item.clear_preset[0]:
        case "L":
            zero = clear
        case "H":
            one = preset
        case "N":
            zero = maker.conj(zero ^ 1, maker.conj(both, state ^ 1) ^ 1) ^ 1
            one = maker.conj(one ^ 1, maker.conj(both, state) ^ 1) ^ 1
        case _:
            unknown = both
    return StateTemplate(
        state=item.state,
        kind=FLIP_FLOP if item.kind is StorageKind.FLIP_FLOP else LATCH,
        data=literal(item.data, Var(item.state)),
        clock=literal(item.clock, _NEVER),
        zero=zero,
        one=one,
        unknown=unknown,
    )
