"""Behavioural stand-ins for scan cells that a library lacks, written only when the user asks.

A stand-in is a Verilog model and a Liberty stub, both marked as such: it has the function of the
cell that is missing, but neither layout, area nor timing. With it plans can be made and compared;
nothing can be built from it.
"""

from collections.abc import Collection, Iterable
from dataclasses import dataclass, replace

from insertdft.library import read_library
from insertdft.library.cell import Cell, Library
from insertdft.styles.gates import free_name
from insertdft.styles.stand_in_liberty import liberty
from insertdft.styles.stand_in_parts import StandInKind, read_parts
from insertdft.styles.stand_in_verilog import verilog
from insertdft.text import SourceText

__all__ = ["StandIn", "StandInKind", "stand_in", "with_stand_ins"]


@dataclass(frozen=True, slots=True)
class StandIn:
    """A cell that stands in for a missing one.

    Attributes:
        cell: Described as a library cell, ``stand_in`` set.
        verilog: Its model.
        liberty: Its description, a library of one cell.
    """

    cell: Cell
    verilog: str
    liberty: str


def stand_in(
    plain: Cell, kind: StandInKind, taken: Collection[str] = frozenset()
) -> StandIn | None:
    """Return the stand-in for the scan cell of ``plain``; None if the cell cannot be read so.

    It can if it holds one latch or flip-flop (as ``kind`` asks) with one clock pin, at most one
    pin each for set and reset, and outputs that are functions of the state.
    """
    parts = read_parts(plain, kind, free_name(f"stand_in_{kind.value}_{plain.name}", taken))
    if parts is None:
        return None
    stub = liberty(parts)
    library = read_library([SourceText(f"{parts.name}.lib", stub)])
    cell = library.cells[parts.name]
    if not cell.scan:
        raise RuntimeError(f"the stand-in `{parts.name}` has no scan role")
    return StandIn(replace(cell, stand_in=True, span=plain.span), verilog(parts), stub)


def with_stand_ins(library: Library, stand_ins: Iterable[StandIn]) -> Library:
    """Return the library with stand-ins among its cells; they are found as scan twins."""
    cells = {**library.cells, **{item.cell.name: item.cell for item in stand_ins}}
    return replace(library, cells=cells)
