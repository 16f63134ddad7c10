"""First half of ``Design`` -> ``Circuit``: every cell gets its nodes, every net its literal.

Operands are filled in by ``build``, when all nets are known.
"""

from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, StateTable
from insertdft.netlist import CONST1, FIRST_NET
from insertdft.proof.aig import Lits
from insertdft.proof.order import Flags, Numbers
from insertdft.proof.template import FREE, Template, make_template
from insertdft.simulate.buses import bus_nets
from insertdft.simulate.pin_rows import PinRows, pins_by_cell

#: Kinds of leaves that are no states.
PORT: Final = "port"
BOX: Final = "black-box pin"
OPEN_PIN: Final = "unconnected pin"
UNDRIVEN: Final = "undriven net"
BUS: Final = "released bus"
FREE_VALUE: Final = "open value"

NOT_YET: Final = -2


@dataclass(slots=True, eq=False)
class Laid:
    """One cell type laid down.

    Attributes:
        template: Its functions.
        table: Its state table.
        pins: Its instances.
        first: Node of the first and-node of the first instance; instance follows instance.
        buffers: Output pin that shows a variable or constant -> first node, one an instance.
        leaves: State or free variable -> leaf of each instance.
        place: Shape (variables + 1, n), literal of the constant and of each variable.
    """

    template: Template
    table: StateTable | None
    pins: PinRows
    first: int
    buffers: dict[str, int] = field(default_factory=dict)
    leaves: dict[str, Lits] = field(default_factory=dict)
    place: Lits = field(default_factory=lambda: np.zeros((0, 0), np.int32))

    @property
    def count(self) -> int:
        """Number of instances."""
        return len(self.pins.instances)

    def value(self, local: int) -> Lits:
        """Return a literal of the template, for each instance, as literals of the circuit."""
        node, inverted = local >> 1, local & 1
        if node < len(self.place):
            found: Lits = self.place[node] ^ inverted
            return found
        nodes = self.and_nodes(node - len(self.place))
        return (2 * nodes + inverted).astype(np.int32)

    def and_nodes(self, number: int) -> Numbers:
        """Return the node of the template's and-node ``number`` for each instance."""
        each = np.arange(self.count, dtype=np.int64) * len(self.template.ands)
        found: Numbers = self.first + each + number
        return found


@dataclass(slots=True, eq=False)
class Work:
    """A circuit half-way.

    Attributes:
        design: The design.
        is_bus: Nets that can be let go.
        net: Literal of each net, NOT_YET where unknown.
        driver: The instance that alone drives a net, else -1.
        nodes: Number of nodes so far.
        leaves: See ``Circuit``.
        laid: Cell types.
        boxes: Black boxes.
        unsupported: See ``Circuit``.
    """

    design: Design
    is_bus: Flags
    net: Lits
    driver: Numbers
    nodes: int = 1
    leaves: dict[tuple[str, str], int] = field(default_factory=dict)
    laid: list[Laid] = field(default_factory=list)
    boxes: list[PinRows] = field(default_factory=list)
    unsupported: list[tuple[int, str]] = field(default_factory=list)

    def take(self, count: int) -> int:
        """Return the first of ``count`` new nodes."""
        self.nodes += count
        return self.nodes - count

    def leaf(self, kind: str, name: str) -> int:
        """Return the leaf of that name, made where there is none."""
        if (kind, name) not in self.leaves:
            self.leaves[kind, name] = self.take(1)
        return self.leaves[kind, name]

    def pin_name(self, pins: PinRows, at: int, pin: str) -> str:
        """Return the hierarchical name of a pin."""
        return f"{self.design.name(int(pins.instances[at]))}.{pin}"


def lay_down(design: Design) -> Work:
    """Return every node but those of buses and cut loops, and the literal of every net."""
    net = np.full(design.net_count, NOT_YET, np.int32)
    net[:2] = (0, 1)
    work = Work(design, bus_nets(design), net, np.full(design.net_count, -1, np.int64))
    for port in design.ports:
        if port.direction != "output" and port.net >= FIRST_NET and not work.is_bus[port.net]:
            work.net[port.net] = 2 * work.leaf(PORT, port.name)
    for pins in pins_by_cell(
        design.cell, design.pin_start, design.pin_name, design.pin_names, len(design.cells)
    ):
        cell = design.cells[pins.cell]
        if cell is None:
            work.boxes.append(pins)
        else:
            _lay_cell(work, cell, pins)
    for pins in work.boxes:
        _lay_box(work, pins)
    for bus in np.flatnonzero(work.is_bus).tolist():
        work.net[bus] = 2 * work.take(1)
    _name_undriven(work)
    for laid in work.laid:
        laid.place = _places(work, laid)
    return work


def _lay_cell(work: Work, cell: Cell, pins: PinRows) -> None:
    template = make_template(cell)
    count = len(pins.instances)
    if template.unsupported:
        work.unsupported += [(int(at), template.unsupported) for at in pins.instances]
    laid = Laid(template, cell.state_table, pins, work.take(count * len(template.ands)))
    for state in template.states:
        start = work.take(count)
        laid.leaves[state] = np.arange(start, start + count, dtype=np.int32)
    for name in template.variables:
        if name.startswith(FREE):
            names = [work.pin_name(pins, at, name[len(FREE) :]) for at in range(count)]
            nodes = [work.leaf(FREE_VALUE, at) for at in names]
            laid.leaves[name] = np.array(nodes, np.int32)
    for pin, (value, _) in template.outputs.items():
        _lay_output(work, laid, pin, value)
    for pin in template.dark:
        _lay_dark(work, pins, pin)
    work.laid.append(laid)


def _lay_output(work: Work, laid: Laid, pin: str, value: int) -> None:
    nets, here = driven(work, laid.pins, pin)
    if not len(here):
        return
    number = (value >> 1) - len(laid.template.variables) - 1
    if number >= 0:
        node, inverted = laid.and_nodes(number)[here], value & 1
    else:
        laid.buffers[pin] = work.take(laid.count)
        node, inverted = laid.buffers[pin] + here, 0
    plain = ~work.is_bus[nets]
    work.net[nets[plain]] = (2 * node[plain] + inverted).astype(np.int32)
    work.driver[nets[plain]] = laid.pins.instances[here[plain]]


def driven(work: Work, pins: PinRows, pin: str) -> tuple[Numbers, Numbers]:
    """Return the nets at one pin of a cell type, constants aside, and the places that have one."""
    rows = pins.rows.get(pin)
    if rows is None:
        return np.zeros(0, np.int64), np.zeros(0, np.int64)
    nets = np.where(rows >= 0, work.design.pin_net[rows], -1)
    here = np.flatnonzero(nets >= FIRST_NET)
    return nets[here].astype(np.int64), here


def _lay_dark(work: Work, pins: PinRows, pin: str) -> None:
    nets, here = driven(work, pins, pin)
    for net, at in zip(nets.tolist(), here.tolist(), strict=True):
        if not work.is_bus[net]:
            work.net[net] = 2 * work.leaf(BOX, work.pin_name(pins, at, pin))


def _lay_box(work: Work, pins: PinRows) -> None:
    """Let a black box drive the nets that nothing else drives: the first pin on each."""
    for pin in pins.rows:
        nets, here = driven(work, pins, pin)
        for net, at in zip(nets.tolist(), here.tolist(), strict=True):
            if work.net[net] == NOT_YET and not work.is_bus[net]:
                work.net[net] = 2 * work.leaf(BOX, work.pin_name(pins, at, pin))


def _name_undriven(work: Work) -> None:
    """Give every net that is read and that nothing drives a leaf of its own."""
    design = work.design
    read = np.zeros(design.net_count, np.bool_)
    read[design.pin_net[design.pin_net >= FIRST_NET]] = True
    read[[port.net for port in design.ports]] = True
    for net in np.flatnonzero(read & (work.net == NOT_YET)).tolist():
        work.net[net] = 2 * work.leaf(UNDRIVEN, design.net_name(net))
    work.net[work.net == NOT_YET] = 0


def _places(work: Work, laid: Laid) -> Lits:
    names = laid.template.variables
    place = np.zeros((len(names) + 1, laid.count), np.int32)
    for number, name in enumerate(names, start=1):
        own = laid.leaves.get(name)
        place[number] = 2 * own if own is not None else _at_pin(work, laid.pins, name)
    return place


def _at_pin(work: Work, pins: PinRows, pin: str) -> Lits:
    """Return the literal at an input pin; one that is open or at x or z has a leaf of its own."""
    rows = pins.rows.get(pin)
    if rows is None:
        nets = np.full(len(pins.instances), -1, np.int64)
    else:
        nets = np.where(rows >= 0, work.design.pin_net[rows], -1).astype(np.int64)
    found = work.net[np.maximum(nets, 0)]
    for at in np.flatnonzero((nets < 0) | ((nets > CONST1) & (nets < FIRST_NET))).tolist():
        found[at] = 2 * work.leaf(OPEN_PIN, work.pin_name(pins, at, pin))
    return found
