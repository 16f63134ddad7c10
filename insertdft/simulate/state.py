"""A design run cycle by cycle: ports forced, clocks pulsed, states followed, many runs at once.

Zero delay. After every change of a port the design is brought to rest: logic is evaluated, then
flip-flops whose clock rose take their data and open latches pass it on, until no state changes.
A flip-flop whose clock comes from another state sees the data after that state has changed (as an
event simulator without delays does).
"""

from collections.abc import Mapping

import numpy as np

from insertdft.design.flat import Design
from insertdft.netlist import CONST0, Ids
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.words import ONES, Flags, Rails, Words, inverse, selected

#: Rounds of settling beyond one for each latch.
_SPARE_ROUNDS = 8


class Machine:
    """Many copies of a design, each bit of a word one of them, at rest between calls.

    Attributes:
        circuit: Its functions, clocks laid down.
        values: Shape (rails, slots, words); see ``words``.
        restless: Number of states that did not come to rest after the last change.
    """

    def __init__(self, design: Design, words: int = 1, *, unknown: bool = True) -> None:
        """Start with every port and state unknown, or at 0.

        Args:
            design: The flat design.
            words: Machine words a value; 64 runs each.
            unknown: Simulate three values; else two, where what nobody gives reads 0.
        """
        self.circuit: Circuit = make_circuit(design, clocks=True)
        self._evaluator = Evaluator(self.circuit, 2 if unknown else 1)
        self.values = self._evaluator.blank(words)
        self.restless = 0
        self._order = _Rows(self.circuit)
        self._evaluator.run(self.values)
        self._clock = self._order.clock(self.values)
        self.settle()

    def force(self, ports: Mapping[str, Words | int]) -> None:
        """Give input port bits values (0 or 1 for all runs, or words) and come to rest.

        Raises:
            KeyError: No input port bit has that name.
        """
        self._put({self.circuit.inputs[name]: value for name, value in ports.items()})
        self.settle()

    def load(self, states: Words) -> None:
        """Give every state a value, shape (states, words), and come to rest without any edge."""
        self._evaluator.put(self.values, self.circuit.states.slot, states)
        self._evaluator.run(self.values)
        self._clock = self._order.clock(self.values)
        self.settle()

    def put_states(self, one: Words, zero: Words) -> None:
        """Give every state a value or make it unknown, and come to rest without any edge.

        Args:
            one: Shape (states, words), where it is surely 1.
            zero: Where it is surely 0.
        """
        self._write((one, zero)[: len(self.values)])
        self._evaluator.run(self.values)
        self._clock = self._order.clock(self.values)
        self.settle()

    def pulse(self, clocks: Mapping[str, int]) -> None:
        """Bring clock ports to the opposite of their off values together, then back.

        Args:
            clocks: Name of each port bit and its off value.
        """
        self.force({name: 1 - off for name, off in clocks.items()})
        self.force(dict(clocks))

    def port(self, name: str) -> Rails:
        """Return the rails of an output or input port bit."""
        slot = self.circuit.outputs.get(name, self.circuit.inputs.get(name))
        if slot is None:
            raise KeyError(name)
        return tuple(rail[slot] for rail in self.values)

    def net(self, net: int) -> Rails:
        """Return the rails of a flat net."""
        return tuple(rail[self.circuit.slot(net)] for rail in self.values)

    def states(self) -> Rails:
        """Return the rails of all states, rows as in ``circuit.states``."""
        return tuple(rail[self.circuit.states.slot] for rail in self.values)

    def settle(self) -> None:
        """Come to rest; what does not stays as it was last, or becomes unknown."""
        states, rows = self.circuit.states, self._order
        rounds = int(states.latch.sum()) + _SPARE_ROUNDS
        for _ in range(rounds):
            self._evaluator.run(self.values)
            before = self.states()
            after = rows.following(self.values, self._clock)
            self._clock = rows.clock(self.values)
            moved = _changed(before, after)
            if not moved.any():
                self.restless = 0
                return
            self._write(after)
        self.restless = int(moved.any(axis=-1).sum())
        if len(before) == 2:
            self._write(tuple(np.where(moved, np.uint64(0), rail) for rail in after))
        self._evaluator.run(self.values)

    def _write(self, states: Rails) -> None:
        for rail, new in zip(self.values, states, strict=True):
            rail[self.circuit.states.slot] = new

    def _put(self, values: Mapping[int, Words | int]) -> None:
        for slot, value in values.items():
            words = (ONES if value else np.uint64(0)) if isinstance(value, int) else value
            self.values[0, slot] = words
            if len(self.values) == 2:
                self.values[1, slot] = np.bitwise_not(words)


class _Rows:
    """How each state follows from the values at its slots."""

    def __init__(self, circuit: Circuit) -> None:
        self._states = circuit.states
        self._latch = circuit.states.latch.astype(np.bool_)[:, None]

    def clock(self, values: Words) -> Rails:
        """Return the clock of every state; 0 for those without."""
        return _at(values, self._states.clock)

    def following(self, values: Words, clock_before: Rails) -> Rails:
        """Return what every state takes now."""
        now, states = self.clock(values), self._states
        old = _at(values, states.slot)
        data = _at(values, states.following)
        sure, maybe = _taken(clock_before, now, self._latch)
        new = _merged(old, data, sure, maybe)
        return _forced(new, _at(values, states.to_zero), _at(values, states.to_one))


def _at(values: Words, slots: Ids) -> Rails:
    """Return the rails at ``slots``; a constant 0 where the slot is -1."""
    return tuple(rail[np.maximum(slots, CONST0)] for rail in values)


def _taken(before: Rails, now: Rails, latch: Flags) -> tuple[Words, Words]:
    """Return where data is surely taken, and where it may be."""
    on, was_off = now[0], inverse(before)[0]
    may_be_on, may_have_been_off = ~inverse(now)[0], ~before[0]
    sure: Words = np.where(latch, on, on & was_off)
    maybe: Words = np.where(latch, may_be_on, may_be_on & may_have_been_off)
    return sure, maybe


def _merged(old: Rails, data: Rails, sure: Words, maybe: Words) -> Rails:
    """Return data where it is taken; where it only may be, what both agree on."""
    if len(old) == 1:
        return selected(sure, data, old)
    agreed = tuple(a & b for a, b in zip(old, data, strict=True))
    return selected(sure, data, selected(maybe, agreed, old))


def _forced(new: Rails, to_zero: Rails, to_one: Rails) -> Rails:
    """Return the states with clears and presets obeyed; both at once leave two rails unknown."""
    if len(new) == 1:
        return ((new[0] | to_one[0]) & ~to_zero[0],)
    may_be_0 = ~to_zero[1] | (~new[0] & ~to_one[0])
    may_be_1 = ~to_one[1] | (~new[1] & ~to_zero[0])
    return ~may_be_0, ~may_be_1


def _changed(before: Rails, after: Rails) -> Words:
    found = before[0] ^ after[0]
    for one, two in zip(before[1:], after[1:], strict=True):
        found = found | (one ^ two)
    return found
