"""SDC: what timing analysis holds constant, and the clocks, in each mode of a scan netlist.

Mission mode is the user's own file and three lines of ours that take test away. Shift and capture
mode define the tester's clocks with the edges of the timing table. Commands as remembered from the
open, Tcl-based format; names are quoted so that Tcl substitutes nothing.
"""

import re
from collections.abc import Iterator, Mapping, Sequence
from typing import Final

from insertdft.exports.frames import FREE, Frame, Program
from insertdft.exports.inputs import ExportInput
from insertdft.exports.timing import Timing, as_ns

_SPECIAL: Final = re.compile(r'[\\\[\]{}"$; ]')


def tcl_word(name: str) -> str:
    """Return a name as one Tcl word that nothing is substituted in."""
    return _SPECIAL.sub(lambda found: "\\" + found[0], name) if _SPECIAL.search(name) else name


def ports(names: Sequence[str]) -> str:
    """Return the expression that looks ports up."""
    return f"[get_ports [list {' '.join(map(tcl_word, names))}]]"


def to_sdc(given: ExportInput) -> Mapping[str, str]:
    """Return the text of each mode: ``mission``, ``shift`` and ``capture``."""
    program = given.program()
    found = {"mission": _text("mission", _mission(given))}
    found["shift"] = _text("shift", _tester(given, program, program.shift))
    capture = program.captures.get("capture", ())
    if capture:
        found["capture"] = _text("capture", _tester(given, program, capture))
    return found


def _text(mode: str, lines: Iterator[str]) -> str:
    return "\n".join([f"# {mode} mode, times in ns", *lines, ""])


def _mission(given: ExportInput) -> Iterator[str]:
    held = [at for at in given.description.ports if at.mission is not None]
    held += [
        at
        for at in given.description.ports
        if at.mission is None and at.added and (at.off is not None or at.role == "scan_enable")
    ]
    for at in held:
        value = at.mission if at.mission is not None else at.off or 0
        yield f"set_case_analysis {value} {ports([at.port])}"
    data = [
        at.port for at in given.description.ports if at.role in ("scan_in", "scan_out") and at.added
    ]
    starts = [at.port for at in given.description.ports if at.role == "scan_in" and at.added]
    ends = [port for port in data if port not in starts]
    if starts:
        yield f"set_false_path -from {ports(starts)}"
    if ends:
        yield f"set_false_path -to {ports(ends)}"


def _tester(given: ExportInput, program: Program, frames: Sequence[Frame]) -> Iterator[str]:
    timing = given.timing
    pulsed = [
        (port, edges)
        for frame in frames
        for phase, edges in zip(frame.pulses, timing.phases, strict=False)
        for port in phase
    ]
    defined = dict(pulsed)
    for port, (start, end) in defined.items():
        # A clock at rest at 1 falls first: its rising edge is the trailing one.
        edges = (end, timing.period + start) if program.off[port] else (start, end)
        yield (
            f"create_clock -name {tcl_word('test_' + port)} -period {as_ns(timing.period)}"
            f" -waveform {{{as_ns(edges[0])} {as_ns(edges[1])}}} {ports([port])}"
        )
    levels = frames[0].levels
    for port, off in program.off.items():
        if port not in defined:
            yield f"set_case_analysis {off} {ports([port])}"
    fixed = {at.port for at in given.description.ports if at.role != "scan_in"}
    for port in program.inputs:
        if port in fixed and port not in program.off and levels[port] in "01":
            yield f"set_case_analysis {levels[port]} {ports([port])}"
    yield from _delays(given, program, frames, tcl_word("test_" + next(iter(defined), "")), timing)


def _delays(
    given: ExportInput, program: Program, frames: Sequence[Frame], clock: str, timing: Timing
) -> Iterator[str]:
    moving = [port for port, level in frames[0].levels.items() if level == FREE]
    if frames[0].scan:
        moving = [chain.scan_in for chain in given.description.chains]
    seen = list(program.outputs) if frames[0].measure else []
    if frames[0].scan:
        seen = [chain.scan_out for chain in given.description.chains]
    if moving:
        yield f"set_input_delay {as_ns(timing.force)} -clock {clock} {ports(moving)}"
    if seen:
        late = as_ns(timing.period - timing.strobe)
        yield f"set_output_delay {late} -clock {clock} {ports(seen)}"
