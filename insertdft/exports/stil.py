r"""STIL (IEEE 1450-1999): structures, timing, procedures and patterns that run as they are.

Every name stands in double quotes in its Verilog spelling (``"u1.\q[3] .r"``). What a quoted name
cannot hold is written as ``%`` and two hexadecimal digits: the quote itself, ``%``, and what cannot
be printed. The waveform characters P, Q, R, ... are pulses in the first, second, third, ... phase.
"""

import re
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

from insertdft.description import Chain
from insertdft.exports.frames import FREE, SCAN, Frame, Program, leading_scans
from insertdft.exports.inputs import ExportInput
from insertdft.exports.patterns import Pattern, parity
from insertdft.exports.render import render
from insertdft.exports.timing import PHASES, Timing, as_ns

_AWAY: Final = re.compile(r'[^ -~]|["%]')
_BACK: Final = re.compile("%([0-9A-F]{2})")


def quoted(name: str) -> str:
    """Return a name as STIL has it, with its quotes."""
    return '"' + _AWAY.sub(lambda found: f"%{ord(found[0]):02X}", name) + '"'


def unquoted(text: str) -> str:
    """Return the name that ``quoted`` made ``text`` from."""
    return _BACK.sub(lambda found: chr(int(found[1], 16)), text[1:-1])


@dataclass(frozen=True, slots=True)
class _Procedure:
    name: str
    notes: tuple[str, ...]
    vectors: tuple[str, ...]


def to_stil(given: ExportInput) -> str:
    """Return the STIL text of a scan netlist."""
    program = given.program()
    work = _Writer(given, program)
    return render(
        "stil.jinja",
        design=given.description.design,
        title=_AWAY.sub("?", given.description.design),
        date=given.date,
        signals=work.signals(),
        groups=work.groups(),
        chains=[_chain(chain) for chain in given.description.chains],
        period=as_ns(given.timing.period),
        waveforms=work.waveforms(),
        rest=work.rest(),
        setup=work.vectors(program.setup),
        before_shift=work.vectors(program.before_shift),
        shift=work.vectors(program.shift),
        captures=work.captures(),
        calls=work.calls(given.all_patterns(program)),
    )


def _chain(chain: Chain) -> dict[str, object]:
    cells: list[str] = []
    for cell in chain.cells:
        cells += ["!"] if cell.inverted else []
        names = [cell.instance]
        if cell.bits > 1:
            names = [f"{cell.instance} [{number}]" for number in range(cell.bits)]
        cells += map(quoted, names)
    cells += ["!"] if chain.inverted_out else []
    masters, slaves = scan_clocks(chain)
    return {
        "name": quoted(chain.name),
        "length": chain.length,
        "scan_in": quoted(chain.scan_in),
        "scan_out": quoted(chain.scan_out),
        "inversion": parity(chain),
        "masters": " ".join(map(quoted, masters)),
        "slaves": " ".join(map(quoted, slaves)),
        "cells": cells,
    }


def scan_clocks(chain: Chain) -> tuple[tuple[str, ...], tuple[str, ...]]:
    """Return the ports that clock masters and slaves while a chain shifts."""
    if chain.style == "lssd":
        return chain.clocks[:1], chain.clocks[1:]
    return chain.clocks, ()


class _Writer:
    def __init__(self, given: ExportInput, program: Program) -> None:
        self.program = program
        self.chains = given.description.chains
        self.timing: Timing = given.timing
        self.scan_ins = tuple(chain.scan_in for chain in self.chains)
        self.scan_outs = tuple(chain.scan_out for chain in self.chains)
        self.shared = any(port in program.free for port in self.scan_ins)
        self.free = tuple(port for port in program.free if port not in self.scan_ins)
        apart = {*self.free, *self.scan_ins}
        self.controls = tuple(port for port in program.inputs if port not in apart)

    def signals(self) -> list[str]:
        """Return the declarations, inputs first."""
        longest = {chain.scan_in: chain.length for chain in self.chains}
        ends = {chain.scan_out: chain.length for chain in self.chains}
        found = [
            f"{quoted(name)} In" + (f" {{ ScanIn {longest[name]}; }}" if name in longest else ";")
            for name in self.program.inputs
        ]
        found += [
            f"{quoted(name)} Out" + (f" {{ ScanOut {ends[name]}; }}" if name in ends else ";")
            for name in self.program.outputs
        ]
        return found + [f"{quoted(name)} InOut;" for name in self.program.inouts]

    def groups(self) -> list[tuple[str, str]]:
        """Return the groups that have members, with their sums."""
        every = {
            "all_inputs": self.program.inputs,
            "all_outputs": self.program.outputs,
            "scan_inputs": self.scan_ins,
            "scan_outputs": self.scan_outs,
            "free_inputs": self.free,
            "controls": self.controls,
            "bidirectional": self.program.inouts,
        }
        return [(name, " + ".join(map(quoted, ports))) for name, ports in every.items() if ports]

    def waveforms(self) -> list[str]:
        """Return what each waveform character does, from the timing table."""
        force, strobe = as_ns(self.timing.force), as_ns(self.timing.strobe)
        found = [
            f"\"all_inputs\" {{ 01 {{ '{force}ns' D/U; }} }}",
            f"\"all_outputs\" {{ LHX {{ '0ns' X; '{strobe}ns' L/H/X; }} }}",
        ]
        for port, off in self.program.off.items():
            idle, on = "UD" if off else "DU"
            for letter, (start, end) in zip(PHASES, self.timing.phases, strict=False):
                edges = f"'0ns' {idle}; '{as_ns(start)}ns' {on}; '{as_ns(end)}ns' {idle};"
                found.append(f"{quoted(port)} {{ {letter} {{ {edges} }} }}")
        if self.program.inouts:
            found.append("\"bidirectional\" { Z { '0ns' Z; } }")
        return found

    def rest(self) -> str:
        """Return the condition that every procedure starts from."""
        levels = self.program.setup[-1].levels
        ins = "".join(levels[p] if levels[p] in "01" else "0" for p in self.program.inputs)
        parts = [f'"all_inputs" = {ins};', f'"all_outputs" = {"X" * len(self.program.outputs)};']
        if self.program.inouts:
            parts.append(f'"bidirectional" = {"Z" * len(self.program.inouts)};')
        return " ".join(parts)

    def vectors(self, frames: Sequence[Frame], *, compare: bool = True) -> list[str]:
        """Return one V statement a frame."""
        found: list[str] = []
        given = False
        for frame in frames:
            parts = [f'"controls" = {self._controls(frame)};'] if self.controls else []
            parts += self._data(frame, given=given)
            parts += self._compared(frame, compare=compare)
            given = given or FREE in frame.levels.values()
            found.append(f"V {{ {' '.join(parts)} }}")
        return found

    def _controls(self, frame: Frame) -> str:
        phase_of = {port: i for i, phase in enumerate(frame.pulses) for port in phase}
        return "".join(
            PHASES[phase_of[port]] if port in phase_of else frame.levels[port]
            for port in self.controls
        )

    def _data(self, frame: Frame, *, given: bool) -> list[str]:
        levels = frame.levels
        parts = []
        free = [levels[port] == FREE for port in self.free]
        if self.free and not (given and all(free)):
            parts.append(f'"free_inputs" = {("#" if all(free) else "0") * len(free)};')
        moves = levels[self.scan_ins[0]] == SCAN
        asked = self.shared and not given and FREE in levels.values()
        letter = "#" if moves or asked else "0"
        if moves or not (self.shared and given):
            parts.append(f'"scan_inputs" = {letter * len(self.scan_ins)};')
        return parts

    def _compared(self, frame: Frame, *, compare: bool) -> list[str]:
        if frame.measure:
            return [f'"all_outputs" = {"#" * len(self.program.outputs)};']
        if frame.scan and compare:
            return [f'"scan_outputs" = {"#" * len(self.scan_outs)};']
        return [f'"all_outputs" = {"X" * len(self.program.outputs)};']

    def captures(self) -> list[_Procedure]:
        """Return a procedure for each capture sequence, and one for each clock alone."""
        found = [
            _Procedure(
                quoted(name),
                tuple(_AWAY.sub("?", frame.why) for frame in frames),
                tuple(self.vectors(frames, compare=False)),
            )
            for name, frames in self.program.captures.items()
        ]
        for frame in self.program.captures.get("capture", ())[:1]:
            for port in dict.fromkeys(port for phase in frame.pulses for port in phase):
                alone = Frame(frame.levels, _only(frame, port), False, True, False, "")
                vectors = tuple(self.vectors([alone], compare=False))
                notes = (_AWAY.sub("?", f"capture by {port} alone"),)
                found.append(_Procedure(quoted(f"capture_by_{port}"), notes, vectors))
        return found

    def calls(self, patterns: Sequence[Pattern]) -> list[str]:
        """Return the calls that load, capture and unload every pattern."""
        found: list[str] = []
        unload: tuple[str, ...] = ()
        for number, pattern in enumerate(patterns):
            loads = [
                load[: chain.length] for chain, load in zip(self.chains, pattern.load, strict=True)
            ]
            found.append(f'"pattern_{number}": {self._shift(loads, unload)}')
            if pattern.sequence:
                found.append(self._capture(pattern))
            unload = pattern.unload
        zeros = ["0" * chain.length for chain in self.chains]
        return [*found, f'"last_unload": {self._shift(zeros, unload)}'] if unload else found

    def _shift(self, loads: Sequence[str], unloads: Sequence[str]) -> str:
        parts = [
            f"{quoted(port)} = {load};" for port, load in zip(self.scan_ins, loads, strict=True)
        ]
        # The first load compares nothing, and says so: readers need not guess a default.
        shown = unloads or ["X" * chain.length for chain in self.chains]
        parts += [
            f"{quoted(port)} = {row};" for port, row in zip(self.scan_outs, shown, strict=True)
        ]
        inner = "\n    ".join(parts)
        return f'Call "shift_load_unload" {{\n    {inner} }}'

    def _capture(self, pattern: Pattern) -> str:
        extra = leading_scans(self.program.captures[pattern.sequence])
        free = dict(zip(self.program.free, pattern.inputs, strict=True))
        parts = []
        if self.free:
            parts.append(f'"free_inputs" = {"".join(free[port] for port in self.free)};')
        rows = [
            load[chain.length :][:extra]
            for chain, load in zip(self.chains, pattern.load, strict=True)
        ]
        if self.shared:
            rows = [row + free.get(at, "0") for row, at in zip(rows, self.scan_ins, strict=True)]
        parts += _arguments("scan_inputs", self.scan_ins, rows)
        seen = ["".join(letters) for letters in zip(*pattern.measured, strict=True)]
        parts += _arguments("all_outputs", self.program.outputs, seen)
        inner = "\n    ".join(parts)
        return f"Call {quoted(pattern.sequence)} {{\n    {inner} }}"


def _arguments(group: str, ports: Sequence[str], rows: Sequence[str]) -> list[str]:
    """Return the data of a group: at once for one cycle, port by port for several."""
    if not rows or not rows[0]:
        return []
    if len(rows[0]) == 1:
        return [f'"{group}" = {"".join(rows)};']
    return [f"{quoted(port)} = {row};" for port, row in zip(ports, rows, strict=True)]


def _only(frame: Frame, port: str) -> tuple[tuple[str, ...], ...]:
    """Return the phases of a frame with one port left; it keeps its place in time."""
    return tuple((port,) if port in phase else () for phase in frame.pulses)
