"""LSSD scan roles, found in the latches of a cell.

L1 is a latch with two ports: its enable is ``C or A``, it takes one input under A alone and system
data under C alone. L2 is a latch that takes L1's state under B; with a system port of its own the
pair is an L1/L2* cell (DasGupta, Goel, Walther, Williams, ITC 1982, from memory). Which port is the
scan port is declared (``test_scan_clock_a``, ``test_scan_in``, the mission latch of ``test_cell``)
or told by the data pin names of the library's plain latches.
"""

from dataclasses import dataclass
from itertools import permutations

from insertdft.library.cell import Cell, ScanOutput, ScanRole, Storage, StorageKind, Style
from insertdft.library.declared import LibraryHints, pins_with, test_only_outputs
from insertdft.library.expression import Const, Expression, substitute
from insertdft.library.functions import cofactor, literal, pruned, support
from insertdft.library.mission import one_state


@dataclass(frozen=True, slots=True)
class Port:
    """What one clock alone loads into a latch.

    Attributes:
        clock: Clock pin.
        off: Its value at rest.
        data: What is loaded.
    """

    clock: str
    off: int
    data: Expression


@dataclass(frozen=True, slots=True)
class Reading:
    """One way to read latches as a shift-register latch.

    Attributes:
        first: L1.
        second: L2, or None.
        system: L1's system port.
        scan: L1's scan port.
        copy: L2's port that takes L1's state, or None.
        other: L2's own system port, or None.
    """

    first: Storage
    second: Storage | None
    system: Port
    scan: Port
    copy: Port | None
    other: Port | None

    @property
    def scan_in(self) -> str | None:
        """Pin that the scan port takes, or None."""
        found = literal(self.scan.data)
        return found[0] if found else None


def latch_role(cell: Cell, hints: LibraryHints) -> ScanRole | None:
    """Return the LSSD role of a cell made of latches, or None."""
    found = readings(cell)
    if not found:
        return None
    scores = [_score(cell, reading) for reading in found]
    best = max(scores)
    if best > 0:
        chosen = [item for item, score in zip(found, scores, strict=True) if score == best]
    else:
        names = hints.plain_data[StorageKind.LATCH]
        chosen = [
            item for item in found if _pin(item.system.data) in names and item.scan_in not in names
        ]
    return _role(cell, chosen[0]) if len(chosen) == 1 else None


def readings(cell: Cell) -> list[Reading]:
    """Return every way to read the cell as a shift-register latch."""
    if cell.clock_gate or any(item.kind is not StorageKind.LATCH for item in cell.storage):
        return []
    inputs = {pin.name for pin in cell.inputs()}
    found: list[Reading] = []
    for first in cell.storage:
        for system, scan in _two_ports(first, inputs):
            source = literal(scan.data)
            if source is None or source[0] not in inputs or source[0] in support(system.data):
                continue
            if not inputs & set(support(system.data)):
                continue
            second, copy, other = _second(cell, first, inputs)
            found.append(Reading(first, second, system, scan, copy, other))
    return found


def _two_ports(latch: Storage, inputs: set[str]) -> list[tuple[Port, Port]]:
    """Return both orders of the two ports of a latch; empty unless it has exactly two."""
    if latch.clock is None or latch.data is None:
        return []
    clocks = [name for name in support(latch.clock) if name in inputs]
    if len(clocks) != 2 or len(support(latch.clock)) != 2:
        return []
    found: list[tuple[Port, Port]] = []
    for one, two in permutations(clocks):
        off = _off_values(latch.clock, one, two)
        if off is not None:
            found.append((_port(latch.data, one, two, off), _port(latch.data, two, one, off)))
    return found


def _off_values(enable: Expression, one: str, two: str) -> dict[str, int] | None:
    """Return the values at rest under which each clock alone opens the latch, or None."""
    for off_two in (0, 1):
        alone = literal(cofactor(enable, two, off_two))
        if alone is None:
            continue
        off_one = int(alone[1])
        back = literal(cofactor(enable, one, off_one))
        if back is not None and int(back[1]) == off_two:
            return {one: off_one, two: off_two}
    return None


def _port(data: Expression, clock: str, other: str, off: dict[str, int]) -> Port:
    held = {clock: Const(off[clock] == 0), other: Const(off[other] == 1)}
    return Port(clock, off[clock], pruned(substitute(data, held)))


def _second(
    cell: Cell, first: Storage, inputs: set[str]
) -> tuple[Storage | None, Port | None, Port | None]:
    """Return L2 of ``first`` with its copying port and its system port."""
    for latch in cell.storage:
        if latch is first or latch.clock is None or latch.data is None:
            continue
        alone = literal(latch.clock)
        if alone is not None:
            port = Port(alone[0], int(alone[1]), pruned(latch.data))
            if _copies(port, first):
                return latch, port, None
        for copy, other in _two_ports(latch, inputs):
            if _copies(copy, first) and inputs & set(support(other.data)):
                return latch, copy, other
    return None, None, None


def _copies(port: Port, first: Storage) -> bool:
    found = literal(one_state(port.data, first))
    return found is not None and found[0] == first.state


def _score(cell: Cell, reading: Reading) -> int:
    score = 2 * (reading.scan.clock in pins_with(cell, "test_scan_clock_a"))
    score += 2 * (reading.scan_in in pins_with(cell, "test_scan_in"))
    test = cell.test_cell
    if test and test.storage and test.storage[0].clock is not None:
        score += reading.system.clock in support(test.storage[0].clock)
    return score


def _role(cell: Cell, reading: Reading) -> ScanRole | None:
    scan_in = literal(reading.scan.data)
    outputs = _outputs(cell, reading)
    if scan_in is None or not outputs:
        return None
    ports = [reading.system, reading.scan, reading.copy, reading.other]
    return ScanRole(
        style=Style.LSSD,
        data=_pin(reading.system.data),
        scan_in=scan_in[0],
        scan_in_inverted=scan_in[1],
        outputs=outputs,
        clock=reading.system.clock,
        clock_a=reading.scan.clock,
        clock_b=reading.copy.clock if reading.copy else None,
        off_values=tuple((port.clock, port.off) for port in ports if port),
        data_2=_pin(reading.other.data) if reading.other else None,
        clock_2=reading.other.clock if reading.other else None,
    )


def _pin(data: Expression) -> str | None:
    found = literal(data)
    return found[0] if found else None


def _outputs(cell: Cell, reading: Reading) -> tuple[ScanOutput, ...]:
    """Return the outputs that show L2 (L1 where there is no L2), those for scan alone first."""
    inverses = {reading.first.state: False, reading.first.state_inverted: True}
    if reading.second is not None and reading.copy is not None:
        taken = literal(one_state(reading.copy.data, reading.first))
        turned = taken is not None and taken[1]
        inverses = {reading.second.state: turned, reading.second.state_inverted: not turned}
    system = [
        pin
        for pin in cell.outputs()
        if pin.function and reading.first.state in support(one_state(pin.function, reading.first))
    ]
    declared = test_only_outputs(cell)
    single = reading.second is not None and reading.other is None and bool(system)
    found: list[ScanOutput] = []
    for pin in cell.outputs():
        shown = literal(pin.function) if pin.function and not pin.three_state else None
        if shown is not None and shown[0] in inverses:
            alone = pin.name in declared or (single and cell.test_cell is None)
            found.append(ScanOutput(pin.name, inverses[shown[0]] ^ shown[1], alone))
    return tuple(sorted(found, key=lambda item: not item.test_only))
