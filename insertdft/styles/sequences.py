"""The clock sequences of all styles, written once.

All styles follow one scheme and differ in which clocks pulse in which phase:

=============  ======================  =========================  =====================
style          one shift               one capture                before unloading
=============  ======================  =========================  =====================
mux-D          the clocks together     each clock in turn         --
clocked scan   the scan clocks         each system clock in turn  --
LSSD           A, then B               each C in turn             B (the response is in L1)
=============  ======================  =========================  =====================

Launch on capture is a whole capture (LSSD: C, then B, whose edge launches) and then the capture
that is timed. Launch on shift is one more shift, whose last phase launches, and then the capture.
Schemes: J. Savir, S. Patil, VTS 1994 (broad-side); J. Savir, ITC 1992 (skewed load), as remembered.
At capture clocks pulse one after the other, so that no cell sees another clock's new data in a
race.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field

from insertdft.description import Cycle

#: Ports that pulse together, one such group after the other.
Phases = tuple[tuple[str, ...], ...]


@dataclass(frozen=True, slots=True)
class Clocking:
    """What the sequences of one design are made from.

    Attributes:
        held: Ports that keep sets and resets off and the test mode on, with their values.
        enable: Scan-enable ports.
        shift: Phases of one shift.
        capture: Phases of one capture.
        settle: Phases that carry a captured response on to where unloading starts.
    """

    held: Mapping[str, int] = field(default_factory=dict)
    enable: tuple[str, ...] = ()
    shift: Phases = ()
    capture: Phases = ()
    settle: Phases = ()


def make_sequences(clocking: Clocking) -> dict[str, tuple[Cycle, ...]]:
    """Return the sequences by name, see ``Description.sequences``."""
    on = tuple((port, 1) for port in clocking.enable)
    off = tuple((port, 0) for port in clocking.enable)
    held = tuple(clocking.held.items())
    shift = Cycle(force=on, scan=True, pulses=clocking.shift, why="one bit along every chain")
    found: dict[str, tuple[Cycle, ...]] = {
        "setup": (Cycle(force=(*held, *off), why="sets and resets off, test mode on"),),
        "shift": (shift,),
        "capture": (
            Cycle(force=off, inputs=True, measure=True, pulses=clocking.capture, why="capture"),
        ),
    }
    if clocking.settle:
        found["unload_start"] = (
            Cycle(force=on, pulses=clocking.settle, why="the response moves on to L2"),
        )
    launch = (*clocking.capture, *clocking.settle)
    found["launch_on_capture"] = (
        Cycle(force=off, inputs=True, pulses=launch, why="the response to the load launches"),
        Cycle(measure=True, pulses=clocking.capture, at_speed=True, why="capture at speed"),
    )
    found["launch_on_shift"] = (
        Cycle(force=on, scan=True, pulses=clocking.shift, why="the last shift launches"),
        Cycle(
            force=off,
            inputs=True,
            measure=True,
            pulses=clocking.capture,
            at_speed=True,
            why="capture at speed; scan enable switches within one cycle",
        ),
    )
    return found
