"""Library files of any supported kind -> one ``Library``."""

from collections.abc import Mapping, Sequence
from dataclasses import replace
from types import MappingProxyType
from typing import Final

from insertdft.diagnostics import DesignError, Diagnostic, error, errors
from insertdft.library.cell import Library
from insertdft.library.liberty import merge, read_liberty
from insertdft.library.roles import with_roles
from insertdft.text import SourceText

_NO_TWINS: Final[Mapping[str, str]] = MappingProxyType({})


def read_library(
    sources: Sequence[SourceText], twins_by_hand: Mapping[str, str] = _NO_TWINS
) -> Library:
    """Return all cells of the files as one library, scan roles filled in.

    A file that begins with ``library (`` is read as Liberty. Of a cell described twice the first
    description holds.

    Args:
        sources: Texts of the files, in the user's order.
        twins_by_hand: Plain cell -> scan cell, the user's choice.

    Raises:
        DesignError: A file cannot be read, there is no cell, or a choice by hand does not fit.
    """
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
    if errors(problems):
        raise DesignError(problems)
    merged, own = merge(libraries or [Library("", {})])
    problems += own
    if not merged.cells:
        raise DesignError([error("library-empty", "no cell was found in the library files")])
    cells, own = with_roles(merged.cells)
    problems += own
    return replace(
        merged,
        cells=cells,
        twins_by_hand=dict(twins_by_hand),
        diagnostics=tuple(problems),
    )
