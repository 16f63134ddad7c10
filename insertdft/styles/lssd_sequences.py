"""Clock sequences of level-sensitive scan in all its forms, as data.

What pulses, and why, follows from the shift-register latch: A loads L1 from the scan-in pin, C
loads L1 with the response, B copies L1 into L2. The reasons are told in ``docs/styles.md``.

====================  ============  ==========================  =======================
form                  system reads  response sits in            so unloading begins
====================  ============  ==========================  =======================
double latch          L2            L1                          with B
single latch          L1            L1                          with B
L1/L2*                both          L1 (by C) or L2 (by C2)     with B, or at once
====================  ============  ==========================  =======================

Sources: E. B. Eichelberger, T. W. Williams, DAC 1977; for L1/L2* S. DasGupta, P. Goel, R. G.
Walther, T. W. Williams, ITC 1982 (from memory).
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from enum import Enum
from itertools import combinations, product

from insertdft.description import Cycle
from insertdft.styles.sequences import Clocking, Phases, make_sequences


class Form(Enum):
    """Which latches of the design are system latches."""

    DOUBLE = "double-latch"
    SINGLE = "single-latch"
    STAR = "l1-l2-star"


@dataclass(frozen=True, slots=True)
class LssdClocks:
    """The clock ports of one design.

    Attributes:
        a: Ports that shift into L1.
        b: Ports that copy L1 into L2.
        c: System clocks of L1, in the order in which they capture; the phases of a single-latch
            design.
        c_2: System clocks of L2 in the L1/L2* form.
        held: Ports that keep sets and resets off and the test mode on, with their values.
    """

    a: tuple[str, ...]
    b: tuple[str, ...]
    c: tuple[str, ...]
    c_2: tuple[str, ...] = ()
    held: Mapping[str, int] = field(default_factory=dict)


def lssd_sequences(form: Form, clocks: LssdClocks) -> dict[str, tuple[Cycle, ...]]:
    """Return the sequences of one form by name, see ``Description.sequences``.

    Beside the usual names, a form in which either kind of latch can launch has
    ``launch_on_capture_2``, ...: the same with another phase in the lead; L1/L2* has ``capture_l2``
    (the response of L2, which one unload cannot show together with that of L1) and
    ``launch_on_shift_2``.
    """
    match form:
        case Form.DOUBLE:
            return make_sequences(
                Clocking(
                    held=clocks.held,
                    shift=(clocks.a, clocks.b),
                    capture=in_turn(clocks.c),
                    settle=(clocks.b,),
                )
            )
        case Form.SINGLE:
            return _single(clocks)
        case Form.STAR:
            return _star(clocks)


def in_turn(ports: Sequence[str]) -> Phases:
    """Return phases in which the ports pulse one after the other."""
    return tuple((port,) for port in ports)


def exclusive(form: Form, clocks: LssdClocks) -> tuple[tuple[str, str], ...]:
    """Return the pairs of clock ports that must never be on together.

    A and C load the same latch from two sides. A and B, and C and B where L2 is read, would let
    data race through both latches. System clocks of a single-latch or L1/L2* design open latches
    that feed each other.
    """
    pairs = [*product(clocks.a, clocks.c), *product(clocks.a, clocks.b)]
    if form is not Form.SINGLE:
        pairs += product(clocks.c, clocks.b)
    if form is Form.SINGLE:
        pairs += combinations(clocks.c, 2)
    pairs += [*product(clocks.c, clocks.c_2), *product(clocks.b, clocks.c_2)]
    pairs += product(clocks.a, clocks.c_2)
    return tuple(dict.fromkeys(pairs))


def _common(clocks: LssdClocks) -> dict[str, tuple[Cycle, ...]]:
    return {
        "setup": (Cycle(force=tuple(clocks.held.items()), why="sets and resets off"),),
        "shift": (
            Cycle(scan=True, pulses=(clocks.a, clocks.b), why="A moves into L1, B on into L2"),
        ),
    }


def _single(clocks: LssdClocks) -> dict[str, tuple[Cycle, ...]]:
    """Let the phases of the design take turns: C1 launches, C2 captures, and the other way."""
    found = _common(clocks)
    capture = in_turn(clocks.c)
    found["capture"] = (
        Cycle(inputs=True, measure=True, pulses=capture, why="each phase captures into L1"),
    )
    found["unload_start"] = (Cycle(pulses=(clocks.b,), why="B copies the response into L2"),)
    for number, launching in enumerate(clocks.c if len(clocks.c) > 1 else ()):
        others = clocks.c[number + 1 :] + clocks.c[:number]
        name = "launch_on_capture" + (f"_{number + 1}" if number else "")
        found[name] = (
            Cycle(inputs=True, pulses=((launching,),), why=f"{launching} launches"),
            Cycle(
                measure=True,
                pulses=in_turn(others),
                at_speed=True,
                why=f"{others[0]} captures at speed",
            ),
        )
    found["launch_on_shift"] = (
        Cycle(
            scan=True,
            inputs=True,
            pulses=(clocks.a,),
            why="one more A launches: L1 takes its neighbour's L2",
        ),
        Cycle(measure=True, pulses=capture, at_speed=True, why="capture at speed"),
    )
    return found


def _star(clocks: LssdClocks) -> dict[str, tuple[Cycle, ...]]:
    """L1 and L2 are both system latches: one unload shows one of them, B decides which."""
    found = _common(clocks)
    first, second, settle = in_turn(clocks.c), in_turn(clocks.c_2), (clocks.b,)
    lead = "/".join(clocks.c)
    follow = "/".join(clocks.c_2)
    found["capture"] = (
        Cycle(
            inputs=True,
            measure=True,
            pulses=(*first, *settle),
            why=f"{lead} captures into L1, B carries it into L2",
        ),
    )
    found["capture_l2"] = (
        Cycle(inputs=True, measure=True, pulses=second, why=f"{follow} captures into L2"),
    )
    found["launch_on_capture"] = (
        Cycle(inputs=True, pulses=first, why=f"{lead} launches out of L1"),
        Cycle(measure=True, pulses=second, at_speed=True, why=f"{follow} captures at speed"),
    )
    found["launch_on_capture_2"] = (
        Cycle(inputs=True, pulses=second, why=f"{follow} launches out of L2"),
        Cycle(
            measure=True,
            pulses=(*first, *settle),
            at_speed=True,
            why=f"{lead} captures at speed, B carries it into L2",
        ),
    )
    found["launch_on_shift"] = (
        Cycle(scan=True, inputs=True, pulses=(clocks.a,), why="one more A launches out of L1"),
        Cycle(measure=True, pulses=second, at_speed=True, why=f"{follow} captures at speed"),
    )
    found["launch_on_shift_2"] = (
        Cycle(
            scan=True,
            inputs=True,
            pulses=(clocks.a, clocks.b),
            why="one more shift, whose B launches out of L2",
        ),
        Cycle(
            measure=True,
            pulses=(*first, *settle),
            at_speed=True,
            why=f"{lead} captures at speed, B carries it into L2",
        ),
    )
    return found
