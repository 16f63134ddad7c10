"""Structural Verilog to a netlist, in straight line: directives, statements, names, links, top.

The subset is that of IEEE 1364-2005 which describes structure: modules with ports, nets, continuous
assignments of nets and constants, instances of modules, cells and gate primitives.
"""

import gc
from collections.abc import Iterator, Mapping, Sequence
from contextlib import contextmanager
from types import MappingProxyType
from typing import Final

from insertdft.diagnostics import Diagnostic, Severity, error
from insertdft.netlist import Module, Netlist
from insertdft.source.complaints import Complaints, word_at
from insertdft.source.draft import Draft, Tables
from insertdft.source.link import link_module
from insertdft.source.ports import prepare_linking
from insertdft.source.preprocess import Macros, prepare
from insertdft.source.resolve import Resolved, check_names, resolve
from insertdft.source.statements import read_modules
from insertdft.source.top import find_top
from insertdft.text import SourceText, Span

_NO_DEFINES: Final[Mapping[str, str]] = MappingProxyType({})


def read_netlist(
    sources: Sequence[SourceText],
    top: str | None = None,
    defines: Mapping[str, str] = _NO_DEFINES,
) -> Netlist:
    """Read the modules of all sources.

    Macros go on from one source to the next, as the standard has it; ```default_nettype`` starts
    anew in each, so that the order of files does not change what an undeclared name is.

    Args:
        sources: In any order of modules.
        top: Kept name of the top module; found by itself if only one is instanced nowhere.
        defines: Macros defined from outside, name -> body.

    Raises:
        DesignError: With every problem found, each with its place.
    """
    with _without_garbage_collection():
        complaints = Complaints()
        tables = Tables()
        macros = Macros(defines)
        drafts: list[Draft] = []
        resolved: dict[str, Resolved] = {}
        for source in sources:
            prepared = prepare(source, macros, complaints)
            for draft in read_modules(prepared, macros, tables, complaints):
                if _is_new(draft, drafts, complaints):
                    drafts.append(draft)
        for draft in drafts:
            resolved[draft.name] = resolve(draft, complaints)
            check_names(draft, complaints)
        _check_any(sources, drafts, complaints)
        return _link(tuple(sources), drafts, resolved, tables, complaints, top)


def _link(
    sources: tuple[SourceText, ...],
    drafts: Sequence[Draft],
    resolved: Mapping[str, Resolved],
    tables: Tables,
    complaints: Complaints,
    top: str | None,
) -> Netlist:
    linking = prepare_linking(drafts, tables, complaints)
    modules: dict[str, Module] = {
        draft.name: link_module(draft, resolved[draft.name], linking) for draft in drafts
    }
    complaints.stop_if_any()
    cells = linking.cells.all()
    return Netlist(
        sources=sources,
        modules=modules,
        top=find_top(modules, cells, top),
        cell_names=cells,
        pin_names=linking.pins.all(),
        diagnostics=complaints.found(),
    )


@contextmanager
def _without_garbage_collection() -> Iterator[None]:
    """Millions of new objects and no cycle among them: looking for cycles would double the time."""
    was_enabled = gc.isenabled()
    gc.disable()
    try:
        yield
    finally:
        if was_enabled:
            gc.enable()


def _is_new(draft: Draft, drafts: Sequence[Draft], complaints: Complaints) -> bool:
    first = next((item for item in drafts if item.name == draft.name), None)
    if first is None:
        return True
    complaints.add(
        Diagnostic(
            "module-duplicate",
            Severity.ERROR,
            f"module `{draft.name}` is described twice",
            _header(draft),
            hint="leave one of the two out",
            also=((_header(first), "first here"),),
        )
    )
    return False


def _header(draft: Draft) -> Span:
    return word_at(draft.prepared.source, draft.start)


def _check_any(
    sources: Sequence[SourceText], drafts: Sequence[Draft], complaints: Complaints
) -> None:
    complaints.stop_if_any()
    if not drafts:
        names = ", ".join(f"`{source.name}`" for source in sources)
        complaints.add(
            error(
                "netlist-empty",
                f"no module is described in {names or 'no file at all'}",
                hint="give the netlist that synthesis writes",
            )
        )
    complaints.stop_if_any()
