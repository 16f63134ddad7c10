"""Is there any test for a fault? Asked of a SAT solver, one fault at a time.

The good and the faulty copy of the cone are laid down side by side; "some seen slot differs" is
demanded. No solution means that no pattern detects the fault under the given access: with full
scan it is redundant.

Source: T. Larrabee, "Test pattern generation using Boolean satisfiability", IEEE TCAD 11(1), 1992,
pp. 4-15 (from memory). Checked against simulation: every test found must detect its fault, and
nothing simulation detects may be called untestable.
"""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from enum import Enum
from typing import Final

import numpy as np
from pysat.solvers import Solver

from insertdft.faults.access import Access
from insertdft.faults.clauses import ONE, UNKNOWN, ZERO, Clauses, Value
from insertdft.faults.collapse import FaultList
from insertdft.faults.sites import BLIND, PIN, PORT
from insertdft.netlist import CONST0, CONST1
from insertdft.simulate.circuit import Circuit, Group
from insertdft.simulate.levels import grouped
from insertdft.simulate.words import Flags, Words, pack


class Verdict(Enum):
    """Whether a test exists."""

    TESTABLE = "a test exists"
    UNTESTABLE = "no test exists"
    UNDECIDED = "the search was given up"


@dataclass(frozen=True, slots=True)
class Proof:
    """The answer for one class of faults.

    Attributes:
        verdict: The answer.
        pattern: Bits of ``Access.free`` of a test, if one exists.
    """

    verdict: Verdict
    pattern: tuple[bool, ...] | None = field(default=None, repr=False)


#: Conflicts of the solver after which a fault stays undecided.
GIVE_UP: Final = 20_000


def prove_untestable(
    faults: FaultList, access: Access, classes: Iterable[int], give_up: int = GIVE_UP
) -> dict[int, Proof]:
    """Return for each class of faults whether any pattern detects it.

    Costs about a millisecond for each hundred gates of a fault's cone.

    Args:
        faults: Fault list of the access's circuit.
        access: What a test can set and see.
        classes: Classes to decide.
        give_up: Conflicts after which a class stays undecided.
    """
    readers = _Readers(access.circuit)
    return {number: _decide(faults, access, readers, number, give_up) for number in classes}


def as_words(proofs: Mapping[int, Proof], access: Access) -> tuple[Words, int]:
    """Return the tests found as pattern words for ``grade_patterns``, and their number."""
    found = [proof.pattern for proof in proofs.values() if proof.pattern is not None]
    bits = np.array(found, np.bool_).reshape(len(found), len(access.free)).T
    return pack(bits), len(found)


class _Readers:
    """Edges by slot, and where the inputs of a node stand."""

    def __init__(self, circuit: Circuit) -> None:
        self.circuit = circuit
        self.start, self.edges = grouped(circuit.edge_slot, circuit.slots)
        self._first = np.array([group.first for group in circuit.groups])

    def of(self, slot: int) -> list[int]:
        """Return the nodes that read ``slot``."""
        edges = self.edges[self.start[slot] : self.start[slot + 1]]
        nodes: list[int] = self.circuit.edge_node[edges].tolist()
        return nodes

    def group(self, node: int) -> Group:
        """Return the group of a node."""
        return self.circuit.groups[int(np.searchsorted(self._first, node, side="right")) - 1]


def _decide(
    faults: FaultList, access: Access, readers: _Readers, number: int, give_up: int
) -> Proof:
    site, stuck = divmod(int(faults.first[number]), 2)
    sites = faults.sites
    kind, slot = int(sites.kind[site]), int(sites.slot[site])
    if kind == BLIND:
        return Proof(Verdict.UNTESTABLE)
    edge = int(sites.edge[site]) if kind == PIN else -1
    with Solver("glucose4") as solver:
        clauses = Clauses(solver.add_clause)
        copies = _Copies(access, readers, clauses)
        good = copies.good(slot)
        clauses.require([good.zero if stuck else good.one])
        wrong = ONE if stuck else ZERO
        if kind == PORT:
            ends = [clauses.differs(good, wrong)] if access.seen[slot] else []
        else:
            ends = copies.differences(slot, edge, wrong, access.seen)
        clauses.require(ends)
        solver.conf_budget(give_up)
        answer = solver.solve_limited()
        if answer is None:
            return Proof(Verdict.UNDECIDED)
        if not answer:
            return Proof(Verdict.UNTESTABLE)
        true = {literal for literal in solver.get_model() if literal > 0}
        return Proof(Verdict.TESTABLE, copies.pattern(true))


class _Copies:
    """The good circuit, laid down where it is needed, and one faulty copy."""

    def __init__(self, access: Access, readers: _Readers, clauses: Clauses) -> None:
        self._access, self._readers, self._clauses = access, readers, clauses
        self._good: dict[int, Value] = {int(CONST0): ZERO, int(CONST1): ONE}
        self._good |= {slot: ONE if value else ZERO for slot, value in access.held.items()}
        self._free = dict.fromkeys(access.free.tolist())

    def good(self, slot: int) -> Value:
        """Return the fault-free value of a slot."""
        waiting = [slot]
        while waiting:
            now = waiting[-1]
            if now in self._good:
                waiting.pop()
            elif now < self._access.circuit.first_node:
                self._good[now] = self._clauses.free() if now in self._free else UNKNOWN
            else:
                inputs, group = self._inputs(now)
                missing = [one for one in inputs if one not in self._good]
                if missing:
                    waiting += missing
                else:
                    self._good[now] = self._evaluate(group, [self._good[one] for one in inputs])
        return self._good[slot]

    def differences(self, slot: int, edge: int, wrong: Value, seen: Flags) -> list[int]:
        """Return a literal for each seen slot that the fault reaches: "differs here"."""
        circuit = self._access.circuit
        faulty: dict[int, Value] = {} if edge >= 0 else {slot: wrong}
        first = int(circuit.edge_node[edge]) if edge >= 0 else slot
        for node in self._cone(first):
            if node in faulty:
                continue
            inputs, group = self._inputs(node)
            values = [faulty.get(one) or self.good(one) for one in inputs]
            if edge >= 0 and node == first:
                values[(edge - group.first_edge) // (group.end - group.first)] = wrong
            faulty[node] = self._evaluate(group, values)
        return [
            self._clauses.differs(self.good(node), value)
            for node, value in faulty.items()
            if seen[node]
        ]

    def pattern(self, true: set[int]) -> tuple[bool, ...]:
        """Return the values of the free slots in a model; False where they do not matter."""
        return tuple(slot in self._good and self._good[slot].one in true for slot in self._free)

    def _cone(self, first: int) -> list[int]:
        found = {first}
        waiting = [first]
        while waiting:
            for node in self._readers.of(waiting.pop()):
                if node not in found:
                    found.add(node)
                    waiting.append(node)
        return sorted(found)  # nodes are numbered in order of evaluation

    def _inputs(self, node: int) -> tuple[list[int], Group]:
        group = self._readers.group(node)
        slots: list[int] = group.inputs[:, node - group.first].tolist()
        return slots, group

    def _evaluate(self, group: Group, inputs: Sequence[Value]) -> Value:
        function = self._access.circuit.functions[group.function]
        return self._clauses.evaluate(function.expression, inputs)
