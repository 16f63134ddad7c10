"""Design -> ``Circuit``: every cell's functions laid down, cell type by cell type.

Buses: a net with several drivers, or with one that can be at high impedance, is the OR of what its
active drivers say (contention is not shown); with none active it is what a pull cell or an inout
port says, else unknown.
"""

from collections.abc import Collection
from dataclasses import dataclass, field
from typing import Final

import numpy as np

from insertdft.design.flat import INOUT, OUTPUT, Design
from insertdft.library.cell import Cell, Storage, StorageKind
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, negation, variables
from insertdft.library.functions import pruned
from insertdft.library.mission import one_state
from insertdft.library.state_table import table_storages
from insertdft.netlist import CONST0, CONST1, CONSTX, CONSTZ, FIRST_NET, Ids
from insertdft.simulate.circuit import Circuit, States
from insertdft.simulate.draft import Draft, Signal, Slots, Sorted
from insertdft.simulate.pin_rows import PinRows, pins_by_cell
from insertdft.simulate.words import Flags

#: Function and enable (None for always on) of an output.
Output = tuple[Expression, Expression | None]

_UNKNOWN: Final = "$unknown"
_NEVER: Final = Const(False)


def make_circuit(
    design: Design, *, clocks: bool = False, transparent: Collection[int] = ()
) -> Circuit:
    """Return the functions of ``design`` in order of evaluation.

    Args:
        design: The flat design.
        clocks: Also lay down clock, set and reset functions of the states, for simulation cycle
            by cycle. Without, a state has one function: what it takes when it is clocked.
        transparent: Latches (instances) that are always open: wires instead of states.
    """
    work = _Lowering(design, Draft(design.net_count), clocks=clocks)
    work.open[list(transparent)] = True
    work.is_bus = _bus_nets(design)
    for pins in pins_by_cell(
        design.cell, design.pin_start, design.pin_name, design.pin_names, len(design.cells)
    ):
        cell = design.cells[pins.cell]
        if cell is None:
            work.unmodelled.append(pins.instances)
        else:
            _lower_cell(work, cell, pins)
    _join_buses(work)
    return _finished(work)


@dataclass(slots=True, eq=False)
class _Lowering:
    """What is known half-way."""

    design: Design
    draft: Draft
    clocks: bool
    open: Flags = field(init=False)
    is_bus: Flags = field(init=False)
    unmodelled: list[Slots] = field(default_factory=list)
    states: list[dict[str, Slots]] = field(default_factory=list)
    drivers: list[tuple[Slots, Slots, Slots]] = field(default_factory=list)  # net, data, enable
    pulls: dict[int, int] = field(default_factory=dict)  # net -> value
    outer: dict[int, int] = field(default_factory=dict)  # bus net -> slot of its port's value

    def __post_init__(self) -> None:
        self.open = np.zeros(len(self.design.cell), np.bool_)


def storages(cell: Cell) -> tuple[Storage, ...]:
    """Return the storage elements of a cell, those of its state table if it has one."""
    if cell.storage or cell.state_table is None:
        return cell.storage
    return table_storages(cell.state_table)


def _bus_nets(design: Design) -> Flags:
    """Return which nets have several drivers, one that can let go, or one beside a port."""
    driving = np.isin(design.pin_direction, (OUTPUT, INOUT)) & (design.pin_net >= 0)
    count = np.bincount(design.pin_net[driving], minlength=design.net_count)
    found: Flags = count > 1
    letting_go = [
        (number, pin.name)
        for number, cell in enumerate(design.cells)
        if cell is not None
        for pin in cell.outputs()
        if pin.three_state is not None
    ]
    names = {name: number for number, name in enumerate(design.pin_names)}
    for number, pin in letting_go:
        rows = np.flatnonzero(design.pin_name == names.get(pin, -1))
        nets = design.pin_net[rows[design.cell[design.pin_instance[rows]] == number]]
        found[nets[nets >= 0]] = True
    ports = np.array(sorted(design.input_ports), np.int64)
    found[ports[count[ports] > 0]] = True
    found[:FIRST_NET] = False
    return found


def _lower_cell(work: _Lowering, cell: Cell, pins: PinRows) -> None:
    kept = storages(cell)
    if cell.state_table is not None and not kept:
        work.unmodelled.append(pins.instances)
        return
    signals = {pin.name: _signal(work.design, pins, pin.name) for pin in cell.inputs()}
    count = len(pins.instances)
    nothing = np.full(count, -1, np.int64)
    signals[_UNKNOWN] = Signal(np.full(count, CONSTX, np.int64), nothing)
    for storage in kept:
        signals[storage.state] = Signal(work.draft.fresh(count), nothing)
    outputs = _outputs(cell, kept)
    wanted = [_state_functions(storage, clocks=work.clocks) for storage in kept]
    _buffer_shared(work, signals, pins, [*_flat(outputs), *_all(wanted)])
    for name, (function, enable) in outputs.items():
        if name in pins.rows:
            _lower_output(work, signals, pins, name, function, enable)
    for number, (storage, functions) in enumerate(zip(kept, wanted, strict=True)):
        _lower_state(work, signals, pins, number, storage, functions)
    if any(pin.name not in outputs for pin in cell.outputs()):
        work.unmodelled.append(pins.instances)


def _signal(design: Design, pins: PinRows, name: str) -> Signal:
    rows = pins.rows.get(name)
    if rows is None:
        return Signal(*(np.full(len(pins.instances), value, np.int64) for value in (CONSTX, -1)))
    nets = np.where(rows >= 0, design.pin_net[rows], -1).astype(np.int64)
    return Signal(np.where(nets >= 0, nets, int(CONSTX)), rows)


def _outputs(
    cell: Cell, kept: tuple[Storage, ...]
) -> dict[str, tuple[Expression, Expression | None]]:
    """Return function and enable (None for always) of the outputs that are described."""
    states = {storage.state for storage in kept}
    found: dict[str, Output] = {}
    for pin in cell.outputs():
        function = pin.function
        if function is None and pin.internal_node in states:
            function = Var(str(pin.internal_node))
        if function is None:
            continue
        closed = pin.three_state
        enable = None if closed is None else negation(_plain(closed, kept))
        found[pin.name] = (_plain(function, kept), enable)
    return found


def _plain(expression: Expression, kept: tuple[Storage, ...]) -> Expression:
    """Return an expression over pins and first state variables, without idle variables."""
    for storage in kept:
        if storage.state_inverted in variables(expression):
            expression = one_state(expression, storage)
    return pruned(expression)


def _state_functions(storage: Storage, *, clocks: bool) -> dict[str, Expression]:
    """Return the functions a state needs, by column of ``States``."""
    clear, preset = storage.clear or _NEVER, storage.preset or _NEVER
    data = storage.data or Var(storage.state)
    together = And((clear, preset))
    winner = storage.clear_preset[0] or "X"
    to_zero: Expression = And((clear, negation(preset)))
    to_one: Expression = And((preset, negation(clear)))
    if winner in ("L", "X"):
        to_zero = clear
    if winner in ("H", "X"):
        to_one = preset
    kept = (storage,)
    if not clocks:
        forced = Or((And((to_zero, to_one, Var(_UNKNOWN))), And((to_one, negation(to_zero)))))
        quiet = And((negation(clear), negation(preset)))
        hold = And((together, Var(storage.state))) if winner == "N" else _NEVER
        return {"following": _plain(Or((And((data, quiet)), forced, hold)), kept)}
    found = {"following": data, "to_zero": to_zero, "to_one": to_one}
    if storage.clock is not None:
        found["clock"] = storage.clock
    plain = {name: _plain(value, kept) for name, value in found.items()}
    return {name: value for name, value in plain.items() if value != _NEVER or name == "following"}


def _flat(outputs: dict[str, Output]) -> list[Expression]:
    return [part for pair in outputs.values() for part in pair if part is not None]


def _all(wanted: list[dict[str, Expression]]) -> list[Expression]:
    return [value for functions in wanted for value in functions.values()]


def _buffer_shared(
    work: _Lowering, signals: dict[str, Signal], pins: PinRows, expressions: list[Expression]
) -> None:
    """Give a pin that several nodes read a slot of its own, so that it can be wrong alone."""
    for name, signal in list(signals.items()):
        if name not in pins.rows or sum(name in variables(one) for one in expressions) < 2:
            continue
        slots = work.draft.fresh(len(signal.slots))
        nothing = np.full(len(slots), -1, np.int64)
        work.draft.add(Var(name), {name: signal}, slots, pins.instances, nothing)
        signals[name] = Signal(slots, nothing)


def _lower_output(
    work: _Lowering,
    signals: dict[str, Signal],
    pins: PinRows,
    name: str,
    function: Expression,
    enable: Expression | None,
) -> None:
    rows = pins.rows[name]
    nets = np.where(rows >= 0, work.design.pin_net[rows], -1).astype(np.int64)
    on_bus = (nets >= FIRST_NET) & work.is_bus[nets]
    alone = np.flatnonzero((nets >= FIRST_NET) & ~on_bus)
    _add(work, function, signals, nets[alone], pins.instances, rows, alone)
    chosen = np.flatnonzero(on_bus)
    if not len(chosen):
        return
    if work.design.cell_names[pins.cell] in ("pullup", "pulldown"):
        work.pulls.update(dict.fromkeys(nets[chosen].tolist(), int(function == Const(True))))
        return
    data, active = work.draft.fresh(len(chosen)), work.draft.fresh(len(chosen))
    _add(work, function, signals, data, pins.instances, rows, chosen)
    _add(work, enable or Const(True), signals, active, pins.instances, rows * 0 - 1, chosen)
    work.drivers.append((nets[chosen], data, active))


def _add(
    work: _Lowering,
    expression: Expression,
    signals: dict[str, Signal],
    outputs: Slots,
    instances: Slots,
    rows: Slots,
    chosen: Slots,
) -> None:
    picked = {
        name: Signal(signals[name].slots[chosen], signals[name].rows[chosen])
        for name in variables(expression)
    }
    work.draft.add(expression, picked, outputs, instances[chosen], rows[chosen])


def _lower_state(
    work: _Lowering,
    signals: dict[str, Signal],
    pins: PinRows,
    number: int,
    storage: Storage,
    functions: dict[str, Expression],
) -> None:
    count = len(pins.instances)
    nothing = np.full(count, -1, np.int64)
    latch = storage.kind is StorageKind.LATCH
    state = signals[storage.state].slots
    wire = work.open[pins.instances] if latch else np.zeros(count, np.bool_)
    through = np.flatnonzero(wire)
    _add(work, functions["following"], signals, state[through], pins.instances, nothing, through)
    kept = np.flatnonzero(~wire)
    if not len(kept):
        return
    row = {
        "instance": pins.instances[kept],
        "storage": np.full(len(kept), number),
        "latch": np.full(len(kept), int(latch)),
        "slot": state[kept],
    }
    for column in ("following", "clock", "to_zero", "to_one"):
        row[column] = nothing[kept]
        if column in functions:
            row[column] = work.draft.fresh(len(kept))
            _add(work, functions[column], signals, row[column], pins.instances, nothing, kept)
    work.states.append(row)


def _join_buses(work: _Lowering) -> None:
    """Add the node that gives each bus its value."""
    by_net: dict[int, list[tuple[int, int]]] = {}
    for nets, data, active in work.drivers:
        for net, one, on in zip(nets.tolist(), data.tolist(), active.tolist(), strict=True):
            by_net.setdefault(net, []).append((one, on))
    for net in sorted(work.pulls.keys() | by_net.keys()):
        pairs = by_net.get(net, [])
        idle = work.pulls.get(net)
        rest = int(CONSTZ) if idle is None else (int(CONST1) if idle else int(CONST0))
        if net in work.design.input_ports:
            rest = int(work.draft.fresh(1)[0])
            work.outer[net] = rest
        _join_bus(work, net, pairs, rest)


def _join_bus(work: _Lowering, net: int, pairs: list[tuple[int, int]], rest: int) -> None:
    nothing = np.full(1, -1, np.int64)
    signals = {"rest": Signal(np.array([rest]), nothing)}
    said: list[Expression] = []
    silent: list[Expression] = [Var("rest")]
    for number, (data, active) in enumerate(pairs):
        signals[f"d{number}"] = Signal(np.array([data]), nothing)
        signals[f"e{number}"] = Signal(np.array([active]), nothing)
        said.append(And((Var(f"d{number}"), Var(f"e{number}"))))
        silent.append(Not(Var(f"e{number}")))
    value = Or((*said, And(tuple(silent)))) if said else Var("rest")
    work.draft.add(value, signals, np.array([net]), nothing, nothing)


def _finished(work: _Lowering) -> Circuit:
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
        loops=result.loops,
        unmodelled=tuple(unmodelled.tolist()),
    )


def _states(work: _Lowering, place: Ids) -> States:
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


def _unknown(work: _Lowering, result: Sorted) -> Ids:
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
