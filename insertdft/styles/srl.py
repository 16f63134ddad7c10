"""Shift-register latches composed from a library's NAND gates and inverters.

The form is the published one in NAND gates (E. B. Eichelberger, T. W. Williams, "A logic design
structure for LSI testability", DAC 1977; the figure as remembered): each port ANDs data and
inverted data with its clock into a pair of cross-coupled NAND gates. The pair holds by itself, so
that no clock edge can lose the state, and one input changing at a time never makes a pulse at an
output that keeps its value (polarity hold, free of hazards).

L1 has a system port (D under C) and a scan port (I under A); L2 takes L1 under B. Set and reset
force the pair and close the opposite side of every port, so that they win over any clock.
"""

from collections.abc import Collection, Mapping
from dataclasses import dataclass
from enum import Enum
from typing import Final

from insertdft.library.cell import Library
from insertdft.styles.gates import (
    ComposedModule,
    GateBuilder,
    ModulePart,
    free_name,
    gate_builder,
    renamed,
    to_verilog,
)

__all__ = ["ComposedModule", "Kind", "ModulePart", "Shape", "compose", "renamed", "to_verilog"]


class Kind(Enum):
    """What a composed module holds."""

    TWO_PORT = "two_port"  # L1 alone; output Q
    DOUBLE = "double"  # L1 and L2; output Q is L2
    SINGLE = "single"  # L1 and L2; output Q is L1, output L2 for scan alone


@dataclass(frozen=True, slots=True)
class Shape:
    """What a module has to do.

    Attributes:
        kind: Which latches it holds.
        clock_low: Whether C opens L1 while 0.
        clear: Level of pin R that makes the state 0, None for no such pin.
        preset: Level of pin S that makes the state 1, None for no such pin.
        preset_wins: Whether S wins where both act.
        true_output: Whether there is an output Q.
        inverse_output: Whether there is an output QN.
    """

    kind: Kind
    clock_low: bool = False
    clear: int | None = None
    preset: int | None = None
    preset_wins: bool = False
    true_output: bool = True
    inverse_output: bool = False


def compose(
    library: Library, shape: Shape, taken: Collection[str] = frozenset()
) -> ComposedModule | None:
    """Return the module for ``shape``, None if the library lacks 2-input NAND gates or inverters.

    Args:
        library: Where the gates come from; the smallest of each kind is used.
        shape: What the module has to do.
        taken: Names of modules and cells that are in use.

    Raises:
        ValueError: The shape asks for no output at all.
    """
    if not (shape.true_output or shape.inverse_output):
        raise ValueError("a shift-register latch needs Q or QN")
    builder = gate_builder(library)
    if builder is None:
        return None
    _build(builder, shape)
    name = free_name(_base_name(shape), taken)
    return builder.module(name, _ports(shape), _PURPOSE[shape.kind])


_PURPOSE: Final[Mapping[Kind, str]] = {
    Kind.TWO_PORT: "two-port latch (L1): D under C, I under A",
    Kind.DOUBLE: "shift-register latch: L1 takes D under C or I under A, L2 takes L1 under B",
    Kind.SINGLE: "shift-register latch with system output L1; L2 takes L1 under B for shifting",
}


def _base_name(shape: Shape) -> str:
    parts = ["srl", shape.kind.value]
    parts += ["low"] if shape.clock_low else []
    parts += [f"r{shape.clear}"] if shape.clear is not None else []
    parts += [f"s{shape.preset}"] if shape.preset is not None else []
    parts += ["s_first"] if shape.preset_wins else []
    parts += ["qn"] if not shape.true_output else []
    parts += ["q_qn"] if shape.true_output and shape.inverse_output else []
    return "_".join(parts)


def _ports(shape: Shape) -> tuple[tuple[str, str], ...]:
    inputs = ["D", "C", "I", "A"]
    inputs += ["B"] if shape.kind is not Kind.TWO_PORT else []
    inputs += ["R"] if shape.clear is not None else []
    inputs += ["S"] if shape.preset is not None else []
    outputs = ["Q"] if shape.true_output else []
    outputs += ["QN"] if shape.inverse_output else []
    outputs += ["L2"] if shape.kind is Kind.SINGLE else []
    return (*((name, "input") for name in inputs), *((name, "output") for name in outputs))


@dataclass(frozen=True, slots=True)
class _Force:
    """Nets that are 0 while the state is forced to 0, and while it is forced to 1."""

    clear_n: list[str]
    preset_n: list[str]


def _build(builder: GateBuilder, shape: Shape) -> None:
    clock = builder.invert("C", "c_on") if shape.clock_low else "C"
    force = _force(builder, shape)
    system = (clock, "D", builder.invert("D", "d_n"))
    scan = ("A", "I", builder.invert("I", "i_n"))
    none = _Force([], [])
    match shape.kind:
        case Kind.TWO_PORT:
            _latch(builder, _out(shape), [system, scan], force)
        case Kind.DOUBLE:
            _latch(builder, ("l1", "l1_n"), [system, scan], force)
            _latch(builder, _out(shape), [("B", "l1", "l1_n")], force)
        case Kind.SINGLE:
            first = _out(shape)
            _latch(builder, first, [system, scan], force)
            _latch(builder, ("L2", "l2_n"), [("B", *first)], none)


def _out(shape: Shape) -> tuple[str, str]:
    """Return the nets of a latch that is read from outside."""
    return ("Q" if shape.true_output else "q", "QN" if shape.inverse_output else "q_n")


def _force(builder: GateBuilder, shape: Shape) -> _Force:
    """Bring set and reset to nets that are 0 while they act; where both do, one wins."""
    clear_n, preset_n = "R", "S"
    if shape.clear == 1:
        clear_n = builder.invert("R", "r_n")
    if shape.preset == 1:
        preset_n = builder.invert("S", "s_n")
    if shape.clear is not None and shape.preset is not None:
        if shape.preset_wins:
            acts = "R" if shape.clear == 1 else builder.invert("R", "r_on")
            clear_n = builder.nand([acts, preset_n], "r_alone_n")
        else:
            acts = "S" if shape.preset == 1 else builder.invert("S", "s_on")
            preset_n = builder.nand([acts, clear_n], "s_alone_n")
    return _Force(
        [clear_n] if shape.clear is not None else [],
        [preset_n] if shape.preset is not None else [],
    )


def _latch(
    builder: GateBuilder,
    outputs: tuple[str, str],
    ports: list[tuple[str, str, str]],
    force: _Force,
) -> None:
    """Add one latch: each port is (clock, data, inverted data)."""
    true, inverse = outputs
    ups, downs = [], []
    for clock, data, data_n in ports:
        stem = f"{true.lower()}_{clock.lower()}"
        ups.append(builder.nand([data, clock, *force.clear_n], f"{stem}_up"))
        downs.append(builder.nand([data_n, clock, *force.preset_n], f"{stem}_down"))
    builder.nand([*ups, inverse, *force.preset_n], true)
    builder.nand([*downs, true, *force.clear_n], inverse)
