"""One backward step along a shift path: from a storage cell's output to what it took in."""

from typing import NamedTuple

from insertdft.library.cell import Cell, ScanRole, Storage, StorageKind, Style
from insertdft.library.expression import Expression, Not, Var
from insertdft.simulate.paths import Source, Walker, pin_and_parity


class Step(NamedTuple):
    """One storage cell on a shift path, seen from behind.

    Attributes:
        instance: Flat id.
        output: Output pin that the walk came by.
        output_inverted: Whether that output shows the inverse of the state.
        entry: Pin that shift data enters by.
        entry_inverted: Whether the state becomes the inverse of that pin.
        net: Net at that pin.
        is_latch: Whether it is a single latch, as a lock-up is.
        bits: Shift cycles through it.
        scan_clock: Net that clocks the scan port of a two-port latch, -1 for other cells.
    """

    instance: int
    output: str
    output_inverted: bool
    entry: str
    entry_inverted: bool
    net: int
    is_latch: bool
    bits: int
    scan_clock: int = -1


def step_into(walker: Walker, source: Source) -> Step | None:
    """Return how the storage cell that drives ``source`` takes shift data.

    The next state under the constants of shift mode decides; a cell that the library describes by
    a state table alone is taken by its scan role. None if more than one pin decides.
    """
    cell = walker.design.cell_of(source.instance)
    if cell is None:
        return None
    if len(cell.storage) == 1 and cell.storage[0].bits == 1:
        found = _by_function(walker, source, cell, cell.storage[0])
        if found is not None:
            return found
    return _by_role(walker, source, cell)


def _by_function(walker: Walker, source: Source, cell: Cell, storage: Storage) -> Step | None:
    shown = _shows_inverse(cell.pins[source.pin].function, storage)
    if storage.data is None or shown is None:
        return None
    literal = walker.literal(source.instance, storage.data)
    found = pin_and_parity(walker.design, source.instance, literal)
    inner = literal.part if isinstance(literal, Not) else literal
    if found is None or not isinstance(inner, Var):
        return None
    is_latch = storage.kind is StorageKind.LATCH
    net, inverted = found
    return Step(source.instance, source.pin, shown, inner.name, inverted, net, is_latch, 1)


def _shows_inverse(function: Expression | None, storage: Storage) -> bool | None:
    """Return whether an output is the inverse of the state, None if it is something else."""
    inverted = isinstance(function, Not)
    inner = function.part if isinstance(function, Not) else function
    if inner == Var(storage.state):
        return inverted
    return not inverted if inner == Var(storage.state_inverted) else None


def _by_role(walker: Walker, source: Source, cell: Cell) -> Step | None:
    role = next((role for role in cell.scan if _is_shifting(walker, source.instance, role)), None)
    if role is None:
        return None
    output = next((out for out in role.outputs if out.pin == source.pin), None)
    net = walker.design.pins(source.instance).get(role.scan_in, -1)
    if output is None or net < 0:
        return None
    is_first = role.clock_a is not None and role.clock_b is None
    clock = walker.design.net_at(source.instance, role.clock_a or "") if is_first else -1
    return Step(
        source.instance,
        source.pin,
        output.inverted,
        role.scan_in,
        role.scan_in_inverted,
        net,
        False,
        role.bits,
        clock,
    )


def _is_shifting(walker: Walker, instance: int, role: ScanRole) -> bool:
    if role.style is not Style.MUX_D or role.scan_enable is None:
        return True
    net = walker.design.pins(instance).get(role.scan_enable, -1)
    return walker.values.get(net) == role.shift_value
