"""The same faults without scan: random vectors at the ports, cycle by cycle, states unknown first.

Every bit of a word is another faulty machine; the fault-free one runs beside them. A fault counts
as detected when an output port has a known value that is known to differ. Clocks are taken to pulse
once a cycle.

Source: parallel fault simulation, S. Seshu 1965 (from memory).
"""

from collections.abc import Mapping
from dataclasses import dataclass, field
from types import MappingProxyType
from typing import Final

import numpy as np

from insertdft.faults.collapse import FaultList
from insertdft.faults.sites import PIN, PORT, STEM
from insertdft.netlist import Ids
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.circuit import Group
from insertdft.simulate.words import BITS, ONES, Flags, Words, differs, pack, unpack

_NONE: Final[Mapping[str, int]] = MappingProxyType({})


@dataclass(frozen=True, slots=True, eq=False)
class Unscanned:
    """What vectors at the ports detect.

    Attributes:
        faults: The list.
        cycles: Number of vectors.
        chosen: Classes that were simulated.
        detected_at: Cycle (from 0) that first detects each of ``chosen``, -1 if none does.
    """

    faults: FaultList
    cycles: int
    chosen: Ids = field(repr=False)
    detected_at: Ids = field(repr=False)

    @property
    def coverage(self) -> float:
        """Detected share of the classes simulated; 1 for none."""
        return float((self.detected_at >= 0).mean()) if len(self.chosen) else 1.0

    @property
    def error(self) -> float:
        """Half-width of the 95 % interval of ``coverage`` as an estimate for all classes.

        1.96 * sqrt(c * (1 - c) / n), 0 if all were simulated (sampling formula from memory).
        """
        if len(self.chosen) == self.faults.collapsed:
            return 0.0
        share = self.coverage
        return float(1.96 * np.sqrt(share * (1 - share) / max(1, len(self.chosen))))


def grade_unscanned(
    faults: FaultList,
    cycles: int,
    seed: int,
    chosen: Ids,
    held: Mapping[str, int] = _NONE,
    start: Mapping[str, int] = _NONE,
    start_cycles: int = 2,
) -> Unscanned:
    """Return what random vectors at the ports detect.

    Args:
        faults: Fault list of a circuit made without clocks.
        cycles: Number of vectors.
        seed: Of the random generator.
        chosen: Classes to simulate; the cost grows with their number.
        held: Input port bits that keep a value.
        start: Port bits (resets) with the value they have in the first ``start_cycles`` cycles;
            afterwards they keep the opposite value.
        start_cycles: How long.
    """
    circuit = faults.sites.circuit
    generator = np.random.default_rng(seed)
    runner = _Runner(faults, chosen)
    fixed = {circuit.inputs[name]: v for name, v in {**circuit.at_rest, **held}.items()}
    opening = {circuit.inputs[name]: value for name, value in start.items()}
    free = [slot for slot in circuit.inputs.values() if slot not in fixed and slot not in opening]
    for cycle in range(cycles):
        tossed = dict(zip(free, generator.integers(0, 2, len(free)).tolist(), strict=True))
        begun = cycle >= start_cycles
        now = {slot: value ^ int(begun) for slot, value in opening.items()}
        runner.cycle(cycle, {**fixed, **now, **tossed})
        if not len(runner.waiting):
            break
    return Unscanned(faults, cycles, chosen, runner.detected_at)


@dataclass(frozen=True, slots=True, eq=False)
class _Forced:
    """Places that are stuck in some of the machines: (row, word) with masks, each pair once."""

    row: Ids
    word: Ids
    to_zero: Words
    to_one: Words

    def apply(self, rails: tuple[Words, ...]) -> None:
        """Force rails shaped (rows, words), in place."""
        free = ~(self.to_zero | self.to_one)
        at = (self.row, self.word)
        rails[0][at] = rails[0][at] & free | self.to_one
        rails[1][at] = rails[1][at] & free | self.to_zero


class _Runner:
    """All machines side by side; detected ones are thrown out when half of them are."""

    def __init__(self, faults: FaultList, chosen: Ids) -> None:
        self._faults, self._circuit = faults, faults.sites.circuit
        self._evaluator = Evaluator(self._circuit, 2)
        self._good = self._evaluator.blank(1)
        self._outputs = np.array(sorted(set(self._circuit.outputs.values())), np.int64)
        self._chosen = chosen
        self.detected_at = np.full(len(chosen), -1, np.int32)
        self.waiting = np.arange(len(chosen), dtype=np.int32)  # machine -> place in chosen
        self._bad = self._evaluator.blank(-(-len(chosen) // BITS))
        self._place_faults()

    def cycle(self, number: int, ports: Mapping[int, int]) -> None:
        """Apply one vector, look at the outputs, clock all states."""
        for values in (self._good, self._bad):
            for slot, value in ports.items():
                self._evaluator.put(
                    values, [slot], np.full((1, 1), ONES if value else 0, np.uint64)
                )
        self._evaluator.run(self._good)
        self._run_bad()
        self._look(number)
        states = self._circuit.states
        for values in (self._good, self._bad):
            values[:, states.slot] = values[:, states.following]
        if 2 * (self.detected_at[self.waiting] >= 0).sum() > len(self.waiting):
            self._throw_out()

    def _run_bad(self) -> None:
        self._force(_SOURCES, tuple(self._bad))
        for number, group in enumerate(self._circuit.groups):
            inputs = self._evaluator.read(self._bad, group)
            for place in range(len(inputs)):
                self._force((number, place), inputs[place])
            result = self._evaluator.steps[group.function](inputs)
            for rail, new in zip(self._bad, result, strict=True):
                rail[group.first : group.end] = new
            self._force((number, -1), tuple(r[group.first : group.end] for r in self._bad))

    def _force(self, key: tuple[int, int], rails: tuple[Words, ...]) -> None:
        if key in self._forced:
            self._forced[key].apply(rails)

    def _look(self, number: int) -> None:
        good = tuple(rail[self._outputs] for rail in self._good)
        bad = tuple(rail[self._outputs] for rail in self._bad)
        hit = unpack(np.bitwise_or.reduce(differs(good, bad), axis=0), len(self.waiting))
        hit |= self._port_hits()
        fresh = self.waiting[hit & (self.detected_at[self.waiting] < 0)]
        self.detected_at[fresh] = number

    def _port_hits(self) -> Flags:
        """Return the machines whose fault is at an output port alone and shows now."""
        kind, slot, stuck, _ = self._columns()
        wrong = np.where(stuck == 1, self._good[1, slot, 0], self._good[0, slot, 0]) != 0
        found: Flags = wrong & (kind == PORT)
        return found

    def _columns(self) -> tuple[Ids, Ids, Ids, Ids]:
        sites = self._faults.sites
        fault = self._faults.first[self._chosen[self.waiting]]
        site = fault // 2
        return sites.kind[site], sites.slot[site], fault % 2, sites.edge[site]

    def _place_faults(self) -> None:
        """Sort the faults to where they act: sources, inputs of a group, outputs of a group."""
        kind, slot, stuck, edge = self._columns()
        circuit = self._circuit
        found: dict[tuple[int, int], list[tuple[int, int]]] = {}
        firsts = np.array([group.first for group in circuit.groups])
        for machine in np.flatnonzero((kind == STEM) | (kind == PIN)).tolist():
            at = int(circuit.edge_node[edge[machine]] if kind[machine] == PIN else slot[machine])
            number = int(np.searchsorted(firsts, at, side="right")) - 1
            if at < circuit.first_node:
                key, row = _SOURCES, at
            elif kind[machine] == PIN:
                place, row = _place(circuit.groups[number], int(edge[machine]))
                key = (number, place)
            else:
                key, row = (number, -1), at - circuit.groups[number].first
            found.setdefault(key, []).append((row, machine))
        self._forced = {key: _merged(pairs, stuck) for key, pairs in found.items()}

    def _throw_out(self) -> None:
        """Keep the machines that are not detected; their states move along."""
        kept = np.flatnonzero(self.detected_at[self.waiting] < 0)
        states = self._circuit.states.slot
        bits = unpack(self._bad[:, states], len(self.waiting))[:, :, kept]
        self.waiting = self.waiting[kept]
        self._bad = self._evaluator.blank(-(-len(kept) // BITS))
        self._bad[:, states] = pack(bits)
        self._place_faults()


#: Key of the faults on sources.
_SOURCES: Final = (-1, -1)


def _place(group: Group, edge: int) -> tuple[int, int]:
    """Return which input, and which node of the group, an edge belongs to."""
    return divmod(edge - group.first_edge, group.end - group.first)


def _merged(pairs: list[tuple[int, int]], stuck: Ids) -> _Forced:
    masks: dict[tuple[int, int], list[int]] = {}
    for row, machine in pairs:
        word, bit = divmod(machine, BITS)
        masks.setdefault((row, word), [0, 0])[int(stuck[machine])] |= 1 << bit
    keys = np.array(list(masks), np.int32).reshape(-1, 2)
    both = np.array(list(masks.values()), np.uint64).reshape(-1, 2)
    return _Forced(keys[:, 0], keys[:, 1], both[:, 0], both[:, 1])
