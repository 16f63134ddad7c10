"""What a stand-in is made of, read from the plain cell it is made after."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from enum import Enum
from typing import Final

from insertdft.library.cell import Cell, Storage, StorageKind
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor
from insertdft.library.functions import literal, support
from insertdft.styles.gates import free_name

MARK: Final = "STAND-IN written by insertdft: function only, no layout, no area, no timing"


class StandInKind(Enum):
    """What a stand-in does beside the function of the plain cell."""

    CLOCKED_SCAN = "clocked_scan"  # of a flip-flop: SI under SCK
    FIRST = "two_port"  # of a latch: I under A
    SINGLE = "single"  # of a latch: I under A, L2 under B for scan alone
    DOUBLE = "double"  # of a flip-flop, read as L1 under C and L2 under B


@dataclass(frozen=True, slots=True)
class Parts:
    """What both texts are made of.

    Attributes:
        name: Of the new cell.
        kind: What it does.
        plain: The cell it is made after.
        storage: Its one storage element.
        clock: Mission clock pin.
        rest: Value of that pin at rest.
        clear: Pin and level of the reset, or None.
        preset: Pin and level of the set, or None.
        preset_wins: Whether the set wins.
        scan_in: New pin.
        clocks: New clock pins: SCK, or A, or A and B.
        second: New output for scan alone, or None.
    """

    name: str
    kind: StandInKind
    plain: Cell
    storage: Storage
    clock: str
    rest: int
    clear: tuple[str, int] | None
    preset: tuple[str, int] | None
    preset_wins: bool
    scan_in: str
    clocks: tuple[str, ...]
    second: str | None

    @property
    def data(self) -> Expression:
        """What the storage element takes."""
        return self.storage.data or Var(self.storage.state)

    def data_pins(self) -> list[str]:
        """Return the pins that the data depends on."""
        states = (self.storage.state, self.storage.state_inverted)
        return [name for name in support(self.data) if name not in states]

    def forcing(self) -> list[tuple[str, int, int]]:
        """Return pin, level and forced value of set and reset, the one that wins first."""
        found = [(*self.clear, 0)] if self.clear else []
        found += [(*self.preset, 1)] if self.preset else []
        return found[::-1] if self.preset_wins else found


def read_parts(plain: Cell, kind: StandInKind, name: str) -> Parts | None:
    """Return what a stand-in of ``plain`` is made of, None if the cell cannot be read so."""
    wanted = StorageKind.LATCH
    if kind in (StandInKind.CLOCKED_SCAN, StandInKind.DOUBLE):
        wanted = StorageKind.FLIP_FLOP
    if len(plain.storage) != 1 or plain.storage[0].kind is not wanted:
        return None
    item = plain.storage[0]
    clock = literal(item.clock) if item.clock else None
    forced = [_level(condition) for condition in (item.clear, item.preset)]
    if clock is None or item.clock_also is not None or item.data is None or None in forced:
        return None
    states = {item.state, item.state_inverted}
    if kind is StandInKind.DOUBLE and states & set(support(item.data)):
        return None  # the next state reads L2, which L1 cannot say in one table
    if any(pin.three_state or pin.function is None for pin in plain.outputs()):
        return None
    pins = set(plain.pins)
    scan = kind is StandInKind.CLOCKED_SCAN
    two = kind in (StandInKind.SINGLE, StandInKind.DOUBLE)
    clocks = ["SCK"] if scan else ["A", "B"] if two else ["A"]
    falling = clock[1] and kind is not StandInKind.DOUBLE
    return Parts(
        name=name,
        kind=kind,
        plain=plain,
        storage=item,
        clock=clock[0],
        rest=int(falling),
        clear=forced[0] or None,
        preset=forced[1] or None,
        preset_wins=item.clear_preset[0] == "H",
        scan_in=free_name("SI" if scan else "I", pins),
        clocks=tuple(free_name(at, pins) for at in clocks),
        second=free_name("L2", pins) if kind is StandInKind.SINGLE else None,
    )


def _level(condition: Expression | None) -> tuple[str, int] | tuple[()] | None:
    """Return pin and acting level, nothing where there is no condition, None if it is no pin."""
    if condition is None:
        return ()
    found = literal(condition)
    return None if found is None else (found[0], int(not found[1]))


def to_text(
    expression: Expression, names: Mapping[str, str], conjunction: str, disjunction: str
) -> str:
    """Return an expression in Liberty's or Verilog's spelling, every operator in brackets."""
    match expression:
        case Const(value):
            return "1" if value else "0"
        case Var(name):
            return names.get(name, name)
        case Not(part):
            return f"!({to_text(part, names, conjunction, disjunction)})"
        case And(parts):
            return _joined(parts, names, conjunction, (conjunction, disjunction))
        case Or(parts):
            return _joined(parts, names, disjunction, (conjunction, disjunction))
        case Xor(parts):
            return _joined(parts, names, "^", (conjunction, disjunction))


def _joined(
    parts: Sequence[Expression], names: Mapping[str, str], by: str, spelling: tuple[str, str]
) -> str:
    return "(" + f" {by} ".join(to_text(part, names, *spelling) for part in parts) + ")"
