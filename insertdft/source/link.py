"""Drafts to modules: connections of vectors become one row a bit, by the port's own bit names.

Only here do modules know each other. Whatever is one bit wide and goes to a library cell, which is
nearly everything, stays as the columns have it.
"""

from itertools import combinations
from typing import Final, NamedTuple

import numpy as np
import numpy.typing as npt

from insertdft.diagnostics import nearest
from insertdft.netlist import (
    CONST0,
    CONST1,
    OPEN,
    PRIMITIVES,
    Header,
    Ids,
    Module,
    Offsets,
    Port,
)
from insertdft.netlist.names import KEYWORDS, canonical
from insertdft.source.complaints import word_at
from insertdft.source.draft import Draft
from insertdft.source.ports import Linking
from insertdft.source.resolve import WIDE, Resolved
from insertdft.text import Span

#: Comparing every pair of so many columns is faster than sorting rows.
_FEW: Final = 12


def link_module(draft: Draft, resolved: Resolved, linking: Linking) -> Module:
    """Return the finished module."""
    _check_cells(draft, linking)
    pin_start, pin_name, pin_net = _pins(draft, resolved, linking)
    left, right, start = _assigns(draft, resolved, linking)
    names = draft.names
    if "" in names:
        names = [name or f"${number}" for number, name in enumerate(names)]
    return Module(
        name=draft.name,
        source=draft.prepared.source,
        start=draft.start,
        body_end=draft.body_end,
        header=draft.header or Header(False, None, True, draft.start, draft.start),
        ports=linking.ports[draft.name],
        net_names=draft.nets.names,
        vectors=draft.nets.vectors,
        net_kinds=draft.nets.kinds,
        instance_names=names,
        instance_cell=linking.cells.of_raw[draft.cells],
        instance_before=draft.before,
        instance_start=draft.starts,
        instance_end=draft.ends,
        pin_start=pin_start,
        pin_name=pin_name,
        pin_net=pin_net,
        assign_left=left,
        assign_right=right,
        assign_start=start,
        parameters=draft.parameters,
        code=draft.prepared.code,
    )


def _check_cells(draft: Draft, linking: Linking) -> None:
    """Complain about keywords in place of names, and modules instanced without a name."""
    cells = draft.cells
    raw = tuple(draft.tables.cells)
    for number in np.unique(cells).tolist():
        if raw[number] in KEYWORDS and raw[number] not in PRIMITIVES:
            first = int(draft.starts[np.flatnonzero(cells == number)[0]])
            linking.complaints.error(
                "netlist-syntax",
                f"`{raw[number]}` cannot start an instance",
                word_at(draft.prepared.source, first),
                "only cells, modules and gate primitives can be instanced",
            )
    _check_gates(draft, linking, [number for number, name in enumerate(raw) if name in PRIMITIVES])
    if "" not in draft.names and KEYWORDS.isdisjoint(draft.names):
        return
    for number, name in enumerate(draft.names):
        if name in KEYWORDS or (not name and raw[int(cells[number])] not in PRIMITIVES):
            linking.complaints.error(
                "netlist-syntax",
                f"this instance of `{raw[int(cells[number])]}` has no name of its own",
                word_at(draft.prepared.source, int(draft.starts[number])),
                "only gate primitives may stand without a name",
            )


def _check_gates(draft: Draft, linking: Linking, gates: list[int]) -> None:
    """Complain about gate primitives connected by name: their pins have none."""
    if not gates:
        return
    counts = np.diff(draft.row_start)
    by_name = np.array([pin[0] != "#" for pin in linking.raw_pins], bool)
    wrong = by_name[draft.pins] & np.repeat(np.isin(draft.cells, gates), counts)
    for instance in np.unique(np.repeat(np.arange(len(counts)), counts)[wrong]).tolist():
        linking.complaints.error(
            "netlist-syntax",
            f"gate `{draft.names[instance]}` is connected by name",
            word_at(draft.prepared.source, int(draft.starts[instance])),
            "connect it by position, the output first",
        )


class _Pins(NamedTuple):
    start: Offsets
    name: Ids
    net: Ids


def _pins(draft: Draft, resolved: Resolved, linking: Linking) -> _Pins:
    row_start = draft.row_start
    names = linking.pins.of_raw[draft.pins]
    numbers = draft.numbers
    nets = resolved.net[numbers] if len(numbers) else np.zeros(0, np.int32)
    _check_twice(draft, names, row_start, linking)
    is_module = np.array([name in linking.ports for name in linking.cells.all()], bool)
    to_module = np.repeat(
        is_module[linking.cells.of_raw[draft.cells]] if len(row_start) > 1 else [],
        np.diff(row_start),
    ).astype(bool)
    special = np.flatnonzero(to_module | (nets == WIDE))
    if len(special) == 0:
        return _Pins(row_start, names, nets)
    expanded = _Expansion(draft, resolved, linking, row_start)
    widths = np.ones(len(names), np.int64)
    widths[special] = [
        expanded.add(row, is_to_module=bool(to_module[row])) for row in special.tolist()
    ]
    offsets = np.concatenate(([0], np.cumsum(widths))).astype(np.int64)
    is_new = np.repeat(np.isin(np.arange(len(names)), special, assume_unique=True), widths)
    new_names, new_nets = np.repeat(names, widths), np.repeat(nets, widths)
    new_names[is_new], new_nets[is_new] = expanded.names, expanded.nets
    return _Pins(offsets[row_start], new_names, new_nets)


class _Expansion:
    """Rows that do not stay as they are, bit by bit."""

    def __init__(
        self, draft: Draft, resolved: Resolved, linking: Linking, row_start: Offsets
    ) -> None:
        self.names: list[int] = []
        self.nets: list[int] = []
        self._draft = draft
        self._resolved = resolved
        self._linking = linking
        self._row_start = row_start
        self._raw_pins = draft.pins
        self._numbers = draft.numbers
        self._cells = draft.cells
        self._cell_names = linking.cells.all()
        self._bit_ids: dict[tuple[str, str], tuple[Port, tuple[int, ...]]] = {}

    def add(self, row: int, *, is_to_module: bool) -> int:
        """Add the bits of one connection and return how many there are."""
        name = canonical(self._linking.raw_pins[int(self._raw_pins[row])])
        if is_to_module:
            return self._to_module(row, name)
        bits = self._resolved.bits(int(self._numbers[row]))
        nets = bits.nets if bits.is_sized else _shortest(bits.nets)
        ids = self._linking.pins
        if len(nets) == 1:
            self.names.append(ids.id(name))
        else:
            gap = " " if name[0] == "\\" else ""
            self.names.extend(ids.id(f"{name}{gap}[{place}]") for place in range(len(nets)))
        self.nets.extend(nets)
        return len(nets)

    def _to_module(self, row: int, pin: str) -> int:
        instance = int(np.searchsorted(self._row_start, row, side="right")) - 1
        cell = self._cell_names[int(self._linking.cells.of_raw[self._cells[instance]])]
        found = self._bit_ids.get((cell, pin)) or self._find(cell, pin)
        if found is None:
            self._no_port(instance, cell, pin)
            return 0
        port, ids = found
        bits = self._resolved.bits(int(self._numbers[row]))
        nets = bits.nets
        if not nets:
            nets = (OPEN,) * len(ids)
        elif not bits.is_sized:
            nets = (nets + (0,) * len(ids))[: len(ids)]
        elif len(nets) != len(ids):
            self._wrong_width(instance, port, len(ids), len(nets))
            return 0
        self.names.extend(ids)
        self.nets.extend(nets)
        return len(ids)

    def _find(self, cell: str, pin: str) -> tuple[Port, tuple[int, ...]] | None:
        ports = self._linking.ports[cell]
        if pin[0] == "#":
            place = int(pin[1:])
            port = ports[place] if place < len(ports) else None
        else:
            port = next((port for port in ports if port.name == pin), None)
        if port is None:
            return None
        ids = tuple(map(self._linking.pins.id, port.bit_names()))
        return self._bit_ids.setdefault((cell, pin), (port, ids))

    def _span(self, instance: int) -> Span:
        start, end = int(self._draft.starts[instance]), int(self._draft.ends[instance])
        return Span(self._draft.prepared.source, start, end)

    def _no_port(self, instance: int, cell: str, pin: str) -> None:
        names = [port.name for port in self._linking.ports[cell]]
        instance_name = self._draft.names[instance]
        if pin[0] == "#":
            fact = f"`{instance_name}` has more connections than module `{cell}` has ports"
        else:
            fact = f"`{instance_name}` connects `{pin}`, which module `{cell}` does not have"
        self._linking.complaints.error(
            "port-unknown",
            fact,
            self._span(instance),
            nearest(pin, names) or f"its ports are {', '.join(names) or 'none at all'}",
        )

    def _wrong_width(self, instance: int, port: Port, wanted: int, given: int) -> None:
        self._linking.complaints.error(
            "width-mismatch",
            f"port `{port.name}` of `{self._draft.names[instance]}` is {_bits(wanted)} wide and"
            f" is given {given}",
            self._span(instance),
            "connect as many bits as the port has",
        )


def _bits(count: int) -> str:
    return "1 bit" if count == 1 else f"{count} bits"


def _shortest(nets: tuple[int, ...]) -> tuple[int, ...]:
    """Return a constant without width as narrow as its value lets it be, at least one bit.

    Zeros in front say nothing, and of several x or z bits in front one says it all.
    """
    width = len(nets)
    while width > 1 and (nets[width - 1] == CONST0 or nets[width - 1] == nets[width - 2] != CONST1):
        width -= 1
    return nets[:width]


def _check_twice(draft: Draft, names: Ids, row_start: Offsets, linking: Linking) -> None:
    """Complain about a pin that one instance connects twice."""
    counts = np.diff(row_start)
    for count in np.unique(counts).tolist():
        if count < 2:
            continue
        instances = np.flatnonzero(counts == count)
        rows = names[row_start[instances][:, None] + np.arange(count)]
        for place in np.flatnonzero(_has_repeats(rows)).tolist():
            _complain_twice(draft, int(instances[place]), linking)


def _has_repeats(rows: Ids) -> npt.NDArray[np.bool_]:
    """Return for each row whether a value comes twice in it."""
    width = rows.shape[1]
    if width > _FEW:
        rows.sort(axis=1)
        return np.asarray((rows[:, 1:] == rows[:, :-1]).any(axis=1))
    found = np.zeros(len(rows), bool)
    for one, other in combinations(range(width), 2):
        found |= rows[:, one] == rows[:, other]
    return found


def _complain_twice(draft: Draft, instance: int, linking: Linking) -> None:
    start, end = int(draft.starts[instance]), int(draft.ends[instance])
    linking.complaints.error(
        "name-duplicate",
        f"`{draft.names[instance]}` connects one pin twice",
        Span(draft.prepared.source, start, end),
        "connect every pin once",
    )


def _assigns(draft: Draft, resolved: Resolved, linking: Linking) -> tuple[Ids, Ids, Offsets]:
    left: list[int] = []
    right: list[int] = []
    start: list[int] = []
    for assign in draft.assigns:
        targets = resolved.bits(assign.left).nets
        sources = resolved.bits(assign.right)
        nets = sources.nets
        if not sources.is_sized:
            nets = (nets + (0,) * len(targets))[: len(targets)]
        if len(nets) != len(targets):
            linking.complaints.error(
                "width-mismatch",
                f"the left side of this assignment is {_bits(len(targets))} wide, the right side"
                f" {len(nets)}",
                word_at(draft.prepared.source, assign.start),
                "give both sides the same width",
            )
            continue
        left.extend(targets)
        right.extend(nets)
        start.extend([assign.start] * len(targets))
    return np.array(left, np.int32), np.array(right, np.int32), np.array(start, np.int64)
