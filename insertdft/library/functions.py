"""Questions about Boolean functions that do not depend on how they are written."""

from collections.abc import Iterable, Mapping, Sequence
from functools import lru_cache
from typing import Final

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
    count = len(names)
    ones = (1 << (1 << count)) - 1
    care = ones if care is None else care & ones
    table &= care
    for bit, mask in enumerate(columns(count)):
        # A variable goes if both halves agree wherever both matter.
        step = 1 << bit
        high, low = (table & mask) >> step, table & (mask >> step)
        care_high, care_low = (care & mask) >> step, care & (mask >> step)
        if (high ^ low) & care_high & care_low == 0:
            merged, cared = high | low, care_high | care_low
            table, care = merged | merged << step, cared | cared << step
    return _shannon(table, care, list(names), ones)


def within(function: Expression, condition: Expression) -> Expression:
    """Return a simple function that equals ``function`` wherever ``condition`` holds."""
    names = tuple(dict.fromkeys((*variables(function), *variables(condition))))
    if len(names) > MOST_VARIABLES:
        return function
    table, care = truth_table(function, names), truth_table(condition, names)
    return pruned(from_table(table, names, care))


def _shannon(table: int, care: int, names: list[str], ones: int) -> Expression:
    if table & care == 0:
        return Const(False)
    if table & care == care & ones:
        return Const(True)
    bit = len(names) - 1
    half = 1 << (1 << bit)
    low_ones = half - 1
    rest = names[:bit]
    when0 = _shannon(table & low_ones, care & low_ones, rest, low_ones)
    when1 = _shannon(table >> (1 << bit), care >> (1 << bit), rest, low_ones)
    return choose(Var(names[bit]), when1, when0)


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
