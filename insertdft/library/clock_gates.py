"""Clock gates that nobody declares, known by what they do: a latch that holds the clock still.

The latch is open while the clock rests and its state lets the clock pass or keeps it at rest. Which
of two enables is the test pin cannot be seen in the function; it is the one that the gates with one
enable do not have.
"""

from collections.abc import Mapping
from dataclasses import dataclass, replace

from insertdft.library.cell import Cell, Pin, Storage, StorageKind
from insertdft.library.expression import Const, Expression, Not, Or, Var, negation
from insertdft.library.functions import cofactor, literal, same, support
from insertdft.library.mission import one_state


@dataclass(frozen=True, slots=True)
class _Gate:
    """A clock gate as found.

    Attributes:
        clock: Clock pin.
        output: Gated clock.
        rising: Whether the clock rests at 0.
        enables: Pins that the latch takes, either of which lets the clock pass.
        after: Pin that lets the clock pass past the latch, or None.
    """

    clock: str
    output: str
    rising: bool
    enables: tuple[str, ...]
    after: str | None


def with_clock_gates(cells: Mapping[str, Cell]) -> dict[str, Cell]:
    """Return the cells, undeclared clock gates among them marked as if declared."""
    found = {name: gate for name, cell in cells.items() if (gate := _gate(cell)) is not None}
    alone = {gate.enables[0] for gate in found.values() if len(gate.enables) == 1}
    return {
        name: _marked(cell, found[name], alone) if name in found else cell
        for name, cell in cells.items()
    }


def _gate(cell: Cell) -> _Gate | None:
    outputs = cell.outputs()
    if cell.clock_gate or cell.test_cell or len(cell.storage) != 1 or len(outputs) != 1:
        return None
    [latch], [output] = cell.storage, outputs
    if latch.kind is not StorageKind.LATCH or latch.clock is None or output.function is None:
        return None
    enable = literal(latch.clock)
    if enable is None or output.three_state is not None:
        return None
    clock, rising = enable
    function = one_state(output.function, latch)
    if cofactor(function, clock, int(not rising)) != Const(not rising):
        return None
    shown = cofactor(function, clock, int(rising))
    passing = shown if rising else negation(shown)
    for state in (Var(latch.state), Not(Var(latch.state))):
        after = _after(passing, latch, state)
        enables = _enables(latch, inverted=isinstance(state, Not))
        if after is not None and enables:
            return _Gate(clock, output.name, rising, enables, after or None)
    return None


def _after(passing: Expression, latch: Storage, state: Expression) -> str | None:
    """Return the pin that acts after the latch, an empty text if none does, None if no gate."""
    others = [name for name in support(passing) if name != latch.state]
    if not others:
        return "" if same(passing, state) else None
    if len(others) == 1 and same(passing, Or((Var(others[0]), state))):
        return others[0]
    return None


def _enables(latch: Storage, *, inverted: bool) -> tuple[str, ...]:
    """Return the pins of which any lets the clock pass."""
    if latch.data is None:
        return ()
    data = negation(latch.data) if inverted else latch.data
    names = support(data)
    if len(names) == 1:
        return names if same(data, Var(names[0])) else ()
    return names if len(names) == 2 and same(data, Or(tuple(map(Var, names)))) else ()


def _marked(cell: Cell, gate: _Gate, alone: set[str]) -> Cell:
    roles = {gate.clock: "clock", gate.output: "out"}
    control = ""
    if gate.after:
        roles[gate.after], control = "test", "_postcontrol"
    plain = [name for name in gate.enables if name in alone] or list(gate.enables)
    roles[plain[0]] = "enable"
    if len(gate.enables) == 2 and len(plain) == 1:
        roles |= {name: "test" for name in gate.enables if name != plain[0]}
        control = "_precontrol"
    kind = f"latch_{'posedge' if gate.rising else 'negedge'}{control}"
    pins = {name: _with_role(pin, roles.get(name)) for name, pin in cell.pins.items()}
    return replace(cell, pins=pins, clock_gate=kind)


def _with_role(pin: Pin, role: str | None) -> Pin:
    return replace(pin, clock_gate_role=role) if role else pin
