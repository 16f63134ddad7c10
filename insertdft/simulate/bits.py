"""Bit-parallel evaluation of a ``Circuit``: all patterns of a block at once, group by group."""

from collections.abc import Sequence

import numpy as np

from insertdft.netlist import CONST1, Ids
from insertdft.simulate.circuit import Circuit, Group
from insertdft.simulate.words import ONES, Rails, Step, Words, compiled


class Evaluator:
    """The functions of a circuit made ready for one or two rails."""

    def __init__(self, circuit: Circuit, rails: int) -> None:
        """Compile every distinct function once.

        Args:
            circuit: What to evaluate.
            rails: 1 for two-valued simulation (unknown sources read 0), 2 for three-valued.
        """
        if rails not in (1, 2):
            raise ValueError(f"rails must be 1 or 2, got {rails}")
        self.circuit = circuit
        self.rails = rails
        self.steps: tuple[Step, ...] = tuple(
            compiled(function.expression, rails) for function in circuit.functions
        )

    def blank(self, words: int) -> Words:
        """Return values with the constants set and all else 0 (one rail) or unknown (two)."""
        values = np.zeros((self.rails, self.circuit.slots, words), np.uint64)
        values[0, CONST1] = ONES
        if self.rails == 2:
            values[1, 0] = ONES
        return values

    def put(self, values: Words, slots: Ids | Sequence[int], words: Words) -> None:
        """Give source ``slots`` known values, shape (len(slots), words)."""
        values[0, slots] = words
        if self.rails == 2:
            values[1, slots] = ~words

    def run(self, values: Words) -> None:
        """Work out every node from the sources, in place."""
        for group in self.circuit.groups:
            result = self.steps[group.function](self.read(values, group))
            for rail in range(self.rails):
                values[rail, group.first : group.end] = result[rail]

    def read(self, values: Words, group: Group) -> list[Rails]:
        """Return the values at each input of a group."""
        return [tuple(rail[slots] for rail in values) for slots in group.inputs]
