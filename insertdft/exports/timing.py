"""One timing table for every format: when inputs change, outputs are compared and clocks pulse.

Whole picoseconds, so that all formats agree to the last digit. A cycle is: inputs change, outputs
are compared, then the phases pulse one after the other ("force, measure, pulse": common practice).
The phases of a cycle never overlap; that is what level-sensitive scan rests on.
"""

from dataclasses import dataclass
from itertools import pairwise
from typing import Final

from insertdft.description import Description
from insertdft.diagnostics import DesignError, error

DEFAULT_PERIOD: Final = 100_000
#: Names of the phases as waveform characters, in time order.
PHASES: Final = "PQRSTUVW"
_SHORTEST: Final = 1_000


@dataclass(frozen=True, slots=True)
class Timing:
    """The edges of one tester cycle, in picoseconds from its start.

    Attributes:
        period: Length of the cycle.
        force: When inputs take their values.
        strobe: When outputs are compared.
        phases: (leading edge, trailing edge) of each clock phase.
    """

    period: int
    force: int
    strobe: int
    phases: tuple[tuple[int, int], ...]

    def __post_init__(self) -> None:
        """Refuse edges out of order.

        Raises:
            DesignError: Two events overlap or leave the cycle.
        """
        edges = [self.force, self.strobe, *(edge for phase in self.phases for edge in phase)]
        ordered = all(one < two for one, two in pairwise(edges))
        if self.force < 0 or not ordered or edges[-1] >= self.period:
            raise DesignError(
                [
                    error(
                        "timing-overlap",
                        f"the edges {', '.join(map(as_ns, edges))} ns do not follow each other"
                        f" within a cycle of {as_ns(self.period)} ns",
                        hint="inputs change first, then outputs are compared, then each phase"
                        " ends before the next begins",
                    )
                ]
            )


def make_timing(description: Description, period: int = DEFAULT_PERIOD) -> Timing:
    """Return a table with as many phases as the busiest cycle of the description has.

    Inputs change at the start, outputs are compared after a tenth of the period, and the phases
    share the time from two tenths on evenly, each on for half of its share.

    Raises:
        DesignError: The period is too short, or there are more phases than names for them.
    """
    return _table(phase_count(description), period)


def phase_count(description: Description) -> int:
    """Return the number of phases of the busiest cycle, at least 1."""
    cycles = (cycle for row in description.sequences.values() for cycle in row)
    return max([1, *(len(cycle.pulses) for cycle in cycles)])


def _table(count: int, period: int) -> Timing:
    share = period * 8 // 10 // count
    if count > len(PHASES) or period < _SHORTEST * (count + 1):
        raise DesignError(
            [
                error(
                    "timing-overlap",
                    f"a cycle of {as_ns(period)} ns has no room for {count} clock phases",
                    hint=f"ask for a longer --period; {len(PHASES)} phases are the most",
                )
            ]
        )
    starts = [period * 2 // 10 + number * share for number in range(count)]
    return Timing(period, 0, period // 10, tuple((at, at + share // 2) for at in starts))


def as_ns(picoseconds: int) -> str:
    """Return a time in nanoseconds, exact, without trailing zeros."""
    whole, rest = divmod(picoseconds, 1000)
    return f"{whole}.{rest:03}".rstrip("0").rstrip(".")
