"""One Liberty cell group -> ``Cell``, without its scan roles."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from insertdft.library.cell import Arc, Cell, Pin, Storage, TestCell
from insertdft.library.expression import Expression
from insertdft.library.liberty_buses import PinText, Range, open_pins, read_types
from insertdft.library.liberty_expressions import Reader, for_bit
from insertdft.library.liberty_storage import chained, read_state_table, read_storages
from insertdft.library.liberty_syntax import Group
from insertdft.library.tables import LazyTables, Templates

_GATE_PINS: Final = {
    "clock_gate_clock_pin": "clock",
    "clock_gate_enable_pin": "enable",
    "clock_gate_test_pin": "test",
    "clock_gate_obs_pin": "obs",
    "clock_gate_out_pin": "out",
}


@dataclass(frozen=True, slots=True)
class Context:
    """What a cell takes from the library around it.

    Attributes:
        types: Bus types.
        templates: Table templates.
        reader: Reads expressions, collects problems.
        input_capacitance: ``default_input_pin_cap`` or None.
    """

    types: Mapping[str, Range]
    templates: Templates
    reader: Reader
    input_capacitance: float | None


@dataclass(frozen=True, slots=True)
class _Names:
    """What expressions of one cell may mention.

    Attributes:
        vectors: Bits of buses and bank variables.
        known: Pins, state variables and table nodes.
    """

    vectors: Mapping[str, tuple[str, ...]]
    known: Mapping[str, object]


def read_cell(group: Group, context: Context) -> Cell:
    """Return the cell that ``group`` describes."""
    reader = context.reader
    texts, buses = open_pins(group, {**context.types, **read_types(group)})
    outside = {text.name for text in texts if _direction(text) != "internal"}
    storage, banks = read_storages(group, reader, buses, outside)
    table, nodes = read_state_table(group, reader, outside)
    shown = {
        text.name: (node,)
        for text in texts
        if (node := nodes.get(text.text("internal_node") or "")) and text.name not in outside
    }
    vectors = {**buses, **banks, **shown, **{name: (node,) for name, node in nodes.items()}}
    states = dict.fromkeys((*_state_names(storage), *nodes.values()))
    names = _Names(vectors, {**{text.name: None for text in texts}, **states})
    pins = {text.name: _pin(text, names, context) for text in texts}
    test = _test_cell(group, context)
    return Cell(
        name=group.name,
        area=group.number("area"),
        pins=pins,
        power_pins=tuple(pin.name for pin in group.all_of("pg_pin")),
        storage=_linked(storage, texts, pins, test),
        state_table=table,
        test_cell=test,
        clock_gate=group.text("clock_gating_integrated_cell"),
        dont_use=group.flag("dont_use"),
        dont_touch=group.flag("dont_touch"),
        power_management=_manages_power(group),
        footprint=group.text("cell_footprint"),
        span=group.span(),
    )


def _manages_power(group: Group) -> bool:
    flags = ("is_isolation_cell", "is_level_shifter", "always_on")
    return any(map(group.flag, flags)) or any(
        group.text(attribute) is not None for attribute in ("switch_cell_type", "retention_cell")
    )


def _state_names(storages: tuple[Storage, ...]) -> dict[str, None]:
    return dict.fromkeys(
        name for storage in storages for name in (storage.state, storage.state_inverted)
    )


def _direction(text: PinText) -> str:
    return (text.text("direction") or "internal").strip().lower()


def _pin(text: PinText, names: _Names, context: Context) -> Pin:
    direction = _direction(text)
    return Pin(
        name=text.name,
        direction=direction,
        function=_function(text, names, context.reader),
        three_state=_expression(text, "three_state", names, context.reader),
        capacitance=_load(text, direction, context),
        max_capacitance=text.number("max_capacitance"),
        is_clock=text.flag("clock"),
        signal_type=text.text("signal_type"),
        nextstate_type=text.text("nextstate_type"),
        clock_gate_role=_gate_role(text),
        internal_node=text.text("internal_node"),
        state_function=text.text("state_function"),
        test_output_only=text.flag("test_output_only"),
        arcs=_arcs(text, context.templates),
    )


def _function(text: PinText, names: _Names, reader: Reader) -> Expression | None:
    shows = ("function", "state_function", "internal_node")
    for attribute in shows[:1] if _direction(text) == "internal" else shows:
        found = _expression(text, attribute, names, reader)
        if found is not None:
            return found
    return None


def _expression(text: PinText, attribute: str, names: _Names, reader: Reader) -> Expression | None:
    owner = text.owner(attribute)
    found = reader.read(owner, attribute)
    if found is None:
        return None
    found = for_bit(found, text.bit, names.vectors)
    return found if reader.check_names(found, names.known, owner, attribute) else None


def _load(text: PinText, direction: str, context: Context) -> float | None:
    own = text.number("capacitance")
    if own is not None:
        return own
    edges = [text.number("rise_capacitance"), text.number("fall_capacitance")]
    given = [edge for edge in edges if edge is not None]
    if given:
        return max(given)
    return context.input_capacitance if direction in ("input", "inout") else None


def _gate_role(text: PinText) -> str | None:
    for attribute, role in _GATE_PINS.items():
        if text.flag(attribute):
            return role
    return None


def _arcs(text: PinText, templates: Templates) -> tuple[Arc, ...]:
    return tuple(
        Arc(
            related=tuple((timing.text("related_pin") or "").split()),
            kind=timing.text("timing_type") or "combinational",
            sense=timing.text("timing_sense"),
            when=timing.text("when"),
            tables=LazyTables(timing, templates),
        )
        for group in text.groups
        for timing in group.all_of("timing")
    )


def _test_cell(cell: Group, context: Context) -> TestCell | None:
    groups = cell.all_of("test_cell")
    if not groups:
        return None
    group, reader = groups[0], context.reader
    texts, buses = open_pins(group, {**context.types, **read_types(cell)})
    outside = {text.name for text in texts if _direction(text) != "internal"}
    storage, banks = read_storages(group, reader, buses, outside)
    pins = dict.fromkeys(text.name for text in texts)
    names = _Names({**buses, **banks}, {**pins, **_state_names(storage)})
    functions = {text.name: _expression(text, "function", names, reader) for text in texts}
    signals = {text.name: text.text("signal_type") for text in texts}
    return TestCell(
        storage=storage,
        functions={name: value for name, value in functions.items() if value is not None},
        signal_types={name: value for name, value in signals.items() if value is not None},
        test_output_only=frozenset(text.name for text in texts if text.flag("test_output_only")),
    )


def _linked(
    storage: tuple[Storage, ...],
    texts: list[PinText],
    pins: Mapping[str, Pin],
    test: TestCell | None,
) -> tuple[Storage, ...]:
    """Link the bits of a bank as ``scan_start_pin`` of one of its outputs says."""
    starts = [text for text in texts if text.text("scan_start_pin")]
    if not starts or len(storage) < 2:
        return storage
    scan_in = _scan_in(pins, test)
    if scan_in is None:
        return storage
    first = min(starts, key=lambda text: text.bit)
    from_msb = first.text("scan_start_pin") != first.name
    inverted = starts[0].flag("scan_pin_inverted")
    return chained(storage, scan_in, inverted=inverted, from_msb=from_msb)


def _scan_in(pins: Mapping[str, Pin], test: TestCell | None) -> str | None:
    """Return the one pin that is declared to be the scan input."""
    signals = test.signal_types if test else {}
    found = [
        pin.name
        for pin in pins.values()
        if (signals.get(pin.name) or pin.signal_type or "").startswith("test_scan_in")
        or pin.nextstate_type == "scan_in"
    ]
    return found[0] if len(found) == 1 else None
