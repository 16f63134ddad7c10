"""The clock sequences of level-sensitive scan: what the latches hold after them, and overlaps."""

from itertools import pairwise

import pytest

from insertdft.description import Cycle
from insertdft.styles.lssd_sequences import Form, LssdClocks, exclusive, lssd_sequences
from insertdft.styles.overlaps import Overlap, Times, find_overlaps

CLOCKS = {
    Form.DOUBLE: LssdClocks(("a",), ("b",), ("c1", "c2"), held={"rst_n": 1}),
    Form.SINGLE: LssdClocks(("a",), ("b",), ("c1", "c2")),
    Form.STAR: LssdClocks(("a",), ("b",), ("c1",), ("c2",)),
}


class Model:
    """Three shift-register latches; the values are words that tell where they came from."""

    def __init__(self, form: Form) -> None:
        self.form = form
        self.first = ["x"] * 3
        self.second = ["x"] * 3
        self.scan_in = "s"

    def system(self) -> list[str]:
        return self.second if self.form is Form.DOUBLE else self.first

    def run(self, cycles: tuple[Cycle, ...]) -> None:
        for cycle in cycles:
            for phase in cycle.pulses:
                self._pulse(phase)

    def _pulse(self, phase: tuple[str, ...]) -> None:
        before_first, before_second = list(self.first), list(self.second)
        if "a" in phase:
            self.first = [self.scan_in, *before_second[:-1]]
        if "b" in phase:
            self.second = before_first
        state = "/".join(before_second if self.form is Form.DOUBLE else before_first)
        if "c1" in phase:
            self.first = [f"c1({state})"] * 3
        if "c2" in phase and self.form is Form.STAR:
            self.second = [f"c2({'/'.join(before_first)})"] * 3
        elif "c2" in phase:
            self.first = [f"c2({state})"] * 3


def loaded(form: Form, *bits: str) -> Model:
    model = Model(form)
    shift = lssd_sequences(form, CLOCKS[form])["shift"]
    for bit in bits:
        model.scan_in = bit
        model.run(shift)
    model.scan_in = "next"
    return model


@pytest.mark.parametrize("form", list(Form))
def test_shifting_moves_one_bit_a_cycle_and_leaves_both_latches_alike(form: Form) -> None:
    model = loaded(form, "p", "q", "r")

    assert model.second == ["r", "q", "p"]
    assert model.first == model.second


@pytest.mark.parametrize("form", list(Form))
def test_a_response_is_in_l2_when_unloading_starts(form: Form) -> None:
    sequences = lssd_sequences(form, CLOCKS[form])
    model = loaded(form, "p", "q", "r")

    model.run(sequences["capture"])
    model.run(sequences.get("unload_start", ()))

    assert all("c" in value for value in model.second)


def test_a_double_latch_captures_what_l2_held() -> None:
    sequences = lssd_sequences(Form.DOUBLE, CLOCKS[Form.DOUBLE])
    model = loaded(Form.DOUBLE, "p", "q", "r")

    model.run(sequences["capture"])

    assert model.first == ["c2(r/q/p)"] * 3
    assert model.second == ["r", "q", "p"]


def test_the_response_of_the_l2_latches_is_unloaded_without_b() -> None:
    sequences = lssd_sequences(Form.STAR, CLOCKS[Form.STAR])
    model = loaded(Form.STAR, "p", "q", "r")

    model.run(sequences["capture_l2"])

    assert "unload_start" not in sequences
    assert model.second == ["c2(r/q/p)"] * 3


def test_launch_on_capture_captures_the_response_to_a_response() -> None:
    double = loaded(Form.DOUBLE, "p", "q", "r")
    double.run(
        lssd_sequences(Form.DOUBLE, LssdClocks(("a",), ("b",), ("c1",)))["launch_on_capture"]
    )
    single = loaded(Form.SINGLE, "p", "q", "r")
    single.run(lssd_sequences(Form.SINGLE, CLOCKS[Form.SINGLE])["launch_on_capture"])

    inner = "c1(r/q/p)"
    assert double.first == [f"c1({inner}/{inner}/{inner})"] * 3
    assert single.first == [f"c2({inner}/{inner}/{inner})"] * 3


def test_launch_on_shift_captures_the_response_to_a_shifted_state() -> None:
    for form, wanted in (
        (Form.DOUBLE, "c2(next/r/q)"),
        (Form.STAR, "c2(next/r/q)"),
    ):
        sequences = lssd_sequences(form, CLOCKS[form])
        model = loaded(form, "p", "q", "r")
        model.run(sequences["launch_on_shift"])

        assert (model.second if form is Form.STAR else model.first) == [wanted] * 3

    single = loaded(Form.SINGLE, "p", "q", "r")
    sequence = lssd_sequences(Form.SINGLE, CLOCKS[Form.SINGLE])["launch_on_shift"]
    single.run(sequence)
    assert sequence[0].pulses == (("a",),)
    assert single.first[0].startswith("c2(c1(next/r/q)")


@pytest.mark.parametrize("form", list(Form))
def test_two_pattern_sequences_time_one_pair_alone(form: Form) -> None:
    for name, cycles in lssd_sequences(form, CLOCKS[form]).items():
        timed = [cycle.at_speed for cycle in cycles]
        assert timed == ([False, True] if name.startswith("launch") else [False] * len(cycles))


def test_a_single_phase_has_nothing_to_launch_by_capture() -> None:
    sequences = lssd_sequences(Form.SINGLE, LssdClocks(("a",), ("b",), ("c1",)))

    assert "launch_on_capture" not in sequences
    assert set(lssd_sequences(Form.SINGLE, CLOCKS[Form.SINGLE])) >= {
        "launch_on_capture",
        "launch_on_capture_2",
    }


@pytest.mark.parametrize("form", list(Form))
def test_no_sequence_of_ours_lets_exclusive_clocks_overlap(form: Form) -> None:
    sequences = lssd_sequences(form, CLOCKS[form])
    pairs = exclusive(form, CLOCKS[form])

    assert find_overlaps(sequences, pairs) == ()
    assert ("a", "c1") in pairs
    assert ("a", "b") in pairs
    planted = {**sequences, "shift": (Cycle(scan=True, pulses=(("a", "b"),)),)}
    assert find_overlaps(planted, pairs) == (
        Overlap("shift", 0, "a", "b", "both pulse in one phase"),
    )


def test_a_clock_forced_on_overlaps_until_it_is_forced_off() -> None:
    cycles = (
        Cycle(force=(("c", 1),)),
        Cycle(pulses=(("b",),)),
        Cycle(force=(("c", 0),), pulses=(("b",),)),
    )

    [found] = find_overlaps({"capture": cycles}, [("c", "b")])

    assert (found.cycle, found.why) == (1, "`c` is forced on while `b` is on")


def test_a_clock_that_rests_at_one_is_on_at_zero() -> None:
    cycles = (Cycle(force=(("c", 1), ("b", 0)), pulses=()),)

    assert find_overlaps({"x": cycles}, [("c", "b")], {"c": 1}) == ()
    assert len(find_overlaps({"x": cycles}, [("c", "b")], {"b": 1})) == 1


def test_times_are_checked_for_overlap_order_and_gap() -> None:
    sequences = {"shift": (Cycle(pulses=(("a",), ("b",))),)}
    good = {"a": Times(20, 30), "b": Times(60, 70)}

    assert find_overlaps(sequences, [("b", "a")], times=good) == ()
    assert find_overlaps(sequences, [("a", "b")], times=good, gap=30) == ()
    assert len(find_overlaps(sequences, [("a", "b")], times=good, gap=31)) == 1
    late = {"a": Times(20, 61), "b": Times(60, 70)}
    assert "from 20 to 61" in find_overlaps(sequences, [("a", "b")], times=late)[0].why
    turned = {"a": Times(60, 70), "b": Times(20, 30)}
    assert len(find_overlaps(sequences, [("a", "b")], times=turned)) == 1


def test_phases_are_in_turn() -> None:
    for form, clocks in CLOCKS.items():
        for cycles in lssd_sequences(form, clocks).values():
            for cycle in cycles:
                for before, after in pairwise(cycle.pulses):
                    assert not set(before) & set(after)
