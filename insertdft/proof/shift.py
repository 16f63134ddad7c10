"""The chain proof: in shift mode every chain moves by exactly one position a cycle.

All inputs that are not held, all scan-ins and all states are variables; one shift cycle of the
clock sequence is simulated symbolically, and what each position holds afterwards must be what the
position before it held, inverted where the description says so. As everything is a variable, this
is so for every content of the chains and whatever the rest of the design does. Ports that pulse
together are moved one after the other, in both orders, so that a bit that skew could lose is lost.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.description import Chain, ChainCell, Description
from insertdft.design.flat import Design
from insertdft.netlist import FIRST_NET, OPEN
from insertdft.netlist.names import join_path
from insertdft.proof.aig import TRUE, Lits
from insertdft.proof.circuit import at
from insertdft.proof.joint import AFTER, Joint
from insertdft.proof.lay import PORT
from insertdft.proof.match import Side, shown_at
from insertdft.proof.obligations import Block
from insertdft.proof.part import part_for
from insertdft.proof.phases import Machine, UnsettledError
from insertdft.proof.template import LOOP

BY_LOOP: Final = -1


@dataclass(frozen=True, slots=True)
class Position:
    """Where a chain position shows its state.

    Attributes:
        net: Flat net, OPEN if the description names none that exists.
        turned: Whether the net shows the inverse of the state; BY_LOOP for a position made of
            gates, whose state is that of the cell it replaced.
        states: Places of the states of its instance.
    """

    net: int
    turned: int
    states: tuple[int, ...]


@dataclass(frozen=True, slots=True, eq=False)
class Shift:
    """Obligations of shift mode.

    Attributes:
        blocks: What must be equal.
        wrong: What is plainly wrong: (subject, sentence).
        reasons: What cannot be told.
    """

    blocks: tuple[Block, ...]
    wrong: tuple[tuple[str, str], ...] = ()
    reasons: tuple[str, ...] = ()


def shift_values(description: Description, name: str) -> dict[str, int]:
    """Return what ports are held at in a sequence (``shift`` or ``capture``), clocks at rest."""
    held = {port.port: port.off for port in description.ports if port.off is not None}
    for port in description.ports:
        value = port.shift if name == "shift" else port.capture
        if value is not None:
            held[port.port] = value
    for step in ("setup", name):
        for cycle in description.sequences.get(step, ())[:1]:
            held.update(dict(cycle.force))
    return {port: int(value) for port, value in held.items() if value is not None}


def shift_pulses(description: Description) -> tuple[tuple[str, ...], ...]:
    """Return the phases of one shift cycle."""
    cycles = description.sequences.get("shift", ())
    if cycles:
        return tuple(phase for cycle in cycles for phase in cycle.pulses)
    clocks = dict.fromkeys(clock for chain in description.chains for clock in chain.clocks)
    together = [clock for chain in description.chains for clock in chain.clocks[:1]]
    if any(chain.style == "lssd" for chain in description.chains):
        return tuple((clock,) for clock in clocks)
    return (tuple(dict.fromkeys(together)),)


def shift_obligations(joint: Joint, description: Description) -> Shift:
    """Return what must hold of every chain."""
    side = joint.after
    where = _Finder(side)
    places = {
        chain.name: [where.position(cell) for cell in chain.cells] for chain in description.chains
    }
    lost = [
        cell.slave or cell.instance
        for chain in description.chains
        for cell, place in zip(chain.cells, places[chain.name], strict=True)
        if place.net == OPEN
    ]
    if lost:
        return Shift((), tuple((name, f"`{name}` shows no state to a net") for name in lost))
    bench = _bench(joint, description, places)
    phases = shift_pulses(description)
    blocks: list[Block] = []
    wrong: list[tuple[str, str]] = []
    for number, order in enumerate(_orders(phases)):
        kind = "shift" if number == 0 else "shift, clocks in the other order"
        try:
            run = bench.run(order)
        except UnsettledError:
            subject = description.chains[0].name if description.chains else "shift"
            wrong.append((subject, "latches of a chain are open together: its data races through"))
            continue
        blocks += [
            block
            for chain in description.chains
            for block in _chain_blocks(run, chain, places[chain.name], kind)
        ]
    return Shift(tuple(blocks), tuple(wrong))


def _orders(phases: tuple[tuple[str, ...], ...]) -> list[tuple[tuple[str, ...], ...]]:
    back = tuple(tuple(reversed(phase)) for phase in phases)
    return [phases] if back == phases else [phases, back]


@dataclass(frozen=True, slots=True, eq=False)
class _Run:
    """Values at rest before and after one shift cycle.

    Attributes:
        side: The converted netlist.
        before: Literals of all nodes.
        after: Literals of all nodes.
        rest: Net values, and state values, that do not depend on the cycle: by state place the
            variable it had.
        ports: Variable of each scan-in.
    """

    side: Side
    before: Lits
    after: Lits
    state_of: Mapping[int, int] = field(repr=False)
    ports: Mapping[str, int] = field(repr=False)

    def net(self, values: Lits, net: int) -> int:
        """Return the literal of a net."""
        return int(at(values, self.side.circuit.net[[net]])[0])


@dataclass(frozen=True, slots=True, eq=False)
class _Bench:
    joint: Joint
    description: Description
    held: Mapping[str, int]
    roots: Lits

    def run(self, phases: tuple[tuple[str, ...], ...]) -> _Run:
        """Simulate one shift cycle."""
        joint, circuit = self.joint, self.joint.after.circuit
        clocks = {port for phase in phases for port in phase}
        moving = {port: value for port, value in self.held.items() if port not in clocks}
        values = joint.values(AFTER, moving)
        part = part_for(circuit, values, self.roots)
        for port in clocks:
            if (PORT, port) in circuit.leaves:
                values[circuit.leaves[PORT, port]] = self.held.get(port, 0)
        machine = Machine(circuit, joint.aig, values, part)
        machine.settle()
        before = machine.values.copy()
        for phase in phases:
            for level in (1, 0):
                for port in phase:
                    if (PORT, port) in circuit.leaves:
                        machine.move(port, self.held.get(port, 0) ^ level)
        leaves = joint.after.states.leaf
        state_of = {int(before[leaf]): place for place, leaf in enumerate(leaves.tolist())}
        ports = {
            chain.scan_in: joint.leaves.get((PORT, chain.scan_in), TRUE)
            for chain in self.description.chains
        }
        return _Run(joint.after, before, machine.values, state_of, ports)


def _bench(joint: Joint, description: Description, places: Mapping[str, list[Position]]) -> _Bench:
    circuit = joint.after.circuit
    nets = [place.net for row in places.values() for place in row]
    nets += [joint.after.design.port_nets[chain.scan_out] for chain in description.chains]
    roots = np.unique(circuit.net[np.array(nets, np.int64)])
    return _Bench(joint, description, shift_values(description, "shift"), roots)


def _chain_blocks(run: _Run, chain: Chain, places: list[Position], kind: str) -> list[Block]:
    """Return what one chain must do in one cycle."""
    wanted: list[int] = []
    found: list[int] = []
    held = run.ports[chain.scan_in]
    for cell, place in zip(chain.cells, places, strict=True):
        wanted.append(held ^ int(cell.inverted))
        rest = run.net(run.before, place.net)
        turned = rest & 1 if place.turned == BY_LOOP else place.turned
        value = run.net(run.after, place.net) ^ turned
        for _ in range(cell.bits - 1):
            value = _one_bit_back(run, place, value)
        found.append(value)
        held = rest ^ turned
    out = run.net(run.before, run.side.design.port_nets[chain.scan_out])
    names = [cell.instance for cell in chain.cells]
    sources = [f"scan-in `{chain.scan_in}`", *(f"`{name}`" for name in names)]

    def name(row: int) -> str:
        return names[row]

    def fact(row: int) -> str:
        return (
            f"`{names[row]}`, position {row + 1} of chain `{chain.name}`, does not take what"
            f" {sources[row]} held one shift cycle before"
        )

    def out_name(row: int) -> str:
        del row
        return chain.scan_out

    def out_fact(row: int) -> str:
        del row
        return (
            f"scan-out `{chain.scan_out}` of chain `{chain.name}` does not show its last position"
        )

    last = np.array([held ^ int(chain.inverted_out)], np.int32)
    return [
        Block(kind, np.array(wanted, np.int32), np.array(found, np.int32), None, name, fact),
        Block("scan-out", last, np.array([out], np.int32), None, out_name, out_fact),
    ]


def _one_bit_back(run: _Run, place: Position, value: int) -> int:
    """Return what the bit that ``value`` came from holds after the cycle, if it is of the cell."""
    for turned in (0, 1):
        state = run.state_of.get(value ^ turned)
        if state in place.states and state is not None:
            return int(run.after[run.side.states.leaf[state]]) ^ turned
    return value


class _Finder:
    """Finds the net at which a position shows its state."""

    def __init__(self, side: Side) -> None:
        self._side = side
        design = side.design
        self._states: dict[str, list[int]] = {}
        for place, instance in enumerate(side.states.instance.tolist()):
            if side.states.kind[place] != LOOP:
                self._states.setdefault(design.name(instance), []).append(place)
        self._occurrences = {
            join_path(design.path(number)): number for number in range(1, len(design.occurrences))
        }

    def position(self, cell: ChainCell) -> Position:
        """Return where a position shows its state."""
        name = cell.slave or cell.instance
        states = self._states.get(name, [])
        if states:
            return self._of_cell(cell, states)
        number = self._occurrences.get(name)
        return Position(OPEN, 0, ()) if number is None else self._of_module(cell, number)

    def _of_cell(self, cell: ChainCell, states: list[int]) -> Position:
        side = self._side
        design = side.design
        instance = int(side.states.instance[states[0]])
        net = design.net_at(instance, cell.scan_out)
        library_cell = design.cell_of(instance)
        if library_cell is None:
            return Position(OPEN, 0, ())
        turned = [
            inverted
            for state in states
            for pin, inverted in shown_at(library_cell, int(side.states.state[state]))
            if pin == cell.scan_out
        ]
        own = self._states.get(cell.instance, states)
        return Position(net, turned[0] if turned else 0, tuple(own))

    def _of_module(self, cell: ChainCell, number: int) -> Position:
        """Return the net of a port of a module; whether it is inverted is left to its loop."""
        design = self._side.design
        return Position(_port_net(design, number, cell.scan_out), BY_LOOP, ())


def _port_net(design: Design, occurrence: int, pin: str) -> int:
    place = design.occurrences[occurrence]
    for port in design.netlist.modules[place.module].ports:
        for name, net in zip(port.bit_names(), port.nets, strict=True):
            if name == pin:
                return int(design.net_of[place.net_base + net - FIRST_NET])
    return OPEN
