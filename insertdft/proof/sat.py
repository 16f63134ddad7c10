"""Decide whether functions of an ``Aig`` can be true: random patterns first, then a SAT solver.

Random patterns find what differs often; the solver (Glucose 4 through python-sat) decides the rest
within a number of conflicts. Where that is not enough, equal inner functions of the cones are
merged first (SAT sweeping: A. Kuehlmann, "Dynamic transition relation simplification for bounded
property checking", ICCAD 2004, from memory), see ``sweep``.
"""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

import numpy as np
from pysat.solvers import Glucose4

from insertdft.proof.aig import FALSE, TRUE, Aig, Lits, Words, cone, read, simulate

#: Words of 64 random patterns.
WIDTH: Final = 16
_SEED: Final = 20240229


@dataclass(frozen=True, slots=True)
class Answer:
    """What became of one question.

    Attributes:
        by: ``structure``, ``solver`` (both: it is never true), ``patterns``, ``solver`` with a
            model (it can be true), or ``undecided``.
        model: Values of variables (nodes) under which it is true, None if it never is or that is
            undecided. Variables that are not named may have any value.
    """

    by: str
    model: Mapping[int, bool] | None = None


def decide(aig: Aig, questions: Lits, conflicts: int) -> list[Answer]:
    """Return for each literal whether it can be true.

    Args:
        aig: The graph; it may grow.
        questions: Literals.
        conflicts: How many conflicts the solver may spend on one of them.
    """
    answers = [Answer("structure")] * len(questions)
    for place in np.flatnonzero(questions == TRUE).tolist():
        answers[place] = Answer("structure", {})
    left = np.flatnonzero(questions > TRUE)
    if not len(left):
        return answers
    nodes = cone(aig, questions[left])
    sources = nodes[(aig.left[nodes] < 0) & (nodes > 0)]
    patterns = random_words(len(sources), WIDTH)
    values = simulate(aig, nodes, patterns, WIDTH)
    seen = read(values, nodes, questions[left])
    solver = Solver(aig)
    for row, place in enumerate(left.tolist()):
        literal = int(questions[place])
        if seen[row].any():
            model = _pattern(aig, literal, seen[row], sources, patterns)
            answers[place] = Answer("patterns", model)
        else:
            answers[place] = solver.ask(literal, conflicts)
    return answers


def random_words(rows: int, width: int) -> Words:
    """Return the same random words each time; the first patterns are all 0 and all 1."""
    source = np.random.default_rng(_SEED)
    words = source.integers(0, 1 << 64, (rows, width), np.uint64)
    words[:, 0] = (words[:, 0] & ~np.uint64(3)) | np.uint64(2)
    return words


def _pattern(
    aig: Aig, literal: int, seen: Words, sources: Lits, patterns: Words
) -> dict[int, bool]:
    """Return the first pattern that makes ``literal`` true, over the variables it depends on."""
    word = int(np.flatnonzero(seen)[0])
    bits = int(seen[word])
    bit = (bits & -bits).bit_length() - 1
    support = cone(aig, np.array([literal], np.int32))
    support = support[(aig.left[support] < 0) & (support > 0)]
    rows = np.searchsorted(sources, support)
    values = (patterns[rows, word] >> np.uint64(bit)) & np.uint64(1)
    return {int(node): bool(value) for node, value in zip(support, values, strict=True)}


class Solver:
    """A solver that is told of the graph as far as questions need it."""

    def __init__(self, aig: Aig) -> None:
        """Know nothing yet."""
        self._aig = aig
        self._solver = Glucose4()
        self._numbers: dict[int, int] = {}
        self._known = 0

    def ask(self, literal: int, conflicts: int) -> Answer:
        """Return whether ``literal`` can be true."""
        if literal in (FALSE, TRUE):
            return Answer("structure", {} if literal == TRUE else None)
        self._learn(literal)
        self._solver.conf_budget(conflicts)
        found = self._solver.solve_limited(assumptions=[self._of(literal)])
        if found is None:
            return Answer("undecided")
        return Answer("solver", self._model(literal) if found else None)

    def differ(self, one: int, other: int, conflicts: int) -> Mapping[int, bool] | bool:
        """Return False if two literals are equal, a model if not, True if undecided."""
        for left, right in ((one, other ^ 1), (one ^ 1, other)):
            self._learn(one)
            self._learn(other)
            self._solver.conf_budget(conflicts)
            wanted = [self._of(left), self._of(right)]
            found = self._solver.solve_limited(assumptions=wanted)
            if found is None:
                return True
            if found:
                return self._model(one) | self._model(other)
            self._solver.add_clause([-wanted[0], -wanted[1]])
        return False

    def _of(self, literal: int) -> int:
        number = self._numbers[literal >> 1]
        return -number if literal & 1 else number

    def _learn(self, literal: int) -> None:
        node = literal >> 1
        if node in self._numbers:
            return
        left, right = self._aig.left, self._aig.right
        stack = [node]
        while stack:
            node = stack[-1]
            if node in self._numbers:
                stack.pop()
                continue
            one, other = int(left[node]), int(right[node])
            if one >= 0:
                missing = [at >> 1 for at in (one, other) if at >> 1 not in self._numbers]
                if missing:
                    stack += missing
                    continue
            stack.pop()
            self._number(node, one, other)

    def _number(self, node: int, one: int, other: int) -> None:
        own = self._known = self._known + 1
        self._numbers[node] = own
        if node == 0:
            self._solver.add_clause([-own])
        elif one >= 0:
            first, second = self._of(one), self._of(other)
            self._solver.add_clause([-own, first])
            self._solver.add_clause([-own, second])
            self._solver.add_clause([own, -first, -second])

    def _model(self, literal: int) -> dict[int, bool]:
        model = self._solver.get_model()
        support = cone(self._aig, np.array([literal], np.int32))
        support = support[(self._aig.left[support] < 0) & (support > 0)]
        return {node: model[self._numbers[node] - 1] > 0 for node in support.tolist()}
