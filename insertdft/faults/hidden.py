"""Why faults stay undetected, and behind what."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import Enum
from typing import Final

import numpy as np

from insertdft.faults.access import Access
from insertdft.faults.collapse import FaultList
from insertdft.faults.grade import Grade
from insertdft.faults.sites import BLIND, PIN, PORT, STEM
from insertdft.faults.untestable import Proof, Verdict
from insertdft.netlist import Ids
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.levels import members
from insertdft.simulate.lower import leads_to
from insertdft.simulate.words import ONES, Flags

STUCK: Final = ("stuck at 0", "stuck at 1")


class Reason(Enum):
    """Why a fault was not detected; the first that fits."""

    NO_TEST = "no pattern detects it (proved)"
    UNSEEN_END = "its effect ends in cells that are not unloaded"
    HELD = "the test mode holds its line at the stuck value"
    UNLOADED_SOURCE = "its line hangs on cells that are not loaded, and had no known opposite value"
    NOT_EXCITED = "no pattern gave its line the opposite value"
    NOT_SEEN = "it was excited, but no pattern carried its effect to where it is seen"


REASONS: Final = tuple(Reason)


@dataclass(frozen=True, slots=True, eq=False)
class Remaining:
    """The undetected classes of a ``Grade``.

    Attributes:
        grade: What was simulated.
        classes: Undetected classes, ascending.
        reason: Index into ``REASONS`` of each.
        behind: An instance that stands in the way (UNSEEN_END: where the effect ends,
            UNLOADED_SOURCE: what the line hangs on), -1 where there is none.
    """

    grade: Grade
    classes: Ids = field(repr=False)
    reason: Ids = field(repr=False)
    behind: Ids = field(repr=False)

    def counts(self) -> dict[Reason, int]:
        """Return the number of classes for each reason that occurs, in the order of ``Reason``."""
        counts = np.bincount(self.reason, minlength=len(REASONS)).tolist()
        return {reason: count for reason, count in zip(REASONS, counts, strict=True) if count}

    def obstacles(self) -> tuple[tuple[int, int], ...]:
        """Return instances that stand in the way and the number of classes, most first."""
        found, counts = np.unique(self.behind[self.behind >= 0], return_counts=True)
        order = np.lexsort((found, -counts))
        return tuple(zip(found[order].tolist(), counts[order].tolist(), strict=True))


def explain(grade: Grade, proofs: Mapping[int, Proof] | None = None) -> Remaining:
    """Return why each undetected class of ``grade`` is undetected.

    Args:
        grade: Of random or given patterns.
        proofs: What is known about tests, by class.
    """
    faults, access = grade.faults, grade.access
    classes = grade.undetected()
    sites, site = faults.sites, faults.first[classes] // 2
    stuck = faults.first[classes] % 2
    slot, kind = sites.slot[site], sites.kind[site]
    start = np.where(kind == PIN, sites.circuit.edge_node[sites.edge[site]], slot)
    held = _held(access, slot, stuck)
    ends, obstacle = _ends(access)
    blocked = ~ends[start] & (kind != PORT) | (kind == BLIND)
    blocked |= (kind == PORT) & ~access.seen[slot]
    source = _sources(access)
    excited = grade.excited[classes]
    hanging = ~excited & (source[slot] >= 0)
    no_test = _proved(classes, proofs or {})
    tests = (no_test, blocked, held, hanging, ~excited)
    reason = np.select(tests, range(len(tests)), len(tests)).astype(np.int32)
    at_end = np.where(kind == BLIND, sites.circuit.design.pin_instance[sites.row[site]], -1)
    at_end = np.where(at_end >= 0, at_end, obstacle[start])
    behind = np.select((reason == 1, reason == 3), (at_end, source[slot]), -1)
    return Remaining(grade, classes, reason, behind.astype(np.int32))


def fault_name(faults: FaultList, number: int) -> str:
    """Return a class's first fault as ``instance.pin stuck at 0`` (or ``port stuck at 1``)."""
    fault = int(faults.first[number])
    return f"{site_name(faults, fault // 2)} {STUCK[fault % 2]}"


def site_name(faults: FaultList, site: int) -> str:
    """Return where a site is: the pin it is at; of a stem the pin or port that drives it."""
    sites, design = faults.sites, faults.sites.circuit.design
    row, net = int(sites.row[site]), int(sites.net[site])
    if sites.kind[site] == PORT:
        return design.ports[int(sites.port[site])].name
    if sites.kind[site] == STEM:
        if net in design.input_ports:
            return design.input_ports[net]
        row = design.drivers.of(net)[0]
    pin = design.pin_names[int(design.pin_name[row])]
    return f"{design.name(int(design.pin_instance[row]))}.{pin}"


def _held(access: Access, slot: Ids, stuck: Ids) -> Flags:
    """Return where the held ports alone fix a line at its stuck value."""
    evaluator = Evaluator(access.circuit, 2)
    values = evaluator.blank(1)
    for one, value in access.held.items():
        evaluator.put(values, [one], np.full((1, 1), ONES if value else 0, np.uint64))
    evaluator.run(values)
    fixed: Flags = np.where(stuck == 1, values[0, slot, 0], values[1, slot, 0]) != 0
    return fixed


def _sources(access: Access) -> Ids:
    """Return for each slot an instance that feeds an unknown value into its cone, or -1."""
    circuit = access.circuit
    label = np.full(circuit.slots, -1, np.int32)
    states = circuit.states
    loose = np.isin(states.slot, access.unknown)
    label[states.slot[loose]] = states.instance[loose]
    for instance in circuit.unmodelled:
        rows = members(circuit.design.pin_start, np.array([instance]))
        nets = circuit.design.pin_net[rows]
        slots = circuit.slot_of_net[nets[nets >= 0]]
        label[np.intersect1d(slots, access.unknown)] = instance
    for group in circuit.groups:
        label[group.first : group.end] = label[group.inputs].max(axis=0)
    return label


def _ends(access: Access) -> tuple[Flags, Ids]:
    """Return the slots from which a seen one is reached, and an instance at another end."""
    circuit, states = access.circuit, access.circuit.states
    label = np.full(circuit.slots, -1, np.int32)
    label[states.following[~access.observe]] = states.instance[~access.observe]
    for group in reversed(circuit.groups):
        here = label[group.first : group.end]
        for slots in group.inputs:
            np.maximum.at(label, slots, here)
    return leads_to(circuit, access.seen), label


def _proved(classes: Ids, proofs: Mapping[int, Proof]) -> Flags:
    return np.array(
        [
            number in proofs and proofs[number].verdict is Verdict.UNTESTABLE
            for number in classes.tolist()
        ],
        np.bool_,
    )
