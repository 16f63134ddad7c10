"""Library files of any supported kind -> one ``Library``."""

import re
from collections.abc import Mapping, Sequence
from dataclasses import replace
from types import MappingProxyType
from typing import Final

from insertdft.diagnostics import DesignError, Diagnostic, error, errors, nearest
from insertdft.library.cell import Cell, Library
from insertdft.library.liberty import is_liberty, merge, read_liberty
from insertdft.library.model_cells import with_models
from insertdft.library.roles import with_roles
from insertdft.library.twins import match
from insertdft.library.verilog_text import units_of
from insertdft.text import SourceText

_NO_TWINS: Final[Mapping[str, str]] = MappingProxyType({})
_VERILOG: Final = re.compile(r"^[ \t]*(?:module|macromodule|primitive)\b", re.MULTILINE)


def read_library(
    sources: Sequence[SourceText], twins_by_hand: Mapping[str, str] = _NO_TWINS
) -> Library:
    """Return all cells of the files as one library, scan roles filled in.

    A file with modules or primitives that does not begin with ``library (`` is read as Verilog
    cell models, any other as Liberty. Of a cell described twice the first description holds;
    Liberty goes before models, which then add the pin order and functions that Liberty lacks.

    Args:
        sources: Texts of the files, in the user's order.
        twins_by_hand: Plain cell -> scan cell, the user's choice.

    Raises:
        DesignError: A file cannot be read, there is no cell, or a choice by hand does not fit.
    """
    models = [source for source in sources if _is_verilog(source)]
    libraries, problems = _liberty([source for source in sources if source not in models])
    if errors(problems):
        raise DesignError(problems)
    merged, own = merge(libraries or [Library("", {})])
    problems += own
    cells = merged.cells
    if models:
        cells, own = with_models(cells, units_of(models))
        problems += own
    if not cells:
        raise DesignError([_empty(sources)])
    completed, own = with_roles(cells)
    wrong = _wrong_choices(completed, twins_by_hand)
    if wrong:
        raise DesignError(wrong)
    return replace(
        merged,
        cells=completed,
        twins_by_hand=dict(twins_by_hand),
        diagnostics=(*problems, *own),
    )


def read_models(sources: Sequence[SourceText]) -> Library:
    """Return the cells that Verilog models describe, each worked out from its model alone.

    Raises:
        DesignError: There is no module.
    """
    cells, problems = with_models({}, units_of(sources))
    if not cells:
        raise DesignError([_empty(sources)])
    completed, own = with_roles(cells)
    return Library("", completed, diagnostics=(*problems, *own))


def _is_verilog(source: SourceText) -> bool:
    return not is_liberty(source) and _VERILOG.search(source.text) is not None


def _liberty(sources: Sequence[SourceText]) -> tuple[list[Library], list[Diagnostic]]:
    libraries: list[Library] = []
    problems: list[Diagnostic] = []
    for source in sources:
        try:
            found, own = read_liberty(source)
        except DesignError as fault:
            problems += fault.diagnostics
            continue
        libraries += found
        problems += own
    return libraries, problems


def _empty(sources: Sequence[SourceText]) -> Diagnostic:
    files = ", ".join(f"`{source.name}`" for source in sources) or "no file"
    hint = "give Liberty files (`library (...) {...}`) or Verilog models of the cells"
    return error("library-empty", f"there is no cell in {files}", hint=hint)


def _wrong_choices(cells: Mapping[str, Cell], chosen: Mapping[str, str]) -> list[Diagnostic]:
    """Return what is wrong with a mapping by hand."""
    found: list[Diagnostic] = []
    for plain, scan in chosen.items():
        missing = [name for name in (plain, scan) if name not in cells]
        for name in missing:
            message = f"the mapping `{plain}` to `{scan}` names `{name}`, which no library has"
            hint = nearest(name, cells) or "correct the name or give the library of the cell"
            found.append(error("cell-map-wrong", message, hint=hint))
        if missing:
            continue
        if not cells[scan].scan:
            message = f"`{plain}` is mapped to `{scan}`, which is no scan cell"
            hint = "map it to a cell that shifts by its function; docs/libraries.md says which do"
            found.append(error("cell-map-wrong", message, cells[scan].span, hint))
        elif not any(match(cells[plain], cells[scan], role) for role in cells[scan].scan):
            message = f"`{scan}` with scan off is another function than `{plain}`"
            hint = "map it to a cell with the same clock edge, set, reset, data and outputs"
            found.append(error("cell-map-wrong", message, cells[scan].span, hint))
    return found
