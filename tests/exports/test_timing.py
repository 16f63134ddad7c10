"""One timing table for every format."""

import pytest
from exports.made import made

from insertdft.diagnostics import DesignError
from insertdft.exports.timing import Timing, as_ns, make_timing


@pytest.mark.parametrize("period", [10_000, 33_333, 100_000])
def test_phases_never_overlap_and_stay_within_the_period(period: int) -> None:
    timing = make_timing(made("lssd", count=0).description, period)

    events = [timing.force, timing.strobe, *(edge for phase in timing.phases for edge in phase)]
    assert events == sorted(set(events))
    assert events[-1] < timing.period == period
    assert len(timing.phases) >= 2


@pytest.mark.parametrize(
    "phases",
    [((20, 40), (40, 60)), ((20, 40), (30, 60)), ((40, 20),), ((5, 20),), ((20, 100),)],
)
def test_edges_out_of_order_are_refused(phases: tuple[tuple[int, int], ...]) -> None:
    with pytest.raises(DesignError) as caught:
        Timing(100, 0, 10, phases)

    assert caught.value.diagnostics[0].slug == "timing-overlap"


def test_a_period_without_room_is_refused() -> None:
    with pytest.raises(DesignError, match="no room"):
        make_timing(made("lssd", count=0).description, 1_000)


def test_times_are_exact() -> None:
    assert [as_ns(time) for time in (0, 1, 1_500, 100_000)] == ["0", "0.001", "1.5", "100"]
