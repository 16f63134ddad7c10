"""Which module is the top, and that no module contains itself."""

from collections.abc import Mapping, Sequence
from graphlib import CycleError, TopologicalSorter
from itertools import pairwise

import numpy as np

from insertdft.diagnostics import DesignError, Diagnostic, Severity, error, nearest
from insertdft.netlist import Module
from insertdft.text import Span


def find_top(modules: Mapping[str, Module], cell_names: Sequence[str], top: str | None) -> str:
    """Return the kept name of the top module.

    Raises:
        DesignError: A module contains itself, the named top does not exist, or several modules
            could be the top and none is named.
    """
    children = {name: _children(module, modules, cell_names) for name, module in modules.items()}
    _refuse_cycles(modules, children)
    if top is not None:
        if top in modules:
            return top
        names = ", ".join(f"`{name}`" for name in modules)
        raise DesignError(
            [
                error(
                    "top-unknown",
                    f"the netlist has no module `{top}`",
                    hint=nearest(top, modules) or f"it has {names}",
                )
            ]
        )
    instanced = {child for names in children.values() for child in names}
    roots = [name for name in modules if name not in instanced]
    if len(roots) == 1:
        return roots[0]
    raise DesignError([_several(modules, roots)])


def _children(
    module: Module, modules: Mapping[str, Module], cell_names: Sequence[str]
) -> dict[str, int]:
    """Return the modules that ``module`` instances, with the first instance of each."""
    cells, first = np.unique(module.instance_cell, return_index=True)
    return {
        cell_names[cell]: place
        for cell, place in zip(cells.tolist(), first.tolist(), strict=True)
        if cell_names[cell] in modules
    }


def _refuse_cycles(
    modules: Mapping[str, Module], children: Mapping[str, Mapping[str, int]]
) -> None:
    try:
        TopologicalSorter(children).prepare()
        return
    except CycleError as cause:
        # Its list runs from inside to outside and ends with the module that it starts with.
        cycle: list[str] = cause.args[1][::-1]
    steps = pairwise(cycle)
    places = [modules[name].span(children[name][child]) for name, child in steps]
    path = " -> ".join(f"`{name}`" for name in cycle)
    raise DesignError(
        [
            Diagnostic(
                "module-cycle",
                Severity.ERROR,
                f"module `{cycle[0]}` contains itself: {path}",
                places[0],
                hint="take one of the instances out",
                also=tuple((span, "and on from here") for span in places[1:]),
            )
        ]
    )


def _several(modules: Mapping[str, Module], roots: Sequence[str]) -> Diagnostic:
    names = " or ".join(f"`{name}`" for name in roots)
    spans = [(_header(modules[name]), f"`{name}` is instanced nowhere") for name in roots]
    return Diagnostic(
        "top-unknown",
        Severity.ERROR,
        f"{len(roots)} modules could be the top: {names}",
        hint="say which one with --top",
        also=tuple(spans),
    )


def _header(module: Module) -> Span:
    return Span(module.source, module.start, module.header.end)
