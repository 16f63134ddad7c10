"""The plan: every decision of a conversion, made before a byte is edited.

It speaks of modules and of instances inside them, because a module that stands in many places of
the design is edited once. A *segment* is the part of a chain inside one module: it enters by one
port and leaves by another, and consists of cells and of segments of the modules instanced there.
The segments of the top module are the chains.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final, NamedTuple

from insertdft.description import Cycle, TestPort
from insertdft.styles.conversion import Conversion, Part


class Element(NamedTuple):
    """One step of a segment: a cell, or a segment of a module instanced here.

    Attributes:
        instance: Instance name inside the module.
        number: CELL: index into ``Plan.conversions``; SEGMENT: index into the segments of the
            instanced module.
        kind: CELL or SEGMENT.
    """

    instance: str
    number: int
    kind: str


CELL: Final = "cell"
SEGMENT: Final = "segment"


@dataclass(frozen=True, slots=True)
class Segment:
    """A part of a chain inside one module, from its scan-in port to its scan-out port.

    Attributes:
        scan_in: Port it enters by.
        scan_out: Port it leaves by.
        elements: In shift order, at least one.
        connected: Whether the last element's output net exists already, so that a buffer or an
            ``assign`` has to lead from it to the port; otherwise the element drives the port.
    """

    scan_in: str
    scan_out: str
    elements: tuple[Element, ...]
    connected: bool


@dataclass(frozen=True, slots=True)
class Mend:
    """Cells put into the way of a pin, to make it controllable in test.

    At an input pin, MISSION of the parts is what drove it and DATA is what drives it afterwards.
    At an output pin, MISSION is what it drives and DATA is the net that it drove.

    Attributes:
        instance: Instance name inside the module.
        pin: Its pin.
        parts: What is added.
        why: Slug of the finding that it mends.
    """

    instance: str
    pin: str
    parts: tuple[Part, ...]
    why: str


@dataclass(frozen=True, slots=True)
class ModulePlan:
    """What is done to one module.

    Attributes:
        segments: In port order.
        test_nets: Test nets that the module needs, each entering by a port of the name that
            ``Plan.port_names`` gives.
        mends: Cells added to make clocks, resets and enables controllable.
    """

    segments: tuple[Segment, ...]
    test_nets: tuple[str, ...]
    mends: tuple[Mend, ...] = ()


@dataclass(frozen=True, slots=True)
class ChainPlan:
    """What a chain is, beside the segment of the top module that it consists of.

    Attributes:
        name: Its name in the description.
        style: ``mux-d``, ``clocked-scan`` or ``lssd``.
        clocks: Ports that shift it.
        edge: ``rise`` or ``fall``; None for LSSD.
    """

    name: str
    style: str
    clocks: tuple[str, ...]
    edge: str | None


@dataclass(frozen=True, slots=True)
class LeftAlone:
    """A storage cell that stays as it is.

    Attributes:
        instance: Hierarchical name.
        cell: Library cell.
        reason: Slug of the finding.
    """

    instance: str
    cell: str
    reason: str


@dataclass(frozen=True, slots=True)
class Plan:
    """Every decision of one conversion.

    Attributes:
        design: Top module.
        style: Style asked for.
        netlist: sha256 of each source by its name, in order; a plan fits only this netlist.
        conversions: How cells become scan cells.
        modules: By module name; modules that are not touched are absent.
        chains: Chain k is segment k of the top module.
        port_names: Port that carries each test net in use.
        connector: Library buffer that drives a scan-out port: cell, input pin, output pin. None
            where an ``assign`` does.
        ports: Top ports with a part in test.
        sequences: Clock sequences, see ``Description``.
        left_alone: Storage cells that stay as they are.
        lower_bound: Shortest possible longest chain: the largest ceil(cells / chains) of a group.
        area_before: Sum of the areas of the cells before.
        area_after: The same after the plan is applied.
        without_area: Cells in use that state no area and so are not counted.
        shared_l2: LSSD: second latches that L1/L2* saved.
    """

    design: str
    style: str
    netlist: Mapping[str, str]
    conversions: tuple[Conversion, ...]
    modules: Mapping[str, ModulePlan] = field(repr=False)
    chains: tuple[ChainPlan, ...]
    port_names: Mapping[str, str]
    connector: tuple[str, str, str] | None
    ports: tuple[TestPort, ...]
    sequences: Mapping[str, tuple[Cycle, ...]]
    left_alone: tuple[LeftAlone, ...] = field(repr=False)
    lower_bound: int
    area_before: float
    area_after: float
    without_area: tuple[str, ...]
    shared_l2: int = 0
