"""The survey itself: every storage cell, where its clock comes from, what keeps it out."""

from collections.abc import Mapping

import numpy as np

from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, Diagnostic, error, nearest
from insertdft.library.cell import StorageKind
from insertdft.netlist import Ids
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import Walker
from insertdft.survey.clocks import find_clocks
from insertdft.survey.facts import LEFT_ALONE, HeldPort, Survey
from insertdft.survey.kept import find_kept
from insertdft.survey.resets import find_set_resets
from insertdft.survey.verdict import Verdict


def survey(
    design: Design,
    held: Mapping[str, int] | None = None,
    kept: tuple[str, ...] = (),
) -> Survey:
    """Return the facts about ``design``.

    Args:
        design: The flat design.
        held: Test-mode values of ports (bits) that the user promises to hold.
        kept: Patterns of hierarchical names that the user wants left alone.

    Raises:
        DesignError: A held port or a pattern matches nothing.
    """
    storage = storage_instances(design)
    promised = held or {}
    walker = Walker(design, propagate(design, _nets_of(design, promised)))
    verdict = Verdict(design)
    find_kept(verdict, storage, kept)
    clocks = find_clocks(walker, storage, verdict)
    set_resets = find_set_resets(walker, storage, verdict)
    domain = np.full(len(design.cell), LEFT_ALONE, np.int32)
    for number, cells in enumerate(clocks.cells):
        domain[np.array(cells, np.int64)] = number
    domain[np.array(list(verdict.reasons), np.int64)] = LEFT_ALONE
    area, without_area = total_area(design)
    return Survey(
        design=design,
        storage=storage,
        domain=domain[storage],
        domains=clocks.domains,
        held=tuple(HeldPort(port, value) for port, value in promised.items()),
        set_resets=set_resets,
        findings=tuple(verdict.findings),
        reasons=verdict.reasons,
        area=area,
        without_area=without_area,
    )


def storage_instances(design: Design) -> Ids:
    """Return the flat ids of all storage cells, in hierarchical source order."""
    keeps = np.array([cell is not None and cell.is_storage for cell in design.cells], bool)
    return np.flatnonzero(keeps[design.cell]).astype(np.int32)


def is_latch(design: Design, instance: int) -> bool:
    """Return whether ``instance`` is a level-sensitive latch."""
    cell = design.cell_of(instance)
    return cell is not None and any(item.kind is StorageKind.LATCH for item in cell.storage)


def total_area(design: Design) -> tuple[float, tuple[str, ...]]:
    """Return the sum of cell areas and the names of cells that state none."""
    counts = np.bincount(design.cell, minlength=len(design.cells))
    area, without = 0.0, []
    for name, cell, count in zip(design.cell_names, design.cells, counts.tolist(), strict=True):
        if count and (cell is None or cell.area is None):
            without.append(name)
        elif count and cell is not None and cell.area is not None:
            area += cell.area * count
    return area, tuple(sorted(set(without)))


def _nets_of(design: Design, held: Mapping[str, int]) -> dict[int, int]:
    inputs = {port.name: port.net for port in design.ports if port.direction != "output"}
    missing = [_no_such_port(port, inputs) for port in held if port not in inputs]
    if missing:
        raise DesignError(missing)
    return {inputs[port]: value for port, value in held.items()}


def _no_such_port(port: str, inputs: Mapping[str, int]) -> Diagnostic:
    return error(
        "port-unknown",
        f"`{port}` is to be held in test but is no input port",
        hint=nearest(port, inputs) or "name one bit of an input port of the top module",
    )
