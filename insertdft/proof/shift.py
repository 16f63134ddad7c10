"""The chain proof: in shift mode every chain moves by exactly one position a cycle.

All inputs that are not held, all scan-ins and all states are variables; one shift cycle of the
clock sequence is simulated symbolically, and what each position holds afterwards must be what the
position before it held, inverted where the description says so. As everything is a variable, this
is so for every content of the chains and whatever the rest of the design does. Ports that pulse
together are moved one after the other, in both orders, so that a bit that skew could lose is lost.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field

import numpy as np

from insertdft.description import Chain, Description
from insertdft.netlist import OPEN
from insertdft.proof.aig import TRUE, Lits
from insertdft.proof.circuit import at
from insertdft.proof.joint import AFTER, Joint
from insertdft.proof.lay import PORT
from insertdft.proof.match import Side
from insertdft.proof.obligations import Block
from insertdft.proof.order import Numbers
from insertdft.proof.part import part_for
from insertdft.proof.phases import Machine, UnsettledError
from insertdft.proof.places import BY_LOOP, ChainPlaces, Position, find_places

#: Ports that pulse together, one such group after the other.
Phases = tuple[tuple[str, ...], ...]


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


def shift_pulses(description: Description) -> Phases:
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
    places = find_places(joint.after, description.chains)
    lost = [
        cell.slave or cell.instance
        for place in places
        for cell, net in zip(place.chain.cells, place.nets.tolist(), strict=True)
        if net == OPEN
    ]
    if lost:
        return Shift((), tuple((name, f"`{name}` shows no state to a net") for name in lost))
    bench = _bench(joint, description, places)
    blocks: list[Block] = []
    wrong: list[tuple[str, str]] = []
    for number, phases in enumerate(_orders(shift_pulses(description))):
        kind = "shift" if number == 0 else "shift, clocks in the other order"
        try:
            run = bench.run(phases)
        except UnsettledError:
            subject = description.chains[0].name
            wrong.append((subject, "latches of a chain are open together: its data races through"))
            continue
        for place in places:
            blocks += [*_moves(run, place, kind), *_in_time(run, place)]
    return Shift(tuple(blocks), tuple(wrong))


def _orders(phases: Phases) -> list[Phases]:
    back = tuple(tuple(reversed(phase)) for phase in phases)
    return [phases] if back == phases else [phases, back]


@dataclass(frozen=True, slots=True, eq=False)
class _Run:
    """Values at rest before, during and after one shift cycle.

    Attributes:
        side: The converted netlist.
        phases: What pulsed.
        before: Literals of all nodes.
        on: The same while the clocks of each phase were on.
        off: The same after each phase.
        state_of: Variable -> place of the state that it was before.
        ports: Variable of each scan-in while it was valid.
        rest: Values of clocks at rest, where they are no 0.
    """

    side: Side
    phases: Phases
    before: Lits
    on: list[Lits] = field(repr=False)
    off: list[Lits] = field(repr=False)
    state_of: Mapping[int, int] = field(repr=False)
    ports: Mapping[str, int] = field(repr=False)
    rest: Mapping[str, int] = field(repr=False)

    def nets(self, values: Lits, nets: Numbers) -> Lits:
        """Return the literals of nets."""
        return at(values, self.side.circuit.net[nets])

    def phase_of(self, port: str) -> int:
        """Return the last phase in which a port pulses, -1 if in none."""
        return max((at for at, phase in enumerate(self.phases) if port in phase), default=-1)


@dataclass(frozen=True, slots=True, eq=False)
class _Bench:
    """One shift cycle, ready to be simulated.

    Attributes:
        joint: Both netlists.
        chains: Of the converted one.
        held: Values of ports, clocks at rest.
        roots: Literals that matter.
    """

    joint: Joint
    chains: Sequence[Chain]
    held: Mapping[str, int]
    roots: Lits

    def run(self, phases: Phases) -> _Run:
        """Simulate one shift cycle.

        Once the first clock of a chain has pulsed, its scan-in becomes another variable: a cell
        that still listens then takes what it must not.
        """
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
        ports = {
            chain.scan_in: int(before[circuit.leaves[PORT, chain.scan_in]])
            for chain in self.chains
            if (PORT, chain.scan_in) in circuit.leaves
        }
        leaves = joint.after.states.leaf.tolist()
        state_of = {int(before[leaf]): place for place, leaf in enumerate(leaves)}
        run = _Run(joint.after, phases, before, [], [], state_of, ports, self.held)
        for phase in phases:
            for level, seen in ((1, run.on), (0, run.off)):
                for port in phase:
                    if (PORT, port) in circuit.leaves:
                        machine.move(port, self.held.get(port, 0) ^ level)
                seen.append(machine.values.copy())
            self._forget(machine, phase)
        return run

    def _forget(self, machine: Machine, phase: tuple[str, ...]) -> None:
        """Let the scan-ins of chains whose first clock has pulsed change."""
        leaves = self.joint.after.circuit.leaves
        for chain in self.chains:
            if set(chain.clocks[:1]) & set(phase) and (PORT, chain.scan_in) in leaves:
                machine.move(chain.scan_in, self.joint.aig.variable())


def _bench(joint: Joint, description: Description, places: Sequence[ChainPlaces]) -> _Bench:
    nets = np.concatenate([np.append(place.nets, place.out) for place in places])
    roots = np.unique(joint.after.circuit.net[nets])
    return _Bench(joint, description.chains, shift_values(description, "shift"), roots)


def _moves(run: _Run, place: ChainPlaces, kind: str) -> list[Block]:
    """Return that one chain moves by one position in one cycle."""
    chain = place.chain
    rest = run.nets(run.before, place.nets)
    turned = np.where(place.turned == BY_LOOP, rest & 1, place.turned).astype(np.int32)
    found = run.nets(run.off[-1], place.nets) ^ turned
    for row, cell in enumerate(chain.cells):
        for _ in range(cell.bits - 1):
            found[row] = _one_bit_back(run, place.positions[row], int(found[row]))
    first = np.array([run.ports.get(chain.scan_in, TRUE)], np.int32)
    sources = np.concatenate((first, rest ^ turned))
    inverted = np.array([cell.inverted for cell in chain.cells], np.int32)
    last = sources[-1:] ^ int(chain.inverted_out)
    out = run.nets(run.before, np.array([place.out]))
    names = [cell.instance for cell in chain.cells]
    giving = [f"scan-in `{chain.scan_in}`", *(f"`{name}`" for name in names)]

    def fact(row: int) -> str:
        return (
            f"`{names[row]}`, position {row + 1} of chain `{chain.name}`, does not take what"
            f" {giving[row]} held one shift cycle before"
        )

    shown = f"scan-out `{chain.scan_out}` of chain `{chain.name}` does not show its last position"
    return [
        Block(kind, sources[:-1] ^ inverted, found, None, names.__getitem__, fact),
        Block("scan-out", last, out, None, lambda _: chain.scan_out, lambda _: shown),
    ]


def _one_bit_back(run: _Run, place: Position, value: int) -> int:
    """Return what the bit that ``value`` came from holds after the cycle, if it is of the cell."""
    for turned in (0, 1):
        state = run.state_of.get(value ^ turned)
        if state is not None and state in place.states:
            return int(run.off[-1][run.side.states.leaf[state]]) ^ turned
    return value


def _in_time(run: _Run, place: ChainPlaces) -> list[Block]:
    """Return that the positions of a chain change when its clocks say, and not at another time."""
    chain = place.chain
    phase = run.phase_of(chain.clocks[-1]) if chain.clocks else -1
    if phase < 0:
        return []
    before = run.nets(run.before, place.nets)
    names = [cell.instance for cell in chain.cells]

    def block(wanted: Lits, found: Lits, words: str) -> Block:
        return Block(
            "shift clocks",
            wanted,
            found,
            None,
            names.__getitem__,
            lambda row: f"`{names[row]}` of chain `{chain.name}` {words}",
        )

    clock = f"`{chain.clocks[-1]}`"
    first_edge = "fall" if run.rest.get(chain.clocks[-1]) else "rise"
    if chain.edge == first_edge:
        off, on = (run.nets(values[phase], place.nets) for values in (run.off, run.on))
        return [block(off, on, f"changes at the other edge of {clock}")]
    if chain.edge in ("rise", "fall"):
        on = run.nets(run.on[phase], place.nets)
        return [block(before, on, f"changes at the other edge of {clock}")]
    if chain.edge is None and phase > 0:
        early = run.nets(run.off[phase - 1], place.nets)
        return [block(before, early, f"changes before {clock} opens its second latch")]
    return []
