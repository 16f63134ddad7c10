"""Two circuits over the same variables, and the names of those variables."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.proof.aig import FALSE, TRUE, Aig, Lits
from insertdft.proof.circuit import Circuit, evaluate
from insertdft.proof.lay import PORT
from insertdft.proof.match import Matching, Side
from insertdft.proof.storage import state_name, states_of

BEFORE: Final = 0
AFTER: Final = 1

#: Kind of a variable that is a state.
STATE: Final = "state"


@dataclass(frozen=True, slots=True, eq=False)
class Joint:
    """Original and converted netlist over one graph.

    Attributes:
        aig: The graph.
        before: The original.
        after: The converted netlist.
        matching: Which states are one variable.
        leaves: Variable (node) of everything but states, by kind and name.
        state_vars: Variable of each state of both sides, -1 where it has none; literal.
    """

    aig: Aig
    before: Side
    after: Side
    matching: Matching
    leaves: Mapping[tuple[str, str], int] = field(repr=False)
    state_vars: tuple[Lits, Lits] = field(repr=False)

    def values(self, side: int, held: Mapping[str, int]) -> Lits:
        """Return the literals of all nodes of one side, some ports held at 0 or 1."""
        circuit = (self.before, self.after)[side].circuit
        values = self.start(side, held)
        evaluate(circuit, self.aig, values, circuit.order, circuit.bounds)
        return values

    def start(self, side: int, held: Mapping[str, int]) -> Lits:
        """Return literals of a side's leaves alone."""
        part = (self.before, self.after)[side]
        values = np.zeros(len(part.circuit.left), np.int32)
        for (kind, name), node in part.circuit.leaves.items():
            is_held = kind == PORT and name in held
            values[node] = (FALSE, TRUE)[held[name]] if is_held else self.leaves[kind, name]
        values[part.states.leaf] = self.state_vars[side]
        return values


def join(before: Side, after: Side, matching: Matching) -> Joint:
    """Return both sides with leaves of one name, and matched states, as the same variables."""
    aig = Aig()
    keys = dict.fromkeys((*before.circuit.leaves, *after.circuit.leaves))
    leaves = dict(zip(keys, aig.variables(len(keys)).tolist(), strict=True))
    own = aig.variables(len(before.states))
    other = aig.variables(len(after.states))
    other[matching.after] = own[matching.before] ^ matching.inverted.astype(np.int32)
    return Joint(aig, before, after, matching, leaves, (own, other))


class Names:
    """What the variables of a joint graph are, for messages."""

    def __init__(self, joint: Joint, more: Mapping[int, str] | None = None) -> None:
        """Index the variables once."""
        self._joint = joint
        self._leaves = {lit >> 1: key for key, lit in joint.leaves.items()}
        self._states = [
            {lit >> 1: at for at, lit in enumerate(lits.tolist())} for lits in joint.state_vars
        ]
        self._more = dict(more or {})

    def of(self, node: int) -> tuple[str, str, int]:
        """Return kind, name and side of a variable; states of both sides count as the original's.

        The kind is ``state``, a kind of ``lay``, or ``value`` for variables of the proof itself.
        """
        if node in self._leaves:
            kind, name = self._leaves[node]
            return kind, name, BEFORE
        for side, part in enumerate((self._joint.before, self._joint.after)):
            if node in self._states[side]:
                return STATE, state_name(part.circuit, part.states, self._states[side][node]), side
        return "value", self._more.get(node, f"value {node}"), AFTER


def make_side(circuit: Circuit) -> Side:
    """Return a circuit with its states listed."""
    return Side(circuit, states_of(circuit))
