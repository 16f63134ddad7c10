"""Boolean expressions of library cells: read, evaluate, compare.

Precedence (Liberty Reference Manual 2020.09, "Boolean operators", as quoted by the liberty-db
crate): NOT (``!a``, ``a'``), then XOR ``^``, then AND (``&``, ``*``, blank), then OR (``|``,
``+``); equal ones from the left. XOR binds tighter than AND, unlike in Verilog.
"""

import re
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Final, Protocol, Self, TypeVar


class ExpressionError(ValueError):
    """The text is no Boolean expression; says at which character."""


@dataclass(frozen=True, slots=True)
class Const:
    """Constant 0 or 1."""

    value: bool


@dataclass(frozen=True, slots=True)
class Var:
    """A pin or a state variable."""

    name: str


@dataclass(frozen=True, slots=True)
class Not:
    """Inverse of ``part``."""

    part: "Expression"


@dataclass(frozen=True, slots=True)
class And:
    """All of ``parts``, two or more."""

    parts: tuple["Expression", ...]


@dataclass(frozen=True, slots=True)
class Or:
    """Any of ``parts``, two or more."""

    parts: tuple["Expression", ...]


@dataclass(frozen=True, slots=True)
class Xor:
    """An odd number of ``parts``, two or more."""

    parts: tuple["Expression", ...]


Expression = Const | Var | Not | And | Or | Xor


class Word(Protocol):
    """What an expression can be evaluated on: ints as bit masks, numpy arrays, solver literals."""

    def __and__(self, other: Self, /) -> Self:
        """Bitwise AND."""

    def __or__(self, other: Self, /) -> Self:
        """Bitwise OR."""

    def __xor__(self, other: Self, /) -> Self:
        """Bitwise XOR."""


W = TypeVar("W", bound=Word)


def evaluate(expression: Expression, values: Mapping[str, W], ones: W) -> W:
    """Return the value of ``expression`` for many input patterns at once, one a bit.

    Args:
        expression: What to evaluate.
        values: Word of each variable.
        ones: The word with every bit 1 (it also sets the width for NOT).

    Raises:
        KeyError: A variable has no value.
    """
    match expression:
        case Const(value):
            return ones if value else ones ^ ones
        case Var(name):
            return values[name]
        case Not(part):
            return evaluate(part, values, ones) ^ ones
        case And(parts):
            result = evaluate(parts[0], values, ones)
            for part in parts[1:]:
                result = result & evaluate(part, values, ones)
            return result
        case Or(parts):
            result = evaluate(parts[0], values, ones)
            for part in parts[1:]:
                result = result | evaluate(part, values, ones)
            return result
        case Xor(parts):
            result = evaluate(parts[0], values, ones)
            for part in parts[1:]:
                result = result ^ evaluate(part, values, ones)
            return result


def variables(expression: Expression) -> tuple[str, ...]:
    """Return the names in ``expression``, each once, in the order of first mention."""
    found: dict[str, None] = {}
    stack: list[Expression] = [expression]
    while stack:
        match stack.pop():
            case Var(name):
                found[name] = None
            case Not(part):
                stack.append(part)
            case And(parts) | Or(parts) | Xor(parts):
                stack.extend(reversed(parts))
            case Const():
                pass
    return tuple(found)


def columns(count: int) -> tuple[int, ...]:
    """Return the truth-table column of each of ``count`` inputs, as masks of ``2 ** count`` bits.

    Bit ``p`` of column ``i`` is bit ``i`` of ``p``: pattern p gives input i the value of its bit i.
    """
    size = 1 << count
    ones = (1 << size) - 1
    return tuple(ones // ((1 << (1 << i)) + 1) << (1 << i) for i in range(count))


def truth_table(expression: Expression, inputs: Sequence[str]) -> int:
    """Return the value of ``expression`` for all patterns of ``inputs``, one bit a pattern.

    Bit ``p`` is the value when input i is bit i of ``p``. Two expressions over the same inputs are
    equal functions when their tables are equal.

    Raises:
        KeyError: The expression uses a name that is not in ``inputs``.
    """
    ones = (1 << (1 << len(inputs))) - 1
    return evaluate(expression, dict(zip(inputs, columns(len(inputs)), strict=True)), ones)


def substitute(expression: Expression, values: Mapping[str, Expression]) -> Expression:
    """Return ``expression`` with variables replaced, constants folded away."""
    match expression:
        case Const():
            return expression
        case Var(name):
            return values.get(name, expression)
        case Not(part):
            return negation(substitute(part, values))
        case And(parts):
            return _fold_and([substitute(part, values) for part in parts])
        case Or(parts):
            inverse = _fold_and([negation(substitute(part, values)) for part in parts])
            return negation(inverse)
        case Xor(parts):
            return _fold_xor([substitute(part, values) for part in parts])


def negation(expression: Expression) -> Expression:
    """Return the inverse, without a double NOT."""
    match expression:
        case Const(value):
            return Const(not value)
        case Not(part):
            return part
        case And(parts) if all(isinstance(part, Not) for part in parts):
            return Or(tuple(part.part for part in parts if isinstance(part, Not)))
        case Or(parts):
            return And(tuple(map(negation, parts)))
        case _:
            return Not(expression)


def _fold_and(parts: list[Expression]) -> Expression:
    kept = [part for part in parts if part != Const(True)]
    if any(part == Const(False) for part in kept):
        return Const(False)
    if not kept:
        return Const(True)
    return kept[0] if len(kept) == 1 else And(tuple(kept))


def _fold_xor(parts: list[Expression]) -> Expression:
    odd = sum(part == Const(True) for part in parts) % 2 == 1
    kept = [part for part in parts if not isinstance(part, Const)]
    if not kept:
        return Const(odd)
    result = kept[0] if len(kept) == 1 else Xor(tuple(kept))
    return negation(result) if odd else result


def as_literal(expression: Expression, names: Sequence[str]) -> Expression | None:
    """Return the constant, the variable or the inverted variable that an expression equals.

    Args:
        expression: Over ``names``; its truth table is made, so keep them few.
        names: Its variables.

    Returns:
        ``Const``, ``Var`` or ``Not(Var)``; None if it depends on two variables or more.
    """
    if isinstance(expression, Const | Var):
        return expression
    table = truth_table(expression, names)
    ones = (1 << (1 << len(names))) - 1
    if table in (0, ones):
        return Const(table == ones)
    for name, column in zip(names, columns(len(names)), strict=True):
        if table == column:
            return Var(name)
        if table == column ^ ones:
            return Not(Var(name))
    return None


TOKEN: Final = re.compile(
    r"""\s*(?:([A-Za-z_$][\w$]*(?:\s*\[\s*\d+\s*(?::\s*\d+\s*)?\])?|\\?"[^"]+?\\?"|\d[\w$]+(?<!['])"""
    r"""|[01](?![\w$]))|([!'^&*|+()]))""",
    re.ASCII,
)


def parse_expression(text: str) -> Expression:
    """Read one expression of a Liberty attribute such as ``function`` or ``next_state``.

    Raises:
        ExpressionError: The text is no expression.
    """
    tokens = _tokens(text)
    parser = _Parser(text, tokens)
    found = parser.disjunction()
    parser.expect_end()
    return found


def _tokens(text: str) -> list[tuple[str, int]]:
    tokens: list[tuple[str, int]] = []
    at, end = 0, len(text.rstrip())
    while at < end:
        match = TOKEN.match(text, at)
        if match is None:
            raise ExpressionError(f"cannot read {text!r} at character {at + 1}")
        tokens.append((match[1] or match[2], match.start(1) if match[1] else match.start(2)))
        at = match.end()
    if not tokens:
        raise ExpressionError("the expression is empty")
    return tokens


class _Parser:
    """Recursive descent over the tokens, one method a level of precedence."""

    def __init__(self, text: str, tokens: list[tuple[str, int]]) -> None:
        self._text = text
        self._tokens = tokens
        self._at = 0

    def disjunction(self) -> Expression:
        parts = [self._conjunction()]
        while self._peek() in ("|", "+"):
            self._at += 1
            parts.append(self._conjunction())
        return parts[0] if len(parts) == 1 else Or(tuple(parts))

    def expect_end(self) -> None:
        if self._at < len(self._tokens):
            raise self._unexpected()

    def _conjunction(self) -> Expression:
        parts = [self._parity()]
        while (token := self._peek()) is not None and token not in ("|", "+", ")"):
            if token in ("&", "*"):
                self._at += 1
            parts.append(self._parity())
        return parts[0] if len(parts) == 1 else And(tuple(parts))

    def _parity(self) -> Expression:
        parts = [self._inverted()]
        while self._peek() == "^":
            self._at += 1
            parts.append(self._inverted())
        return parts[0] if len(parts) == 1 else Xor(tuple(parts))

    def _inverted(self) -> Expression:
        if self._peek() == "!":
            self._at += 1
            return negation(self._inverted())
        found = self._atom()
        while self._peek() == "'":
            self._at += 1
            found = negation(found)
        return found

    def _atom(self) -> Expression:
        token = self._peek()
        if token is None or token in ("!", "'", "^", "&", "*", "|", "+", ")"):
            raise self._unexpected()
        self._at += 1
        if token == "(":
            found = self.disjunction()
            if self._peek() != ")":
                raise self._unexpected()
            self._at += 1
            return found
        if token in ("0", "1"):
            return Const(token == "1")
        return Var(re.sub(r'[\s\\"]', "", token))

    def _peek(self) -> str | None:
        return self._tokens[self._at][0] if self._at < len(self._tokens) else None

    def _unexpected(self) -> ExpressionError:
        if self._at == len(self._tokens):
            return ExpressionError(f"{self._text!r} ends too early")
        token, place = self._tokens[self._at]
        return ExpressionError(f"unexpected {token!r} in {self._text!r} at character {place + 1}")
