"""Scan patterns: what is loaded, applied, and expected.

The chain test needs the description alone. All other expected values come from our own simulator,
run on the written netlist from unknown states; what it cannot know is not compared.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, replace

import numpy as np

from insertdft.description import Chain, Description
from insertdft.design.flat import Design
from insertdft.exports.frames import FREE, SCAN, Frame, Program, leading_scans
from insertdft.exports.places import (
    hold_load,
    places_of,
    set_before_last_shift,
    unloaded,
)
from insertdft.simulate.state import Machine
from insertdft.simulate.two_clocks import start_marks, with_two_clock_cells
from insertdft.simulate.words import Words, pack, unpack


@dataclass(frozen=True, slots=True)
class Pattern:
    """One load, what follows it, and the unload. Leftmost characters are shifted first.

    Attributes:
        sequence: Capture sequence that is run; empty for the chain test, which only shifts.
        load: ``0`` and ``1`` of each chain, as many as it is long, and one more for each frame of
            the sequence that still shifts.
        inputs: ``0`` and ``1`` of each free input.
        measured: ``L``, ``H``, ``X`` of every output, for each frame that measures.
        unload: ``L``, ``H``, ``X`` of each chain, as many as it is long.
    """

    sequence: str
    load: tuple[str, ...]
    inputs: str
    measured: tuple[str, ...]
    unload: tuple[str, ...]


def chain_test(description: Description, program: Program) -> Pattern:
    """Return 0011 0011 ... along every chain: every transition passes through every cell."""
    loads = tuple(("0011" * chain.length)[: chain.length] for chain in description.chains)
    unloads = tuple(
        "".join("LH"[int(bit) ^ parity(chain)] for bit in load)
        for chain, load in zip(description.chains, loads, strict=True)
    )
    return Pattern("", loads, "0" * len(program.free), (), unloads)


def parity(chain: Chain) -> int:
    """Return 1 if scan-out shows the inverse of what entered at scan-in."""
    return (sum(cell.inverted for cell in chain.cells) + chain.inverted_out) % 2


def random_patterns(
    design: Design, description: Description, program: Program, count: int, seed: int = 1
) -> tuple[Pattern, ...]:
    """Return ``count`` random patterns of each capture sequence, with expected values.

    Values that follow from cells whose behaviour the simulator does not know are ``X``.
    """
    if not program.captures or count < 1:
        return ()
    return _Batch(design, description, program, count, seed).run()


class _Batch:
    """Patterns of all sequences side by side; each run of the machine is a *lane*."""

    def __init__(
        self, design: Design, description: Description, program: Program, count: int, seed: int
    ) -> None:
        self.chains, self.program = description.chains, program
        self.names = [name for name in program.captures for _ in range(count)]
        self.lanes = len(self.names)
        self.extra = {name: leading_scans(frames) for name, frames in program.captures.items()}
        toss = np.random.default_rng(seed).integers
        more = max(self.extra.values())
        self.loads = [
            toss(0, 2, (chain.length + more, self.lanes), dtype=np.uint8).astype(np.bool_)
            for chain in self.chains
        ]
        self.inputs = toss(0, 2, (len(program.free), self.lanes), dtype=np.uint8).astype(np.bool_)
        self.free = {port: pack(row) for port, row in zip(program.free, self.inputs, strict=True)}
        self.masks = {
            name: pack(np.array([mine == name for mine in self.names])) for name in program.captures
        }
        self.everywhere = pack(np.ones(self.lanes, np.bool_))
        self.machine = Machine(with_two_clock_cells(design), words=len(self.everywhere))
        self.machine.force(program.off)
        start_marks(self.machine)
        self.places = places_of(self.machine.circuit, self.chains)
        self.at = 0

    def run(self) -> tuple[Pattern, ...]:
        """Return the patterns with what the simulator expects."""
        for frame in self.program.setup:
            self._all(frame)
        self._load()
        measured: list[list[str]] = [[] for _ in self.names]
        for step in range(max(map(len, self.program.captures.values()))):
            self._step(step, measured)
        ends = self._unload()
        return tuple(self._pattern(lane, measured[lane], ends) for lane in range(self.lanes))

    def _load(self) -> None:
        """Bring the load into the chains, by the last shift alone where that is possible."""
        for frame in self.program.before_shift:
            self._all(frame)
        if self.places is not None and self._one_frame_shifts():
            loads = [
                load[: chain.length] for chain, load in zip(self.chains, self.loads, strict=True)
            ]
            set_before_last_shift(self.machine, self.places, loads)
            [frame] = self.program.shift
            self.machine.force(self._at_rest(frame))
            self._pulse([(replace(frame, pulses=frame.pulses[1:]), self.everywhere)])
            self.at = self.program.length - 1
            self._all(frame)
            if hold_load(self.machine, self.places, loads):
                return
            self.places = None
            self.at = 0
        self._shift(self.program.length)

    def _unload(self) -> list[list[str]]:
        """Return what each scan-out shows over all lanes, shift by shift."""
        for frame in self.program.before_shift:
            self._all(frame)
        if self.places is None or not self._one_frame_shifts():
            return self._shift(self.program.length)
        seen = self._shift(1)
        for rows, places in zip(seen, self.places, strict=True):
            one, zero = unloaded(self.machine, places)
            rows += [self._word(*rails) for rails in zip(one, zero, strict=True)]
        return seen

    def _one_frame_shifts(self) -> bool:
        return len(self.program.shift) == 1

    def _at_rest(self, frame: Frame) -> dict[str, Words | int]:
        levels = {port: "0" if level == SCAN else level for port, level in frame.levels.items()}
        return {port: int(level) for port, level in levels.items() if level != FREE}

    def _shift(self, count: int) -> list[list[str]]:
        """Shift ``count`` times; return what each scan-out shows over all lanes, shift by shift."""
        seen: list[list[str]] = [[] for _ in self.chains]
        for _ in range(count):
            for frame in self.program.shift:
                self.machine.force(self._values(frame))
                if frame.scan:
                    for chain, rows in zip(self.chains, seen, strict=True):
                        rows.append(self._letters(chain.scan_out))
                self._pulse([(frame, self.everywhere)])
        return seen

    def _all(self, frame: Frame) -> None:
        self.machine.force(self._values(frame))
        self._pulse([(frame, self.everywhere)])

    def _step(self, step: int, measured: list[list[str]]) -> None:
        """Run frame ``step`` of every sequence that has one, each in its lanes."""
        running = [
            (frames[min(step, len(frames) - 1)], self.masks[name], step < len(frames))
            for name, frames in self.program.captures.items()
        ]
        values = {port: np.zeros_like(self.everywhere) for port in self.program.inputs}
        scanned = self.at
        for frame, mask, _ in running:
            self.at = scanned
            for port, word in self._values(frame).items():
                words = (mask if word else np.zeros_like(mask)) if isinstance(word, int) else word
                values[port] = values[port] | (words & mask)
        self.machine.force(values)
        outputs = [self._letters(port) for port in self.program.outputs]
        for lane, name in enumerate(self.names):
            frames = self.program.captures[name]
            if step < len(frames) and frames[step].measure:
                measured[lane].append("".join(row[lane] for row in outputs))
        self._pulse([(frame, mask) for frame, mask, active in running if active])

    def _values(self, frame: Frame) -> dict[str, Words | int]:
        scan = self._scan_bits() if frame.scan else {}
        return {
            port: self.free[port] if level == FREE else scan[port] if level == SCAN else int(level)
            for port, level in frame.levels.items()
        }

    def _scan_bits(self) -> Mapping[str, Words | int]:
        found: dict[str, Words | int] = {}
        for chain, load in zip(self.chains, self.loads, strict=True):
            row = self.at - (self.program.length - chain.length)
            found[chain.scan_in] = pack(load[row]) if 0 <= row < len(load) else 0
        self.at += 1
        return found

    def _pulse(self, frames: Sequence[tuple[Frame, Words]]) -> None:
        """Pulse phase after phase, every frame in its own lanes."""
        for phase in range(max((len(frame.pulses) for frame, _ in frames), default=0)):
            on: dict[str, Words] = {}
            for frame, mask in frames:
                for port in frame.pulses[phase] if phase < len(frame.pulses) else ():
                    on[port] = on.get(port, np.zeros_like(mask)) | mask
            off = self.program.off
            self.machine.force({port: ~word if off[port] else word for port, word in on.items()})
            self.machine.force({port: off[port] for port in on})

    def _letters(self, port: str) -> str:
        """Return the values of a port over all lanes."""
        return self._word(*self.machine.port(port))

    def _word(self, one: Words, zero: Words) -> str:
        pairs = zip(unpack(one, self.lanes), unpack(zero, self.lanes), strict=True)
        return "".join("H" if high else "L" if low else "X" for high, low in pairs)

    def _pattern(
        self, lane: int, measured: Sequence[str], ends: Sequence[Sequence[str]]
    ) -> Pattern:
        name = self.names[lane]
        loads = (
            load[: chain.length + self.extra[name], lane]
            for chain, load in zip(self.chains, self.loads, strict=True)
        )
        return Pattern(
            name,
            tuple("".join("01"[int(bit)] for bit in load) for load in loads),
            "".join("01"[int(bit)] for bit in self.inputs[:, lane]),
            tuple(measured),
            tuple(
                "".join(row[lane] for row in rows[: chain.length])
                for chain, rows in zip(self.chains, ends, strict=True)
            ),
        )
