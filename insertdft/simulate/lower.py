"""Design -> ``Circuit``: every cell's functions laid down, cell type by cell type."""

from collections.abc import Collection, Mapping
from types import MappingProxyType
from typing import Final

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.expression import variables
from insertdft.netlist import CONST0, CONST1, FIRST_NET, Ids
from insertdft.simulate.buses import bus_nets, join_buses
from insertdft.simulate.circuit import Circuit, States
from insertdft.simulate.draft import Draft, Sorted
from insertdft.simulate.lower_cells import lower_cell
from insertdft.simulate.lowering import Lowering, Pulse, storages
from insertdft.simulate.pin_rows import pins_by_cell
from insertdft.simulate.words import Flags

_NONE: Final[Mapping[str, int]] = MappingProxyType({})


def make_circuit(
    design: Design,
    *,
    clocks: bool = False,
    transparent: Collection[int] = (),
    pulsed: Mapping[str, int] = _NONE,
) -> Circuit:
    """Return the functions of ``design`` in order of evaluation.

    Args:
        design: The flat design.
        clocks: Also lay down clock, set and reset functions of the states, for simulation cycle
            by cycle. Without, a state has one function: what it takes when it is clocked.
        transparent: Latches (instances) that are always open: wires instead of states.
        pulsed: Clock port bits and their off values, without ``clocks``: all of them pulse
            together, and a state whose clock a gate holds back keeps its value. Every state takes
            what stood before the pulse, also one that acts on its second edge. Clocks that come
            from elsewhere are taken to arrive.

    Raises:
        KeyError: ``pulsed`` names no input port bit.
        ValueError: Both ``clocks`` and ``pulsed`` are asked for.
    """
    if clocks and pulsed:
        raise ValueError("clocks and pulsed exclude each other")
    circuit = _make(design, clocks, transparent, None, _NONE)
    if not pulsed:
        return circuit
    moving, plain = _pulsed_nets(circuit, pulsed)
    return _make(design, clocks, transparent, (moving, plain), pulsed)


def _make(
    design: Design,
    clocks: bool,
    transparent: Collection[int],
    pulsing: tuple[Flags, Flags] | None,
    at_rest: Mapping[str, int],
) -> Circuit:
    work = Lowering(design, Draft(design.net_count), clocks, bus_nets(design))
    work.open[list(transparent)] = True
    if pulsing is not None:
        work.pulse = _pulse(work, *pulsing, at_rest)
    for pins in pins_by_cell(
        design.cell, design.pin_start, design.pin_name, design.pin_names, len(design.cells)
    ):
        cell = design.cells[pins.cell]
        if cell is None:
            work.unmodelled.append(pins.instances)
        else:
            lower_cell(work, cell, pins)
    join_buses(work)
    return _finished(work, at_rest)


def _pulse(work: Lowering, moving: Flags, plain: Flags, at_rest: Mapping[str, int]) -> Pulse:
    during = np.arange(work.design.net_count, dtype=np.int64)
    during[moving] = work.draft.fresh(int(moving.sum()))
    for name, off in at_rest.items():
        during[work.design.port_nets[name]] = int(CONST0 if off else CONST1)
    return Pulse(moving, plain, during)


def _pulsed_nets(circuit: Circuit, pulsed: Mapping[str, int]) -> tuple[Flags, Flags]:
    """Return the nets from clock ports to clock pins, and those of them that always pulse."""
    reached = np.zeros(circuit.slots, np.bool_)
    reached[[circuit.inputs[name] for name in pulsed]] = True
    plain = reached.copy()
    plain[[CONST0, CONST1]] = True
    for group in circuit.groups:
        reached[group.first : group.end] = reached[group.inputs].any(axis=0)
        plain[group.first : group.end] = plain[group.inputs].all(axis=0)
    clocks = np.zeros(circuit.slots, np.bool_)
    clocks[circuit.slot_of_net[clock_nets(circuit.design)]] = True
    moving = (reached & leads_to(circuit, clocks))[circuit.slot_of_net]
    moving[:FIRST_NET] = False
    return moving, plain[circuit.slot_of_net] & moving


def leads_to(circuit: Circuit, ends: Flags) -> Flags:
    """Return the slots from which one of ``ends`` is reached, themselves included."""
    found = ends.copy()
    for group in reversed(circuit.groups):
        leading = found[group.first : group.end]
        for slots in group.inputs:
            found[slots[leading]] = True
    return found


def clock_nets(design: Design) -> Ids:
    """Return the nets at clock pins of storage cells, ascending."""
    found = np.zeros(design.net_count, np.bool_)
    for pins in pins_by_cell(
        design.cell, design.pin_start, design.pin_name, design.pin_names, len(design.cells)
    ):
        cell = design.cells[pins.cell]
        names = {
            name
            for storage in (storages(cell) if cell else ())
            for name in (variables(storage.clock) if storage.clock is not None else ())
        }
        for name in sorted(names & pins.rows.keys()):
            rows = pins.rows[name]
            nets = design.pin_net[rows[rows >= 0]]
            found[nets[nets >= FIRST_NET]] = True
    return np.flatnonzero(found).astype(np.int32)


def _finished(work: Lowering, at_rest: Mapping[str, int]) -> Circuit:
    design, result = work.design, work.draft.sort()
    place = result.place
    slot_of_net = place[: design.net_count].copy()
    outer = {net: int(place[slot]) for net, slot in work.outer.items()}
    unmodelled = np.unique(np.concatenate([np.zeros(0, np.int64), *work.unmodelled]))
    return Circuit(
        design=design,
        slots=result.slots,
        first_node=result.first_node,
        slot_of_net=slot_of_net,
        functions=tuple(work.draft.functions),
        groups=result.groups,
        level=result.level,
        node_instance=result.node_instance,
        node_row=result.node_row,
        edge_slot=result.edge_slot,
        edge_node=result.edge_node,
        edge_row=result.edge_row,
        states=_states(work, place),
        unknown=_unknown(work, result),
        inputs={
            port.name: outer.get(port.net, int(slot_of_net[port.net]))
            for port in design.ports
            if port.direction != "output"
        },
        outputs={
            port.name: int(slot_of_net[port.net])
            for port in design.ports
            if port.direction != "input"
        },
        at_rest=dict(at_rest),
        loops=result.loops,
        unmodelled=tuple(unmodelled.tolist()),
    )


def _states(work: Lowering, place: Ids) -> States:
    def column(name: str) -> Ids:
        parts = [row[name] for row in work.states]
        return np.concatenate([np.zeros(0, np.int64), *parts]).astype(np.int32)

    def slots(name: str) -> Ids:
        drafted = column(name)
        return np.where(drafted >= 0, place[drafted], -1).astype(np.int32)

    return States(
        instance=column("instance"),
        storage=column("storage"),
        latch=column("latch"),
        slot=slots("slot"),
        following=slots("following"),
        clock=slots("clock"),
        to_zero=slots("to_zero"),
        to_one=slots("to_one"),
    )


def _unknown(work: Lowering, result: Sorted) -> Ids:
    """Return the sources that are neither constant, port nor state."""
    given = np.zeros(result.slots, np.bool_)
    given[result.first_node :] = True
    given[[CONST0, CONST1]] = True
    ports = [result.place[net] for net in sorted(work.design.input_ports)]
    ports += [result.place[slot] for slot in work.outer.values()]
    given[ports] = True
    for row in work.states:
        given[result.place[row["slot"]]] = True
    return np.flatnonzero(~given).astype(np.int32)
