"""How strong an output drives, for choosing a scan cell as strong as the plain one.

In this order: the largest load it may drive (``max_capacitance``), else how little its delay grows
with load (the slope of its delay table), else the number that ends the cell's name. Two outputs
are as strong as each other when the ratio is below the square root of 2 (common practice: drives
come in steps of 2).
"""

import math
import re
from typing import Final

from insertdft.library.cell import Cell, Pin, Table

_LOAD_AXIS: Final = "total_output_net_capacitance"
_LAST_NUMBER: Final = re.compile(r"(\d+)[A-Za-z]{0,3}\Z")


def steps_apart(first: Cell, first_pin: str, second: Cell, second_pin: str) -> int:
    """Return by how many doublings the drives of two outputs differ; 0 where nothing tells."""
    for measure in (_by_load, _by_slope, _by_name):
        one = measure(first, first.pins[first_pin])
        two = measure(second, second.pins[second_pin])
        if one and two:
            return abs(round(math.log2(one / two)))
    return 0


def _by_load(_cell: Cell, pin: Pin) -> float | None:
    return pin.max_capacitance


def _by_slope(_cell: Cell, pin: Pin) -> float | None:
    slopes = [
        slope
        for arc in pin.arcs
        for name in ("cell_rise", "cell_fall")
        if name in arc.tables and (slope := load_slope(arc.tables[name])) > 0
    ]
    return 1 / max(slopes) if slopes else None


def _by_name(cell: Cell, _pin: Pin) -> float | None:
    return drive_number(cell.name)


def drive_number(name: str) -> float | None:
    """Return the number that ends a cell's name (up to three letters may follow), or None."""
    found = _LAST_NUMBER.search(name)
    return float(found[1]) if found else None


def load_slope(table: Table) -> float:
    """Return how much a delay grows from the smallest to the largest load, per unit of load.

    At the fastest input edge of the table; 0.0 if the table does not depend on load.
    """
    if _LOAD_AXIS not in table.axes:
        return 0.0
    axis = table.axes.index(_LOAD_AXIS)
    loads = table.indices[axis]
    stride = math.prod(len(index) for index in table.indices[axis + 1 :])
    last = (len(loads) - 1) * stride
    if last >= len(table.values) or loads[-1] <= loads[0]:
        return 0.0
    return (table.values[last] - table.values[0]) / (loads[-1] - loads[0])
