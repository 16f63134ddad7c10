"""Mux-D scan roles, found in the next-state function of a flip-flop.

A pin ``s`` with a value ``v`` is a scan enable if the next state with ``s`` held at ``v`` is one
other variable (or its inverse), and with ``s`` held the other way does not depend on that variable
but on some other input. ``s ? a : b`` fits twice, and a plain cell with a data mux has that shape
too; what the library declares decides then (``choose_shift``).
"""

from dataclasses import dataclass
from typing import Final

from insertdft.library.cell import Cell, ScanOutput, ScanRole, Storage, StorageKind, Style
from insertdft.library.declared import LibraryHints, pins_with, test_only_outputs
from insertdft.library.expression import Const, Expression, substitute
from insertdft.library.functions import cofactor, inputs_of, literal, pruned, same, support

#: Next states of more variables are not searched for a scan enable.
MOST_VARIABLES: Final = 12


@dataclass(frozen=True, slots=True)
class Shift:
    """One way to read a cell as a mux-D scan cell.

    Attributes:
        enable: The scan enable.
        value: Its value that shifts.
        scan_in: Input that the first bit takes.
        inverted: Whether the last state becomes the inverse of ``scan_in``.
        order: State variables from scan-in to scan-out.
        mission: Next state of each storage, in the cell's order, when not shifting.
    """

    enable: str
    value: int
    scan_in: str
    inverted: bool
    order: tuple[str, ...]
    mission: tuple[Expression, ...]

    def data_pin(self) -> str | None:
        """Return the only input the mission next state is made of, or None."""
        found = [literal(item) for item in self.mission]
        return found[0][0] if len(found) == 1 and found[0] is not None else None


def shifts(cell: Cell) -> list[Shift]:
    """Return every way to read the cell as a mux-D scan cell, from its functions alone."""
    if not cell.storage or any(s.kind is not StorageKind.FLIP_FLOP for s in cell.storage):
        return []
    data = [pruned(s.data) for s in cell.storage if s.data is not None]
    if len(data) != len(cell.storage) or any(len(support(d)) > MOST_VARIABLES for d in data):
        return []
    inputs = {pin.name for pin in cell.inputs()}
    selects = [name for name in inputs_of(data) if name in inputs]
    if len({s.clock for s in cell.storage}) != 1:
        return []
    found = (_shift(cell, data, name, value) for name in selects for value in (1, 0))
    return [shift for shift in found if shift is not None]


def _shift(cell: Cell, data: list[Expression], enable: str, value: int) -> Shift | None:
    inputs = {pin.name for pin in cell.inputs()}
    states = _state_literals(cell.storage)
    sources: dict[str, tuple[str, bool]] = {}
    mission: list[Expression] = []
    for storage, expression in zip(cell.storage, data, strict=True):
        source = literal(cofactor(expression, enable, value))
        rest = cofactor(expression, enable, 1 - value)
        if source is None or source[0] in support(rest) or not inputs & set(support(rest)):
            return None
        if source[0] in states:
            name, inverted = states[source[0]]
            source = name, inverted ^ source[1]
        sources[storage.state] = source
        mission.append(rest)
    order = _order(sources, inputs)
    if order is None:
        return None
    inverted = sum(sources[state][1] for state in order) % 2 == 1
    return Shift(enable, value, sources[order[0]][0], inverted, order, tuple(mission))


def _state_literals(storages: tuple[Storage, ...]) -> dict[str, tuple[str, bool]]:
    """Return state variable and inversion by every name a state goes by."""
    found: dict[str, tuple[str, bool]] = {}
    for storage in storages:
        found[storage.state] = (storage.state, False)
        found[storage.state_inverted] = (storage.state, True)
    return found


def _order(sources: dict[str, tuple[str, bool]], inputs: set[str]) -> tuple[str, ...] | None:
    """Return the states as one path from an input, or None if they form no such path."""
    first = [state for state, (name, _) in sources.items() if name in inputs]
    after = {name: state for state, (name, _) in sources.items() if name not in inputs}
    if len(first) != 1:
        return None
    path = [first[0]]
    while path[-1] in after and len(path) < len(sources):
        path.append(after[path[-1]])
    return tuple(path) if len(path) == len(sources) else None


def choose_shift(cell: Cell, found: list[Shift], hints: LibraryHints) -> Shift | None:
    """Return the reading that the declarations of the cell and its library ask for, or None.

    First what the cell declares (``test_cell``, ``signal_type``, ``nextstate_type``), as far as it
    agrees with the function. If the library declares scan pins anywhere, an undeclared cell is
    plain. Else the reading whose mission data pin is called as in the library's plain flip-flops,
    and whose scan input is not, holds; without one there is no role.
    """
    if not found:
        return None
    scores = [_score(cell, shift) for shift in found]
    best = max(scores)
    if best > 0 or hints.declared:
        chosen = [shift for shift, score in zip(found, scores, strict=True) if score == best > 0]
        return chosen[0] if len(chosen) == 1 else None
    if len(found) == 1:
        return found[0]
    names = hints.plain_data[StorageKind.FLIP_FLOP]
    plain = [shift for shift in found if shift.data_pin() in names and shift.scan_in not in names]
    return plain[0] if len(plain) == 1 else None


def _score(cell: Cell, shift: Shift) -> int:
    score = 2 * (shift.scan_in in pins_with(cell, "test_scan_in"))
    score += 2 * (shift.enable in pins_with(cell, "test_scan_enable"))
    test = cell.test_cell
    if test and len(test.storage) == len(shift.mission):
        own = [storage.data for storage in test.storage]
        pairs = zip(own, shift.mission, strict=True)
        score += 2 * all(data is not None and same(data, rest) for data, rest in pairs)
    return score


def mux_role(cell: Cell, shift: Shift) -> ScanRole | None:
    """Return the scan role of a cell read as ``shift``; None if no output shows the state."""
    outputs = scan_outputs(cell, shift)
    clock_expression = cell.storage[0].clock
    if not outputs or clock_expression is None:
        return None
    clock = literal(clock_expression)
    return ScanRole(
        style=Style.MUX_D,
        data=shift.data_pin(),
        scan_in=shift.scan_in,
        scan_in_inverted=shift.inverted,
        outputs=outputs,
        scan_enable=shift.enable,
        shift_value=shift.value,
        clock=clock[0] if clock else None,
        bits=len(shift.order),
        off_values=((clock[0], int(clock[1])),) if clock else (),
    )


def scan_outputs(cell: Cell, shift: Shift) -> tuple[ScanOutput, ...]:
    """Return the outputs that show the last state while shifting, those for scan alone first."""
    last = next(s for s in cell.storage if s.state == shift.order[-1])
    inverses = {last.state: False, last.state_inverted: True}
    held: dict[str, Expression] = {shift.enable: Const(shift.value == 1)}
    only = test_only_outputs(cell)
    found: list[ScanOutput] = []
    for pin in cell.outputs():
        if pin.function is None or pin.three_state is not None:
            continue
        shown = literal(substitute(pin.function, held))
        if shown is None or shown[0] not in inverses:
            continue
        gated = shift.enable in support(pin.function)
        inverted = inverses[shown[0]] ^ shown[1]
        found.append(ScanOutput(pin.name, inverted, pin.name in only or gated))
    return tuple(sorted(found, key=lambda item: not item.test_only))
