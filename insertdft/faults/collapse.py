"""Faults that no test tells apart: equivalence inside one cell.

Two faults at the pins of a cell are equivalent when all outputs of the cell become the same
functions. For gates this is the textbook rule (AND: input at 0 and output at 0; inverter: both;
XOR: none); for complex cells it finds what their function allows. Nothing is collapsed through
storage. Dominance is not used.
"""

from collections.abc import Iterator
from dataclasses import dataclass, field
from functools import lru_cache
from typing import Final, NamedTuple

import numpy as np
from scipy.sparse import coo_array
from scipy.sparse.csgraph import connected_components

from insertdft.faults.sites import Sites, find_sites
from insertdft.library.cell import Cell
from insertdft.library.expression import And, Expression, Not, Or, Var, columns, evaluate, variables
from insertdft.netlist import Ids
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.lowering import storages
from insertdft.simulate.pin_rows import PinRows, pins_by_cell

#: Functions of more inputs are not tabulated; gates of any width are known by their form.
MOST_INPUTS: Final = 10


@dataclass(frozen=True, slots=True, eq=False)
class FaultList:
    """All faults of the sites, and their classes.

    Attributes:
        sites: Places; fault ``2 * site + value``.
        class_of: Class of each fault, numbered by their first fault.
        first: First fault of each class, which stands for it.
    """

    sites: Sites
    class_of: Ids = field(repr=False)
    first: Ids = field(repr=False)

    @property
    def total(self) -> int:
        """Number of faults before collapsing."""
        return len(self.class_of)

    @property
    def collapsed(self) -> int:
        """Number of classes."""
        return len(self.first)

    def sizes(self) -> Ids:
        """Return the number of faults in each class."""
        return np.bincount(self.class_of, minlength=self.collapsed).astype(np.int32)


class PinFault(NamedTuple):
    """One pin of a cell stuck at a value."""

    pin: str
    value: int


def make_faults(circuit: Circuit) -> FaultList:
    """Return the collapsed fault list of a circuit made without clocks."""
    sites = find_sites(circuit)
    pairs = list(_same_pairs(sites))
    one = np.concatenate([np.zeros(0, np.int64), *(a for a, _ in pairs)])
    two = np.concatenate([np.zeros(0, np.int64), *(b for _, b in pairs)])
    count = 2 * len(sites.net)
    graph = coo_array((np.ones(len(one), np.int8), (one, two)), shape=(count, count))
    _, label = connected_components(graph, directed=False)
    _, first, class_of = np.unique(label, return_index=True, return_inverse=True)
    order = np.argsort(first, kind="stable")
    rank = np.empty_like(order)
    rank[order] = np.arange(len(order))
    return FaultList(sites, rank[class_of].astype(np.int32), first[order].astype(np.int32))


def _same_pairs(sites: Sites) -> Iterator[tuple[Ids, Ids]]:
    """Yield pairs of equivalent faults, cell type by cell type."""
    design = sites.circuit.design
    for pins in pins_by_cell(
        design.cell, design.pin_start, design.pin_name, design.pin_names, len(design.cells)
    ):
        cell = design.cells[pins.cell]
        if cell is None:
            continue
        place = {name: _sites_of(sites, cell, pins, name) for name in pins.rows}
        for group in equivalent_faults(cell):
            here = [fault for fault in group if fault.pin in place]
            for fault in here[1:]:
                one, two = place[here[0].pin], place[fault.pin]
                both = (one >= 0) & (two >= 0)
                yield 2 * one[both] + here[0].value, 2 * two[both] + fault.value


def _sites_of(sites: Sites, cell: Cell, pins: PinRows, name: str) -> Ids:
    """Return the site at one pin of every instance, -1 where it has none."""
    design, rows = sites.circuit.design, pins.rows[name]
    known = np.maximum(rows, 0)
    if cell.pins[name].direction == "input" if name in cell.pins else True:
        found = sites.at_row(known)
    else:
        nets = design.pin_net[known]
        found = np.where(nets >= 0, sites.stem_of_net[nets], -1)
        # On a bus the pin is not the net.
        found = np.where(sites.circuit.node_row[sites.circuit.slot_of_net[nets]] == rows, found, -1)
    return np.where(rows >= 0, found, -1).astype(np.int64)


@lru_cache(maxsize=4096)
def equivalent_faults(cell: Cell) -> tuple[tuple[PinFault, ...], ...]:
    """Return the groups, of two or more, of equivalent faults at the pins of a logic cell."""
    inputs = [pin.name for pin in cell.inputs()]
    functions = {pin.name: pin.function for pin in cell.outputs()}
    if storages(cell) or cell.state_table or None in functions.values():
        return ()
    if any(pin.three_state is not None for pin in cell.outputs()):
        return ()
    known = {name: function for name, function in functions.items() if function is not None}
    if len(inputs) > MOST_INPUTS:
        return _by_form(known)
    return _by_function(inputs, known)


def _by_function(
    inputs: list[str], functions: dict[str, Expression]
) -> tuple[tuple[PinFault, ...], ...]:
    ones = (1 << (1 << len(inputs))) - 1
    good = dict(zip(inputs, columns(len(inputs)), strict=True))
    healthy = tuple(evaluate(function, good, ones) for function in functions.values())
    groups: dict[tuple[int, ...], list[PinFault]] = {}
    for name in (*inputs, *functions):
        for value in (0, 1):
            stuck = ones if value else 0
            seen = good | {name: stuck} if name in good else good
            tables = tuple(
                stuck if output == name else evaluate(function, seen, ones)
                for output, function in functions.items()
            )
            if tables != healthy:
                groups.setdefault(tables, []).append(PinFault(name, value))
    return tuple(tuple(group) for group in groups.values() if len(group) > 1)


def _by_form(functions: dict[str, Expression]) -> tuple[tuple[PinFault, ...], ...]:
    """Return the groups of a wide gate: one output, AND or OR of its pins, maybe inverted."""
    if len(functions) != 1:
        return ()
    ((output, function),) = functions.items()
    inverted = isinstance(function, Not)
    inner = function.part if isinstance(function, Not) else function
    if not isinstance(inner, And | Or) or not all(isinstance(part, Var) for part in inner.parts):
        return ()
    value = int(isinstance(inner, Or))
    group = [PinFault(name, value) for name in variables(inner)]
    return ((*group, PinFault(output, value ^ inverted)),)
