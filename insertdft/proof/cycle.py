"""Flip-flops that became latches: compared over a whole cycle of the clock.

A rising clock edge is replaced by two clocks, one after the other: the first lets L1 take the data,
the second lets L2 follow. Both sides are simulated from matching states over one cycle; then the
states must match again. The second latch stands for the flip-flop. The first holds anything at the
start, or, where that does not suffice (a gated clock keeps it), the same as the second, which must
then be so again at the end.
"""

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from insertdft.description import Description
from insertdft.proof.aig import Lits
from insertdft.proof.circuit import Circuit
from insertdft.proof.joint import AFTER, BEFORE, Joint
from insertdft.proof.lay import PORT
from insertdft.proof.obligations import Block
from insertdft.proof.part import part_for
from insertdft.proof.phases import Machine, UnsettledError
from insertdft.proof.shift import Shift
from insertdft.proof.storage import state_name


@dataclass(frozen=True, slots=True)
class Clocking:
    """Clocks of the original and what stands for each.

    Attributes:
        phases: Clock port of the original -> ports of the converted netlist, in order.
        rest: Value at rest of every clock port of either side.
    """

    phases: Mapping[str, tuple[str, ...]]
    rest: Mapping[str, int]


def clocking_of(
    joint: Joint, description: Description | None, given: Mapping[str, tuple[str, ...]]
) -> Clocking:
    """Return which ports stand for each clock of the original.

    Without ``given`` a clock that both sides have is followed by every added B clock that mission
    mode leaves free.
    """
    ports = description.ports if description else ()
    rest = {port.port: port.off for port in ports if port.off is not None}
    own = {port.name for port in joint.before.design.ports}
    second = tuple(
        port.port
        for port in ports
        if port.role == "clock_b" and port.added and port.mission is None
    )
    phases = {
        port.port: (port.port, *second)
        for port in ports
        if port.role in ("clock", "clock_c") and port.port in own
    }
    return Clocking({**phases, **given} if second or given else {}, rest)


def cycle_obligations(
    joint: Joint, rows: Lits, clocking: Clocking, held: Mapping[str, int]
) -> Shift:
    """Return what must hold after one cycle of each clock.

    Args:
        joint: Both netlists.
        rows: Rows of the matching to compare.
        clocking: The clocks.
        held: Values of test ports in mission mode.
    """
    if not clocking.phases:
        names = [_name(joint, int(row)) for row in rows[:3].tolist()]
        shown = ", ".join(f"`{name}`" for name in names)
        why = "nothing says which clocks stand for the flip-flop's"
        return Shift((), (), (f"{len(rows)} flip-flops became latches ({shown}), but {why}",))
    blocks: list[Block] = []
    for clock, phases in clocking.phases.items():
        try:
            blocks.append(_one_clock(joint, rows, clocking, held, (clock, phases)))
        except UnsettledError:
            wrong = ((clock, f"a cycle of clock `{clock}` does not come to rest"),)
            return Shift(tuple(blocks), wrong)
    return Shift(tuple(blocks))


def _name(joint: Joint, row: int) -> str:
    before = joint.before
    return state_name(before.circuit, before.states, int(joint.matching.before[row]))


def _one_clock(
    joint: Joint,
    rows: Lits,
    clocking: Clocking,
    held: Mapping[str, int],
    clock: tuple[str, tuple[str, ...]],
) -> Block:
    own, other = joint.matching.before[rows], joint.matching.after[rows]
    roots = (
        joint.before.states.leaf[own],
        joint.after.states.leaf[other],
    )
    one = _cycle(joint, BEFORE, roots[BEFORE], clocking, held, (clock[0],))
    two = _cycle(joint, AFTER, roots[AFTER], clocking, held, clock[1])
    turned = joint.matching.inverted[rows].astype(np.int32)

    def name(row: int) -> str:
        return _name(joint, int(rows[row]))

    def fact(row: int) -> str:
        return f"after a cycle of clock `{clock[0]}`, `{name(row)}` holds something else"

    return Block("clock cycle", one, two ^ turned, None, name, fact)


def _cycle(
    joint: Joint,
    side: int,
    leaves: Lits,
    clocking: Clocking,
    held: Mapping[str, int],
    phases: tuple[str, ...],
) -> Lits:
    """Return what states hold after each port of ``phases`` has pulsed once."""
    circuit: Circuit = (joint.before, joint.after)[side].circuit
    values = joint.values(side, held)
    part = part_for(circuit, values, 2 * leaves)
    for port, rest in clocking.rest.items():
        if (PORT, port) in circuit.leaves:
            values[circuit.leaves[PORT, port]] = rest
    machine = Machine(circuit, joint.aig, values, part)
    machine.settle()
    for port in phases:
        rest = clocking.rest.get(port, 0)
        for level in (1 - rest, rest):
            machine.move(port, level)
    found: Lits = machine.values[leaves]
    return found
