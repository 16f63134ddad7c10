"""Modules that are storage made of gates: recognised by what their gates do, whatever their name.

A shift-register latch composed of NAND gates is a module with loops. Opened up, it would be logic
that nothing can be said about; here its loops are cut, its function is tabulated over all inputs
and states, and it becomes a cell with latches, as a library would describe it. What does not come
out as latches stays an ordinary module.
"""

from collections.abc import Mapping, Sequence
from dataclasses import replace
from typing import Final, NamedTuple

import networkx as nx

from insertdft.library.cell import Cell, Library, Pin, Storage
from insertdft.library.expression import Expression, Not, Var, columns, evaluate
from insertdft.library.functions import from_table
from insertdft.library.stepping import latch_of
from insertdft.netlist import FIRST_NET, Instance, Module, Netlist

MOST_INPUTS: Final = 9
MOST_GATES: Final = 80
MOST_LOOPS: Final = 3


class _Gate(NamedTuple):
    """One gate: the net it drives, its function over its pins, the net at each pin."""

    output: int
    function: Expression
    pins: Mapping[str, int]


def storage_module(netlist: Netlist, library: Library, module: Module) -> Cell | None:
    """Return the cell that a module of gates is, None if it is no storage or something else too.

    Args:
        netlist: Where the module stands.
        library: Cells of its gates; storage cells, three-state outputs and buses rule it out.
        module: The module.
    """
    inputs = [port for port in module.ports if port.direction == "input"]
    count = len(module.instance_names)
    plain = all(len(port.nets) == 1 and port.direction != "inout" for port in module.ports)
    if not plain or len(inputs) > MOST_INPUTS or not 4 <= count <= MOST_GATES:
        return None
    if len(module.assign_left) or module.name == netlist.top:
        return None
    gates = _gates(netlist, library, module)
    if gates is None:
        return None
    graph: nx.DiGraph[int] = nx.DiGraph()
    graph.add_edges_from(
        (net, gate.output) for gate in gates.values() for net in gate.pins.values()
    )
    loops = [part for part in nx.strongly_connected_components(graph) if len(part) > 1]
    if not 1 <= len(loops) <= MOST_LOOPS:
        return None
    states = _states(module, graph, loops)
    return None if states is None else _cell(library, netlist, module, gates, graph, states)


def _gates(netlist: Netlist, library: Library, module: Module) -> dict[int, _Gate] | None:
    """Return the gates by the net they drive, None if anything is no plain gate."""
    found: dict[int, _Gate] = {}
    for instance in netlist.instances(module):
        cell = library.cells.get(instance.cell)
        gate = _gate(instance, cell) if cell else None
        if gate is None or gate.output in found or min(gate.pins.values()) < FIRST_NET:
            return None
        found[gate.output] = gate
    return found


def _gate(instance: Instance, cell: Cell) -> _Gate | None:
    outputs = cell.outputs()
    if len(outputs) != 1 or cell.storage or cell.state_table or cell.clock_gate:
        return None
    output, pins = outputs[0], instance.pins
    inputs = {pin.name: pins.get(pin.name, -1) for pin in cell.inputs()}
    if output.function is None or output.three_state is not None or not inputs:
        return None
    return _Gate(pins.get(output.name, -1), output.function, inputs)


def _states(
    module: Module, graph: "nx.DiGraph[int]", loops: Sequence[set[int]]
) -> dict[int, str] | None:
    """Return one net of each loop that cuts it, outputs preferred, with a name for its state."""
    ports = {port.nets[0]: port.name for port in module.ports if port.direction == "output"}
    condensed = nx.condensation(graph)
    members = nx.get_node_attributes(condensed, "members")
    place = {
        net: number
        for number, part in enumerate(nx.topological_sort(condensed))
        for net in members[part]
    }
    found: dict[int, str] = {}
    for loop in sorted(loops, key=lambda part: place[min(part)]):
        candidates = [net for net in ports if net in loop]
        candidates += sorted(loop - set(candidates), key=module.net_name)
        for net in candidates:
            if nx.is_directed_acyclic_graph(graph.subgraph(loop - {net})):
                found[net] = f"state {module.net_name(net)}"
                break
        else:
            return None
    return found


def _cell(
    library: Library,
    netlist: Netlist,
    module: Module,
    gates: Mapping[int, _Gate],
    graph: "nx.DiGraph[int]",
    states: Mapping[int, str],
) -> Cell | None:
    names = {port.nets[0]: port.name for port in module.ports if port.direction == "input"}
    space = _Space((*names.values(), *states.values()))
    tables = {net: space.masks[name] for net, name in {**names, **states}.items()}
    cut = graph.copy()
    cut.remove_edges_from([(net, state) for state in states for net in graph.predecessors(state)])
    following = _tabulate(space, gates, tables, [*nx.topological_sort(cut), *states], states)
    storage = _storage(space, following, states) if following else None
    if storage is None or following is None:
        return None
    settled = space.ones
    for net, name in states.items():
        settled &= ~(following[net] ^ space.masks[name])
    pins = {
        port.name: Pin(port.name, "input")
        if port.direction == "input"
        else Pin(port.name, "output", function=_shown(space, tables[port.nets[0]], settled))
        for port in module.ports
    }
    cells = [library.cells[netlist.cell_names[at]] for at in module.instance_cell.tolist()]
    areas = [cell.area for cell in cells]
    area = None if None in areas else sum(at for at in areas if at is not None)
    return Cell(module.name, area, pins, pin_order=tuple(pins), storage=storage)


class _Space:
    """All values of inputs and states, as the bits of a mask."""

    def __init__(self, variables: tuple[str, ...]) -> None:
        self.variables = variables
        self.masks = dict(zip(variables, columns(len(variables)), strict=True))
        self.ones = (1 << (1 << len(variables))) - 1


def _tabulate(
    space: _Space,
    gates: Mapping[int, _Gate],
    tables: dict[int, int],
    order: Sequence[int],
    states: Mapping[int, str],
) -> dict[int, int] | None:
    """Fill in the table of every net; return what each state's gate makes of it.

    None if some gate reads a net that nothing drives.
    """
    following: dict[int, int] = {}
    for number, net in enumerate(order):
        gate = gates.get(net)
        is_last = number >= len(order) - len(states)
        if gate is None or (net in states and not is_last):
            continue
        if any(at not in tables for at in gate.pins.values()):
            return None
        pins = {pin: tables[at] for pin, at in gate.pins.items()}
        (following if net in states else tables)[net] = evaluate(gate.function, pins, space.ones)
    return following


def _storage(
    space: _Space, following: Mapping[int, int], states: Mapping[int, str]
) -> tuple[Storage, ...] | None:
    """Return one latch a state, each over the inputs and the states before it at rest."""
    found: list[Storage] = []
    care = space.ones
    for net, name in states.items():
        # Set and reset are looked for in what the gates do in any case; clock and data are then
        # told as they are while the latches before this one are at rest.
        rest = from_table(following[net], space.variables)
        others = [other for other in space.variables if other != name]
        latch = latch_of(rest, name, f"{name} inverse", others)
        if latch is None:
            return None
        found.append(_at_rest(space, latch, care))
        care &= ~(following[net] ^ space.masks[name])
    return tuple(found)


def _at_rest(space: _Space, latch: Storage, care: int) -> Storage:
    """Return a latch with clock and data as simple as they are within ``care``."""
    if latch.clock is None or latch.data is None:
        return latch
    for forced in (latch.clear, latch.preset):
        if forced is not None:
            care &= ~evaluate(forced, space.masks, space.ones)
    opened = evaluate(latch.clock, space.masks, space.ones)
    data = evaluate(latch.data, space.masks, space.ones)
    return replace(
        latch,
        clock=from_table(opened, space.variables, care),
        data=from_table(data, space.variables, care & opened),
    )


def _shown(space: _Space, table: int, settled: int) -> Expression:
    """Return the function of an output wherever all states are at rest.

    Two sides of a NAND latch are both 1 where ports fight over it, which no clock sequence may
    let happen; elsewhere they are inverses, and that is what they are taken for.
    """
    for name, mask in space.masks.items():
        if (table ^ mask) & settled == 0:
            return Var(name)
        fight = table & mask
        if (table ^ mask ^ space.ones) & settled & ~fight == 0:
            return Not(Var(name))
    return from_table(table, space.variables, settled)
