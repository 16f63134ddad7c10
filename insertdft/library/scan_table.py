"""Scan roles of cells that only a state table describes, checked by pulsing their clocks.

What the pins are is declared (``test_scan_in``, ``test_scan_clock``, ``test_scan_clock_a``,
``test_scan_clock_b``, and the mission storage of ``test_cell``); the table must then do it: from
rest, for every state and all other data, a shift pulse brings scan-in to the output and a mission
pulse brings the mission next state. A clock acts on its first edge away from rest.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, replace
from itertools import product
from typing import NamedTuple

from insertdft.library.cell import Cell, ScanOutput, ScanRole, Storage, Style
from insertdft.library.declared import only_pin, test_only_outputs
from insertdft.library.expression import Expression, evaluate
from insertdft.library.functions import literal, support
from insertdft.library.state_table import TableModel
from insertdft.library.stepping import Value, patterns


@dataclass(frozen=True, slots=True)
class _Claim:
    """What a cell declares: shift clocks in the order they are pulsed, and its mission."""

    style: Style
    scan_in: str
    clocks: tuple[str, ...]
    mission: Storage
    outputs: tuple[str, ...]


class _Run(NamedTuple):
    """What some pulses did.

    Attributes:
        inputs: At rest.
        before: Nodes at rest.
        after: Nodes right after the last leading edge.
    """

    inputs: Mapping[str, int]
    before: Mapping[str, Value]
    after: Mapping[str, Value]


def table_role(cell: Cell) -> ScanRole | None:
    """Return the role that a cell declares and its table confirms, or None.

    A cell without any function of its own (neither storage nor table) is believed.
    """
    claim = _claim(cell)
    if claim is None or cell.storage:
        return None
    if cell.state_table is None:
        outputs = tuple(
            ScanOutput(name, _declared_inverse(cell, name), name in test_only_outputs(cell))
            for name in claim.outputs
        )
        return _role(claim, outputs, False, dict.fromkeys(claim.clocks, 0))
    model = TableModel(cell.state_table)
    if not _known(cell, claim, model):
        return None
    for values in product((0, 1), repeat=len(claim.clocks)):
        off = dict(zip(claim.clocks, values, strict=True))
        found = _confirmed(cell, claim, model, off)
        if found is not None:
            return found
    return None


def _claim(cell: Cell) -> _Claim | None:
    test = cell.test_cell
    scan_in = only_pin(cell, "test_scan_in")
    if test is None or len(test.storage) != 1 or scan_in is None or test.storage[0].clock is None:
        return None
    outputs = tuple(pin.name for pin in cell.outputs() if _shows(cell, pin.name))
    clock = only_pin(cell, "test_scan_clock")
    if clock is not None:
        return _Claim(Style.CLOCKED_SCAN, scan_in, (clock,), test.storage[0], outputs)
    clock_a, clock_b = only_pin(cell, "test_scan_clock_a"), only_pin(cell, "test_scan_clock_b")
    if clock_a is None:
        return None
    clocks = (clock_a, clock_b) if clock_b else (clock_a,)
    return _Claim(Style.LSSD, scan_in, clocks, test.storage[0], outputs)


def _shows(cell: Cell, name: str) -> bool:
    """Return whether an output may show the state when the cell shifts."""
    test = cell.test_cell
    signal = test.signal_types.get(name, "") if test else ""
    known = cell.pins[name].function is not None
    return known or signal.startswith("test_scan_out") or bool(test and name in test.functions)


def _declared_inverse(cell: Cell, name: str) -> bool:
    signal = cell.test_cell.signal_types.get(name, "") if cell.test_cell else ""
    return signal == "test_scan_out_inverted"


def _known(cell: Cell, claim: _Claim, model: TableModel) -> bool:
    """Return whether the table speaks of all pins that the declarations speak of."""
    mission = claim.mission
    names = {claim.scan_in, *claim.clocks}
    for expression in (mission.clock, mission.data):
        names |= set(support(expression)) & cell.pins.keys() if expression is not None else set()
    return names <= set(model.inputs)


def _confirmed(
    cell: Cell, claim: _Claim, model: TableModel, off: Mapping[str, int]
) -> ScanRole | None:
    """Return the role if some values of the other inputs let the cell shift and work."""
    clock = literal(claim.mission.clock) if claim.mission.clock is not None else None
    if clock is None:
        return None
    rest = {**off, clock[0]: int(clock[1])}
    data = claim.mission.data
    moving = {claim.scan_in, *rest, *(support(data) if data is not None else ())}
    others = [name for name in model.inputs if name not in moving]
    for held in patterns(others):
        shown = _shift_outputs(cell, claim, model, rest, held)
        if shown and (data is None or _captures(cell, claim, model, rest, held)):
            return _role(claim, *_relative(cell, shown), off)
    return None


def _shift_outputs(
    cell: Cell, claim: _Claim, model: TableModel, rest: Mapping[str, int], held: Mapping[str, int]
) -> tuple[ScanOutput, ...]:
    """Return the outputs that show scan-in after the shift pulses, those for scan alone first."""
    only = test_only_outputs(cell)
    found = _following(cell, claim, _runs(model, claim.clocks, rest, held))
    # What shows scan-in before the last pulse already is L1, and L2 is to be shown.
    early = _following(cell, claim, _runs(model, claim.clocks[:-1], rest, held))
    last = {name: turned for name, turned in found.items() if name not in early} or found
    outputs = [ScanOutput(name, turned, name in only) for name, turned in last.items()]
    return tuple(sorted(outputs, key=lambda item: not item.test_only))


def _following(cell: Cell, claim: _Claim, runs: Sequence[_Run]) -> dict[str, bool]:
    """Return the outputs that equal scan-in (False) or its inverse (True) in all runs."""
    return {
        name: inverted
        for name in claim.outputs
        for inverted in (False, True)
        if (function := cell.pins[name].function) is not None
        and all(_shown(function, run.after) == run.inputs[claim.scan_in] ^ inverted for run in runs)
    }


def _relative(cell: Cell, outputs: tuple[ScanOutput, ...]) -> tuple[tuple[ScanOutput, ...], bool]:
    """Return the outputs relative to the mission state instead of scan-in, and scan-in's own."""
    for output in outputs:
        own = _mission_inverse(cell, output.pin)
        if own is not None:
            turned = own ^ output.inverted
            kept = (replace(item, inverted=item.inverted ^ turned) for item in outputs)
            return tuple(kept), turned
    return outputs, False


def _mission_inverse(cell: Cell, pin: str) -> bool | None:
    """Return whether an output shows the inverse of the mission state; None if it shows neither."""
    test = cell.test_cell
    function = test.functions.get(pin) if test else None
    own = literal(function) if function is not None else None
    if test is None or own is None:
        return None
    mission = test.storage[0]
    if own[0] not in (mission.state, mission.state_inverted):
        return None
    return own[1] ^ (own[0] == mission.state_inverted)


def _captures(
    cell: Cell, claim: _Claim, model: TableModel, rest: Mapping[str, int], held: Mapping[str, int]
) -> bool:
    """Return whether a mission pulse does to each output what the mission storage says."""
    mission, test = claim.mission, cell.test_cell
    if mission.clock is None or mission.data is None or test is None:
        return False
    pulses = [*support(mission.clock)]
    if mission.clock_also is not None:
        pulses += support(mission.clock_also)
    pulses = [name for name in pulses if name in rest]
    for run in _runs(model, pulses, rest, held):
        state = _mission_state(cell, run.before)
        values = {**run.inputs, mission.state: state, mission.state_inverted: 1 - state}
        state = evaluate(mission.data, values, 1)
        for name in test.functions:
            inverse, shows = _mission_inverse(cell, name), cell.pins[name].function
            if (
                inverse is not None
                and shows is not None
                and _shown(shows, run.after) != state ^ inverse
            ):
                return False
    return True


def _mission_state(cell: Cell, nodes: Mapping[str, Value]) -> int:
    """Return the mission state that the outputs show (0 where none shows it)."""
    for pin in cell.outputs():
        inverse = _mission_inverse(cell, pin.name)
        shown = _shown(pin.function, nodes) if pin.function is not None else None
        if inverse is not None and shown is not None:
            return shown ^ inverse
    return 0


def _runs(
    model: TableModel, clocks: Sequence[str], rest: Mapping[str, int], held: Mapping[str, int]
) -> list[_Run]:
    """Pulse ``clocks`` one after another, for all data and from all states."""
    free = [name for name in model.inputs if name not in rest and name not in held]
    found: list[_Run] = []
    for data in patterns(free):
        for before in patterns(model.nodes):
            idle = {**held, **data, **rest}
            start: dict[str, Value] = model.settle(idle, idle, before)
            after = nodes = start
            for clock in clocks:
                on = {**idle, clock: 1 - idle[clock]}
                after = model.settle(idle, on, nodes)
                nodes = model.settle(on, idle, after)
            found.append(_Run(idle, start, after))
    return found


def _shown(function: Expression, nodes: Mapping[str, Value]) -> Value:
    found = literal(function)
    value = nodes.get(found[0]) if found else None
    return None if value is None or found is None else value ^ found[1]


def _role(
    claim: _Claim, outputs: tuple[ScanOutput, ...], scan_in_inverted: bool, off: Mapping[str, int]
) -> ScanRole | None:
    clock = literal(claim.mission.clock) if claim.mission.clock is not None else None
    data = literal(claim.mission.data) if claim.mission.data is not None else None
    if not outputs:
        return None
    lssd = claim.style is Style.LSSD
    rest = ((clock[0], int(clock[1])),) if clock else ()
    return ScanRole(
        style=claim.style,
        data=data[0] if data else None,
        scan_in=claim.scan_in,
        scan_in_inverted=scan_in_inverted,
        outputs=outputs,
        clock=clock[0] if clock else None,
        scan_clock=None if lssd else claim.clocks[0],
        clock_a=claim.clocks[0] if lssd else None,
        clock_b=claim.clocks[1] if lssd and len(claim.clocks) > 1 else None,
        off_values=(*rest, *off.items()),
    )
