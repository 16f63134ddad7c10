"""Arrivals worked out by hand."""

import pytest
from circuits import LIBERTY, design_of
from timed_cells import INVERTER_BETWEEN, NO_WIRE, by_name, timed

from insertdft.diagnostics import DesignError
from insertdft.library import read_library
from insertdft.text import SourceText
from insertdft.timing.analyse import NEVER, Assumptions, Launch, analyse
from insertdft.timing.arcs import FALL, RISE
from insertdft.timing.paths import (
    clock_rates,
    endpoint_needs,
    path_groups,
    to_ports,
    worst_paths,
)
from insertdft.timing.wiring import wiring_of


def test_a_path_worked_out_by_hand() -> None:
    found = timed(INVERTER_BETWEEN)

    # a carries 1 (pin A): Q rises at 7 + 1 = 8 with slew 2, falls at 8 + 1 = 9 with slew 3.
    # n carries 2 (two D): rises 1 + 0.1 * 3 + 2 = 3.3 after a falls: 12.3, slew 4;
    #                      falls 2 + 0.1 * 2 + 2 = 4.2 after a rises: 12.2, slew 6.
    # Setup 0.5 + 0.02 * slew of data: 0.58 rising, 0.62 falling: 12.88 rising, 12.82 falling.
    (group,) = path_groups(found)
    assert group.launch == group.capture == Launch("c", RISE, port=True)
    assert group.endpoints == 2
    assert group.worst == pytest.approx(12.88)
    (path, _) = worst_paths(found, 2)
    assert [(step.instance, step.cell, step.input) for step in path.steps] == [
        ("f", "DFF", "CK"),
        ("i", "INV", "A"),
    ]
    assert [step.edge for step in path.steps] == [FALL, RISE]
    assert [step.arrival for step in path.steps] == pytest.approx([9.0, 12.3])
    assert [step.delay for step in path.steps] == pytest.approx([9.0, 3.3])
    assert (path.arrival, path.setup) == pytest.approx((12.3, 0.58))
    (rate,) = clock_rates(found)
    assert rate.rate_hz == pytest.approx(1e9 / 12.88)


def test_wire_and_port_load_and_transitions_count() -> None:
    found = timed(INVERTER_BETWEEN, Assumptions(wire_per_sink=0.5, port_load=4.0, clock_slew=1.0))

    # a carries 1.5: falls at 8 + 0.1 + 1.5 = 9.6, slew 4.5; n carries 3: rises 1 + 0.45 + 3 later.
    assert path_groups(found)[0].worst == pytest.approx(9.6 + 4.45 + 0.5 + 0.02 * 6)
    # q carries the port alone: falls at 8 + 0.1 + 4.
    ((port, launch, late),) = to_ports(found)
    assert (port, launch) == ("q", Launch("c", RISE, port=True))
    assert late == pytest.approx(12.1)


def test_a_gate_that_inverts_for_one_of_its_inputs_gives_both_edges() -> None:
    text = INVERTER_BETWEEN.replace("INV i (.A(a), .Y(n))", "XOR i (.A(a), .B(1'b0), .Y(n))")

    # n falls 6 + 0.1 * 3 + 2 = 8.3 after a falls at 9: 17.3, slew 6.
    assert path_groups(timed(text))[0].worst == pytest.approx(17.3 + 0.5 + 0.12)


def test_a_constant_side_input_starts_nothing() -> None:
    found = timed(
        "module top (c, q); input c; output q; wire n; AND i (.A(1'b1), .B(1'b0), .Y(n));"
        " DFF g (.D(n), .CK(c), .Q(q)); endmodule"
    )

    assert path_groups(found) == ()
    assert endpoint_needs(found).tolist() == [NEVER]
    assert clock_rates(found) == ()


def test_opposite_edges_have_half_a_period() -> None:
    found = timed(INVERTER_BETWEEN.replace("DFF g", "DFFN g"))

    groups = {(group.launch.edge, group.capture.edge): group for group in path_groups(found)}
    half = groups[RISE, FALL]
    assert half.period == pytest.approx(2 * half.worst)
    assert groups[RISE, RISE].period == pytest.approx(groups[RISE, RISE].worst)
    assert clock_rates(found)[0].group == half


def test_paths_between_two_clocks_set_no_rate() -> None:
    found = timed(
        "module top (c, k, q); input c, k; output q; wire a, n; DFF f (.D(q), .CK(c), .Q(a));"
        " INV i (.A(a), .Y(n)); DFF g (.D(n), .CK(k), .Q(q)); endmodule"
    )

    pairs = {
        (group.launch.clock, group.capture.clock): group.period for group in path_groups(found)
    }
    assert pairs == {("c", "k"): None, ("k", "c"): None}
    assert clock_rates(found) == ()


def test_ports_start_paths_of_their_own() -> None:
    found = timed(
        "module top (c, d, q); input c, d; output q; wire n; INV i (.A(d), .Y(n));"
        " DFF g (.D(n), .CK(c), .Q(q)); endmodule"
    )

    (group,) = path_groups(found)
    assert (group.launch.clock, group.period) == ("", None)
    assert group.worst == pytest.approx(3 + 0.5 + 0.02 * 3)


@pytest.mark.parametrize("ideal", [True, False])
def test_clock_buffers_count_only_where_clocks_are_not_ideal(ideal: bool) -> None:
    text = (
        "module top (c, q); input c; output q; wire a, k; BUF b (.A(c), .Y(k));"
        " DFF f (.D(q), .CK(k), .Q(a)); DFF g (.D(a), .CK(c), .Q(q)); endmodule"
    )

    found = timed(text, Assumptions(wire_per_sink=0.0, ideal_clocks=ideal))

    # Buffer 2 + load 1; f launches with a clock slew of 2 and later by 3. g is not delayed.
    assert len(clock_rates(found)) == 1
    needs = by_name(found)
    late = 0.0 if ideal else 3.0 + 0.1 * 2
    assert needs["g"] == pytest.approx(9 + 0.5 + 0.06 + late)
    early = 0.0 if ideal else 3.0
    assert needs["f"] == pytest.approx(9 + 0.5 + 0.06 - early)


def test_a_latch_is_measured_at_its_opening_edge_and_lends_no_time() -> None:
    found = timed(
        "module top (b, c, q); input b, c; output q; wire a;"
        " LATCH f (.D(q), .CK(c), .Q(a)); LATCH g (.D(a), .CK(b), .Q(q)); endmodule"
    )

    worst = {(group.launch, group.capture): group.worst for group in path_groups(found)}
    c, b = Launch("c", RISE, port=True), Launch("b", RISE, port=True)
    assert worst == {(c, b): pytest.approx(9.0), (b, c): pytest.approx(9.0)}


def test_a_loop_is_cut_and_counted() -> None:
    loop = (
        "module top (c, s, q); input c, s; output q; wire p, n; AND u (.A(s), .B(n), .Y(p));"
        " BUF v (.A(p), .Y(n)); DFF g (.D(n), .CK(c), .Q(q)); endmodule"
    )

    assert timed(loop).looped > 0
    assert timed(loop.replace(".B(n)", ".B(s)")).looped == 0


def test_a_library_without_tables_is_refused() -> None:
    design = design_of(
        "module top (c, d, q); input c, d; output q; DFF f (.D(d), .CK(c), .Q(q)); endmodule",
        read_library([SourceText("tiny.lib", LIBERTY)]),
    )

    with pytest.raises(DesignError) as caught:
        analyse(wiring_of(design), NO_WIRE)

    assert [item.slug for item in caught.value.diagnostics] == ["timing-no-tables"]
