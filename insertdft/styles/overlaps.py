"""Whether two clocks that must not overlap can be on together in any clock sequence.

The phases of a cycle never overlap by themselves; what can go wrong is a phase that names both, a
clock that is forced on while the other pulses, and, once pulses have times, the times.
"""

from collections.abc import Iterable, Iterator, Mapping, Sequence
from typing import NamedTuple

from insertdft.description import Cycle


class Overlap(NamedTuple):
    """Two clocks that can be on together.

    Attributes:
        sequence: Name of the sequence.
        cycle: Index of the cycle in it.
        first: One port.
        second: The other.
        why: The fact in a few words.
    """

    sequence: str
    cycle: int
    first: str
    second: str
    why: str


class Times(NamedTuple):
    """When a clock is on within every cycle that it pulses in, in any unit, start included."""

    on: float
    off: float


def find_overlaps(
    sequences: Mapping[str, Sequence[Cycle]],
    exclusive: Iterable[tuple[str, str]],
    rests: Mapping[str, int] | None = None,
    times: Mapping[str, Times] | None = None,
    gap: float = 0.0,
) -> tuple[Overlap, ...]:
    """Return every place where two clocks of an exclusive pair can be on together.

    Args:
        sequences: By name.
        exclusive: Pairs of ports.
        rests: Value at rest of each clock, 0 where not named.
        times: When each clock pulses within a cycle; leave out to check the order alone.
        gap: Time that must lie between two pulses.

    Returns:
        In the order of sequences, cycles and pairs; an order of times that is not that of the
        phases counts as an overlap too.
    """
    pairs = tuple(exclusive)
    found: list[Overlap] = []
    for name, cycles in sequences.items():
        forced: dict[str, int] = {}
        for number, cycle in enumerate(cycles):
            forced.update(cycle.force)
            on = {port for port, value in forced.items() if value != (rests or {}).get(port, 0)}
            for first, second in pairs:
                reasons = _reasons(cycle, first, second, on, times or {}, gap)
                found += [Overlap(name, number, first, second, why) for why in reasons]
    return tuple(found)


def _reasons(
    cycle: Cycle, first: str, second: str, on: set[str], times: Mapping[str, Times], gap: float
) -> Iterator[str]:
    pulsing = {port for phase in cycle.pulses for port in phase}
    for one, other in ((first, second), (second, first)):
        if one in on and (other in pulsing or (other in on and one < other)):
            yield f"`{one}` is forced on while `{other}` is on"
    if any(first in phase and second in phase for phase in cycle.pulses):
        yield "both pulse in one phase"
    elif {first, second} <= pulsing and {first, second} <= times.keys():
        yield from _timed(cycle, first, second, times, gap)


def _timed(
    cycle: Cycle, first: str, second: str, times: Mapping[str, Times], gap: float
) -> Iterator[str]:
    order = [port for phase in cycle.pulses for port in phase if port in (first, second)]
    before, after = times[order[0]], times[order[-1]]
    if before.off + gap > after.on:
        yield (
            f"`{order[0]}` is on from {before.on:g} to {before.off:g} and `{order[-1]}` from"
            f" {after.on:g} to {after.off:g}"
        )
