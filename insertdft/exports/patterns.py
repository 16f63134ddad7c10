"""Scan patterns: what is loaded, applied, and expected.

The chain test needs the description alone. All other expected values come from our own simulator,
run on the written netlist from unknown states; what it cannot know is not compared.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

import numpy as np

from insertdft.description import Chain, Description
from insertdft.design.flat import Design
from insertdft.exports.frames import FREE, SCAN, Frame, Program, leading_scans
from insertdft.simulate.state import Machine
from insertdft.simulate.words import Rails, Words, pack, unpack


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
    """Return ``count`` random patterns of each capture sequence, with expected values."""
    found: list[Pattern] = []
    for number, name in enumerate(program.captures):
        generator = np.random.default_rng([seed, number])
        found += _Batch(design, description, program, name, generator, count).run()
    return tuple(found)


class _Batch:
    """Patterns of one sequence, simulated side by side."""

    def __init__(
        self,
        design: Design,
        description: Description,
        program: Program,
        name: str,
        generator: np.random.Generator,
        count: int,
    ) -> None:
        self.chains, self.program, self.name = description.chains, program, name
        self.frames = program.captures[name]
        self.extra = leading_scans(self.frames)
        self.count = count
        toss = generator.integers
        self.loads = [
            toss(0, 2, (chain.length + self.extra, count), dtype=np.uint8).astype(np.bool_)
            for chain in self.chains
        ]
        self.inputs = toss(0, 2, (len(program.free), count), dtype=np.uint8).astype(np.bool_)
        self.machine = Machine(design, words=max(1, -(-count // 64)))
        self.at = 0

    def run(self) -> list[Pattern]:
        """Return the patterns with what the simulator expects."""
        for frame in self.program.setup:
            self._frame(frame)
        self._load()
        measured = [
            self._rows(seen) for frame in self.frames if (seen := self._frame(frame)) is not None
        ]
        ends = self._unload()
        return [self._pattern(number, measured, ends) for number in range(self.count)]

    def _load(self) -> None:
        for frame in self.program.before_shift:
            self._frame(frame)
        for _ in range(self.program.length):
            for frame in self.program.shift:
                self._frame(frame)

    def _unload(self) -> list[list[str]]:
        for frame in self.program.before_shift:
            self._frame(frame)
        seen: list[list[str]] = []
        for _ in range(self.program.length):
            for frame in self.program.shift:
                self._force(frame)
                if frame.scan:
                    ports = [self.machine.port(chain.scan_out) for chain in self.chains]
                    seen.append(self._rows(ports))
                self._pulse(frame)
        return seen

    def _frame(self, frame: Frame) -> list[Rails] | None:
        self._force(frame)
        ports = self.program.outputs
        seen = [tuple(map(np.copy, self.machine.port(name))) for name in ports]
        self._pulse(frame)
        return seen if frame.measure else None

    def _force(self, frame: Frame) -> None:
        free = dict(zip(self.program.free, self.inputs, strict=True))
        scan = self._scan_bits() if frame.scan else {}
        values: dict[str, Words | int] = {}
        for port, level in frame.levels.items():
            if level == FREE:
                values[port] = pack(free[port])
            elif level == SCAN:
                values[port] = scan[port]
            else:
                values[port] = int(level)
        self.machine.force(values)

    def _scan_bits(self) -> Mapping[str, Words | int]:
        found: dict[str, Words | int] = {}
        for chain, load in zip(self.chains, self.loads, strict=True):
            row = self.at - (self.program.length - chain.length)
            found[chain.scan_in] = pack(load[row]) if 0 <= row < len(load) else 0
        self.at += 1
        return found

    def _pulse(self, frame: Frame) -> None:
        for phase in frame.pulses:
            self.machine.pulse({port: self.program.off[port] for port in phase})

    def _rows(self, ports: Sequence[Rails]) -> list[str]:
        """Return the values of each port over all patterns."""
        return ["".join(_letters(rails, self.count)) for rails in ports]

    def _pattern(
        self, number: int, measured: Sequence[Sequence[str]], ends: Sequence[Sequence[str]]
    ) -> Pattern:
        return Pattern(
            self.name,
            tuple("".join("01"[int(bit)] for bit in load[:, number]) for load in self.loads),
            "".join("01"[int(bit)] for bit in self.inputs[:, number]),
            tuple("".join(row[number] for row in rows) for rows in measured),
            tuple(
                "".join(rows[index][number] for rows in ends[: chain.length])
                for index, chain in enumerate(self.chains)
            ),
        )


def _letters(rails: Rails, count: int) -> list[str]:
    one, zero = (unpack(rail, count) for rail in rails)
    return ["H" if high else "L" if low else "X" for high, low in zip(one, zero, strict=True)]
