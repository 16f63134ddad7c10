"""Expressions and procedural statements of Verilog cell models -> Boolean expressions.

Everything is one bit wide. ``x`` leaves a choice, which is taken as 0.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any, Final

from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor, negation
from insertdft.library.functions import choose
from insertdft.library.verilog_tree import Node, UnsupportedError

_INVERTING: Final = frozenset({"Unot", "Ulnot", "Unand", "Unor", "Uxnor"})
_PLAIN: Final = frozenset({"Uand", "Uor", "Uxor", "Uplus"})


def kind(node: Node) -> str:
    """Return the name of a node's class."""
    return type(node).__name__


def name_of(node: Node) -> str:
    """Return the net that an identifier, or the side of an assignment, names.

    Raises:
        UnsupportedError: It is more than one whole net.
    """
    while kind(node) in ("Lvalue", "Rvalue"):
        node = node.var
    if kind(node) != "Identifier" or node.scope is not None:
        raise UnsupportedError("it uses part of a vector, or several nets as one")
    return plain(str(node.name))


def plain(name: str) -> str:
    """Return a name without the marks of an escaped identifier."""
    return name[1:].rstrip() if name.startswith("\\") else name


def constant(node: Node) -> str | None:
    """Return ``0``, ``1``, ``x`` or ``z`` if the node is a one-bit constant, else None."""
    if kind(node) in ("Lvalue", "Rvalue"):
        return constant(node.var)
    if kind(node) != "IntConst":
        return None
    text = str(node.value).lower()
    if "'" not in text:
        return str(int(text) & 1)
    digit = text[-1]
    if digit in "xz?":
        return "z" if digit == "?" else digit
    return str(int(digit, 16) & 1)


def logic(node: Node, values: Mapping[str, Expression]) -> Expression:
    """Return the value of an expression; names found in ``values`` are replaced.

    Raises:
        UnsupportedError: An operator that cell models do not need.
    """
    name = kind(node)
    if name in ("Lvalue", "Rvalue"):
        return logic(node.var, values)
    if name == "Identifier":
        net = name_of(node)
        return values.get(net, Var(net))
    if (digit := constant(node)) is not None:
        return Const(digit == "1")
    if name in _INVERTING:
        return negation(logic(node.right, values))
    if name in _PLAIN:
        return logic(node.right, values)
    if name == "Cond":
        parts = (node.cond, node.true_value, node.false_value)
        return choose(*(logic(part, values) for part in parts))
    return _binary(name, node, values)


def _binary(name: str, node: Node, values: Mapping[str, Expression]) -> Expression:
    known = ("And", "Land", "Or", "Lor", "Xor", "Xnor", "Eq", "Eql", "NotEq", "NotEql")
    if name not in known:
        raise UnsupportedError(f"it uses `{name}`, which no gate is")
    pair = (logic(node.left, values), logic(node.right, values))
    if name in ("And", "Land"):
        return And(pair)
    if name in ("Or", "Lor"):
        return Or(pair)
    return Xor(pair) if name in ("Xor", "NotEq", "NotEql") else Not(Xor(pair))


@dataclass(slots=True)
class Values:
    """What procedural statements have assigned so far.

    Attributes:
        now: By blocking assignments, seen by what follows.
        later: By non-blocking assignments.
    """

    now: dict[str, Expression] = field(default_factory=dict)
    later: dict[str, Expression] = field(default_factory=dict)

    def copy(self) -> "Values":
        """Return an independent copy."""
        return Values(dict(self.now), dict(self.later))

    def result(self) -> dict[str, Expression]:
        """Return what each register becomes at the end."""
        return {**self.now, **self.later}


def run(statement: Node | None, values: Values) -> Values:
    """Return the values after a statement.

    Raises:
        UnsupportedError: The statement is none of block, assignment, if and case.
    """
    if statement is None:
        return values
    name = kind(statement)
    if name == "Block":
        for inner in statement.statements:
            values = run(inner, values)
        return values
    if name in ("BlockingSubstitution", "NonblockingSubstitution"):
        return _assigned(statement, values, later=name == "NonblockingSubstitution")
    if name == "IfStatement":
        condition = logic(statement.cond, values.now)
        when1 = run(statement.true_statement, values.copy())
        when0 = run(statement.false_statement, values.copy())
        return _merged(condition, when1, when0)
    if name in ("CaseStatement", "CasezStatement", "CasexStatement"):
        return _case(logic(statement.comp, values.now), list(statement.caselist), values)
    if name in ("SystemCall", "SingleStatement"):
        return values
    raise UnsupportedError(f"it uses `{name}` in a procedure")


def _assigned(statement: Node, values: Values, *, later: bool) -> Values:
    value = logic(statement.right, values.now)
    found = values.copy()
    (found.later if later else found.now)[name_of(statement.left)] = value
    return found


def _case(subject: Expression, cases: list[Any], values: Values) -> Values:
    if not cases:
        return values
    case, rest = cases[0], cases[1:]
    here = run(case.statement, values.copy())
    if case.cond is None:
        return here
    matches = [Not(Xor((subject, logic(item, values.now)))) for item in case.cond]
    condition = matches[0] if len(matches) == 1 else Or(tuple(matches))
    return _merged(condition, here, _case(subject, rest, values))


def _merged(condition: Expression, when1: Values, when0: Values) -> Values:
    return Values(
        _both(condition, when1.now, when0.now), _both(condition, when1.later, when0.later)
    )


def _both(
    condition: Expression, when1: Mapping[str, Expression], when0: Mapping[str, Expression]
) -> dict[str, Expression]:
    return {
        name: choose(condition, when1.get(name, Var(name)), when0.get(name, Var(name)))
        for name in dict.fromkeys((*when1, *when0))
    }
