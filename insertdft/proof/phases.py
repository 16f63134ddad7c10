"""A symbolic simulator: clocks go up and down in order, states are functions.

Time passes in events, one port changing at a time. Within an event, everything settles in steps
without delay: a flip-flop whose clock rises takes what its data was before the step, a latch that
is open follows, a table makes the step that its rows say. What a table leaves open becomes a fresh
variable. States that do not come to rest (latches open in a row) are found.
"""

from dataclasses import dataclass
from typing import Final

import numpy as np

from insertdft.proof.aig import FALSE, TRUE, Aig, Lits
from insertdft.proof.circuit import Circuit, TableBlock, at, evaluate
from insertdft.proof.lay import PORT
from insertdft.proof.order import Flags, Numbers
from insertdft.proof.sat import Solver
from insertdft.proof.tables import step
from insertdft.proof.template import FLIP_FLOP, LOOP

#: Steps until an event must be at rest; more than a few latches in a row are never open by right.
MOST_STEPS: Final = 12
#: Steps after which functions that are written apart are asked for whether they differ at all.
_PATIENCE: Final = 4
_FEW_CONFLICTS: Final = 2000


class UnsettledError(Exception):
    """States keep changing though no port does."""


@dataclass(frozen=True, slots=True, eq=False)
class Part:
    """What of a circuit is simulated.

    Attributes:
        elements: Rows of ``Circuit.elements``.
        tables: Blocks, cut down to the instances that matter.
        order: Nodes to evaluate.
        bounds: Their levels.
    """

    elements: Numbers
    tables: tuple[TableBlock, ...]
    order: Lits
    bounds: Numbers


@dataclass(slots=True, eq=False)
class _Seen:
    """Values at the end of the last step, which edges and tables look back on."""

    clock: Lits
    data: Lits
    inputs: list[Lits]


class Machine:
    """A circuit whose ports can be moved and whose states follow."""

    def __init__(self, circuit: Circuit, aig: Aig, values: Lits, part: Part) -> None:
        """Start from literals of all leaves; nothing is settled yet.

        Args:
            circuit: The graph.
            aig: Where functions are made.
            values: Shape (nodes,), literals of leaves and of nodes outside ``part``; changed.
            part: What to simulate.
        """
        self.values = values
        self._circuit = circuit
        self._aig = aig
        self._part = part
        self._unknown: dict[tuple[int, int], int] = {}
        self._solver = Solver(aig)
        self._evaluate()
        self._seen = self._look()

    def settle(self) -> None:
        """Let latches that are open and sets and resets that act take effect.

        Raises:
            UnsettledError: States do not come to rest.
        """
        self._run()

    def move(self, port: str, literal: int) -> None:
        """Change one port and settle.

        Raises:
            UnsettledError: States do not come to rest.
        """
        self.values[self._circuit.leaves[PORT, port]] = literal
        self._unknown.clear()
        self._run()

    def _run(self) -> None:
        for number in range(MOST_STEPS):
            self._evaluate()
            changed = self._step(patient=number < _PATIENCE)
            self._seen = self._look()
            if not changed:
                return
        raise UnsettledError

    def _evaluate(self) -> None:
        part = self._part
        evaluate(self._circuit, self._aig, self.values, part.order, part.bounds)

    def _look(self) -> _Seen:
        elements, rows = self._circuit.elements, self._part.elements
        return _Seen(
            clock=at(self.values, elements.clock[rows]),
            data=at(self.values, elements.data[rows]),
            inputs=[at(self.values, block.inputs) for block in self._part.tables],
        )

    def _step(self, *, patient: bool) -> bool:
        """Give every state its following value; return whether one changed."""
        now = self._look()
        pairs = [self._elements(now)]
        for number, block in enumerate(self._part.tables):
            pairs.append(self._table(number, block, now.inputs[number]))
        changed = False
        for leaves, following in pairs:
            old = self.values[leaves]
            differ = old != following if patient else self._really(old, following)
            changed |= bool(differ.any())
            self.values[leaves] = np.where(differ, following, old)
        return changed

    def _elements(self, now: _Seen) -> tuple[Lits, Lits]:
        aig, elements, rows = self._aig, self._circuit.elements, self._part.elements
        kind = elements.kind[rows]
        leaves = elements.leaf[rows]
        state = self.values[leaves]
        edge = aig.conj(self._seen.clock ^ 1, now.clock)
        takes = np.where(kind == FLIP_FLOP, edge, now.clock).astype(np.int32)
        data = np.where(kind == FLIP_FLOP, self._seen.data, now.data).astype(np.int32)
        takes = np.where(kind == LOOP, TRUE, takes).astype(np.int32)
        free = aig.choose(takes, data, state)
        zero, one = (at(self.values, column[rows]) for column in (elements.zero, elements.one))
        following = aig.disj(one, aig.conj(zero ^ 1, free))
        clash = at(self.values, elements.unknown[rows])
        for row in np.flatnonzero(clash != FALSE).tolist():
            following[row] = self._perhaps(int(leaves[row]), int(clash[row]), int(following[row]))
        return leaves, following

    def _table(self, number: int, block: TableBlock, inputs: Lits) -> tuple[Lits, Lits]:
        before = self._seen.inputs[number]
        nodes = self.values[block.nodes]
        following, unknown, _ = step(self._aig, block.table, before, inputs, nodes)
        for place, row in zip(*np.nonzero(unknown), strict=True):
            leaf = int(block.nodes[place, row])
            known = int(following[place, row])
            following[place, row] = self._perhaps(leaf, int(unknown[place, row]), known)
        return block.nodes, following

    def _perhaps(self, leaf: int, unknown: int, known: int) -> int:
        """Return ``known``, or an arbitrary value where it is unknown: one variable an event."""
        key = (leaf, unknown)
        if key not in self._unknown:
            self._unknown[key] = self._aig.variable()
        select, free, value = (
            np.array([lit], np.int32) for lit in (unknown, self._unknown[key], known)
        )
        return int(self._aig.choose(select, free, value)[0])

    def _really(self, old: Lits, new: Lits) -> Flags:
        """Return where two literals are different functions; equal ones may be written apart."""
        differ: Flags = old != new
        for place in zip(*np.nonzero(differ & (old > TRUE) & (new > TRUE)), strict=True):
            one, other = int(old[place]), int(new[place])
            if one ^ 1 != other and not self._is_variable(one, other):
                apart = self._solver.differ(one, other, _FEW_CONFLICTS)
                differ[place] = apart is not False
        return differ

    def _is_variable(self, one: int, other: int) -> bool:
        """Return whether both are variables, which differ if their literals do."""
        left = self._aig.left
        return bool(left[one >> 1] < 0 and left[other >> 1] < 0)
