"""Plans: who is converted, into how many chains, under which names."""

import pytest
from designs import convert, design_of, flip_flops

from insertdft import api
from insertdft.chains.plan_json import plan_from_json, plan_to_json
from insertdft.diagnostics import DesignError

TWO_CLOCKS = """
module top(c1, c2, d, y);
  input c1, c2, d;
  output y;
  wire q1, q2, q3, n;
  DFF a1 (.D(d), .CK(c1), .Q(q1));
  DFF a2 (.D(q1), .CK(c1), .Q(q2));
  DFF b1 (.D(q2), .CK(c2), .Q(q3));
  DFFN b2 (.D(q3), .CKN(c2), .Q(n));
  BUF o (.A(n), .Y(y));
endmodule
"""


def slugs(text: str, **wishes: object) -> list[str]:
    with pytest.raises(DesignError) as caught:
        convert(text, **wishes)
    return [item.slug for item in caught.value.diagnostics]


def test_each_clock_and_edge_gets_chains_of_its_own() -> None:
    chains = convert(TWO_CLOCKS).description.chains

    found = {(*chain.clocks, chain.edge): [at.instance for at in chain.cells] for chain in chains}
    assert found == {
        ("c1", "rise"): ["a1", "a2"],
        ("c2", "rise"): ["b1"],
        ("c2", "fall"): ["b2"],
    }


@pytest.mark.parametrize("chains", [1, 2, 3, 7, 20])
def test_chains_are_even_for_any_count(chains: int) -> None:
    done = convert(flip_flops(20), chains=chains)

    lengths = [chain.length for chain in done.description.chains]
    assert len(lengths) == chains
    assert max(lengths) - min(lengths) <= 1
    assert max(lengths) == done.plan.lower_bound


def test_a_maximum_length_sets_the_count() -> None:
    done = convert(flip_flops(20), max_length=6)

    assert [chain.length for chain in done.description.chains] == [5, 5, 5, 5]


def test_more_chains_than_the_maximum_length_needs_are_given_when_asked_for() -> None:
    done = convert(flip_flops(20), max_length=15, chains=5)

    assert len(done.description.chains) == 5


def test_fewer_chains_than_groups_is_an_error_that_says_how_many_are_needed() -> None:
    with pytest.raises(DesignError, match="ask for 3 chains") as caught:
        convert(TWO_CLOCKS, chains=2)

    assert caught.value.diagnostics[0].slug == "chains-too-few"


def test_more_chains_than_cells_is_an_error() -> None:
    assert slugs(flip_flops(3), chains=4) == ["chains-too-many"]


def test_a_netlist_without_storage_is_an_error() -> None:
    text = "module top(a, y); input a; output y; INV i (.A(a), .Y(y)); endmodule"

    assert slugs(text) == ["no-storage"]


def test_a_netlist_whose_every_cell_stays_out_says_why() -> None:
    text = """
module top(a, b, y); input a, b; output y; wire c;
  NAND2 g (.A(a), .B(b), .Y(c));
  DFF r (.D(a), .CK(c), .Q(y));
endmodule
"""

    assert slugs(text) == ["nothing-to-convert", "clock-not-controllable"]


def test_exclude_leaves_matching_cells_alone() -> None:
    done = convert(flip_flops(5), exclude=("r[13]",))

    assert [at.instance for at in done.description.chains[0].cells] == ["r0", "r2", "r4"]
    assert {at.instance: at.reason for at in done.plan.left_alone} == {
        "r1": "cell-kept",
        "r3": "cell-kept",
    }


def test_include_converts_matching_cells_only() -> None:
    done = convert(flip_flops(5), include=("r0", "r4"))

    assert [at.instance for at in done.description.chains[0].cells] == ["r0", "r4"]


@pytest.mark.parametrize("wish", ["include", "exclude"])
def test_a_pattern_that_matches_nothing_is_an_error(wish: str) -> None:
    assert slugs(flip_flops(2), **{wish: ("q*",)}) == ["pattern-unmatched"]


def test_new_ports_get_the_names_asked_for() -> None:
    ports = {"scan_in": "si", "scan_out": "so", "scan_enable": "shift_now"}
    done = convert(flip_flops(4), chains=2, ports=ports)

    added = [port.port for port in done.plan.ports if port.added]
    assert added == ["shift_now", "si_1", "si_2", "so_1", "so_2"]


def test_a_default_name_that_is_taken_is_made_unique() -> None:
    text = flip_flops(2).replace("wire q0", "wire scan_enable, scan_in_1, q0")
    added = [port.port for port in convert(text).plan.ports if port.added]

    assert added == ["scan_enable_2", "scan_in_x_1", "scan_out_1"]


def test_a_name_asked_for_that_is_taken_is_an_error() -> None:
    assert slugs(flip_flops(2), ports={"scan_enable": "q0"}) == ["port-taken"]
    assert slugs(flip_flops(2), ports={"scan_in": "wire"}) == ["port-taken"]
    assert slugs(flip_flops(2), ports={"scan_inn": "a"}) == ["port-taken"]


def test_marks_in_the_netlist_are_respected() -> None:
    text = flip_flops(3)
    text = text.replace("  DFF r1", "  (* keep *)\n  DFF r1")
    text = text.replace("  DFF r2", '  (* src = "x", dont_touch = "false" *) DFF r2')
    done = convert(text)

    assert [at.instance for at in done.description.chains[0].cells] == ["r0", "r2"]
    assert [item.slug for item in done.findings] == ["cell-kept"]


def test_a_latch_stays_out_of_mux_d_chains_and_is_reported() -> None:
    text = flip_flops(2).replace("endmodule", "  LAT l (.D(q0), .G(a), .Q());\nendmodule")
    done = convert(text)

    assert [item.slug for item in done.findings] == ["latch-not-scanned"]


def test_area_is_the_sum_of_the_cells_of_the_written_netlist() -> None:
    done = convert(flip_flops(8), chains=2)
    again = api.survey(api.read_again(done.patches, done.survey.design))

    assert done.plan.area_after == pytest.approx(again.area)
    assert done.plan.area_before < done.plan.area_after


def test_a_plan_survives_its_file_and_gives_the_same_text() -> None:
    design = design_of(flip_flops(9))
    done = api.convert(design, api.Wishes(chains=2))

    kept = plan_from_json(plan_to_json(done.plan), "plan.json")

    assert kept == done.plan
    assert api.apply_plan(design, kept) == done.patches


@pytest.mark.parametrize(
    "text",
    ["", "[]", '{"format": "insertdft-plan", "version": 9}', '{"format": "insertdft-plan"}'],
)
def test_a_file_that_is_no_plan_is_refused(text: str) -> None:
    with pytest.raises(DesignError) as caught:
        plan_from_json(text, "plan.json")

    assert caught.value.diagnostics[0].slug == "plan-unreadable"


def test_a_plan_for_another_netlist_is_refused() -> None:
    plan = convert(flip_flops(3)).plan

    with pytest.raises(DesignError) as caught:
        api.apply_plan(design_of(flip_flops(4)), plan)

    assert caught.value.diagnostics[0].slug == "plan-mismatch"


def test_two_runs_give_the_same_plan() -> None:
    assert convert(TWO_CLOCKS).plan == convert(TWO_CLOCKS).plan
