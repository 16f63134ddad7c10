"""Liberty text -> cells, without their scan roles."""

import re
from collections.abc import Sequence
from typing import Final

from insertdft.diagnostics import Diagnostic, Severity
from insertdft.library.cell import Cell, Library
from insertdft.library.liberty_buses import read_types
from insertdft.library.liberty_cell import Context, read_cell
from insertdft.library.liberty_expressions import Reader
from insertdft.library.liberty_syntax import Group, parse
from insertdft.library.tables import Templates
from insertdft.text import SourceText

_LIBRARY_HEAD: Final = re.compile(
    r"(?:\s++|/\*.*?\*/|//[^\n]*+)*+library\s*\(", re.DOTALL | re.IGNORECASE
)
_UNIT: Final = re.compile(r"\s*([0-9.eE+-]*)\s*([munpf]?)(s|f|F)\s*\Z")
_PREFIX: Final = {"": 1.0, "m": 1e-3, "u": 1e-6, "n": 1e-9, "p": 1e-12, "f": 1e-15}


def is_liberty(source: SourceText) -> bool:
    """Return whether the text starts as a Liberty file does."""
    return _LIBRARY_HEAD.match(source.text) is not None


def read_liberty(source: SourceText) -> tuple[list[Library], list[Diagnostic]]:
    """Return the libraries of one file and what is wrong with their cells.

    Raises:
        DesignError: The text is no Liberty.
    """
    found: list[Library] = []
    problems: list[Diagnostic] = []
    for group in parse(source):
        if group.kind != "library":
            continue
        library, own = _library(group)
        found.append(library)
        problems += own
    return found, problems


def _library(group: Group) -> tuple[Library, list[Diagnostic]]:
    reader = Reader()
    context = Context(
        types=read_types(group),
        templates=Templates(group),
        reader=reader,
        input_capacitance=group.number("default_input_pin_cap"),
    )
    cells: dict[str, Cell] = {}
    for item in group.all_of("cell"):
        cell = read_cell(item, context)
        if cell.name in cells:
            reader.diagnostics.append(duplicate(cells[cell.name], cell))
        else:
            cells[cell.name] = cell
    library = Library(
        name=group.name,
        cells=cells,
        time_unit_s=_unit(group.text("time_unit"), 1e-9),
        capacitance_unit_f=_load_unit(group),
        wire_loads={item.name: _text(item) for item in group.all_of("wire_load")},
    )
    return library, reader.diagnostics


def duplicate(first: Cell, second: Cell) -> Diagnostic:
    """Return the warning that a cell is described twice."""
    return Diagnostic(
        "library-duplicate-cell",
        Severity.WARNING,
        f"`{second.name}` is described a second time; the first description holds",
        second.span,
        hint="give only one of the libraries, the one of the corner you sign off",
        also=((first.span, "first described here"),) if first.span else (),
    )


def merge(libraries: Sequence[Library]) -> tuple[Library, list[Diagnostic]]:
    """Return all cells as one library; units are those of the first."""
    problems: list[Diagnostic] = []
    cells: dict[str, Cell] = {}
    wire_loads: dict[str, str] = {}
    for library in libraries:
        for name, cell in library.cells.items():
            if name in cells:
                problems.append(duplicate(cells[name], cell))
            else:
                cells[name] = cell
        wire_loads = {**library.wire_loads, **wire_loads}
    first = libraries[0]
    merged = Library(first.name, cells, first.time_unit_s, first.capacitance_unit_f, wire_loads)
    return merged, problems


def _text(group: Group) -> str:
    return group.source.text[group.start : group.end]


def _unit(text: str | None, default: float) -> float:
    found = _UNIT.match(text or "")
    return float(found[1] or 1) * _PREFIX[found[2]] if found else default


def _load_unit(group: Group) -> float:
    parts = group.arguments("capacitive_load_unit")
    return _unit("".join(parts).lower(), 1e-12) if parts else 1e-12
