"""What a proof is asked for."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from insertdft.description import Description


@dataclass(frozen=True, slots=True)
class ProofOptions:
    """Wishes and limits.

    Attributes:
        mapping: Instance of the original -> its name in the converted netlist, where they differ.
        mission: Further values of ports of the converted netlist in mission mode.
        phases: Clock port of the original -> the ports of the converted netlist that pulse one
            after the other in its place, where flip-flops became latches under two clocks.
        conflicts: Solver conflicts spent on one obligation before it counts as undecided.
        examples: Counterexamples kept of each kind.
    """

    mapping: Mapping[str, str] = field(default_factory=dict)
    mission: Mapping[str, int] = field(default_factory=dict)
    phases: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    conflicts: int = 20_000
    examples: int = 5


def mission_values(description: Description | None, options: ProofOptions) -> dict[str, int]:
    """Return the values that test ports have in mission mode; scan-ins may have any."""
    ports = description.ports if description else ()
    given = {
        port.port: port.mission
        for port in ports
        if port.mission is not None and port.role != "scan_in"
    }
    return {**given, **options.mission}
