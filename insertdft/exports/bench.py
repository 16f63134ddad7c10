"""A self-checking test bench in Verilog-2001 that any simulator runs.

It flushes every chain, loads, captures and unloads each pattern and compares with what our own
simulator expects; it prints one line for each difference and ``PASS`` or ``FAIL`` at the end. Its
edges are those of the timing table.
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import groupby

from insertdft.description import Chain
from insertdft.design.flat import TopPort
from insertdft.exports.frames import FREE, SCAN, Frame, Program, leading_scans
from insertdft.exports.inputs import ExportInput
from insertdft.exports.patterns import Pattern
from insertdft.exports.render import render
from insertdft.exports.timing import Timing, as_ns
from insertdft.netlist.names import plain, to_verilog


@dataclass(frozen=True, slots=True)
class _Task:
    name: str
    why: str
    lines: tuple[str, ...]


def to_bench(given: ExportInput) -> str:
    """Return the text of the bench; its module is ``scan_bench``."""
    program = given.program()
    work = _Writer(given, program)
    return render(
        "bench.v.jinja",
        design=to_verilog(given.description.design),
        inputs=len(program.inputs),
        outputs=len(program.outputs),
        free=max(1, len(program.free)),
        names=work.names(),
        connections=work.connections(),
        chains=work.chain_data(),
        length=program.length,
        extra=work.extra,
        tasks=work.tasks(),
        rest=work.rest(),
        setup=[f"setup_{n};" for n in range(len(program.setup))],
        before_shift=[f"before_shift_{n};" for n in range(len(program.before_shift))],
        shift=[f"shift_{n};" for n in range(len(program.shift))],
        steps=work.steps(given.all_patterns(program)),
    )


def _bits(text: str) -> str:
    return f"{len(text)}'b{text}" if text else "1'b0"


class _Writer:
    def __init__(self, given: ExportInput, program: Program) -> None:
        self.program = program
        self.ports: Sequence[TopPort] = given.ports
        self.chains: Sequence[Chain] = given.description.chains
        self.timing: Timing = given.timing
        self.input_at = {name: i for i, name in enumerate(program.inputs)}
        self.output_at = {name: i for i, name in enumerate(program.outputs)}
        self.extra = max([1, *map(leading_scans, program.captures.values())])

    def names(self) -> list[str]:
        """Return comment lines that tell which bit is which port."""
        found = [f"in[{at}] {plain(name)}" for name, at in self.input_at.items()]
        return found + [f"out[{at}] {plain(name)}" for name, at in self.output_at.items()]

    def connections(self) -> list[str]:
        """Return the port connections, whole ports in declared order."""
        found = []
        for port, bits in groupby(self.ports, lambda bit: bit.port):
            # The netlist has the rightmost bit of a port first, a concatenation the leftmost.
            wires = [wire for bit in bits if (wire := self._wire(bit))][::-1]
            joined = f"{{{', '.join(wires)}}}" if len(wires) > 1 else "".join(wires)
            found.append(f".{to_verilog(port)}({joined})")
        return found

    def _wire(self, bit: TopPort) -> str:
        if bit.direction == "input":
            return f"in[{self.input_at[bit.name]}]"
        return f"out[{self.output_at[bit.name]}]" if bit.direction == "output" else ""

    def chain_data(self) -> list[dict[str, object]]:
        """Return where each chain begins and ends."""
        return [
            {
                "comment": plain(chain.name),
                "scan_in": self.input_at[chain.scan_in],
                "scan_out": self.output_at[chain.scan_out],
            }
            for chain in self.chains
        ]

    def rest(self) -> str:
        """Return all inputs before the setup: clocks at rest, all else 0."""
        off = self.program.off
        return _bits("".join(str(off.get(name, 0)) for name in reversed(self.program.inputs)))

    def tasks(self) -> list[_Task]:
        """Return a task for every frame."""
        program = self.program
        rows = {"setup": program.setup, "before_shift": program.before_shift}
        rows |= {"shift": program.shift, **program.captures}
        return [
            _Task(_word(name, number), plain(frame.why), tuple(self._lines(frame, name)))
            for name, frames in rows.items()
            for number, frame in enumerate(frames)
        ]

    def _lines(self, frame: Frame, name: str) -> Iterator[str]:
        yield f"#{as_ns(self.timing.force)};"
        levels = [frame.levels[port] for port in self.program.inputs]
        yield f"in = {_bits(''.join(at if at in '01' else '0' for at in reversed(levels)))};"
        for number, port in enumerate(self.program.free):
            if frame.levels[port] == FREE:
                yield f"in[{self.input_at[port]}] = free[{number}];"
        source = "load" if name == "shift" else "extra"
        if SCAN in levels:
            yield f"drive_{source};"
        yield f"#{as_ns(self.timing.strobe - self.timing.force)};"
        if name == "shift" and frame.scan:
            yield "compare_scan;"
        if SCAN in levels:
            yield f"{source}_at = {source}_at + 1;"
        if frame.measure:
            yield "compare_outputs;"
        now = self.timing.strobe
        for phase, (start, end) in zip(frame.pulses, self.timing.phases, strict=False):
            for at, level in ((start, 1), (end, 0)):
                yield f"#{as_ns(at - now)};"
                now = at
                for port in phase:
                    value = level ^ self.program.off[port]
                    yield f"in[{self.input_at[port]}] = {value};"
        yield f"#{as_ns(self.timing.period - now)};"

    def steps(self, patterns: Sequence[Pattern]) -> Iterator[list[str]]:
        """Yield the statements of each pattern: load and unload, then capture."""
        unload: tuple[str, ...] = ()
        for number, pattern in enumerate(patterns):
            lines = [f"pattern = {number};", *self._scan_lines(pattern.load, unload)]
            frames = self.program.captures.get(pattern.sequence, ())
            if pattern.inputs:
                lines.append(f"free = {_bits(pattern.inputs[::-1])};")
            lines.append("extra_at = 0;")
            lines.append("load_unload;")
            measured = iter(pattern.measured)
            for index, frame in enumerate(frames):
                if frame.measure:
                    lines += _expected("outputs", next(measured)[::-1])
                lines.append(f"{_word(pattern.sequence, index)};")
            yield lines
            unload = pattern.unload
        zeros = ["0" * chain.length for chain in self.chains]
        yield [f"pattern = {len(patterns)};", *self._scan_lines(zeros, unload), "load_unload;"]

    def _scan_lines(self, loads: Sequence[str], unloads: Sequence[str]) -> Iterator[str]:
        length = self.program.length
        for number, (chain, load) in enumerate(zip(self.chains, loads, strict=True)):
            now = load[: chain.length].rjust(length, "0")
            yield f"load_{number} = {_bits(now[::-1])};"
            if load[chain.length :]:
                yield f"extra_{number} = {_bits(load[chain.length :][::-1])};"
            row = unloads[number].ljust(length, "X") if unloads else "X" * length
            yield from _expected(str(number), row[::-1])


def _expected(name: str, row: str) -> list[str]:
    """Return the statements that say what is expected, and where."""
    want = "".join("1" if letter == "H" else "0" for letter in row)
    care = "".join("0" if letter == "X" else "1" for letter in row)
    return [f"want_{name} = {_bits(want)};", f"care_{name} = {_bits(care)};"]


def _word(name: str, number: int) -> str:
    return to_verilog(f"\\{name}_{number}") if not name.isidentifier() else f"{name}_{number}"
