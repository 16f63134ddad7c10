"""Give every cell of a library its scan roles."""

from collections.abc import Mapping
from dataclasses import replace

from insertdft.library.cell import Cell, ScanRole, Storage, StorageKind
from insertdft.library.expression import And, Not, Or, Var
from insertdft.library.scan_mux import (
    LibraryHints,
    choose_shift,
    declared,
    library_hints,
    mux_role,
    shifts,
)


def with_roles(cells: Mapping[str, Cell]) -> dict[str, Cell]:
    """Return the cells with ``scan`` filled, from their functions and declarations."""
    completed = {name: _with_storage(cell) for name, cell in cells.items()}
    hints = library_hints(list(completed.values()))
    return {name: _with_roles(cell, hints) for name, cell in completed.items()}


def _with_roles(cell: Cell, hints: LibraryHints) -> Cell:
    if cell.clock_gate is not None:
        return cell
    roles = _mux_roles(cell, hints)
    return replace(cell, scan=roles) if roles else cell


def _mux_roles(cell: Cell, hints: LibraryHints) -> tuple[ScanRole, ...]:
    shift = choose_shift(cell, shifts(cell), hints)
    role = mux_role(cell, shift) if shift else None
    return (role,) if role else ()


def _with_storage(cell: Cell) -> Cell:
    """Give a cell that has only a test_cell the storage that its declarations say.

    Its next state is then ``scan_enable ? scan_in : mission``; inverted pins are inverted.
    """
    test = cell.test_cell
    if cell.storage or cell.state_table or test is None or len(test.storage) != 1:
        return cell
    mission = test.storage[0]
    scan_in, enable = declared(cell, "in"), declared(cell, "enable")
    if len(scan_in) != 1 or len(enable) != 1 or mission.data is None:
        return cell
    if mission.kind is not StorageKind.FLIP_FLOP:
        return cell
    storage = replace(mission, data=_shifted(cell, mission, *scan_in, *enable))
    pins = {
        name: replace(pin, function=pin.function or test.functions.get(name))
        for name, pin in cell.pins.items()
    }
    return replace(cell, storage=(storage,), pins=pins)


def _shifted(cell: Cell, mission: Storage, scan_in: str, enable: str) -> Or:
    signals = cell.test_cell.signal_types if cell.test_cell else {}

    def pin(name: str) -> Var | Not:
        return Not(Var(name)) if signals.get(name, "").endswith("_inverted") else Var(name)

    def inverse(name: str) -> Var | Not:
        return Var(name) if signals.get(name, "").endswith("_inverted") else Not(Var(name))

    data = mission.data
    if data is None:
        raise RuntimeError(f"`{cell.name}` has no mission data")
    return Or((And((pin(enable), pin(scan_in))), And((inverse(enable), data))))
