"""What a reader found in a netlist, in one form for all readers, and every bit spelled out.

The other readers (``by_pyslang``, ``by_pyverilog``) walk their own trees and give ``RawModule``s.
``expand`` gives each connection its bits. ``ours`` brings our columns into the same form.
"""

import re
from dataclasses import dataclass, field

from insertdft.netlist import FIRST_NET, OPEN, PRIMITIVES, Module, Netlist
from insertdft.netlist.names import plain, split_bit

#: One net bit: name without escapes and index (None for a scalar); a constant as ("0", None).
Bit = tuple[str, int | None]
Range = tuple[int, int]


@dataclass
class RawConnection:
    """Pin by name or place; bits from the least significant on, None if unconnected."""

    pin: str | int
    bits: tuple[Bit, ...] | None
    sized: bool = True


@dataclass
class RawInstance:
    cell: str
    name: str | None
    connections: list[RawConnection]


@dataclass
class RawModule:
    name: str
    ports: list[str] = field(default_factory=list)
    directions: dict[str, str] = field(default_factory=dict)
    outer: dict[str, str] = field(default_factory=dict)  # what others call a port, if not its net
    ranges: dict[str, Range | None] = field(default_factory=dict)
    instances: list[RawInstance] = field(default_factory=list)
    assigns: list[tuple[tuple[Bit, ...], tuple[Bit, ...], bool]] = field(default_factory=list)


@dataclass
class Expanded:
    """All that readers must agree on, bit by bit."""

    ports: list[tuple[str, str]]
    instances: list[tuple[str, str | None, dict[str, Bit | None]]]
    assigns: list[tuple[Bit, Bit]]


def indices(limits: Range) -> list[int]:
    msb, lsb = limits
    return list(range(lsb, msb + 1)) if msb >= lsb else list(range(lsb, msb - 1, -1))


def name_bits(name: str, limits: Range | None) -> tuple[Bit, ...]:
    return ((name, None),) if limits is None else tuple((name, i) for i in indices(limits))


def part(name: str, limits: Range, msb: int, lsb: int) -> tuple[Bit, ...]:
    order = indices(limits)
    return tuple((name, i) for i in order[order.index(lsb) : order.index(msb) + 1])


def number_bits(width: int, base: str, digits: str) -> tuple[Bit, ...]:
    digits = digits.replace("_", "").lower().replace("?", "z")
    if base == "d":
        text = digits * width if digits in "xz" else f"{int(digits):0{width}b}"
    else:
        per = {"b": 1, "o": 3, "h": 4}[base]
        text = "".join(d * per if d in "xz" else f"{int(d, 1 << per):0{per}b}" for d in digits)
    filler = text[0] if text[0] in "xz" else "0"
    text = text.rjust(width, filler)[-width:]
    return tuple((bit, None) for bit in reversed(text))


def expand(modules: dict[str, RawModule]) -> dict[str, Expanded]:
    return {name: _expand(module, modules) for name, module in modules.items()}


def _expand(module: RawModule, modules: dict[str, RawModule]) -> Expanded:
    ports = [
        (_bit_name(bit), module.directions[name])
        for name in module.ports
        for bit in name_bits(module.outer.get(name, name), module.ranges[name])
    ]
    instances = [
        (item.cell, item.name, _pins(item, modules.get(item.cell))) for item in module.instances
    ]
    assigns = []
    for left, right, sized in module.assigns:
        wide = right if sized else (right + (("0", None),) * len(left))[: len(left)]
        assigns += list(zip(left, wide, strict=True))
    return Expanded(ports, instances, sorted(assigns, key=repr))


def _bit_name(bit: Bit) -> str:
    return bit[0] if bit[1] is None else f"{bit[0]}[{bit[1]}]"


def _pins(item: RawInstance, module: RawModule | None) -> dict[str, Bit | None]:
    pins: dict[str, Bit | None] = {}
    for connection in item.connections:
        for name, bit in _rows(connection, module):
            assert name not in pins, f"{item.name}: {name} twice"
            pins[name] = bit
    return pins


def _rows(connection: RawConnection, module: RawModule | None) -> list[tuple[str, Bit | None]]:
    bits = connection.bits
    if module is not None:
        pin = connection.pin
        by_name = {module.outer.get(net, net): net for net in module.ports}
        net = module.ports[pin] if isinstance(pin, int) else by_name[pin]
        outer = module.outer.get(net, net)
        inner = [_bit_name(bit) for bit in name_bits(outer, module.ranges[net])]
        if bits is None:
            return [(bit, None) for bit in inner]
        if not connection.sized:
            bits = (bits + (("0", None),) * len(inner))[: len(inner)]
        return list(zip(inner, bits, strict=True))
    head = f"#{connection.pin}" if isinstance(connection.pin, int) else connection.pin
    if bits is None:
        return [(head, None)]
    if not connection.sized:
        text = "".join(bit[0] for bit in reversed(bits)).lstrip("0") or "0"
        text = re.sub(r"^(x+|z+)", lambda run: run[0][0], text)
        bits = tuple((bit, None) for bit in reversed(text))
    if len(bits) == 1:
        return [(head, bits[0])]
    return [(f"{head}[{place}]", bit) for place, bit in enumerate(bits)]


def ours(netlist: Netlist) -> dict[str, Expanded]:
    return {plain(name): _ours(netlist, module) for name, module in netlist.modules.items()}


def _ours(netlist: Netlist, module: Module) -> Expanded:
    ports = [(plain(bit), port.direction) for port in module.ports for bit in port.bit_names()]
    instances = []
    for view in netlist.instances(module):
        nameless = view.cell in PRIMITIVES and view.name[0] == "$"
        pins = {plain(pin): _our_bit(module, net) for pin, net in view.pins.items()}
        assert len(pins) == module.pin_start[view.number + 1] - module.pin_start[view.number]
        instances.append((plain(view.cell), None if nameless else plain(view.name), pins))
    assigns = [
        (_our_bit(module, left), _our_bit(module, right))
        for left, right in zip(
            module.assign_left.tolist(), module.assign_right.tolist(), strict=True
        )
    ]
    return Expanded(ports, instances, sorted(assigns, key=repr))


def _our_bit(module: Module, net: int) -> Bit | None:
    if net == OPEN:
        return None
    if net < FIRST_NET:
        return "01xz"[net], None
    head, index = split_bit(module.net_name(net))
    return plain(head), index
