"""Expressions of the library evaluated on literals of an ``Aig``."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Self

import numpy as np

from insertdft.library.expression import Expression
from insertdft.library.expression import evaluate as evaluate_expression
from insertdft.proof.aig import TRUE, Aig, Lits


@dataclass(frozen=True, slots=True, eq=False)
class _Word:
    aig: Aig
    lits: Lits

    def __and__(self, other: Self, /) -> Self:
        return type(self)(self.aig, self.aig.conj(self.lits, other.lits))

    def __or__(self, other: Self, /) -> Self:
        return type(self)(self.aig, self.aig.disj(self.lits, other.lits))

    def __xor__(self, other: Self, /) -> Self:
        return type(self)(self.aig, self.aig.parity(self.lits, other.lits))


def literals(aig: Aig, expression: Expression, values: Mapping[str, Lits]) -> Lits:
    """Return the literals of an expression over rows of literals, all of one shape."""
    ones = np.full_like(next(iter(values.values())), TRUE)
    words = {name: _Word(aig, lits) for name, lits in values.items()}
    return evaluate_expression(expression, words, _Word(aig, ones)).lits
