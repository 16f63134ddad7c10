"""Conversions by a scan cell of the library, the same for all styles."""

from collections.abc import Mapping

from insertdft.library.cell import Cell, Library, ScanRole, Twin
from insertdft.styles.conversion import Conversion, ScanTap


def by_twin(library: Library, cell: Cell, twin: Twin, test_pins: Mapping[str, str]) -> Conversion:
    """Return the conversion of ``cell`` into its twin, with test nets at the given pins."""
    new = library.cells[twin.cell]
    return Conversion(
        style=twin.role.style.value,
        how="twin",
        before=cell.name,
        after=twin.cell,
        pins=_renamed(twin.pins),
        ties=dict(twin.ties),
        scan_in=twin.role.scan_in,
        scan_in_inverted=twin.role.scan_in_inverted,
        taps=taps_of(twin.role),
        test_pins=test_pins,
        bits=twin.role.bits,
        area=None if new.area is None or cell.area is None else new.area - cell.area,
    )


def _renamed(pins: Mapping[str, str]) -> dict[str, str]:
    """Return the pins whose name changes; of a bus also its name without an index."""
    found = {old: new for old, new in pins.items() if old != new}
    buses = {old.partition("[")[0]: new.partition("[")[0] for old, new in found.items()}
    return {**buses, **found}


def as_is(cell: Cell, role: ScanRole, test_pins: Mapping[str, str]) -> Conversion:
    """Return how a cell that is a scan cell already joins a chain."""
    return Conversion(
        style=role.style.value,
        how="as-is",
        before=cell.name,
        after=cell.name,
        scan_in=role.scan_in,
        scan_in_inverted=role.scan_in_inverted,
        taps=taps_of(role),
        test_pins=test_pins,
        bits=role.bits,
        area=0.0,
    )


def taps_of(role: ScanRole) -> tuple[ScanTap, ...]:
    """Return the outputs that can feed the next position, those for scan alone first."""
    taps = [ScanTap(out.pin, out.inverted, out.test_only) for out in role.outputs]
    return tuple(sorted(taps, key=lambda tap: (not tap.test_only, tap.inverted)))
