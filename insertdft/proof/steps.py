"""One backward step along a shift path: from a storage cell's output to what it took in."""

from typing import NamedTuple

from insertdft.library.cell import Cell, ScanRole, Storage, StorageKind, Style
from insertdft.library.expression import Expression, Not, Var, variables
from insertdft.simulate.paths import Source, Walker


class Step(NamedTuple):
    """One storage cell on a shift path, seen from behind.

    Attributes:
        instance: Flat id.
        output: Output pin that the walk came by.
        output_inverted: Whether that output shows the inverse of the state.
        entry: Pin that shift data enters by.
        entry_inverted: Whether the state becomes the inverse of that pin.
        net: Net at that pin.
        is_latch: Whether it is a single latch, as a lock-up or half of an LSSD position is.
        bits: Shift cycles through it.
        opened_by: Nets that decide when the element that takes the data is open; empty where
            nobody asked.
    """

    instance: int
    output: str
    output_inverted: bool
    entry: str
    entry_inverted: bool
    net: int
    is_latch: bool
    bits: int
    opened_by: tuple[int, ...] = ()


def step_into(walker: Walker, source: Source) -> Step | None:
    """Return how the storage cell that drives ``source`` takes shift data.

    The next state under the constants of shift mode decides; a cell that the library describes by
    a state table alone is taken by its scan role. None if more than one pin decides.
    """
    cell = walker.design.cell_of(source.instance)
    if cell is None:
        return None
    return _by_function(walker, source, cell) or _by_role(walker, source, cell)


def _by_function(walker: Walker, source: Source, cell: Cell) -> Step | None:
    """Follow the data from the state that an output shows back to a pin, through all states."""
    by_state = {name: item for item in cell.storage for name in _names(item)}
    function = cell.pins[source.pin].function
    shown = _literal(None if function is None else walker.literal(source.instance, function))
    if shown is None or shown[0] not in by_state:
        return None
    here = by_state[shown[0]]
    shows_inverse = shown[1] ^ (shown[0] == here.state_inverted)
    met = [here]
    inverted = False
    while True:
        data = None if here.data is None else walker.literal(source.instance, here.data)
        found = _literal(data)
        if found is None:
            return None
        name, turned = found
        inverted ^= turned
        if name not in by_state:
            break
        here = by_state[name]
        inverted ^= name == here.state_inverted
        if here in met:
            return None
        met.append(here)
    net = walker.design.net_at(source.instance, name)
    if net < 0:
        return None
    edges = sum(item.kind is StorageKind.FLIP_FLOP for item in met)
    opened = variables(here.clock) if here.clock else ()
    return Step(
        source.instance,
        source.pin,
        shows_inverse,
        name,
        inverted,
        net,
        edges == 0 and len(met) == 1,
        max(edges, 1),
        tuple(walker.design.net_at(source.instance, pin) for pin in opened),
    )


def _names(storage: Storage) -> tuple[str, str]:
    return storage.state, storage.state_inverted


def _literal(expression: Expression | None) -> tuple[str, bool] | None:
    """Return name and inversion of an expression that is one, None for any other."""
    inner = expression.part if isinstance(expression, Not) else expression
    return (inner.name, isinstance(expression, Not)) if isinstance(inner, Var) else None


def _by_role(walker: Walker, source: Source, cell: Cell) -> Step | None:
    role = next((role for role in cell.scan if _is_shifting(walker, source.instance, role)), None)
    if role is None:
        return None
    output = next((out for out in role.outputs if out.pin == source.pin), None)
    net = walker.design.pins(source.instance).get(role.scan_in, -1)
    if output is None or net < 0:
        return None
    clocks = [walker.design.net_at(source.instance, role.clock_a)] if role.clock_a else []
    return Step(
        source.instance,
        source.pin,
        output.inverted,
        role.scan_in,
        role.scan_in_inverted,
        net,
        False,
        role.bits,
        tuple(clocks),
    )


def _is_shifting(walker: Walker, instance: int, role: ScanRole) -> bool:
    if role.style is not Style.MUX_D or role.scan_enable is None:
        return True
    net = walker.design.pins(instance).get(role.scan_enable, -1)
    return walker.values.get(net) == role.shift_value
