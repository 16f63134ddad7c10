"""Nodes of all instances of one cell.

Where a clock pulse is followed, instances fall into three parts: those that pass a moving clock on
(laid down twice, at rest and during the pulse, their own latches open), storage cells whose clock
pulses only in some patterns (they keep their state in the others), and all the rest.
"""

from dataclasses import dataclass

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, Storage, StorageKind
from insertdft.library.expression import (
    And,
    Const,
    Expression,
    Or,
    Var,
    Xor,
    negation,
    substitute,
    variables,
)
from insertdft.library.functions import pruned
from insertdft.library.mission import one_state
from insertdft.netlist import CONSTX, FIRST_NET
from insertdft.simulate.draft import Signal, Slots
from insertdft.simulate.lowering import NEVER, UNKNOWN, Lowering, storages
from insertdft.simulate.pin_rows import PinRows
from insertdft.simulate.words import Flags

#: Function and enable (None for always on) of an output.
Output = tuple[Expression, Expression | None]
Signals = dict[str, Signal]

_PLAIN, _PASSING, _GATED = 0, 1, 2
_AT_REST, _DURING = "$rest:", "$pulse:"


@dataclass(frozen=True, slots=True, eq=False)
class _Part:
    """Some instances of one cell that are laid down in the same way."""

    cell: Cell
    kept: tuple[Storage, ...]
    pins: PinRows
    kind: int

    @property
    def count(self) -> int:
        return len(self.pins.instances)

    def nothing(self) -> Slots:
        return np.full(self.count, -1, np.int64)


def lower_cell(work: Lowering, cell: Cell, pins: PinRows) -> None:
    """Add the nodes and states of all instances of ``cell``."""
    kept = storages(cell)
    if cell.state_table is not None and not kept:
        work.unmodelled.append(pins.instances)
        return
    if any(pin.name not in _outputs(cell, kept) for pin in cell.outputs()):
        work.unmodelled.append(pins.instances)
    kinds = _kinds(work, cell, kept, pins)
    for kind in np.unique(kinds).tolist():
        chosen = np.flatnonzero(kinds == kind)
        rows = {name: column[chosen] for name, column in pins.rows.items()}
        some = PinRows(pins.cell, pins.instances[chosen], rows)
        _lower_part(work, _Part(cell, kept, some, kind))


def _kinds(work: Lowering, cell: Cell, kept: tuple[Storage, ...], pins: PinRows) -> Slots:
    found = np.full(len(pins.instances), _PLAIN, np.int64)
    if work.pulse is None:
        return found
    moving, plain = work.pulse.moving, work.pulse.plain
    for name in sorted(_clock_pins(kept) & pins.rows.keys()):
        nets = _signal(work.design, pins, name).slots
        found[moving[nets] & ~plain[nets]] = _GATED
    for pin in cell.outputs():
        nets = _signal(work.design, pins, pin.name).slots
        found[moving[nets] & ~work.is_bus[nets]] = _PASSING
    return found


def _clock_pins(kept: tuple[Storage, ...]) -> set[str]:
    return {
        name for storage in kept if storage.clock is not None for name in variables(storage.clock)
    }


def _lower_part(work: Lowering, part: _Part) -> None:
    signals = {pin.name: _signal(work.design, part.pins, pin.name) for pin in part.cell.inputs()}
    signals[UNKNOWN] = Signal(np.full(part.count, CONSTX, np.int64), part.nothing())
    for storage in part.kept:
        signals[storage.state] = Signal(work.draft.fresh(part.count), part.nothing())
    outputs = _outputs(part.cell, part.kept)
    wanted = [_state_functions(storage, part.kind, clocks=work.clocks) for storage in part.kept]
    expressions = [*_flat(outputs), *(one for each in wanted for one in each.values())]
    if part.kind == _PASSING:
        signals, during = _twice(work, part, signals, expressions)
        part_rows = {name: part.nothing() for name in outputs}
        _lower_outputs(work, part, during, outputs, part_rows, during=True)
    else:
        _add_clock_values(work, part, signals)
        _buffer_shared(work, part, signals, expressions)
    _lower_outputs(work, part, signals, outputs, part.pins.rows, during=False)
    for number, functions in enumerate(wanted):
        _lower_state(work, part, signals, number, functions)


def _signal(design: Design, pins: PinRows, name: str) -> Signal:
    rows = pins.rows.get(name)
    if rows is None:
        return Signal(*(np.full(len(pins.instances), value, np.int64) for value in (CONSTX, -1)))
    nets = np.where(rows >= 0, design.pin_net[rows], -1).astype(np.int64)
    return Signal(np.where(nets >= 0, nets, int(CONSTX)), rows)


def _outputs(cell: Cell, kept: tuple[Storage, ...]) -> dict[str, Output]:
    """Return function and enable of the outputs that are described."""
    states = {storage.state for storage in kept}
    found: dict[str, Output] = {}
    for pin in cell.outputs():
        function = pin.function
        if function is None and pin.internal_node in states:
            function = Var(str(pin.internal_node))
        if function is None:
            continue
        closed = pin.three_state
        enable = None if closed is None else negation(_over_states(closed, kept))
        found[pin.name] = (_over_states(function, kept), enable)
    return found


def _over_states(expression: Expression, kept: tuple[Storage, ...]) -> Expression:
    """Return an expression over pins and first state variables, without idle variables."""
    for storage in kept:
        if storage.state_inverted in variables(expression):
            expression = one_state(expression, storage)
    return pruned(expression)


def _state_functions(storage: Storage, kind: int, *, clocks: bool) -> dict[str, Expression]:
    """Return the functions a state needs, by column of ``States``."""
    clear, preset = storage.clear or NEVER, storage.preset or NEVER
    data = storage.data or Var(storage.state)
    winner = storage.clear_preset[0] or "X"
    to_zero: Expression = And((clear, negation(preset)))
    to_one: Expression = And((preset, negation(clear)))
    if winner in ("L", "X"):
        to_zero = clear
    if winner in ("H", "X"):
        to_one = preset
    kept = (storage,)
    if not clocks:
        if kind == _GATED:
            data = _where_pulsed(storage, data)
        forced = Or((And((to_zero, to_one, Var(UNKNOWN))), And((to_one, negation(to_zero)))))
        quiet = And((negation(clear), negation(preset)))
        hold = And((clear, preset, Var(storage.state))) if winner == "N" else NEVER
        return {"following": _over_states(Or((And((data, quiet)), forced, hold)), kept)}
    found = {"following": data, "to_zero": to_zero, "to_one": to_one}
    if storage.clock is not None:
        found["clock"] = storage.clock
    plain = {name: _over_states(value, kept) for name, value in found.items()}
    return {name: value for name, value in plain.items() if value != NEVER or name == "following"}


def _where_pulsed(storage: Storage, data: Expression) -> Expression:
    """Return data where the clock expression changes during the pulse, else the state."""
    clock = storage.clock or NEVER
    rest, pulse = (
        substitute(clock, {name: Var(mark + name) for name in variables(clock)})
        for mark in (_AT_REST, _DURING)
    )
    pulsed = Xor((rest, pulse))
    return Or((And((pulsed, data)), And((negation(pulsed), Var(storage.state)))))


def _flat(outputs: dict[str, Output]) -> list[Expression]:
    return [part for pair in outputs.values() for part in pair if part is not None]


def _add_clock_values(work: Lowering, part: _Part, signals: Signals) -> None:
    """Give the clock pins of gated cells variables for rest and pulse; they are no fault sites."""
    if work.pulse is None or part.kind != _GATED:
        return
    for name in sorted(_clock_pins(part.kept)):
        nets = signals[name].slots
        signals[_AT_REST + name] = Signal(nets, part.nothing())
        signals[_DURING + name] = Signal(work.pulse.during[nets], part.nothing())


def _buffer_shared(
    work: Lowering, part: _Part, signals: Signals, expressions: list[Expression]
) -> None:
    """Give a pin that several nodes read a slot of its own, so that it can be wrong alone."""
    everywhere = np.ones(part.count, np.bool_)
    for name in part.pins.rows:
        if name in signals and sum(name in variables(one) for one in expressions) > 1:
            signals[name] = _buffered(work, part, signals[name], everywhere)


def _buffered(work: Lowering, part: _Part, signal: Signal, where: Flags) -> Signal:
    chosen = np.flatnonzero(where)
    slots = signal.slots.copy()
    slots[chosen] = work.draft.fresh(len(chosen))
    work.add(
        Var("pin"), {"pin": signal}, slots[chosen], part.pins.instances, part.nothing(), chosen
    )
    return Signal(slots, part.nothing())


def _twice(
    work: Lowering, part: _Part, signals: Signals, expressions: list[Expression]
) -> tuple[Signals, Signals]:
    """Return the signals at rest and during the pulse of cells that pass a clock on."""
    rest, during = dict(signals), dict(signals)
    used = {name for one in expressions for name in variables(one)}
    for name in part.pins.rows:
        if work.pulse is None or name not in used:
            continue
        nets = signals[name].slots
        moves = work.pulse.moving[nets]
        rest[name] = _buffered(work, part, signals[name], ~moves)
        slots = np.where(moves, work.pulse.during[nets], rest[name].slots)
        during[name] = Signal(slots, part.nothing())
    return rest, during


def _lower_outputs(
    work: Lowering,
    part: _Part,
    signals: Signals,
    outputs: dict[str, Output],
    rows: dict[str, Slots],
    *,
    during: bool,
) -> None:
    for name, (function, enable) in outputs.items():
        if name not in part.pins.rows:
            continue
        nets = _signal(work.design, part.pins, name).slots
        driven = (nets >= FIRST_NET) & (part.pins.rows[name] >= 0)
        on_bus = driven & work.is_bus[nets]
        if during and work.pulse is not None:
            chosen = np.flatnonzero(driven & ~on_bus & work.pulse.moving[nets])
            slots = work.pulse.during[nets[chosen]]
            work.add(function, signals, slots, part.pins.instances, rows[name], chosen)
            continue
        alone = np.flatnonzero(driven & ~on_bus)
        work.add(function, signals, nets[alone], part.pins.instances, rows[name], alone)
        _lower_driver(work, part, signals, nets, np.flatnonzero(on_bus), (function, enable))


def _lower_driver(
    work: Lowering, part: _Part, signals: Signals, nets: Slots, chosen: Slots, output: Output
) -> None:
    """Add the drivers of bus nets."""
    if not len(chosen):
        return
    function, enable = output
    if work.design.cell_names[part.pins.cell] in ("pullup", "pulldown"):
        work.pulls.update(dict.fromkeys(nets[chosen].tolist(), int(function == Const(True))))
        return
    data, active = work.draft.fresh(len(chosen)), work.draft.fresh(len(chosen))
    nothing, instances = part.nothing(), part.pins.instances
    work.add(function, signals, data, instances, nothing, chosen)
    work.add(enable or Const(True), signals, active, instances, nothing, chosen)
    work.drivers.append((nets[chosen], data, active))


def _lower_state(
    work: Lowering, part: _Part, signals: Signals, number: int, functions: dict[str, Expression]
) -> None:
    storage, instances, nothing = part.kept[number], part.pins.instances, part.nothing()
    latch = storage.kind is StorageKind.LATCH
    state = signals[storage.state].slots
    wire = (work.open[instances] | (part.kind == _PASSING)) & latch
    through = np.flatnonzero(wire)
    work.add(functions["following"], signals, state[through], instances, nothing, through)
    kept = np.flatnonzero(~wire)
    if not len(kept):
        return
    row = {
        "instance": instances[kept],
        "storage": np.full(len(kept), number),
        "latch": np.full(len(kept), int(latch)),
        "slot": state[kept],
    }
    for column in ("following", "clock", "to_zero", "to_one"):
        row[column] = nothing[kept]
        if column in functions:
            row[column] = work.draft.fresh(len(kept))
            work.add(functions[column], signals, row[column], instances, nothing, kept)
    work.states.append(row)
