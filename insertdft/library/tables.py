"""Delay tables that are read from the text only when asked for.

A vendor library is mostly table values; scan insertion needs few of them.
"""

from collections.abc import Iterator, Mapping
from typing import Final

from insertdft.library.cell import Table
from insertdft.library.liberty_syntax import Group

TABLES: Final = frozenset(
    """cell_rise cell_fall rise_transition fall_transition rise_constraint fall_constraint
    retaining_rise retaining_fall rise_propagation fall_propagation""".split()
)


class Templates:
    """``lu_table_template`` groups of one library: axes, and indices that tables inherit."""

    def __init__(self, library: Group) -> None:
        """Keep the template groups by name."""
        self._groups = {group.name: group for group in library.all_of("lu_table_template")}

    def read(self, group: Group) -> Table:
        """Return the table that ``group`` (``cell_rise (template) {...}``) describes."""
        template = self._groups.get(group.name)
        axes: list[str] = []
        indices: list[tuple[float, ...]] = []
        for number in (1, 2, 3):
            index = _floats(group, f"index_{number}")
            if not index and template:
                index = _floats(template, f"index_{number}")
            if not index:
                break
            axis = template.text(f"variable_{number}") if template else None
            axes.append(axis or f"index_{number}")
            indices.append(index)
        values = _floats(group, "values")
        return Table(tuple(axes), tuple(indices), values)


class LazyTables(Mapping[str, Table]):
    """Tables of one timing group by name, each read when first asked for."""

    __slots__ = ("_groups", "_read", "_templates")

    def __init__(self, timing: Group, templates: Templates) -> None:
        """Remember where the tables stand."""
        self._groups = {group.kind: group for group in timing.groups if group.kind in TABLES}
        self._templates = templates
        self._read: dict[str, Table] = {}

    def __getitem__(self, name: str) -> Table:
        """Return one table."""
        if name not in self._read:
            self._read[name] = self._templates.read(self._groups[name])
        return self._read[name]

    def __iter__(self) -> Iterator[str]:
        """Yield the names in the order of the text."""
        return iter(self._groups)

    def __len__(self) -> int:
        """Return the number of tables."""
        return len(self._groups)


def _floats(group: Group, attribute: str) -> tuple[float, ...]:
    """Return all numbers of a complex attribute, rows joined; what is no number is left out."""
    words = " ".join(group.arguments(attribute) or ()).replace(",", " ").replace("\\", " ").split()
    found: list[float] = []
    for word in words:
        try:
            found.append(float(word))
        except ValueError:
            continue
    return tuple(found)
