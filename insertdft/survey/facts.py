"""What the survey finds out about a design: values, no decisions."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final, NamedTuple

from insertdft.design.flat import Design
from insertdft.diagnostics import Diagnostic
from insertdft.netlist import Ids

#: ``Survey.domain`` of a storage cell that stays out of every chain.
LEFT_ALONE: Final = -1


class Domain(NamedTuple):
    """Storage cells that take data at the same moment.

    Attributes:
        port: Top port (bit) that the clock comes from.
        edge: ``rise`` or ``fall`` of that port, for edge-triggered cells; ``high`` or ``low`` for
            latches open at that level.
    """

    port: str
    edge: str

    @property
    def label(self) -> str:
        """``clk (rise)``, for tables."""
        return f"{self.port} ({self.edge})"


class HeldPort(NamedTuple):
    """A port (bit) that has ``value`` while chains shift."""

    port: str
    value: int


@dataclass(frozen=True, slots=True, eq=False)
class Survey:
    """Facts about one design.

    ``s`` storage cells.

    Attributes:
        design: What was surveyed.
        storage: Shape (s,), flat instance ids in hierarchical source order.
        domain: Shape (s,), ids into ``domains``, LEFT_ALONE for a cell that has a finding.
        domains: Where the clocks come from.
        held: Ports that the user promises to hold in test.
        set_resets: Ports to hold while shifting, so that no set or reset acts.
        findings: What keeps cells out of chains, one a cause.
        reasons: Flat instance id -> slug of the finding that keeps it out.
        area: Sum of the cells' areas, in the library's unit.
        without_area: Names of cells in use that state no area.
    """

    design: Design
    storage: Ids = field(repr=False)
    domain: Ids = field(repr=False)
    domains: tuple[Domain, ...]
    held: tuple[HeldPort, ...]
    set_resets: tuple[HeldPort, ...]
    findings: tuple[Diagnostic, ...]
    reasons: Mapping[int, str] = field(repr=False)
    area: float
    without_area: tuple[str, ...]
