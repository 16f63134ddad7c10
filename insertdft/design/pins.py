"""Give every cell name its cell and every pin its direction."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Final

import numpy as np
import numpy.typing as npt

from insertdft.design.flat import INOUT, INPUT, OUTPUT, UNKNOWN
from insertdft.design.gate_storage import storage_module
from insertdft.diagnostics import Diagnostic, Severity, nearest
from insertdft.library.cell import Cell, Library
from insertdft.library.primitives import primitive_cell
from insertdft.netlist import PRIMITIVES, Ids, Module, Netlist

DIRECTIONS: Final = {"input": INPUT, "output": OUTPUT, "inout": INOUT, "internal": INPUT}


@dataclass(frozen=True, slots=True, eq=False)
class Linked:
    """The netlist's columns with cells and directions.

    Attributes:
        cell_names: See ``Design``.
        cells: See ``Design``.
        pin_names: See ``Design``.
        is_module: Shape (len(cell_names),), whether the entry is a module of the netlist that is
            opened (one that is storage made of gates is a cell instead).
        instance_cell: By module, shape (n,), ids into ``cell_names``.
        pin_name: By module, shape (m,), ids into ``pin_names``.
        pin_direction: By module, shape (m,).
    """

    cell_names: tuple[str, ...]
    cells: tuple[Cell | None, ...]
    pin_names: tuple[str, ...]
    is_module: npt.NDArray[np.bool_]
    instance_cell: Mapping[str, Ids]
    pin_name: Mapping[str, Ids]
    pin_direction: Mapping[str, Ids]


class _Tables:
    """Names that grow while modules are linked."""

    def __init__(self, netlist: Netlist, library: Library) -> None:
        self.netlist = netlist
        self.cell_names = list(netlist.cell_names)
        self.cells = [_library_cell(netlist, library, name) for name in self.cell_names]
        self.pin_names = list(netlist.pin_names)
        self._pin_ids = {name: number for number, name in enumerate(self.pin_names)}
        self._primitives: dict[tuple[str, int], int] = {}

    def pin_id(self, name: str) -> int:
        if name not in self._pin_ids:
            self._pin_ids[name] = len(self.pin_names)
            self.pin_names.append(name)
        return self._pin_ids[name]

    def primitive(self, kind: str, pins: int) -> int:
        key = (kind, pins)
        if key not in self._primitives:
            self._primitives[key] = len(self.cells)
            self.cell_names.append(kind)
            self.cells.append(primitive_cell(kind, pins))
        return self._primitives[key]


def _library_cell(netlist: Netlist, library: Library, name: str) -> Cell | None:
    """Return the library's cell; of a module, the cell that its gates amount to, if any."""
    if name in netlist.modules:
        return storage_module(netlist, library, netlist.modules[name])
    return library.cells.get(name)


def link_pins(netlist: Netlist, library: Library) -> tuple[Linked, list[Diagnostic]]:
    """Return cells and directions for every module, and every problem found."""
    tables = _Tables(netlist, library)
    found: list[Diagnostic] = []
    cells: dict[str, Ids] = {}
    names: dict[str, Ids] = {}
    directions: dict[str, Ids] = {}
    for module in netlist.modules.values():
        cells[module.name] = _cells_of(tables, module)
        linked = _pins_of(tables, module, cells[module.name], found)
        names[module.name], directions[module.name] = linked
    found += _black_boxes(tables, cells)
    pairs = zip(tables.cell_names, tables.cells, strict=True)
    is_module = np.array([cell is None and name in netlist.modules for name, cell in pairs], bool)
    return (
        Linked(
            cell_names=tuple(tables.cell_names),
            cells=tuple(tables.cells),
            pin_names=tuple(tables.pin_names),
            is_module=is_module,
            instance_cell=cells,
            pin_name=names,
            pin_direction=directions,
        ),
        found,
    )


def _cells_of(tables: _Tables, module: Module) -> Ids:
    """Return the instances' cells, gate primitives told apart by their number of pins."""
    kinds = [number for number, name in enumerate(tables.cell_names) if name in PRIMITIVES]
    gates = np.flatnonzero(np.isin(module.instance_cell, kinds))
    if len(gates) == 0:
        return module.instance_cell
    cells = module.instance_cell.copy()
    counts = np.diff(module.pin_start)
    for gate in gates.tolist():
        name = tables.netlist.cell_names[int(module.instance_cell[gate])]
        cells[gate] = tables.primitive(name, int(counts[gate]))
    return cells


def _pins_of(
    tables: _Tables, module: Module, cells: Ids, found: list[Diagnostic]
) -> tuple[Ids, Ids]:
    """Return pin names (positions replaced by names) and directions of one module's pins."""
    width = len(tables.pin_names)
    owner = np.repeat(cells, np.diff(module.pin_start)).astype(np.int64)
    keys, where = np.unique(owner * width + module.pin_name, return_inverse=True)
    name_of = np.empty(len(keys), np.int32)
    direction_of = np.empty(len(keys), np.int32)
    for number, key in enumerate(keys.tolist()):
        cell_id, pin_id = divmod(key, width)
        pin = tables.pin_names[pin_id]
        resolved = _resolve(tables, cell_id, pin)
        if isinstance(resolved, str):
            row = int(np.flatnonzero(where == number)[0])
            found.append(_pin_problem(tables, module, row, cell_id, pin, resolved))
            name_of[number], direction_of[number] = pin_id, UNKNOWN
        else:
            name_of[number], direction_of[number] = tables.pin_id(resolved[0]), resolved[1]
    return name_of[where].astype(np.int32), direction_of[where].astype(np.int32)


def _resolve(tables: _Tables, cell_id: int, pin: str) -> tuple[str, int] | str:
    """Return pin name and direction, or the slug of what is wrong."""
    cell = tables.cells[cell_id]
    if cell is None:
        return pin, UNKNOWN
    if pin in cell.pins:
        return pin, DIRECTIONS[cell.pins[pin].direction]
    if pin in cell.power_pins:
        return pin, INPUT
    if pin[0] == "#":
        place = int(pin[1:])
        if cell.pin_order is None:
            return "pin-order-unknown"
        if place >= len(cell.pin_order):
            return "pin-unknown"
        name = cell.pin_order[place]
        return (name, DIRECTIONS[cell.pins[name].direction]) if name in cell.pins else (name, INPUT)
    for bit in _bus_spellings(cell, pin):
        return bit, DIRECTIONS[cell.pins[bit].direction]
    return "pin-unknown"


def _bus_spellings(cell: Cell, pin: str) -> Iterator[str]:
    """Yield the cell's bit that a netlist calls ``D`` (1 bit) or ``D[k]`` (k from the lowest)."""
    head, _, place = pin.partition("[")
    bits = [name for name in cell.pins if name.startswith(head + "[")]
    bits.sort(key=lambda name: int(name[len(head) + 1 : -1]))
    number = int(place[:-1]) if place else 0
    if number < len(bits) and (place or len(bits) == 1):
        yield bits[number]


def _pin_problem(
    tables: _Tables, module: Module, row: int, cell_id: int, pin: str, slug: str
) -> Diagnostic:
    instance = int(np.searchsorted(module.pin_start, row, side="right")) - 1
    cell = tables.cells[cell_id]
    pins = list(cell.pins) if cell else []
    name = module.instance_names[instance]
    if slug == "pin-order-unknown":
        return Diagnostic(
            slug,
            Severity.ERROR,
            f"`{name}` connects `{tables.cell_names[cell_id]}` by position, and Liberty text"
            " gives pins no order",
            module.span(instance),
            hint="also give the Verilog models of the cells with --lib, or connect by name",
        )
    return Diagnostic(
        slug,
        Severity.ERROR,
        f"`{name}` connects pin `{pin}`, which cell `{tables.cell_names[cell_id]}` does not have",
        module.span(instance),
        hint=nearest(pin, pins) or f"its pins are {', '.join(pins)}",
    )


def _black_boxes(tables: _Tables, cells: Mapping[str, Ids]) -> list[Diagnostic]:
    found: dict[int, list[tuple[Module, int]]] = {}
    unknown = [
        number
        for number, name in enumerate(tables.cell_names)
        if tables.cells[number] is None
        and name not in tables.netlist.modules
        and name not in PRIMITIVES
    ]
    for name, ids in cells.items():
        module = tables.netlist.modules[name]
        for instance in np.flatnonzero(np.isin(ids, unknown)).tolist():
            found.setdefault(int(ids[instance]), []).append((module, instance))
    return [_black_box(tables.cell_names[number], places) for number, places in found.items()]


def _black_box(cell: str, places: list[tuple[Module, int]]) -> Diagnostic:
    module, instance = places[0]
    return Diagnostic(
        "cell-unknown",
        Severity.WARNING,
        f"`{cell}` is neither a module nor a library cell and is kept as a black box",
        module.span(instance),
        hint="give the library or the netlist that describes it, or accept it as it is",
        names=tuple(f"{at.name}.{at.instance_names[number]}" for at, number in places),
    )
