"""Give every cell of a library its scan roles."""

from collections.abc import Mapping
from dataclasses import replace
from typing import Final

from insertdft.diagnostics import Diagnostic, Severity
from insertdft.library.cell import Cell, ScanRole, Storage, StorageKind
from insertdft.library.clock_gates import with_clock_gates
from insertdft.library.declared import (
    LibraryHints,
    library_hints,
    only_pin,
    pins_with,
    signals,
)
from insertdft.library.expression import And, Expression, Not, Or, Var, negation
from insertdft.library.scan_latch import latch_role
from insertdft.library.scan_mux import choose_shift, mux_role, shifts
from insertdft.library.scan_table import table_role
from insertdft.library.state_table import table_storages

_HINT: Final = "the cell is taken as a plain one; correct a copy of the library to use it for scan"


def with_roles(cells: Mapping[str, Cell]) -> tuple[dict[str, Cell], list[Diagnostic]]:
    """Return the cells with ``scan`` filled, from their functions and declarations.

    Also fills the storage of cells whose state table is latches or a flip-flop, and of those that
    have a ``test_cell`` alone.
    """
    completed = with_clock_gates({name: _with_storage(cell) for name, cell in cells.items()})
    hints = library_hints(list(completed.values()))
    found: dict[str, Cell] = {}
    problems: list[Diagnostic] = []
    for name, cell in completed.items():
        roles = _roles(cell, hints) if cell.clock_gate is None else ()
        found[name] = replace(cell, scan=roles) if roles else cell
        if not roles and cell.is_storage and pins_with(cell, "test_scan_in"):
            problems.append(_not_confirmed(cell))
    return found, problems


def _roles(cell: Cell, hints: LibraryHints) -> tuple[ScanRole, ...]:
    shift = choose_shift(cell, shifts(cell), hints)
    found = [
        mux_role(cell, shift) if shift else None,
        latch_role(cell, hints),
        table_role(cell),
    ]
    return tuple(role for role in found if role is not None)


def _not_confirmed(cell: Cell) -> Diagnostic:
    pins = ", ".join(f"`{pin}` {signal}" for pin, signal in signals(cell).items())
    message = f"the function of `{cell.name}` does not do what its pins declare: {pins}"
    return Diagnostic("scan-role-wrong", Severity.WARNING, message, cell.span, _HINT)


def _with_storage(cell: Cell) -> Cell:
    if cell.storage:
        return cell
    if cell.state_table is not None:
        found = table_storages(cell.state_table)
        return replace(cell, storage=found) if found else cell
    return _from_test_cell(cell)


def _from_test_cell(cell: Cell) -> Cell:
    """Give a cell that has only a test_cell the storage that its declarations say.

    Its next state is then ``scan_enable ? scan_in : mission``; inverted pins are inverted.
    """
    test = cell.test_cell
    if test is None or len(test.storage) != 1 or cell.clock_gate is not None:
        return cell
    mission = test.storage[0]
    scan_in, enable = only_pin(cell, "test_scan_in"), only_pin(cell, "test_scan_enable")
    if scan_in is None or enable is None or mission.data is None:
        return cell
    if mission.kind is not StorageKind.FLIP_FLOP:
        return cell
    data = _shifted(cell, mission.data, scan_in, enable)
    pins = {
        name: replace(pin, function=pin.function or test.functions.get(name))
        for name, pin in cell.pins.items()
    }
    storage: Storage = replace(mission, data=data)
    return replace(cell, storage=(storage,), pins=pins)


def _shifted(cell: Cell, mission: Expression, scan_in: str, enable: str) -> Expression:
    declared = signals(cell)

    def meaning(name: str) -> Expression:
        return Not(Var(name)) if declared[name].endswith("_inverted") else Var(name)

    on = meaning(enable)
    return Or((And((on, meaning(scan_in))), And((negation(on), mission))))
