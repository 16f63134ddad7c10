"""Mux-D scan: a mux in front of the data pin chooses shift or mission data under scan enable.

The scan cell is the library's own where it has one with the same mission function; otherwise a
mux of the library goes in front of the old flip-flop, which stays as it is.
"""

from insertdft.library import scan_twins
from insertdft.library.cell import Cell, Library, ScanRole, StorageKind, Style
from insertdft.library.expression import Not, Var
from insertdft.styles.compose import area_of, compose_mux
from insertdft.styles.conversion import Conversion, Refusal, ScanTap, TestNet
from insertdft.styles.twins import as_is as joins
from insertdft.styles.twins import by_twin

NAME = Style.MUX_D.value


def convert(library: Library, cell: Cell) -> Conversion | Refusal:
    """Return how a plain storage cell becomes a mux-D scan cell."""
    if any(storage.kind is StorageKind.LATCH for storage in cell.storage):
        return Refusal(
            "latch-not-scanned",
            f"`{cell.name}` is a latch, and mux-D scan needs an edge-triggered cell",
            "leave it out, or choose --style lssd for latch pairs",
        )
    for twin in scan_twins(library, cell.name, Style.MUX_D):
        if twin.role.scan_enable is not None and twin.role.shift_value == 1:
            return by_twin(library, cell, twin, {twin.role.scan_enable: TestNet.SCAN_ENABLE})
    return _composed(library, cell)


def as_is(cell: Cell) -> Conversion | None:
    """Return how a cell that is a mux-D scan cell already joins a chain, None if it is none."""
    role = role_of(cell)
    if role is None or role.scan_enable is None:
        return None
    return joins(cell, role, {role.scan_enable: TestNet.SCAN_ENABLE})


def role_of(cell: Cell) -> ScanRole | None:
    """Return the mux-D role of a cell, if it has one that shifts with scan enable at 1."""
    for role in cell.scan:
        if role.style is Style.MUX_D and role.shift_value == 1:
            return role
    return None


def _composed(library: Library, cell: Cell) -> Conversion | Refusal:
    data = _single_data_pin(cell)
    if data is None:
        return Refusal(
            "no-scan-cell",
            f"the library has no scan cell with the function of `{cell.name}`, and its next state"
            " is more than one data pin, so that no mux can be put in front of it",
            "map it by hand in [twins] of the options file, or give a library with a scan cell",
        )
    parts = compose_mux(library)
    if parts is None:
        return Refusal(
            "no-scan-cell",
            f"the library has no scan cell with the function of `{cell.name}` and neither a mux nor"
            " NAND gates and an inverter to compose one",
            "give a library that has either",
        )
    pin, inverted = data
    return Conversion(
        style=NAME,
        how="composed",
        before=cell.name,
        after=cell.name,
        scan_in=pin,
        scan_in_inverted=inverted,
        taps=_state_outputs(cell),
        test_pins={},
        parts=parts,
        area=area_of(library, parts),
    )


def _single_data_pin(cell: Cell) -> tuple[str, bool] | None:
    """Return the data pin of a flip-flop whose next state is that pin or its inverse."""
    if len(cell.storage) != 1 or cell.storage[0].bits != 1:
        return None
    data = cell.storage[0].data
    if isinstance(data, Var):
        return data.name, False
    if isinstance(data, Not) and isinstance(data.part, Var):
        return data.part.name, True
    return None


def _state_outputs(cell: Cell) -> tuple[ScanTap, ...]:
    storage = cell.storage[0]
    shown = {
        Var(storage.state): False,
        Var(storage.state_inverted): True,
        Not(Var(storage.state)): True,
        Not(Var(storage.state_inverted)): False,
    }
    taps = [
        ScanTap(pin.name, shown[pin.function])
        for pin in cell.outputs()
        if pin.function in shown and pin.three_state is None
    ]
    return tuple(sorted(taps, key=lambda tap: tap.inverted))
