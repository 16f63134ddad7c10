"""Capture mode: each converted cell takes what the original takes, and its clock reaches it.

With ports at their capture values the data of the cells in chains are those of the original, and
no set or reset acts that does not act there. Their clocks may differ (test mode may replace a
divided clock), but the sequence must be able to move each of them, and all must keep their state
while the clocks rest.
"""

from collections.abc import Mapping
from dataclasses import replace

import numpy as np

from insertdft.description import Description
from insertdft.design.flat import Design
from insertdft.proof.aig import FALSE, TRUE, Lits
from insertdft.proof.circuit import evaluate
from insertdft.proof.joint import AFTER, Joint
from insertdft.proof.mission import capture_blocks
from insertdft.proof.obligations import Block
from insertdft.proof.order import Numbers
from insertdft.proof.part import cone_of
from insertdft.proof.result import Count
from insertdft.proof.shift import Shift, shift_values
from insertdft.proof.storage import forms_of, state_name
from insertdft.proof.template import FLIP_FLOP


def capture_obligations(
    joint: Joint, description: Description, mission: Mapping[str, int]
) -> tuple[Shift, Count]:
    """Return what must hold in capture mode, and what mission mode has shown already.

    Args:
        joint: Both netlists.
        description: Of the converted one.
        mission: Values of test ports in mission mode.
    """
    held = _capture_values(joint, description)
    rows = _chain_rows(joint, description)
    clocks = _clocks_arrive(joint, description, rows)
    if all(held.get(port) == value for port, value in mission.items()):
        return clocks, Count(structure=len(rows))
    names = {state_name(joint.after.circuit, joint.after.states, at) for at in rows.tolist()}
    blocks = [_of_chains(block, names) for block in capture_blocks(joint, held)]
    return replace(clocks, blocks=(*blocks, *clocks.blocks)), Count()


def _capture_values(joint: Joint, description: Description) -> dict[str, int]:
    """Return what ports are held at in capture; mission clocks are free, shift clocks rest."""
    moving = {port for cycle in _cycles(description) for phase in cycle for port in phase}
    own = {port.name for port in joint.before.design.ports}
    held = shift_values(description, "capture")
    return {port: value for port, value in held.items() if port not in moving & own}


def _cycles(description: Description) -> list[tuple[tuple[str, ...], ...]]:
    names = [name for name in description.sequences if name.startswith(("capture", "unload_start"))]
    return [cycle.pulses for name in names for cycle in description.sequences[name]]


def _chain_rows(joint: Joint, description: Description) -> Numbers:
    """Return the states of the converted netlist that stand in chains and have a counterpart."""
    design, states = joint.after.design, joint.after.states
    names = {cell.instance for chain in description.chains for cell in chain.cells}
    rows = joint.matching.after
    instances = states.instance[rows].tolist()
    kept = [row for row, at in zip(rows.tolist(), instances, strict=True) if _in(design, at, names)]
    return np.array(kept, np.int64)


def _in(design: Design, instance: int, names: set[str]) -> bool:
    return instance >= 0 and design.name(instance) in names


def _of_chains(block: Block, names: set[str]) -> Block:
    """Return the rows of a block that are about cells of chains, as obligations of capture."""
    rows = [row for row in range(len(block.left)) if block.name(row) in names]
    where = np.array(rows, np.int64)
    return Block(
        "capture",
        block.left[where],
        block.right[where],
        None if block.care is None else block.care[where],
        lambda row: block.name(rows[row]),
        lambda row: f"in capture mode {block.fact(rows[row])}",
    )


def _clocks_arrive(joint: Joint, description: Description, rows: Numbers) -> Shift:
    """Return that no clock at rest moves a cell, and which clocks never come."""
    at_rest = shift_values(description, "capture")
    phases = [phase for cycle in _cycles(description) for phase in cycle]
    if not phases or not len(rows):
        return Shift(())
    rest, kind = _clock_values(joint, at_rest, rows)
    moved = np.zeros(len(rows), np.bool_)
    for phase in dict.fromkeys(phases):
        free = {port: value for port, value in at_rest.items() if port not in phase}
        moved |= _clock_values(joint, free, rows)[0] > TRUE
    circuit, states = joint.after.circuit, joint.after.states
    still = [state_name(circuit, states, at) for at in rows[~moved].tolist()]
    wrong = tuple((name, f"no clock of the capture sequence reaches `{name}`") for name in still)
    levels = np.flatnonzero(kind != FLIP_FLOP)
    places = rows[levels]

    def name(row: int) -> str:
        return state_name(circuit, states, int(places[row]))

    def fact(row: int) -> str:
        return f"latch `{name(row)}` is open while the clocks rest"

    closed = np.full(len(levels), FALSE, np.int32)
    return Shift((Block("clocks at rest", closed, rest[levels], None, name, fact),), wrong)


def _clock_values(joint: Joint, held: Mapping[str, int], rows: Numbers) -> tuple[Lits, Numbers]:
    """Return the clocks of states, and their kinds; only what leads to clocks is worked out."""
    circuit = joint.after.circuit
    roots = [circuit.elements.clock, *(block.inputs.ravel() for block in circuit.tables)]
    order, bounds = cone_of(circuit, np.concatenate(roots))
    values = joint.start(AFTER, held)
    evaluate(circuit, joint.aig, values, order, bounds)
    forms = forms_of(circuit, joint.aig, values)
    return forms.clock[rows], forms.kind[rows]
