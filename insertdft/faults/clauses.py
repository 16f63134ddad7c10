"""Circuit values as literals of a SAT solver, three-valued: surely 1, surely 0.

A value is a pair of literals like the two rails of ``simulate.words``. Equal conjunctions get equal
literals, so a value without unknowns costs no more than one literal.

Source: G. S. Tseitin 1968 for the clauses (from memory).
"""

from collections.abc import Callable, Sequence
from typing import Final, NamedTuple

from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor

#: The literal that is always true.
TRUE: Final = 1


class Value(NamedTuple):
    """Literals "surely 1" and "surely 0"."""

    one: int
    zero: int


ZERO: Final = Value(-TRUE, TRUE)
ONE: Final = Value(TRUE, -TRUE)
UNKNOWN: Final = Value(-TRUE, -TRUE)


class Clauses:
    """A growing set of clauses, given to ``add`` one by one."""

    def __init__(self, add: Callable[[list[int]], object]) -> None:
        """Take the solver's function that adds a clause."""
        self._add = add
        self._count = TRUE
        self._ands: dict[tuple[int, ...], int] = {}
        add([TRUE])

    def free(self) -> Value:
        """Return a value that the solver chooses, 0 or 1."""
        self._count += 1
        return Value(self._count, -self._count)

    def both(self, parts: Sequence[int]) -> int:
        """Return a literal that is true when all ``parts`` are."""
        kept = sorted(set(parts) - {TRUE})
        if -TRUE in kept or any(-part in kept for part in kept if part > 0):
            return -TRUE
        if len(kept) < 2:
            return kept[0] if kept else TRUE
        key = tuple(kept)
        if key not in self._ands:
            self._count += 1
            self._ands[key] = self._count
            for part in key:
                self._add([-self._count, part])
            self._add([self._count, *(-part for part in key)])
        return self._ands[key]

    def either(self, parts: Sequence[int]) -> int:
        """Return a literal that is true when one of ``parts`` is."""
        return -self.both([-part for part in parts])

    def require(self, parts: Sequence[int]) -> None:
        """Demand that one of ``parts`` is true."""
        self._add(list(parts) or [-TRUE])

    def differs(self, first: Value, second: Value) -> int:
        """Return a literal that is true when both are known and unequal."""
        return self.either(
            [self.both([first.one, second.zero]), self.both([first.zero, second.one])]
        )

    def evaluate(self, expression: Expression, inputs: Sequence[Value]) -> Value:
        """Return the value of an expression over ``"0"``, ``"1"``, ..."""
        match expression:
            case Const(value):
                return ONE if value else ZERO
            case Var(name):
                return inputs[int(name)]
            case Not(part):
                one, zero = self.evaluate(part, inputs)
                return Value(zero, one)
            case And(parts):
                values = [self.evaluate(part, inputs) for part in parts]
                return Value(
                    self.both([value.one for value in values]),
                    self.either([value.zero for value in values]),
                )
            case Or(parts):
                values = [self.evaluate(part, inputs) for part in parts]
                return Value(
                    self.either([value.one for value in values]),
                    self.both([value.zero for value in values]),
                )
            case Xor(parts):
                values = [self.evaluate(part, inputs) for part in parts]
                found = values[0]
                for other in values[1:]:
                    found = self._exclusive_or(found, other)
                return found

    def _exclusive_or(self, first: Value, second: Value) -> Value:
        if first.one == -first.zero and second.one == -second.zero:
            one = self.differs(first, second)
            return Value(one, -one)
        return Value(
            self.differs(first, second),
            self.either([self.both([first.one, second.one]), self.both([first.zero, second.zero])]),
        )
