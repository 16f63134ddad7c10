"""The gate primitives of Verilog as library cells (IEEE 1364-2005, clause 7).

Pins have no names in the language; here they are ``#0`` (the output), ``#1``, ``#2``, ...
"""

from functools import cache
from typing import Final

from insertdft.library.cell import Cell, Pin
from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor, negation

_GATES: Final[dict[str, type[And] | type[Or] | type[Xor]]] = {
    "and": And,
    "nand": And,
    "or": Or,
    "nor": Or,
    "xor": Xor,
    "xnor": Xor,
}
_INVERTED: Final = frozenset({"nand", "nor", "xnor", "not", "notif0", "notif1"})


@cache
def primitive_cell(kind: str, pins: int) -> Cell:
    """Return the gate primitive ``kind`` with ``pins`` pins in all, output first.

    ``buf`` and ``not`` may have several outputs; the last pin is then the input.

    Raises:
        ValueError: The kind is no primitive or cannot have that many pins.
    """
    least = {"pullup": 1, "pulldown": 1, "bufif0": 3, "bufif1": 3, "notif0": 3, "notif1": 3}
    if pins < least.get(kind, 2):
        raise ValueError(f"primitive {kind} needs at least {least.get(kind, 2)} pins, got {pins}")
    names = [f"#{number}" for number in range(pins)]
    if kind in _GATES:
        return _cell(kind, {"#0": _gate(kind, names[1:])}, names[1:])
    if kind in ("buf", "not"):
        value = _maybe_inverted(kind, Var(names[-1]))
        return _cell(kind, dict.fromkeys(names[:-1], value), names[-1:])
    if kind in ("bufif0", "bufif1", "notif0", "notif1"):
        enable = Var("#2")
        closed = negation(enable) if kind.endswith("1") else enable
        return _cell(kind, {"#0": _maybe_inverted(kind, Var("#1"))}, names[1:3], closed)
    if kind in ("pullup", "pulldown"):
        # A pull is weak: other drivers may share its net, as they may with a three-state output.
        return _cell(kind, {"#0": Const(kind == "pullup")}, [], Const(False))
    raise ValueError(f"{kind} is no gate primitive")


def _gate(kind: str, inputs: list[str]) -> Expression:
    parts = tuple(Var(name) for name in inputs)
    return _maybe_inverted(kind, parts[0] if len(parts) == 1 else _GATES[kind](parts))


def _maybe_inverted(kind: str, value: Expression) -> Expression:
    return Not(value) if kind in _INVERTED else value


def _cell(
    kind: str,
    outputs: dict[str, Expression],
    inputs: list[str],
    three_state: Expression | None = None,
) -> Cell:
    pins = {
        name: Pin(name, "output", function=value, three_state=three_state)
        for name, value in outputs.items()
    }
    pins |= {name: Pin(name, "input") for name in inputs}
    return Cell(kind, None, pins, pin_order=tuple(pins))
