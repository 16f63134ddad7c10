"""What each latch enable is as a function of the clock ports: off, on, and by how many clocks.

The function of an enable over its cone is worked out for every set of clocks at their on value and
for many values of everything else that gates it: all of them where there are few such signals, a
fixed random choice where there are many (then a fault can be missed, never invented).
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from itertools import combinations
from random import Random
from typing import Final

from insertdft.design.flat import Design
from insertdft.library.expression import Expression, columns, evaluate, variables
from insertdft.library.finders import clock_gate_of
from insertdft.survey.cone import cone

#: Gating signals of an enable that are tried in every combination.
MOST_EXACT: Final = 10
#: Combinations tried where there are more.
_SAMPLES: Final = 1 << MOST_EXACT
#: Gates in front of an enable.
_MOST_GATES: Final = 20_000


@dataclass(frozen=True, slots=True)
class Opening:
    """When one latch is open.

    Attributes:
        clocks: Nets of the clock ports that its enable depends on.
        gating: Other nets that it depends on: what ports, latches and clock gates hold.
        on: Words by set of clocks that are on, all others at rest; bit p is whether the latch is
            open for pattern p of the gating signals. Sets of at most two clocks.
        ones: The word with every pattern.
        exact: Whether the patterns are all there are.
    """

    clocks: tuple[int, ...]
    gating: tuple[int, ...]
    on: Mapping[frozenset[int], int] = field(repr=False)
    ones: int = field(repr=False)
    exact: bool

    def word(self, *clocks: int) -> int:
        """Return the word for these clocks on."""
        return self.on[frozenset(clocks)]

    @property
    def at_rest(self) -> int:
        """Patterns under which the latch is open while every clock rests."""
        return self.word()

    def never_opens(self) -> bool:
        """Return whether no clock alone can open the latch, whatever the gating signals are."""
        alone = (self.word(clock) & ~self.at_rest for clock in self.clocks)
        return not any(alone) and (self.exact or not self.clocks)

    def anded(self) -> tuple[int, int] | None:
        """Return two clocks whose joint effect is not that of one or the other, or None.

        Without such a pair the enable is an OR of its clocks, each gated by no clock.
        """
        for first, second in combinations(self.clocks, 2):
            if self.word(first, second) != self.word(first) | self.word(second):
                return first, second
        return None


def opening(
    design: Design,
    values: Mapping[int, int],
    clocks: Mapping[int, int],
    enable: Expression,
    pins: Mapping[str, int],
) -> Opening:
    """Return when a latch is open.

    Args:
        design: The flat design.
        values: Known nets, without the clocks.
        clocks: Net of each clock port -> its value at rest.
        enable: Over the pins of the latch's cell.
        pins: Net of each pin in ``enable``; an unconnected one counts as 0.
    """
    return _Cone(design, values, clocks).opening(enable, pins)


class _Cone:
    """The gates in front of one enable, evaluated on words."""

    def __init__(
        self, design: Design, values: Mapping[int, int], clocks: Mapping[int, int]
    ) -> None:
        self._design = design
        self._values = values
        self._clocks = clocks
        self._gates: dict[int, None] = {}
        self._leaves: dict[int, None] = {}
        self._clock_gates: dict[int, tuple[int, bool]] = {}

    def opening(self, enable: Expression, pins: Mapping[str, int]) -> Opening:
        for name in variables(enable):
            self._walk(pins.get(name, -1))
        clocks = tuple(net for net in self._leaves if net in self._clocks)
        gating = tuple(net for net in self._leaves if net not in self._clocks)
        words, ones = _patterns(gating)
        sets = [frozenset(some) for size in (0, 1, 2) for some in combinations(clocks, size)]
        on = {some: self._value(enable, pins, some, words, ones) for some in sets}
        return Opening(clocks, gating, on, ones, len(gating) <= MOST_EXACT)

    def _walk(self, net: int) -> None:
        """Collect gates (leaves first) and leaves; a clock gate is passed by its clock."""
        waiting = [net]
        while waiting:
            found = cone(self._design, self._values, waiting.pop(), _MOST_GATES)
            for leaf in found.leaves:
                through = _through_clock_gate(self._design, leaf)
                self._leaves.setdefault(leaf)
                if through is not None and leaf not in self._clock_gates:
                    self._clock_gates[leaf] = through
                    waiting.append(through[0])
            self._gates = dict.fromkeys((*found.gates, *self._gates))

    def _value(
        self,
        enable: Expression,
        pins: Mapping[str, int],
        on: frozenset[int],
        words: Mapping[int, int],
        ones: int,
    ) -> int:
        nets = {net: ones * (rest ^ (net in on)) for net, rest in self._clocks.items()}
        nets |= words
        # Once more for each clock gate: its output is a leaf of the gates behind it.
        for _ in range(1 + len(self._clock_gates)):
            for leaf, (clock, falling) in self._clock_gates.items():
                word = self._word(nets, clock, ones)
                nets[leaf] = words[leaf] | word if falling else words[leaf] & word
            for gate in self._gates:
                self._evaluate(gate, nets, ones)
        known = {name: self._word(nets, pins.get(name, -1), ones) for name in variables(enable)}
        return evaluate(enable, known, ones)

    def _evaluate(self, gate: int, nets: dict[int, int], ones: int) -> None:
        cell = self._design.cell_of(gate)
        pins = self._design.pins(gate)
        for pin in cell.outputs() if cell else ():
            goal = pins.get(pin.name, -1)
            if pin.function is None or goal < 0 or goal in self._values:
                continue
            names = variables(pin.function)
            known = {name: self._word(nets, pins.get(name, -1), ones) for name in names}
            nets[goal] = evaluate(pin.function, known, ones)

    def _word(self, nets: Mapping[int, int], net: int, ones: int) -> int:
        return nets[net] if net in nets else ones * self._values.get(net, 0)


def _patterns(gating: Sequence[int]) -> tuple[dict[int, int], int]:
    """Return a word for each gating signal, all combinations or a fixed random choice."""
    if len(gating) <= MOST_EXACT:
        ones = (1 << (1 << len(gating))) - 1
        return dict(zip(gating, columns(len(gating)), strict=True)), ones
    chance = Random(len(gating))  # noqa: S311 -- patterns, not secrets
    return {net: chance.getrandbits(_SAMPLES) for net in gating}, (1 << _SAMPLES) - 1


def _through_clock_gate(design: Design, net: int) -> tuple[int, bool] | None:
    """Return clock net and whether it is one for the falling edge, if a clock gate drives it."""
    drivers = design.drivers.of(net)
    if len(drivers) != 1:
        return None
    instance = int(design.pin_instance[drivers[0]])
    cell = design.cell_of(instance)
    gate = clock_gate_of(cell) if cell is not None else None
    clock = design.pins(instance).get(gate.clock, -1) if gate else -1
    return (clock, "negedge" in gate.kind) if gate and clock >= 0 else None
