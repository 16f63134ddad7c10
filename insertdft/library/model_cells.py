"""Cells from Verilog models, and what models add to cells that Liberty describes."""

import re
from collections.abc import Mapping, Sequence
from dataclasses import replace
from typing import Final

from insertdft.diagnostics import Diagnostic, Severity
from insertdft.library.cell import Cell, Pin, Storage
from insertdft.library.expression import Expression, Var, substitute
from insertdft.library.models import Model, Models
from insertdft.library.verilog_text import Unit, units_of
from insertdft.library.verilog_tree import UnsupportedError
from insertdft.text import SourceText

_HEAD: Final = re.compile(r"\s*\w+\s+(?:\\\S+|[\w$]+)\s*(?:\((.*?)\))?\s*;", re.DOTALL)
_PORT: Final = re.compile(r"(\\\S+|[A-Za-z_][\w$]*)\s*(?=,|\Z)")
_CALLED: Final = re.compile(
    r"(?:^|;)\s*([A-Za-z_][\w$]*)\s+(?=[^;]*\()|(?:^|;)\s*([A-Za-z_][\w$]*)\s*\("
)
_HINT: Final = (
    "give a Liberty description of the cell, or write its model with the gates, primitives and "
    "procedures that docs/libraries.md lists"
)


def read_units(sources: Sequence[SourceText]) -> list[Unit]:
    """Return the modules and primitives of Verilog files."""
    return units_of(sources)


def pin_order(unit: Unit) -> tuple[str, ...] | None:
    """Return the ports of a module in the order of its header, None if it has vectors there."""
    head = _HEAD.match(unit.text)
    if head is None or head[1] is None:
        return () if head else None
    if "[" in head[1] or "." in head[1]:
        return None
    return tuple(port[1:] if port[0] == "\\" else port for port in _PORT.findall(head[1]))


def with_models(
    cells: Mapping[str, Cell], units: Sequence[Unit]
) -> tuple[dict[str, Cell], list[Diagnostic]]:
    """Return the cells, and those that only models describe.

    A cell of Liberty keeps what Liberty says; the model gives its pin order, and its function where
    Liberty gives none. Modules that cells only wrap are no cells.

    Returns:
        The cells, and for each model that cannot be derived a warning.
    """
    models = Models(units)
    parts = _parts(units)
    found: dict[str, Cell] = dict(cells)
    problems: list[Diagnostic] = []
    for unit in models.units.values():
        known = cells.get(unit.name)
        if known is not None:
            found[unit.name] = _completed(known, unit, models, problems)
        elif not unit.is_primitive and unit.name not in parts:
            found[unit.name] = _derived(unit, models, problems)
    return found, problems


def _completed(cell: Cell, unit: Unit, models: Models, problems: list[Diagnostic]) -> Cell:
    cell = replace(cell, pin_order=pin_order(unit) or cell.pin_order)
    silent = [pin for pin in cell.outputs() if pin.function is None]
    if not silent or cell.storage or cell.state_table or cell.test_cell:
        return cell
    model = _derived(unit, models, problems)
    pins = {
        name: replace(
            pin, function=model.pins[name].function, three_state=model.pins[name].three_state
        )
        if pin in silent and name in model.pins
        else pin
        for name, pin in cell.pins.items()
    }
    return replace(cell, pins=pins, storage=model.storage)


def _derived(unit: Unit, models: Models, problems: list[Diagnostic]) -> Cell:
    """Return the cell that a module is; without functions, and reported, if it is not derivable."""
    try:
        return cell_of(unit, models.model(unit.name))
    except UnsupportedError as fault:
        message = f"the model of `{unit.name}` gives no function, because {fault}"
        problems.append(
            Diagnostic("cell-model-unsupported", Severity.WARNING, message, unit.span, _HINT)
        )
    order = pin_order(unit)
    directions = _directions(unit)
    pins = {name: Pin(name, directions.get(name, "inout")) for name in order or ()}
    return Cell(unit.name, None, pins, pin_order=order, span=unit.span)


def cell_of(unit: Unit, model: Model) -> Cell:
    """Return the cell that a derived model is, its states named ``IQ`` as in Liberty."""
    several = len(model.storages) > 1
    taken = set(model.ports)
    names: dict[str, Expression] = {}
    storages: list[Storage] = []
    for number, storage in enumerate(model.storages, 1):
        state = _free(f"IQ{number if several else ''}", taken)
        inverse = _free(f"IQN{number if several else ''}", taken)
        names |= {storage.state: Var(state), storage.state_inverted: Var(inverse)}
        storages.append(replace(storage, state=state, state_inverted=inverse))

    def renamed(expression: Expression | None) -> Expression | None:
        return None if expression is None else substitute(expression, names)

    pins: dict[str, Pin] = {}
    for port in model.ports:
        driver = model.drivers.get(port)
        pins[port] = Pin(
            port,
            model.directions.get(port, "inout"),
            function=renamed(driver.function) if driver else None,
            three_state=renamed(driver.three_state) if driver else None,
        )
    stored = tuple(
        replace(
            item,
            data=renamed(item.data),
            clock=renamed(item.clock),
            clear=renamed(item.clear),
            preset=renamed(item.preset),
        )
        for item in storages
    )
    return Cell(unit.name, None, pins, pin_order=model.ports, storage=stored, span=unit.span)


def _free(name: str, taken: set[str]) -> str:
    while name in taken:
        name = f"_{name}"
    taken.add(name)
    return name


def _parts(units: Sequence[Unit]) -> frozenset[str]:
    """Return the modules that are the inside of cells.

    Kits wrap one module by a cell for each drive: same ports, its name followed by the drive.
    """
    orders = {unit.name: pin_order(unit) for unit in units if not unit.is_primitive}
    return frozenset(
        word
        for unit in units
        if not unit.is_primitive
        for pair in _CALLED.findall(unit.text)
        for word in pair
        if word != unit.name
        and unit.name.startswith(word or " ")
        and orders.get(word, ()) == orders[unit.name]
    )


def _directions(unit: Unit) -> dict[str, str]:
    found: dict[str, str] = {}
    for match in re.finditer(r"\b(input|output|inout)\b([^;)]*)", unit.text):
        for word in re.findall(r"\\\S+|[A-Za-z_][\w$]*", match[2]):
            if word not in ("reg", "wire", "input", "output", "inout"):
                found.setdefault(word[1:] if word[0] == "\\" else word, match[1])
    return found
