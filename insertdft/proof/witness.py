"""A counterexample as a Verilog bench that a simulator replays on each netlist.

The bench sets the ports, forces the nets that show states, and shows the one function that differs:
an output, a pin of a black box, or what a storage cell would take, worked out from the nets at its
pins as the library says. It holds both netlists' instances; the macro ``AFTER`` chooses the
converted one, so it is compiled twice.
"""

from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.description import Description
from insertdft.design.flat import Design
from insertdft.library.cell import Storage, StorageKind
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor
from insertdft.netlist import FIRST_NET
from insertdft.netlist.names import to_verilog
from insertdft.proof.aig import Lits
from insertdft.proof.build import make_circuit
from insertdft.proof.circuit import at
from insertdft.proof.joint import Joint, join, make_side
from insertdft.proof.lay import BOX, OPEN_PIN, UNDRIVEN
from insertdft.proof.match import Side, match_states, shown_nets
from insertdft.proof.options import ProofOptions, mission_values
from insertdft.proof.part import reached
from insertdft.proof.result import Counterexample
from insertdft.proof.storage import state_name
from insertdft.proof.tables import reduced
from insertdft.proof.template import LOOP, TABLE

#: Kinds of obligations that one set of values shows.
REPLAYED: Final = ("output", "black-box pin", "data", "clock", "set", "reset", "latch")
_NEVER: Final = Const(False)


def witness_bench(
    before: Design,
    after: Design,
    description: Description | None,
    item: Counterexample,
    options: ProofOptions,
) -> str | None:
    """Return the bench, a module ``witness``; None if the kind of counterexample needs a sequence.

    Compile it with the original and the cells' models, then with ``AFTER`` defined and the
    converted netlist; each run prints ``witness: <value>``, and the two values differ.
    """
    if item.kind not in REPLAYED:
        return None
    one, two = make_side(make_circuit(before)), make_side(make_circuit(after))
    joint = join(one, two, match_states(one, two, options.mapping))
    held = mission_values(description, options)
    texts = [_Writer(joint, side, item, held if side else {}).lines() for side in (0, 1)]
    lines = [
        f"// {item.message}",
        f"// the original gives {item.before}, the converted netlist {item.after}",
        "module witness;",
        "`ifdef AFTER",
        *texts[1],
        "`else",
        *texts[0],
        "`endif",
        "endmodule",
        "",
    ]
    return "\n".join(lines)


@dataclass(slots=True)
class _Writer:
    """Writes one side."""

    joint: Joint
    side: int
    item: Counterexample
    held: Mapping[str, int]
    states: dict[str, int] = field(init=False)

    def __post_init__(self) -> None:
        """Find the states that the counterexample names, or is about."""
        matching, before = self.joint.matching, self.joint.before
        wanted = {*self.item.states, self.item.subject}
        pairs = zip(matching.before.tolist(), matching.after.tolist(), strict=True)
        self.states = {}
        for one, other in pairs:
            name = state_name(before.circuit, before.states, one)
            if name in wanted:
                self.states[name] = other if self.side else one

    @property
    def part(self) -> Side:
        return (self.joint.before, self.joint.after)[self.side]

    def lines(self) -> list[str]:
        design = self.part.design
        return [
            *_declared(design),
            f"  {to_verilog(design.netlist.top)} dut ({_connections(design)});",
            "  initial begin",
            *(f"    {line}" for line in self._ports()),
            *(f"    {line}" for line in self._forces()),
            "    #1;",
            *(f"    {line}" for line in self._shown()),
            "    $finish;",
            "  end",
        ]

    def _ports(self) -> Iterator[str]:
        """Set every input: as the counterexample says, as mission mode says, else 0."""
        for port in self.part.design.ports:
            if port.direction == "input":
                value = self.held.get(port.name, self.item.ports.get(port.name, 0))
                yield f"{port.name} = 1'b{value};"

    def _forces(self) -> Iterator[str]:
        """Force the states that matter; those that may have any value are 0."""
        part = self.part
        turned = self._turned()
        values = dict.fromkeys(self._near_states(), 0)
        values |= {place: turned[place] for place in values.keys() & turned.keys()}
        for name, value in self.item.states.items():
            values[self.states[name]] = value ^ turned.get(self.states[name], 0)
        values |= self._extra_states() if self.side else {}
        for place, net, inverted in shown_nets(part, values):
            yield f"force {_net(part.design, net)} = 1'b{values[place] ^ inverted};"
        yield from self._other_forces()

    def _near_states(self) -> list[int]:
        """Return the states that what is shown is a function of."""
        circuit, states = self.part.circuit, self.part.states
        needed = reached(circuit, self._roots())
        found: list[int] = np.flatnonzero(needed[states.leaf]).tolist()
        return found

    def _roots(self) -> Lits:
        circuit = self.part.circuit
        if self.item.kind == "output":
            return circuit.net[[circuit.design.port_nets[self.item.subject]]]
        if self.item.kind == "black-box pin":
            pairs = [(f"{circuit.design.name(at)}.{pin}", lit) for at, pin, lit in circuit.observed]
            return np.array([lit for name, lit in pairs if name == self.item.subject], np.int32)
        leaf = self.part.states.leaf[self.states[self.item.subject]]
        elements = circuit.elements
        rows = np.flatnonzero(elements.leaf == leaf)
        columns = (elements.data, elements.clock, elements.zero, elements.one)
        found = [column[rows] for column in columns]
        found += [
            block.inputs[:, (block.nodes == leaf).any(axis=0)].ravel() for block in circuit.tables
        ]
        return np.concatenate(found)

    def _other_forces(self) -> Iterator[str]:
        """Force what black boxes give and what nothing drives."""
        circuit = self.part.circuit
        nets = {
            circuit.leaves[kind, name]: net
            for kind, name in circuit.leaves
            if kind in (BOX, UNDRIVEN) and f"{kind} {name}" in self.item.others
            for net in np.flatnonzero(circuit.net == 2 * circuit.leaves[kind, name]).tolist()[:1]
        }
        for (kind, name), node in circuit.leaves.items():
            if node in nets:
                value = self.item.others[f"{kind} {name}"]
                yield f"force {_net(circuit.design, nets[node])} = 1'b{value};"

    def _turned(self) -> dict[int, int]:
        """Return the places of this side whose state is the inverse of the original's."""
        matching = self.joint.matching
        rows = np.flatnonzero(matching.inverted).tolist() if self.side else []
        return {int(matching.after[row]): 1 for row in rows}

    def _extra_states(self) -> dict[int, int]:
        part = self.part
        names = {
            state_name(part.circuit, part.states, place): place
            for place in self.joint.matching.left_after
        }
        return {names[name]: value for name, value in self.item.states_after.items()}

    def _shown(self) -> list[str]:
        item, design = self.item, self.part.design
        if item.kind == "output":
            return [_display(item.subject)]
        if item.kind == "black-box pin":
            name, _, pin = item.subject.rpartition(".")
            for instance, own, _ in self.part.circuit.observed:
                if own == pin and design.name(instance) == name:
                    return [_display(_net(design, design.net_at(instance, pin)))]
        place = self.states[item.subject]
        turned = self._turned().get(place, 0)
        if self.part.states.kind[place] == LOOP:
            return self._released(place, turned)
        flips = turned and item.kind in ("data", "latch")
        return [_display(f"{'~' if flips else ''}({self._function(place)})")]

    def _released(self, place: int, turned: int) -> list[str]:
        """Let a loop of gates go and see what it comes to be."""
        [(_, net, inverted)] = shown_nets(self.part, [place])
        text = _net(self.part.design, net)
        return [f"release {text};", "#1;", _display(f"{'~' * (turned ^ inverted)}{text}")]

    def _function(self, place: int) -> str:
        states, circuit = self.part.states, self.part.circuit
        instance, number = int(states.instance[place]), int(states.state[place])
        cell = circuit.design.cell_of(instance)
        if cell is None:
            raise ValueError(f"{self.item.subject} is no library cell")
        is_table = states.kind[place] == TABLE
        item = self._reduced(place) if is_table else cell.storage[number]
        if item is None:
            raise ValueError(f"the state table of {cell.name} is neither latch nor flip-flop")
        kind = self.item.kind
        if self._turned().get(place, 0):
            kind = {"set": "reset", "reset": "set"}.get(kind, kind)
        return self._text(instance, _asked(item, kind))

    def _reduced(self, place: int) -> Storage | None:
        """Return a table's storage under the constants that its pins have in mission mode."""
        states, circuit = self.part.states, self.part.circuit
        values = self.joint.values(self.side, self.held)
        for block in circuit.tables:
            node = int(states.state[place])
            columns = np.flatnonzero(block.nodes[node] == states.leaf[place])
            if len(columns):
                pattern = at(values, block.inputs[:, columns[0]]).tolist()
                pairs = zip(block.table.inputs, pattern, strict=True)
                known = tuple((name, value) for name, value in pairs if value <= 1)
                return reduced(block.table, block.table.nodes[node], known)
        return None

    def _text(self, instance: int, expression: Expression) -> str:
        """Return an expression over pins and states as Verilog."""
        match expression:
            case Const(value):
                return f"1'b{int(value)}"
            case Var(name):
                return self._variable(instance, name)
            case Not(part):
                return f"~{self._text(instance, part)}"
            case And(parts):
                return _joined(" & ", (self._text(instance, part) for part in parts))
            case Or(parts):
                return _joined(" | ", (self._text(instance, part) for part in parts))
            case Xor(parts):
                return _joined(" ^ ", (self._text(instance, part) for part in parts))

    def _variable(self, instance: int, name: str) -> str:
        design = self.part.design
        cell = design.cell_of(instance)
        if cell is not None and name in cell.pins and cell.pins[name].direction != "internal":
            net = design.net_at(instance, name)
            if net < 0:
                value = self.item.others.get(f"{OPEN_PIN} {design.name(instance)}.{name}", 0)
                return f"1'b{value}"
            return f"1'b{'01xz'[net]}" if net < FIRST_NET else _net(design, net)
        inverted, value = self._state_value(instance, name)
        return f"1'b{value ^ inverted}"

    def _state_value(self, instance: int, name: str) -> tuple[int, int]:
        """Return the value of a state variable of an instance, as the counterexample has it."""
        design, states = self.part.design, self.part.states
        cell = design.cell_of(instance)
        names = [] if cell is None else _state_names(cell.state_table, cell.storage)
        own = {**self.item.states}
        values = {self.states[key]: value for key, value in own.items() if key in self.states}
        turned = self._turned()
        for number, (plain, inverse) in enumerate(names):
            if name in (plain, inverse):
                here = np.flatnonzero((states.instance == instance) & (states.state == number))
                for place in here.tolist():
                    value = values.get(place, self._extra_or_zero(place))
                    return int(name == inverse), value ^ turned.get(place, 0)
        return 0, 0

    def _extra_or_zero(self, place: int) -> int:
        return self._extra_states().get(place, 0) if self.side else 0


def _state_names(table: object, storage: Iterable[Storage]) -> list[tuple[str, str]]:
    nodes = getattr(table, "nodes", None)
    if nodes is not None:
        return [(node, f"!{node}") for node in nodes]
    return [(item.state, item.state_inverted) for item in storage]


def _asked(item: Storage, kind: str) -> Expression:
    """Return the function of a storage element that an obligation is about."""
    clear, preset = item.clear or _NEVER, item.preset or _NEVER
    token = item.clear_preset[0]
    zero = clear if token == "L" else And((clear, Not(preset)))
    one = preset if token == "H" else And((preset, Not(clear)))
    data, clock = item.data or Var(item.state), item.clock or _NEVER
    match kind:
        case "clock":
            return clock
        case "reset":
            return zero
        case "set":
            return one
        case "latch":
            if item.kind is not StorageKind.LATCH:
                raise ValueError("a flip-flop is no latch")
            free = Or((And((clock, data)), And((Not(clock), Var(item.state)))))
            return Or((one, And((Not(zero), free))))
        case _:
            return data


def _joined(sign: str, parts: Iterable[str]) -> str:
    return "(" + sign.join(parts) + ")"


def _display(expression: str) -> str:
    # A value of one bit, whatever the expression's own width is.
    return f'$display("witness: %b", 1\'b1 & ({expression}));'


def _net(design: Design, net: int) -> str:
    """Return a net as the bench reaches it."""
    local = int(np.flatnonzero(design.net_of == net)[0])
    bases = np.array([place.net_base for place in design.occurrences])
    home = int(np.searchsorted(bases, local, side="right")) - 1
    module = design.netlist.modules[design.occurrences[home].module]
    name = module.net_name(local - int(bases[home]) + FIRST_NET)
    return ".".join(("dut", *map(to_verilog, (*design.path(home), name))))


def _declared(design: Design) -> Iterator[str]:
    for port in design.netlist.top_module.ports:
        kind = "reg" if port.direction == "input" else "wire"
        width = "" if port.vector is None else f"[{port.vector.msb}:{port.vector.lsb}] "
        yield f"  {kind} {width}{to_verilog(port.name)};"


def _connections(design: Design) -> str:
    names = [to_verilog(port.name) for port in design.netlist.top_module.ports]
    return ", ".join(f".{name}({name})" for name in names)
