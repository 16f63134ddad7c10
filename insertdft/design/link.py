"""Netlist + library -> ``Design``: give every pin a direction and open the hierarchy.

Ports, ``assign`` aliases and supply nets are merged into single nets here, once, so that no later
stage has to follow them. Constants are merged last.
"""

from collections.abc import Iterable
from typing import Final, NamedTuple, TypeVar

import numpy as np
import numpy.typing as npt

from insertdft.design.drivers import find_double_drivers
from insertdft.design.flat import Design, Occurrence, TopPort
from insertdft.design.pins import Linked, link_pins
from insertdft.diagnostics import DesignError, Diagnostic, errors
from insertdft.library.cell import Library
from insertdft.netlist import FIRST_NET, Ids, Module, Netlist, Offsets

T = TypeVar("T", np.int32, np.int64)
Id = np.int32 | np.int64


def link(netlist: Netlist, library: Library) -> tuple[Design, tuple[Diagnostic, ...]]:
    """Return the flat design and what is worth a warning.

    Raises:
        DesignError: A pin that the cell does not have, connection by position to a cell whose pin
            order is unknown, or a net with two drivers.
    """
    linked, found = link_pins(netlist, library)
    if errors(found):
        raise DesignError(found)
    opened = _open_hierarchy(netlist, linked)
    net_of = _merge_nets(opened)
    design = Design(
        netlist=netlist,
        library=library,
        occurrences=opened.occurrences,
        cell_names=linked.cell_names,
        cells=linked.cells,
        pin_names=linked.pin_names,
        cell=opened.cell,
        occurrence=opened.occurrence,
        local=opened.local,
        pin_start=opened.pin_start,
        pin_name=opened.pin_name,
        pin_net=_through(net_of, opened.pin_net),
        pin_direction=opened.pin_direction,
        net_count=len(net_of),
        net_of=net_of,
        ports=_top_ports(netlist.top_module, net_of),
    )
    doubles = find_double_drivers(design)
    if doubles:
        raise DesignError(doubles)
    return design, tuple(found)


class _Piece(NamedTuple):
    """One module prepared for being laid down several times; nets are the module's own ids."""

    module: Module
    leaves: Offsets
    cell: Ids
    pin_counts: Offsets
    pin_name: Ids
    pin_net: Ids
    pin_direction: Ids
    children: tuple[tuple[int, str, Ids, Ids], ...]  # instance, module, inner nets, outer nets


class _Opened(NamedTuple):
    occurrences: tuple[Occurrence, ...]
    cell: Ids
    occurrence: Ids
    local: Ids
    pin_start: Offsets
    pin_name: Ids
    pin_net: Ids
    pin_direction: Ids
    net_total: int
    alias_a: Ids
    alias_b: Ids


def _open_hierarchy(netlist: Netlist, linked: Linked) -> _Opened:
    pieces: dict[str, _Piece] = {}
    occurrences: list[Occurrence] = []
    laid: list[tuple[_Piece, int]] = []
    aliases: list[tuple[Ids, Ids]] = []
    net_total, first = FIRST_NET, 0
    waiting = [(netlist.top, -1, -1, _NONE, _NONE)]
    while waiting:
        name, parent, instance, inner, outer = waiting.pop()
        piece = pieces.get(name) or pieces.setdefault(name, _prepare(netlist, linked, name))
        base = net_total
        aliases.append((_at(inner, base), outer))
        aliases.append((_at(piece.module.assign_left, base), _at(piece.module.assign_right, base)))
        number = len(occurrences)
        occurrences.append(Occurrence(name, parent, instance, base, first))
        laid.append((piece, base))
        net_total += len(piece.module.net_names) - FIRST_NET
        first += len(piece.leaves)
        waiting.extend(
            (child, number, place, inside, _at(outside, base))
            for place, child, inside, outside in reversed(piece.children)
        )
    return _collect(occurrences, laid, aliases, net_total)


_NONE: Final = np.zeros(0, np.int32)


def _collect(
    occurrences: list[Occurrence],
    laid: list[tuple[_Piece, int]],
    aliases: list[tuple[Ids, Ids]],
    net_total: int,
) -> _Opened:
    counts = [len(piece.leaves) for piece, _ in laid]
    pins = _join((piece.pin_counts for piece, _ in laid), np.int64)
    return _Opened(
        occurrences=tuple(occurrences),
        cell=_join((piece.cell for piece, _ in laid), np.int32),
        occurrence=np.repeat(np.arange(len(laid), dtype=np.int32), counts),
        local=_join((piece.leaves for piece, _ in laid), np.int32),
        pin_start=np.concatenate(([0], np.cumsum(pins))).astype(np.int64),
        pin_name=_join((piece.pin_name for piece, _ in laid), np.int32),
        pin_net=_join((_at(piece.pin_net, base) for piece, base in laid), np.int32),
        pin_direction=_join((piece.pin_direction for piece, _ in laid), np.int32),
        net_total=net_total,
        alias_a=_join((a for a, _ in aliases), np.int32),
        alias_b=_join((b for _, b in aliases), np.int32),
    )


def _join(parts: Iterable[npt.NDArray[Id]], kind: type[T]) -> npt.NDArray[T]:
    found = list(parts)
    whole = found[0] if len(found) == 1 else np.concatenate(found)
    return whole.astype(kind, copy=False)


def _at(nets: Ids, base: int) -> Ids:
    """Return module nets as flat ids of an occurrence; constants and OPEN stay what they are."""
    return np.where(nets >= FIRST_NET, nets + (base - FIRST_NET), nets).astype(np.int32)


def _prepare(netlist: Netlist, linked: Linked, name: str) -> _Piece:
    module = netlist.modules[name]
    cells = linked.instance_cell[name]
    is_child = linked.is_module[cells]
    leaves = np.flatnonzero(~is_child)
    counts = np.diff(module.pin_start)
    keep = np.repeat(~is_child, counts)
    rows = linked.pin_name[name]
    return _Piece(
        module=module,
        leaves=leaves,
        cell=cells[leaves],
        pin_counts=counts[leaves],
        pin_name=rows[keep],
        pin_net=module.pin_net[keep],
        pin_direction=linked.pin_direction[name][keep],
        children=tuple(_child(netlist, module, int(at)) for at in np.flatnonzero(is_child)),
    )


def _child(netlist: Netlist, module: Module, instance: int) -> tuple[int, str, Ids, Ids]:
    name = netlist.cell_names[int(module.instance_cell[instance])]
    inner_of = {
        bit: net
        for port in netlist.modules[name].ports
        for bit, net in zip(port.bit_names(), port.nets, strict=True)
    }
    rows = slice(int(module.pin_start[instance]), int(module.pin_start[instance + 1]))
    bits = [netlist.pin_names[pin] for pin in module.pin_name[rows].tolist()]
    outer = module.pin_net[rows]
    used = outer >= 0
    inner = np.fromiter((inner_of[bit] for bit in bits), np.int32, len(bits))
    return instance, name, inner[used], outer[used]


def _merge_nets(opened: _Opened) -> Ids:
    """Return the flat net of every local net: the lowest id of those it is merged with."""
    net_of = np.arange(opened.net_total, dtype=np.int32)
    low = np.minimum(opened.alias_a, opened.alias_b)
    high = np.maximum(opened.alias_a, opened.alias_b)
    wires = low >= FIRST_NET
    _merge(net_of, low[wires], high[wires])
    constants = (low >= 0) & ~wires & (high >= FIRST_NET)
    return _tie(net_of, low[constants], high[constants])


def _merge(net_of: Ids, low: Ids, high: Ids) -> None:
    """Give the nets that aliases connect, directly or through others, their lowest id.

    Each round hooks the higher of two roots under the lower and then halves all paths, so the
    rounds grow with the logarithm of the longest row of aliases.
    """
    while True:
        left, right = net_of[low], net_of[high]
        differ = left != right
        if not differ.any():
            return
        left, right = left[differ], right[differ]
        np.minimum.at(net_of, np.maximum(left, right), np.minimum(left, right))
        while (net_of[net_of] != net_of).any():
            net_of[:] = net_of[net_of]


def _tie(net_of: Ids, constants: Ids, nets: Ids) -> Ids:
    if len(nets) == 0:
        return net_of
    value = np.arange(len(net_of), dtype=np.int32)
    # The strongest statement wins here: x and z first, then 0 and 1; a clash of 0 and 1 on one
    # net is found by `find_double_drivers`, which looks at the aliases again.
    order = np.argsort(-constants, kind="stable")
    value[net_of[nets[order]]] = constants[order]
    return value[net_of]


def _through(net_of: Ids, nets: Ids) -> Ids:
    return np.where(nets >= 0, net_of[np.maximum(nets, 0)], nets).astype(np.int32)


def _top_ports(top: Module, net_of: Ids) -> tuple[TopPort, ...]:
    return tuple(
        TopPort(bit, port.name, port.direction, int(net_of[net]))
        for port in top.ports
        for bit, net in zip(port.bit_names(), port.nets, strict=True)
    )
