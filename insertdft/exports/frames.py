"""The clock sequences as whole tester cycles: what every input does, not only what changes.

The formats, the test bench and the expected values are all made from these frames, so they cannot
differ in what they ask of the tester. While chains shift, free inputs are at 0; during a capture
sequence they keep the pattern's values.
"""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Final

from insertdft.description import Cycle, Description
from insertdft.design.flat import TopPort
from insertdft.diagnostics import DesignError, Diagnostic, error

FREE: Final = "free"
SCAN: Final = "scan"
#: Sequences that are no capture.
_NO_CAPTURE: Final = ("setup", "shift", "unload_start")
_FIXED_ROLES: Final = ("scan_enable", "test_mode", "set_reset")
_CLOCK_ROLES: Final = ("clock", "scan_clock", "clock_a", "clock_b", "clock_c")


@dataclass(frozen=True, slots=True)
class Frame:
    """One tester cycle.

    Attributes:
        levels: What each input has before the clocks pulse: ``0``, ``1``, ``free`` (the pattern's
            value) or ``scan`` (the chain's next bit).
        pulses: Phases in time order.
        scan: Whether scan data moves and is compared.
        measure: Whether all outputs are compared.
        at_speed: See ``Cycle``.
        why: A few words.
    """

    levels: Mapping[str, str]
    pulses: tuple[tuple[str, ...], ...]
    scan: bool
    measure: bool
    at_speed: bool
    why: str


@dataclass(frozen=True, slots=True)
class Program:
    """What a tester does with one netlist.

    Attributes:
        inputs: Input port bits in port order.
        outputs: Output port bits in port order.
        inouts: Bidirectional port bits; never driven, never compared.
        free: Inputs that a pattern gives values to.
        off: Value at rest of each clock port.
        setup: Once, first.
        before_shift: Ahead of each load and unload; at least one frame.
        shift: One bit along every chain.
        captures: Sequences between load and unload, by name.
        length: Shifts of one load.
    """

    inputs: tuple[str, ...]
    outputs: tuple[str, ...]
    inouts: tuple[str, ...]
    free: tuple[str, ...]
    off: Mapping[str, int]
    setup: tuple[Frame, ...]
    before_shift: tuple[Frame, ...]
    shift: tuple[Frame, ...]
    captures: Mapping[str, tuple[Frame, ...]] = field(default_factory=dict)
    length: int = 0


def make_program(description: Description, ports: Sequence[TopPort]) -> Program:
    """Return the frames of a description on the ports of its netlist.

    Raises:
        DesignError: The description names ports that the netlist lacks, or no way to shift.
    """
    inputs = tuple(port.name for port in ports if port.direction == "input")
    outputs = tuple(port.name for port in ports if port.direction == "output")
    problems = [*_missing(description, inputs, outputs), *_no_shift(description)]
    if problems:
        raise DesignError(problems)
    work = _Work(description, inputs)
    sequences = description.sequences
    shift = work.frames(sequences["shift"])
    before = sequences.get("unload_start", ())
    quiet = Cycle(force=sequences["shift"][0].force, why="ready to shift")
    return Program(
        inputs=inputs,
        outputs=outputs,
        inouts=tuple(port.name for port in ports if port.direction == "inout"),
        free=work.free,
        off=work.off,
        setup=work.frames(sequences.get("setup", ()) or (Cycle(why="at rest"),)),
        before_shift=work.frames(before or (quiet,)),
        shift=shift,
        captures={
            name: work.frames(cycles)
            for name, cycles in sequences.items()
            if name not in _NO_CAPTURE and cycles
        },
        length=max(chain.length for chain in description.chains),
    )


def leading_scans(frames: Sequence[Frame]) -> int:
    """Return how many frames at the start of a capture sequence still shift."""
    count = 0
    while count < len(frames) and frames[count].scan:
        count += 1
    return count


class _Work:
    def __init__(self, description: Description, inputs: tuple[str, ...]) -> None:
        self.inputs = inputs
        self.scan_ins = tuple(chain.scan_in for chain in description.chains)
        self.off = {at.port: at.off or 0 for at in description.ports if at.role in _CLOCK_ROLES}
        for port in _pulsed(description):
            self.off.setdefault(port, 0)
        taken = {at.port for at in description.ports if at.role in _FIXED_ROLES or at.added}
        taken.update(self.off)
        # A scan-in pin shared with a mission input stays free during capture.
        self.free = tuple(name for name in inputs if name not in taken)
        self.base = dict.fromkeys(inputs, "0")
        self.base |= {port: str(value) for port, value in self.off.items()}
        for cycle in description.sequences.get("setup", ()):
            self.base |= {port: str(value) for port, value in cycle.force}

    def frames(self, cycles: Sequence[Cycle]) -> tuple[Frame, ...]:
        """Return the cycles with every input's level written out."""
        levels, found = dict(self.base), []
        for cycle in cycles:
            levels |= {port: str(value) for port, value in cycle.force}
            if cycle.inputs:
                levels |= dict.fromkeys(self.free, FREE)
            shown = dict(levels)
            if cycle.scan:
                shown |= dict.fromkeys(self.scan_ins, SCAN)
            found.append(
                Frame(shown, cycle.pulses, cycle.scan, cycle.measure, cycle.at_speed, cycle.why)
            )
        return tuple(found)


def _pulsed(description: Description) -> Iterable[str]:
    for cycles in description.sequences.values():
        for cycle in cycles:
            for phase in cycle.pulses:
                yield from phase


def _missing(
    description: Description, inputs: Sequence[str], outputs: Sequence[str]
) -> list[Diagnostic]:
    forced = [port for row in description.sequences.values() for at in row for port, _ in at.force]
    wanted = [chain.scan_in for chain in description.chains] + [*_pulsed(description), *forced]
    lost = [(name, "an input") for name in dict.fromkeys(wanted) if name not in inputs]
    ends = dict.fromkeys(chain.scan_out for chain in description.chains)
    lost += [(name, "an output") for name in ends if name not in outputs]
    return [
        error(
            "export-mismatch",
            f"`{name}` is {kind} in the chain description but not in the netlist",
            hint="give the netlist that the conversion wrote, with its own chains.json",
        )
        for name, kind in lost
    ]


def _no_shift(description: Description) -> list[Diagnostic]:
    if description.chains and description.sequences.get("shift"):
        return []
    what = "a sequence that shifts" if description.chains else "a chain"
    return [
        error(
            "export-mismatch",
            f"the chain description has not got {what}",
            hint="a description found by `insertdft trace` lacks sequences; use that of convert",
        )
    ]
