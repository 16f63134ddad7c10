"""Questions about Boolean functions that do not depend on how they are written."""

from collections.abc import Iterable, Mapping, Sequence
from functools import lru_cache
from typing import Final, NamedTuple

from insertdft.library.expression import (
    And,
    Const,
    Expression,
    Not,
    Or,
    Var,
    columns,
    evaluate,
    negation,
    substitute,
    truth_table,
    variables,
)

#: Functions of more variables than this are compared as they are written.
MOST_VARIABLES: Final = 14


@lru_cache(maxsize=4096)
def support(expression: Expression) -> tuple[str, ...]:
    """Return the variables that the function really depends on, in order of first mention."""
    names = variables(expression)
    if len(names) > MOST_VARIABLES:
        return names
    table = truth_table(expression, names)
    masks = columns(len(names))
    return tuple(
        name
        for bit, name in enumerate(names)
        if (table & masks[bit]) >> (1 << bit) != table & (masks[bit] >> (1 << bit))
    )


@lru_cache(maxsize=4096)
def pruned(expression: Expression) -> Expression:
    """Return the same function without variables that do not matter; literals as literals."""
    needed = support(expression)
    extra = [name for name in variables(expression) if name not in needed]
    found = substitute(expression, dict.fromkeys(extra, Const(False)))
    if len(needed) > 1 or isinstance(found, Const | Var):
        return found
    table = truth_table(found, needed)
    if not needed:
        return Const(table == 1)
    return Var(needed[0]) if table == 0b10 else Not(Var(needed[0]))


def cofactor(expression: Expression, name: str, value: int) -> Expression:
    """Return the function with one variable held, pruned."""
    return pruned(substitute(expression, {name: Const(bool(value))}))


def literal(expression: Expression) -> tuple[str, bool] | None:
    """Return (variable, inverted) if the function is one variable or its inverse, else None."""
    match pruned(expression):
        case Var(name):
            return name, False
        case Not(Var(name)):
            return name, True
        case _:
            return None


@lru_cache(maxsize=16384)
def same(first: Expression, second: Expression) -> bool:
    """Return whether two expressions are the same function of the same variables."""
    names = tuple(dict.fromkeys((*variables(first), *variables(second))))
    if len(names) > MOST_VARIABLES:
        return first == second
    return truth_table(first, names) == truth_table(second, names)


def satisfiable(parts: Sequence[Expression]) -> bool:
    """Return whether all of ``parts`` can be true at once (yes, if there are too many names)."""
    names = tuple(dict.fromkeys(name for part in parts for name in variables(part)))
    if len(names) > MOST_VARIABLES:
        return True
    ones = (1 << (1 << len(names))) - 1
    masks = dict(zip(names, columns(len(names)), strict=True))
    found = ones
    for part in parts:
        found &= evaluate(part, masks, ones)
    return found != 0


def from_table(table: int, names: Sequence[str], care: int | None = None) -> Expression:
    """Return an expression for a truth table as ``truth_table`` makes it.

    Args:
        table: Bit p is the value for pattern p.
        names: Variable i is bit i of the pattern.
        care: Patterns whose value matters; the rest is chosen so that few variables remain.
    """
    ones = (1 << (1 << len(names))) - 1
    care = ones if care is None else care & ones
    part = _Part(table & care, care, tuple(zip(names, columns(len(names)), strict=True)))
    return _expressed(part)


class _Part(NamedTuple):
    """A function where it matters, over (name, column) pairs of the variables still looked at."""

    table: int
    care: int
    over: tuple[tuple[str, int], ...]


def _halves(part: _Part, place: int) -> tuple[_Part, _Part]:
    """Return the cofactors for 0 and 1 of the variable at ``place``, without that variable."""
    column = part.over[place][1]
    step = column & -column  # the distance between two patterns that differ in the variable
    step = step.bit_length() - 1
    rest = part.over[:place] + part.over[place + 1 :]
    low, low_care = part.table & ~column, part.care & ~column
    high, high_care = part.table & column, part.care & column
    return (
        _Part(low | low << step, low_care | low_care << step, rest),
        _Part(high | high >> step, high_care | high_care >> step, rest),
    )


def _needed(part: _Part) -> _Part:
    """Return the part without the variables that need not matter."""
    for place in reversed(range(len(part.over))):
        low, high = _halves(part, place)
        if (low.table ^ high.table) & low.care & high.care == 0:
            part = _Part(low.table | high.table, low.care | high.care, low.over)
    return part


def _expressed(part: _Part) -> Expression:
    """Split by the variable that leaves the simplest halves, again and again."""
    part = _needed(part)
    if part.table == 0:
        return Const(False)
    if part.table == part.care:
        return Const(True)
    splits = [tuple(map(_needed, _halves(part, place))) for place in range(len(part.over))]
    sizes = [len(low.over) + len(high.over) for low, high in splits]
    best = sizes.index(min(sizes))
    low, high = splits[best]
    return choose(Var(part.over[best][0]), _expressed(high), _expressed(low))


def within(function: Expression, condition: Expression) -> Expression:
    """Return a simple function that equals ``function`` wherever ``condition`` holds."""
    names = tuple(dict.fromkeys((*variables(function), *variables(condition))))
    if len(names) > MOST_VARIABLES:
        return function
    table, care = truth_table(function, names), truth_table(condition, names)
    return pruned(from_table(table, names, care))


def choose(select: Expression, when1: Expression, when0: Expression) -> Expression:
    """Return ``select ? when1 : when0``, constants and equal branches folded away."""
    if when1 == when0:
        return when1
    if when1 == Const(True) and when0 == Const(False):
        return select
    if when1 == Const(False) and when0 == Const(True):
        return negation(select)
    if when0 == Const(False):
        return And((select, when1))
    if when1 == Const(False):
        return And((negation(select), when0))
    if when1 == Const(True):
        return Or((select, when0))
    if when0 == Const(True):
        return Or((negation(select), when1))
    return Or((And((select, when1)), And((negation(select), when0))))


def renamed(expression: Expression, values: Mapping[str, Expression]) -> Expression:
    """Return ``expression`` with variables replaced and what no longer matters left out."""
    return pruned(substitute(expression, values))


def inputs_of(expressions: Iterable[Expression | None]) -> tuple[str, ...]:
    """Return the variables that any of ``expressions`` depends on, in order."""
    found: dict[str, None] = {}
    for expression in expressions:
        if expression is not None:
            found.update(dict.fromkeys(support(expression)))
    return tuple(found)
