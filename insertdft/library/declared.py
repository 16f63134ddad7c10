"""What a library declares about the test pins of its cells, and what its plain cells are like."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Final

from insertdft.library.cell import Cell, StorageKind
from insertdft.library.functions import literal

#: ``nextstate_type`` values that say the same as a ``signal_type``.
_BY_STATE: Final = {"scan_in": "test_scan_in", "scan_enable": "test_scan_enable"}


def signals(cell: Cell) -> dict[str, str]:
    """Return the declared test meaning of pins: ``test_cell`` first, then the pins' own."""
    test = cell.test_cell.signal_types if cell.test_cell else {}
    found: dict[str, str] = {}
    for pin in cell.pins.values():
        signal = test.get(pin.name) or pin.signal_type or _BY_STATE.get(pin.nextstate_type or "")
        if signal:
            found[pin.name] = signal
    return found


def pins_with(cell: Cell, signal: str) -> frozenset[str]:
    """Return the pins with a declared meaning, inverted or not."""
    wanted = (signal, f"{signal}_inverted")
    return frozenset(pin for pin, found in signals(cell).items() if found in wanted)


def only_pin(cell: Cell, signal: str) -> str | None:
    """Return the pin with a declared meaning if there is exactly one."""
    found = pins_with(cell, signal)
    return min(found) if len(found) == 1 else None


def test_only_outputs(cell: Cell) -> frozenset[str]:
    """Return the outputs declared to exist for scan alone."""
    own = {pin.name for pin in cell.outputs() if pin.test_output_only}
    return frozenset(own | (cell.test_cell.test_output_only if cell.test_cell else set()))


@dataclass(frozen=True, slots=True)
class LibraryHints:
    """What the library as a whole says about scan.

    Attributes:
        declared: Whether any cell declares scan pins.
        plain_data: Data pins of the flip-flops and latches whose next state is one pin.
    """

    declared: bool
    plain_data: Mapping[StorageKind, frozenset[str]]


def library_hints(cells: Sequence[Cell]) -> LibraryHints:
    """Return what all cells together say."""
    plain: dict[StorageKind, set[str]] = {kind: set() for kind in StorageKind}
    for cell in cells:
        for storage in cell.storage:
            found = literal(storage.data) if storage.data is not None else None
            if found and not cell.clock_gate:
                plain[storage.kind].add(found[0])
    declared = any(pins_with(cell, "test_scan_in") for cell in cells)
    return LibraryHints(declared, {kind: frozenset(names) for kind, names in plain.items()})
