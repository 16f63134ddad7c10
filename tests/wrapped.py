"""Storage cells in a wrapping, so that a simulation can set and see their states.

The library's own model sits inside. Around it: data pins and outputs lag by one time unit, which
keeps models without delays free of races; while ``bench.loading`` is 1 and the instance is marked
``mine``, its pins are driven so that it takes ``value`` by its own clock; ``state`` shows what it
holds. Works for every library whose cells say their function, and for models of any style.
"""

import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from itertools import product

from insertdft.library.cell import Cell, Storage, StorageKind, Style
from insertdft.library.expression import Expression, evaluate
from insertdft.library.functions import literal, support
from insertdft.library.mission import one_state

SUFFIX = "__wrapped"
TOKEN = re.compile(
    r'//[^\n]*|/\*.*?\*/|\(\*.*?\*\)|"(?:\\.|[^"\\])*"|\\\S+|[A-Za-z_][\w$]*|\s+|.', re.DOTALL
)


@dataclass(frozen=True)
class Wrapping:
    """What a wrapped cell offers.

    Attributes:
        cell: The library cell.
        shown: (output pin, inverted) for each state bit.
        loads: For each input pin other than the clock, its value when loading 0 and 1, and by
            which state bit; None if the cell cannot be loaded.
        clock: Clock pin.
        clock_active: Level (or level after the edge) that makes it take data.
        is_latch: Whether it is transparent rather than edge-triggered.
    """

    cell: Cell
    shown: tuple[tuple[str, bool], ...]
    loads: Mapping[str, tuple[int, int, int]] | None
    clock: str
    clock_active: int
    is_latch: bool

    @property
    def bits(self) -> int:
        """Number of state bits."""
        return len(self.shown)


def wrapping_of(cell: Cell) -> Wrapping | None:
    """Return the wrapping of a storage cell, None if its outputs do not show its state."""
    shown = _shown(cell)
    if not shown:
        return None
    clocks = {literal(item.clock) if item.clock else None for item in cell.storage}
    clock = clocks.pop() if len(clocks) == 1 else None
    loads = _loads(cell.storage, clock[0]) if clock and len(cell.storage) == len(shown) else None
    latch = bool(cell.storage) and cell.storage[0].kind is StorageKind.LATCH
    pin, inverted = clock or ("", False)
    return Wrapping(cell, shown, loads, pin, int(not inverted), latch)


def _shown(cell: Cell) -> tuple[tuple[str, bool], ...]:
    for role in cell.scan:
        if role.style is not Style.MUX_D and role.outputs:
            # L1 where an output shows it, as it is what captures and what A changes first.
            first = _output_of(cell, cell.storage[0]) if cell.storage else None
            if first:
                return (first,)
            return ((role.outputs[0].pin, role.outputs[0].inverted),)
    found = [_output_of(cell, item) for item in cell.storage]
    return tuple(item for item in found if item) if all(found) else ()


def _output_of(cell: Cell, storage: Storage) -> tuple[str, bool] | None:
    for pin in cell.outputs():
        own = literal(one_state(pin.function, storage)) if pin.function else None
        if own and own[0] == storage.state and pin.three_state is None:
            return pin.name, own[1]
    return None


def output_inversions(cell: Cell) -> dict[str, bool]:
    """Return the outputs that show the (first) state, and whether inverted."""
    for role in cell.scan:
        return {item.pin: item.inverted for item in role.outputs}
    found = {}
    for pin in cell.outputs():
        own = literal(one_state(pin.function, cell.storage[0])) if pin.function else None
        if own and own[0] == cell.storage[0].state:
            found[pin.name] = own[1]
    return found


def _loads(storages: tuple[Storage, ...], clock: str) -> dict[str, tuple[int, int, int]] | None:
    """Return pin -> (value for 0, value for 1, state bit), or None."""
    loads: dict[str, tuple[int, int, int]] = {}
    for bit, storage in enumerate(storages):
        found = [_pins_for(storage, clock, value) for value in (0, 1)]
        if found[0] is None or found[1] is None:
            return None
        for pin, low in found[0].items():
            loads[pin] = (low, found[1][pin], bit)
    return loads


def _pins_for(storage: Storage, clock: str, value: int) -> dict[str, int] | None:
    """Return input values under which the storage takes ``value`` whatever it held."""
    if storage.data is None:
        return None
    states = {storage.state, storage.state_inverted}
    forced = [item for item in (storage.clear, storage.preset) if item is not None]
    used = {name for item in (storage.data, *forced) for name in support(item)}
    pins = sorted(used - states - {clock})
    for values in product((0, 1), repeat=len(pins)):
        given = dict(zip(pins, values, strict=True))
        taken = {_value(storage.data, given, storage, held) for held in (0, 1)}
        quiet = not any(_value(item, given, storage, 0) for item in forced)
        if quiet and taken == {value}:
            return given
    return None


def _value(expression: Expression, given: Mapping[str, int], storage: Storage, held: int) -> int:
    states = {storage.state: held, storage.state_inverted: 1 - held}
    return evaluate(expression, {**given, **states}, 1)


def wrapper_text(wrapping: Wrapping) -> str:
    """Return the module that wraps a cell."""
    cell = wrapping.cell
    ports, lines = [], []
    for name, indices in _buses(cell).items():
        ports.append(name)
        direction = cell.pins[name if indices is None else f"{name}[{indices[0]}]"].direction
        width = "" if indices is None else f"[{max(indices)}:{min(indices)}] "
        inner = f"{name}_inner"
        lines += [f"  {direction} {width}{name};", f"  wire {width}{inner};"]
        for index in [None] if indices is None else indices:
            pin = name if index is None else f"{name}[{index}]"
            at = "" if index is None else f"[{index}]"
            lines.append(_through(wrapping, pin, name + at, inner + at, direction, at))
    inside = ", ".join(f".{name}({name}_inner)" for name in ports)
    shown = ", ".join(
        f"{'~' if inverted else ''}{_spelled(pin, '_inner')}"
        for pin, inverted in reversed(wrapping.shown)
    )
    last = wrapping.bits - 1
    head = f"module {cell.name}{SUFFIX} ({', '.join(ports)});"
    return "\n".join(
        [
            head,
            "  reg mine;",
            f"  reg [{last}:0] value;",
            "  initial begin mine = 0; value = 0; end",
            "  wire on = mine & bench.loading;",
            *lines,
            f"  {cell.name} inner ({inside});",
            f"  wire [{last}:0] state = {{{shown}}};",
            "endmodule\n",
        ]
    )


def _spelled(pin: str, suffix: str) -> str:
    name, bracket, index = pin.partition("[")
    return f"{name}{suffix}{bracket}{index}"


def _through(wrapping: Wrapping, pin: str, outer: str, inner: str, direction: str, at: str) -> str:
    """Return how one pin passes the wrapping."""
    if direction == "output":
        return f"  assign #1 {outer} = {inner};"
    if wrapping.loads is not None and pin == wrapping.clock:
        drive = "bench.load_gate" if wrapping.is_latch else "bench.load_clock"
        level = drive if wrapping.clock_active else f"~{drive}"
        return f"  assign {inner} = on ? {level} : {outer};"
    late = f"{pin.partition('[')[0]}_late{at.strip('[]')}"
    plain = f"  wire {late};\n  assign #1 {late} = {outer};\n" if _is_data(wrapping, pin) else ""
    source = late if plain else outer
    if wrapping.loads is None or pin not in wrapping.loads:
        return f"{plain}  assign {inner} = {source};"
    low, high, bit = wrapping.loads[pin]
    value = f"1'b{low}" if low == high else f"{'~' if low else ''}value[{bit}]"
    return f"{plain}  assign {inner} = on ? {value} : {source};"


def _is_data(wrapping: Wrapping, pin: str) -> bool:
    """Return whether a pin only matters when the cell takes data."""
    cell = wrapping.cell
    others = [
        expression
        for item in cell.storage
        for expression in (item.clock, item.clear, item.preset)
        if expression is not None
    ]
    clocks = {name for expression in others for name in support(expression)}
    for role in cell.scan:
        named = (role.clock, role.scan_clock, role.clock_a, role.clock_b, role.clock_2)
        clocks |= {name for name in named if name}
    if cell.storage:
        return pin not in clocks
    return pin in {name for role in cell.scan for name in (role.data, role.scan_in)}


def _buses(cell: Cell) -> dict[str, list[int] | None]:
    """Return the ports of a cell: scalars with None, buses with their indices."""
    found: dict[str, list[int] | None] = {}
    for pin in cell.pins.values():
        if pin.direction == "internal":
            continue
        name, bracket, index = pin.name.partition("[")
        if not bracket:
            found[name] = None
        else:
            found[name] = [*(found.get(name) or []), int(index[:-1])]
    return found


def with_wrapped(text: str, cells: Iterable[str]) -> str:
    """Return netlist text in which instances of ``cells`` are instances of their wrappings."""
    wanted = set(cells)
    parts, before = [], ";"
    for match in TOKEN.finditer(text):
        token = match[0]
        if before in (";", "endmodule") and token in wanted:
            parts.append(token + SUFFIX)
        else:
            parts.append(token)
        if not token.isspace() and not token.startswith(("//", "/*", "(*")):
            before = token
    return "".join(parts)
