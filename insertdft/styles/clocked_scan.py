"""Clocked scan: a second, separate clock takes shift data in; no gate stands in the data path.

The system clock rests during shift and the scan clock during capture. Only a real cell of the
library will do: the function cannot be composed from a flip-flop and gates.
"""

from insertdft.library import scan_twins
from insertdft.library.cell import Cell, Library, Style
from insertdft.styles.conversion import Conversion, Refusal, TestNet
from insertdft.styles.twins import as_is as joins
from insertdft.styles.twins import by_twin

NAME = Style.CLOCKED_SCAN.value


def convert(library: Library, cell: Cell) -> Conversion | Refusal:
    """Return how a plain storage cell becomes a clocked-scan cell."""
    for twin in scan_twins(library, cell.name, Style.CLOCKED_SCAN):
        if twin.role.scan_clock is not None:
            return by_twin(library, cell, twin, {twin.role.scan_clock: TestNet.SCAN_CLOCK})
    return Refusal(
        "no-scan-cell",
        f"the library has no clocked-scan cell with the function of `{cell.name}`",
        "give a library that has a cell with data under the system clock and scan-in under a"
        " scan clock (signal_type test_scan_clock)",
    )


def as_is(cell: Cell) -> Conversion | None:
    """Return how a cell that is a clocked-scan cell already joins a chain, None if it is none."""
    for role in cell.scan:
        if role.style is Style.CLOCKED_SCAN and role.scan_clock is not None:
            return joins(cell, role, {role.scan_clock: TestNet.SCAN_CLOCK})
    return None
