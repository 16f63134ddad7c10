"""The design rules of level-sensitive scan design, each checked on the flat graph.

Source: E. B. Eichelberger, T. W. Williams, "A logic design structure for LSI testability", Proc.
14th Design Automation Conference, 1977, 462-468. The rules in our words:

1. All storage is in level-sensitive latches (``lssd-edge-triggered``, ``lssd-feedback-loop``).
2. A latch feeds the data of another only if their clocks differ (``lssd-same-phase-path``), and
   gates a clock only if no clock made of that one is its own (``lssd-gates-own-clock``).
3. Clocks come from ports so that (i) all latches are closed while all clock ports rest
   (``lssd-clock-not-off``), (ii) each latch can be opened by one clock port with the right gating
   values (``lssd-clock-cannot-turn-on``), (iii) no clock is ANDed with another or its inverse
   (``lssd-clocks-anded``).
4. Clock ports feed clock pins and outputs, never the data of a latch (``lssd-clock-into-data``; set
   and reset pins are held to the same rule here, which the paper does not ask for).
5. Every latch is part of a shift-register latch (``lssd-latch-outside-srl``).
6. In the scan state every shift-register latch takes only its predecessor, and each shift clock is
   turned on and off from its port (``lssd-shift-clock-blocked``; the path itself is for the trace).

Paths are structural: a path that no values ever open is reported too.
"""

from collections.abc import Mapping, Sequence
from typing import Final, NamedTuple

import numpy as np
from scipy.sparse.csgraph import connected_components

from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic, Severity
from insertdft.library.cell import StorageKind
from insertdft.survey.latch_ports import latch_kinds
from insertdft.survey.lssd_clock_rules import blocked_shift_clocks, clock_control
from insertdft.survey.lssd_model import Clocked
from insertdft.survey.lssd_path_rules import clock_into_data, same_phase
from insertdft.survey.lssd_words import Witness, capped, cells_named, route, spans_on

#: Breaks of one rule that are given in full.
MOST: Final = 50


class Srl(NamedTuple):
    """One shift-register latch: flat ids of L1 and L2 (the same for a cell that holds both)."""

    first: int
    second: int


def check_rules(
    design: Design, clocks: Mapping[str, int], held: Mapping[str, int] | None = None
) -> tuple[Diagnostic, ...]:
    """Return every break of rules 1 to 4, each with its path, cell by cell.

    Args:
        design: The flat design.
        clocks: Clock port -> its value at rest; see ``Latches.clock_ports``.
        held: Ports that are held in the mode to check.

    Raises:
        DesignError: A clock or held port is no input port.
    """
    rules = Clocked(design, clocks, held)
    return (
        *_edge_triggered(design),
        *capped(_loops(rules), MOST),
        *capped(clock_control(rules), MOST),
        *capped(clock_into_data(rules), MOST),
        *capped(same_phase(rules), MOST),
    )


def check_srls(design: Design, srls: Sequence[Srl]) -> tuple[Diagnostic, ...]:
    """Return the break of rule 5: latches that are in none of ``srls``."""
    inside = {latch for srl in srls for latch in srl}
    outside = sorted(
        latch
        for kind in latch_kinds(design)
        for latch in kind.instances.tolist()
        if latch not in inside
    )
    if not outside:
        return ()
    return (
        Diagnostic(
            "lssd-latch-outside-srl",
            Severity.WARNING,
            f"{len(outside)} latches belong to no shift-register latch"
            if len(outside) > 1
            else f"latch `{design.name(outside[0])}` belongs to no shift-register latch",
            design.span(outside[0]),
            "let it be converted, or accept that its state is not controlled in test",
            names=cells_named(design, dict.fromkeys(outside)),
        ),
    )


def check_scan_state(
    design: Design,
    srls: Sequence[Srl],
    clocks: Mapping[str, int],
    shift: tuple[str, str],
    held: Mapping[str, int] | None = None,
) -> tuple[Diagnostic, ...]:
    """Return the breaks of rule 6 that concern clocks.

    Args:
        design: The flat design.
        srls: All shift-register latches.
        clocks: Every clock port -> its value at rest, shift clocks included.
        shift: Ports of A and B.
        held: Ports at their scan-state values.

    Raises:
        DesignError: A clock or held port is no input port.
    """
    rules = Clocked(design, clocks, held)
    wanted = ({srl.first for srl in srls}, {srl.second for srl in srls})
    found = [
        item for group in rules.groups for item in blocked_shift_clocks(rules, group, shift, wanted)
    ]
    return tuple(capped(found, MOST))


def _edge_triggered(design: Design) -> list[Diagnostic]:
    found: list[Diagnostic] = []
    for number in np.unique(design.cell).tolist():
        cell = design.cells[number]
        if cell is None or not cell.is_storage:
            continue
        if cell.storage and all(item.kind is StorageKind.LATCH for item in cell.storage):
            continue
        those = np.flatnonzero(design.cell == number).tolist()
        found.append(
            Diagnostic(
                "lssd-edge-triggered",
                Severity.WARNING,
                f"{len(those)} cells `{cell.name}` are no level-sensitive latches",
                design.span(those[0]),
                "let them be converted to shift-register latches, or scan them in another style",
                names=cells_named(design, dict.fromkeys(those)),
            )
        )
    return found


def _loops(rules: Clocked) -> list[Witness]:
    """Return the loops of gates: strongly connected parts, and gates that feed themselves."""
    design = rules.design
    _, part = connected_components(rules.graph.edges, directed=True, connection="strong")
    sizes = np.bincount(part)
    of_loop = np.flatnonzero(sizes[part] > 1)
    looped = rules.graph.edges.diagonal().nonzero()[0]
    by_part: dict[int, list[int]] = {}
    for net in np.union1d(of_loop, looped).tolist():
        by_part.setdefault(int(part[net]), []).append(net)
    found: list[Witness] = []
    for nets in by_part.values():
        rows = [row for net in nets for row in design.drivers.of(net)]
        gates = sorted({int(design.pin_instance[row]) for row in rows})
        found.append(
            Witness(
                "lssd-feedback-loop",
                f"{len(gates)} gates form a loop{route(design, gates)}"
                if len(gates) > 1
                else f"gate `{design.name(gates[0])}` feeds itself",
                "break the loop, or put a latch into it",
                design.span(gates[0]),
                cells_named(design, dict.fromkeys(gates)),
                spans_on(design, gates),
            )
        )
    return found
