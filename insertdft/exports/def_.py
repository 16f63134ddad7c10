r"""DEF 5.8: the SCANCHAINS section for reordering in layout, and reading a reordered one back.

One DEF chain a scan chain and run of cells that may be shuffled: a run ends at a lock-up latch and
wherever an inversion, another clock edge or another width begins, as those must keep their places.
A run of several cells is FLOATING; a run that may not be changed is ORDERED. Sources: grammar of
the open DEF 5.8 reader; that lock-ups bound the runs is common practice.

Names use ``/`` between levels. In a name, ``/``, ``\``, ``[`` and ``]`` of the Verilog spelling are
escaped by a backslash, a leading backslash of an escaped part is left out.
"""

import re
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from itertools import pairwise
from typing import Final

from insertdft.description import Chain, ChainCell, Description
from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.exports.inputs import ExportInput
from insertdft.exports.render import render
from insertdft.netlist.names import join_path, plain_to_name, split_path

_TO_ESCAPE: Final = re.compile(r"[/\\\[\]]")


@dataclass(frozen=True, slots=True)
class Run:
    """Cells of a chain that stand between two points that stay.

    Attributes:
        name: Unique in the design.
        cells: In shift order.
        start: ``PIN port`` or ``instance pin`` that feeds the run.
        stop: What the run feeds.
        floating: Whether the cells may change places.
    """

    name: str
    cells: tuple[ChainCell, ...]
    start: tuple[str, str]
    stop: tuple[str, str]
    floating: bool


def to_def(given: ExportInput) -> str:
    """Return a DEF file with nothing but the SCANCHAINS section."""
    runs = [run for chain in given.description.chains for run in runs_of(chain)]
    return render(
        "scanchains.def.jinja",
        design=def_name(given.description.design),
        runs=[_shown(run) for run in runs],
    )


def def_name(name: str) -> str:
    """Return a hierarchical name as DEF has it."""
    return "/".join(_escaped(part.removeprefix("\\")) for part in split_path(name))


def name_of(text: str) -> str:
    """Return the hierarchical name that ``def_name`` made ``text`` from."""
    parts = re.findall(r"(?:[^/\\]|\\.)+", text)
    return join_path(plain_to_name(re.sub(r"\\(.)", r"\1", part)) for part in parts)


def _escaped(text: str) -> str:
    return _TO_ESCAPE.sub(lambda found: "\\" + found[0], text)


def _port(name: str) -> str:
    """Return a port bit: the brackets of a bit select are DEF's own, others are escaped."""
    head, blank, tail = name.partition(" ")
    if name[0] == "\\":
        return _escaped(head[1:]) + (tail if blank else "")
    return name


def runs_of(chain: Chain) -> list[Run]:
    """Return the runs of a chain in shift order."""
    bounds = [0, *_bounds(chain), len(chain.cells)]
    pairs = [(a, b) for a, b in pairwise(bounds) if a < b]
    lock_ups = {at.after: at for at in chain.lock_ups}
    found: list[Run] = []
    for number, (first, end) in enumerate(pairs):
        cells = chain.cells[first:end]
        before = (
            (chain.cells[first - 1].instance, chain.cells[first - 1].scan_out)
            if first
            else ("PIN", chain.scan_in)
        )
        lock_up = lock_ups.get(first - 1)
        start = (lock_up.instance, "") if lock_up and first else before
        nothing_behind = end == len(chain.cells)
        after = (
            ("PIN", chain.scan_out)
            if nothing_behind
            else (chain.cells[end].instance, chain.cells[end].scan_in)
        )
        lock_up = lock_ups.get(end - 1)
        stop = (lock_up.instance, "") if lock_up else after
        floating = len(cells) > 1 and not any(cell.inverted for cell in cells)
        found.append(Run(f"{chain.name}_run_{number + 1}", cells, start, stop, floating))
    return found


def _bounds(chain: Chain) -> list[int]:
    """Return the positions before which a run ends."""
    held = {lock_up.after + 1 for lock_up in chain.lock_ups}
    for index in range(1, len(chain.cells)):
        one, two = chain.cells[index - 1], chain.cells[index]
        if one.inverted or two.inverted or (chain.edge == "mixed" and one.cell != two.cell):
            held.add(index)
    return sorted(held)


def _shown(run: Run) -> dict[str, object]:
    return {
        "name": _escaped(run.name.removeprefix("\\")),
        "kind": "FLOATING" if run.floating else "ORDERED",
        "start": _point(run.start),
        "stop": _point(run.stop),
        "cells": [_cell(cell) for cell in run.cells],
    }


def _point(point: tuple[str, str]) -> str:
    place, pin = point
    if place == "PIN":
        return f"PIN {_port(pin)}"
    return f"{def_name(place)} {pin}".rstrip()


def _cell(cell: ChainCell) -> str:
    bits = f" ( BITS {cell.bits} )" if cell.bits != 1 else ""
    return f"{def_name(cell.instance)} ( IN {cell.scan_in} ) ( OUT {cell.scan_out} ){bits}"


def orders_from_def(text: str, name: str, description: Description) -> Mapping[str, list[str]]:
    """Return the instances of every chain in the order of a reordered DEF.

    Args:
        text: A DEF file with a SCANCHAINS section.
        name: For messages.
        description: What the netlist has.

    Raises:
        DesignError: The section is missing, holds other cells, or moves one that must stay.
    """
    rows = dict(_section(text, name))
    orders: dict[str, list[str]] = {}
    problems: list[Diagnostic] = []
    for chain in description.chains:
        order: list[str] = []
        for run in runs_of(chain):
            found = rows.pop(_escaped(run.name.removeprefix("\\")), None)
            problems += _problems(run, found)
            order += found or []
        orders[chain.name] = order
    problems += [_illegal(f"`{name}` has a run `{extra}` that no chain has") for extra in rows]
    if problems:
        raise DesignError(problems)
    return orders


def _section(text: str, name: str) -> Iterator[tuple[str, list[str]]]:
    section = re.search(r"^\s*SCANCHAINS\s+\d+\s*;(.*?)^\s*END\s+SCANCHAINS", text, re.S | re.M)
    if section is None:
        hint = "give the DEF file that the layout tool wrote"
        what = f"`{name}` has no SCANCHAINS section"
        raise DesignError([error("order-unreadable", what, hint=hint)])
    for row in re.split(r"\s;(?=\s|\Z)", section[1]):
        words = row.split()
        if words:
            yield words[1], [name_of(cell) for cell in _listed(words[2:])]


def _listed(words: Sequence[str]) -> Iterator[str]:
    """Yield the instances of FLOATING and ORDERED items."""
    listing, depth = False, 0
    for before, word in zip(["", *words], words, strict=False):
        if before == "+":
            listing = word in ("FLOATING", "ORDERED")
        elif word in "()":
            depth += 1 if word == "(" else -1
        elif listing and depth == 0 and word != "+":
            yield word


def _problems(run: Run, found: Sequence[str] | None) -> list[Diagnostic]:
    had = [cell.instance for cell in run.cells]
    if found is None:
        return [_illegal(f"run `{run.name}` is missing")]
    if sorted(found) != sorted(had):
        odd = sorted(set(found) ^ set(had))
        shown = odd[0] if odd else "a cell named twice"
        return [_illegal(f"run `{run.name}` holds other cells than before, first `{shown}`")]
    if not run.floating and list(found) != had:
        return [_illegal(f"run `{run.name}` is ordered, but its cells changed places")]
    return []


def _illegal(message: str) -> Diagnostic:
    return error(
        "order-illegal",
        message,
        hint="cells may change places within a FLOATING run only; write the DEF again and reorder",
    )
