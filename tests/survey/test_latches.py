"""Latch pairs and everything that is not quite one."""

import gzip
from functools import cache
from pathlib import Path

import pytest
from designs import TESTDATA
from kits import osu
from outside import outside

from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.library import read_library
from insertdft.library.cell import Library
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import Walker
from insertdft.source import read_netlist, read_sources
from insertdft.survey.latches import Latches, find_latches
from insertdft.text import SourceText


@cache
def library() -> Library:
    return read_library(read_sources([TESTDATA / "survey" / "lssd" / "cells.lib"]))


def design_of(body: str, ports: str = "c, b, d, e", cells: Library | None = None) -> Design:
    text = f"module top ({ports}, q, r); input {ports}; output q, r;\n{body}\nendmodule\n"
    return link(read_netlist([SourceText("in.v", text)]), cells or library())[0]


def latches(design: Design, clocks: tuple[str, ...] = (), **held: int) -> Latches:
    nets = {design.port_nets[port]: value for port, value in held.items()}
    return find_latches(Walker(design, propagate(design, nets)), clocks)


def pairs(design: Design, found: Latches) -> list[tuple[str, str]]:
    return [(design.name(pair.master), design.name(pair.slave)) for pair in found.pairs]


def slugs(found: Latches) -> list[str]:
    return [item.slug for item in found.findings]


PAIR = """wire m; LAT x (.D(d), .G(c), .Q(m)); LAT y (.D(m), .G(b), .Q(q));"""


def test_master_and_slave_are_a_pair() -> None:
    design = design_of(PAIR)
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    [pair] = found.pairs
    assert (pair.inverted, pair.master_used, pair.copies) == (False, False, ())
    assert pair.master_phase.label == "c (high)"
    assert pair.slave_phase.label == "b (high)"
    assert found.clock_ports() == {"c": 0, "b": 0}
    assert found.findings == ()
    assert (found.singles, found.unfit) == ((), ())


@pytest.mark.parametrize(
    ("between", "inverted"),
    [
        ("LAT x (.D(d), .G(c), .Q(m)); BUF g (.A(m), .Y(n));", False),
        ("LAT x (.D(d), .G(c), .Q(m)); INV g (.A(m), .Y(n));", True),
        ("LAT x (.D(d), .G(c), .QN(m)); BUF g (.A(m), .Y(n));", True),
        ("LAT x (.D(d), .G(c), .QN(m)); INV g (.A(m), .Y(n));", False),
        ("LAT x (.D(d), .G(c), .Q(m)); INV g (.A(m), .Y(k)); INV h (.A(k), .Y(n));", False),
        ("LAT x (.D(d), .G(c), .Q(m)); NAND2 g (.A(m), .B(1'b1), .Y(n));", True),
        ("LAT x (.D(d), .G(c), .Q(m)); not g (n, m);", True),
    ],
)
def test_parity_is_tracked_through_wires(between: str, inverted: bool) -> None:
    design = design_of(f"wire m, n, k; {between} LAT y (.D(n), .G(b), .Q(q));")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert found.pairs[0].inverted is inverted
    assert not found.pairs[0].master_used


def test_enables_are_traced_through_buffers_inverters_and_levels() -> None:
    design = design_of("""wire m, bn, bb;
      LATN x (.D(d), .GN(c), .Q(m));
      INV i (.A(b), .Y(bn)); BUF k (.A(bn), .Y(bb)); LAT y (.D(m), .G(bb), .Q(q));""")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert found.clock_ports() == {"c": 1, "b": 1}
    assert found.pairs[0].slave_phase.label == "b (low)"


def test_a_gated_master_clock_is_known_by_the_clock_that_closes_it() -> None:
    design = design_of("""wire m, n, g; AND2 k (.A(c), .B(e), .Y(g));
      LAT x (.D(d), .G(g), .Q(m)); LAT y (.D(m), .G(b), .Q(q));
      LAT z (.D(d), .G(c), .Q(n)); LAT w (.D(n), .G(b), .Q(r));""")
    found = latches(design)

    assert pairs(design, found) == [("x", "y"), ("z", "w")]
    assert found.pairs[0].master_phase.label == "c (high, gated)"
    assert found.findings == ()


def test_a_gated_slave_clock_is_a_finding() -> None:
    design = design_of("""wire m, n, g; AND2 k (.A(b), .B(e), .Y(g));
      LAT x (.D(d), .G(c), .Q(m)); LAT y (.D(m), .G(g), .Q(q));""")
    found = latches(design, ("c", "b"))

    assert pairs(design, found) == [("x", "y")]
    assert slugs(found) == ["latch-clock-gated"]
    assert found.findings[0].names == ("y",)
    assert slugs(latches(design, e=1)) == []


def test_a_clock_gate_cell_is_gating() -> None:
    design = design_of("""wire m, g; GATE k (.CK(c), .EN(e), .GCK(g));
      LAT x (.D(d), .G(g), .Q(m)); LAT y (.D(m), .G(b), .Q(q));""")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert found.pairs[0].master_phase.label == "c (high, gated)"


def test_two_ports_that_close_an_enable_alike_need_the_user() -> None:
    design = design_of("""wire m, g; AND2 k (.A(c), .B(e), .Y(g));
      LAT x (.D(d), .G(g), .Q(m)); LAT y (.D(m), .G(b), .Q(q));""")
    found = latches(design)

    assert slugs(found)[0] == "clock-not-controllable"
    assert "each of `c` and `e`" in found.findings[0].message
    assert [design.name(at) for at in found.unfit] == ["x"]
    assert pairs(design, latches(design, ("c",))) == [("x", "y")]


def test_an_enable_that_state_decides_is_not_controllable() -> None:
    design = design_of("""wire m, n; LAT x (.D(d), .G(c), .Q(m));
      LAT y (.D(d), .G(m), .Q(q));""")
    found = latches(design)

    assert slugs(found)[0] == "clock-not-controllable"
    assert "`x` (LAT)" in found.findings[0].message
    assert found.reasons[found.unfit[0]] == "clock-not-controllable"


def test_a_master_that_feeds_logic_too_is_noted() -> None:
    design = design_of(f"{PAIR} NAND2 g (.A(m), .B(e), .Y(r));")
    found = latches(design)

    assert found.pairs[0].master_used
    assert slugs(found) == ["latch-master-used"]
    assert found.findings[0].names == ("x",)


def test_a_master_at_an_output_port_is_used() -> None:
    found = latches(design_of(f"{PAIR} assign r = m;"))

    assert found.pairs[0].master_used


def test_several_slaves_in_one_phase_are_copies() -> None:
    design = design_of(f"{PAIR} LAT z (.D(m), .G(b), .Q(r));")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert [design.name(at) for at in found.pairs[0].copies] == ["z"]
    assert not found.pairs[0].master_used
    assert slugs(found) == ["latch-several-slaves"]
    assert found.singles == ()


def test_slaves_in_two_phases_are_one_pair_and_one_latch_alone() -> None:
    design = design_of(f"{PAIR} LAT z (.D(m), .G(e), .Q(r));")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert [design.name(at) for at in found.singles] == ["z"]
    assert found.pairs[0].master_used
    assert slugs(found) == ["latch-alone", "latch-master-used"]


def test_a_slave_with_several_masters_is_no_slave() -> None:
    design = design_of("""wire m, n, k, l; LAT x (.D(d), .G(c), .Q(m)); LAT z (.D(e), .G(c), .Q(n));
      MUX2 g (.S(e), .A(m), .B(n), .Y(k)); LAT y (.D(k), .G(b), .Q(q));
      LAT v (.D(d), .G(c), .Q(l)); LAT w (.D(l), .G(b), .Q(r));""")
    found = latches(design)

    assert pairs(design, found) == [("v", "w")]
    several = found.findings[0]
    assert several.slug == "latch-several-masters"
    assert "`x`, `z`" in several.message
    assert several.names == ("y",)


def test_halves_of_pairs_are_told_apart() -> None:
    design = design_of(f"""{PAIR} wire n; LAT lone (.D(d), .G(c), .Q(n));
      NAND2 g (.A(n), .B(e), .Y(r)); LAT late (.D(e), .G(b));""")
    found = latches(design)

    messages = {item.names: item.message for item in found.findings}
    assert {item.slug for item in found.findings} == {"latch-half-pair"}
    assert "master without a slave" in messages[("lone",)]
    assert "slave without a master" in messages[("late",)]


def test_a_single_latch_design_is_told_as_one() -> None:
    design = design_of("""wire m, n; LAT x (.D(d), .G(c), .Q(m)); NAND2 g (.A(m), .B(e), .Y(n));
      LAT y (.D(n), .G(b), .Q(q));""")
    found = latches(design)

    assert found.pairs == ()
    assert [design.name(at) for at in found.singles] == ["x", "y"]
    assert slugs(found) == ["latch-alone", "latch-alone"]


def test_one_port_at_two_levels_is_a_flip_flop_of_latches() -> None:
    design = design_of("""wire m; LATN x (.D(d), .GN(c), .Q(m)); LAT y (.D(m), .G(c), .Q(q));""")
    found = latches(design)

    assert found.pairs == ()
    assert [(design.name(at.master), design.name(at.slave)) for at in found.one_clock] == [
        ("x", "y")
    ]
    assert slugs(found) == ["latch-pair-one-clock"]
    assert set(found.reasons.values()) == {"latch-pair-one-clock"}


def test_two_latches_open_together_are_no_pair() -> None:
    design = design_of("""wire m; LAT x (.D(d), .G(c), .Q(m)); LAT y (.D(m), .G(c), .Q(q));""")
    found = latches(design)

    assert (found.pairs, found.one_clock) == ((), ())
    assert slugs(found)[0] == "latch-open-together"


def test_a_row_of_latches_is_paired_from_its_masters() -> None:
    design = design_of("""wire m, s, n, t;
      LAT m1 (.D(d), .G(c), .Q(m)); LAT s1 (.D(m), .G(b), .Q(s));
      LAT m2 (.D(s), .G(c), .Q(n)); LAT s2 (.D(n), .G(b), .Q(t));
      LAT m3 (.D(t), .G(c), .Q(r)); LAT s3 (.D(r), .G(b), .Q(q));""")
    found = latches(design)

    assert pairs(design, found) == [("m1", "s1"), ("m2", "s2"), ("m3", "s3")]
    assert [pair.master_used for pair in found.pairs] == [False, False, True]


def test_a_latch_that_leads_a_row_does_not_turn_it_round() -> None:
    many = "".join(
        f"wire a{k}, z{k}; LAT p{k} (.D(d), .G(c), .Q(a{k})); LAT o{k} (.D(a{k}), .G(b), .Q(z{k}));"
        for k in range(3)
    )
    design = design_of(f"""{many} wire s, n; LAT first (.D(d), .G(b), .Q(s));
      LAT m1 (.D(s), .G(c), .Q(n)); LAT s1 (.D(n), .G(b), .Q(q));""")
    found = latches(design)

    assert ("m1", "s1") in pairs(design, found)
    assert [design.name(at) for at in found.singles] == ["first"]


def test_a_ring_of_latches_is_paired_in_one_orientation() -> None:
    design = design_of("""wire m, s, n; LAT m1 (.D(q), .G(c), .Q(m)); LAT s1 (.D(m), .G(b), .Q(s));
      LAT m2 (.D(s), .G(c), .Q(n)); LAT s2 (.D(n), .G(b), .Q(q));""")
    found = latches(design)

    assert len(found.pairs) == 2
    assert len({pair.master_phase for pair in found.pairs}) == 1


def test_three_phases_in_a_row_are_paired_from_the_start() -> None:
    design = design_of("""wire m, s, n; LAT x (.D(d), .G(c), .Q(m)); LAT y (.D(m), .G(b), .Q(s));
      LAT z (.D(s), .G(e), .Q(q));""")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert [design.name(at) for at in found.singles] == ["z"]


def test_latches_with_reset_pair_as_others_do() -> None:
    design = design_of("""wire m; LATR x (.D(d), .G(c), .RN(e), .Q(m));
      LATR y (.D(m), .G(b), .RN(e), .Q(q));""")

    assert pairs(design, latches(design)) == [("x", "y")]


def test_a_master_whose_slave_is_reset_by_it_is_used() -> None:
    design = design_of("""wire m; LAT x (.D(d), .G(c), .Q(m));
      LATR y (.D(m), .G(b), .RN(m), .Q(q));""")

    assert latches(design).pairs[0].master_used


def test_a_cell_of_two_latches_is_named_and_left() -> None:
    design = design_of(f"{PAIR} LAT2 two (.D0(d), .D1(e), .G(c), .Q0(r));")
    found = latches(design)

    assert pairs(design, found) == [("x", "y")]
    assert slugs(found) == ["latch-unclear"]
    assert (found.findings[0].names, [design.name(at) for at in found.unfit]) == (
        ("two",),
        ["two"],
    )


def test_a_latch_with_two_ports_in_use_is_unclear_and_with_one_held_is_not() -> None:
    body = "wire m; L1 x (.D(d), .C(c), .I(e), .A({a}), .Q(m)); LAT y (.D(m), .G(b), .Q(q));"

    used = latches(design_of(body.replace("{a}", "e")))
    free = design_of(body.replace("{a}", "1'b0"))

    assert slugs(used)[0] == "latch-unclear"
    assert pairs(free, latches(free)) == [("x", "y")]


def test_a_ring_of_inverters_ends_no_walk() -> None:
    design = design_of(
        f"{PAIR} wire k, l; INV i (.A(k), .Y(l)); INV j (.A(l), .Y(k));"
        " LAT z (.D(k), .G(c), .Q(r));"
    )

    assert pairs(design, latches(design)) == [("x", "y")]


def test_pairs_are_found_in_every_copy_of_a_module() -> None:
    text = """module bit_cell (c, b, d, q); input c, b, d; output q; wire m;
      LAT x (.D(d), .G(c), .Q(m)); LAT y (.D(m), .G(b), .Q(q)); endmodule
      module top (c, b, d, q); input c, b, d; output q; wire w;
      bit_cell u1 (.c(c), .b(b), .d(d), .q(w)); bit_cell u2 (.c(c), .b(b), .d(w), .q(q));
      endmodule"""
    design = link(read_netlist([SourceText("in.v", text)]), library())[0]

    assert pairs(design, latches(design)) == [("u1.x", "u1.y"), ("u2.x", "u2.y")]


def test_flip_flops_are_no_latches() -> None:
    found = latches(design_of("DFF f (.D(d), .CK(c), .Q(q));"))

    assert (found.pairs, found.singles, found.unfit, found.findings) == ((), (), (), ())


def test_two_thousand_pairs_of_a_real_library_are_found_whole() -> None:
    rows = "".join(
        f"wire m{k}, s{k}; LATCH l{k} (.CLK(c), .D({f's{k - 1}' if k else 'd'}), .Q(m{k}));"
        f" LATCH k{k} (.CLK(b), .D(m{k}), .Q(s{k}));\n"
        for k in range(2000)
    )
    design = design_of(rows, cells=osu("osu035"))
    found = latches(design)

    assert pairs(design, found) == [(f"l{k}", f"k{k}") for k in range(2000)]


@pytest.mark.parametrize(
    ("name", "kit"),
    [
        ("latch_counter.osu035", None),
        ("latch_counter.sky130hd", "sky130hd/sky130hd_tt.lib.gz"),
        ("latch_serv.sky130hd", "sky130hd/sky130hd_tt.lib.gz"),
    ],
)
def test_every_pair_of_a_synthesized_core_is_found(name: str, kit: str | None) -> None:
    path: Path = outside("netlists", f"{name}.v.gz")
    cells = osu("osu035") if kit is None else read_library(read_sources([outside("libs", kit)]))
    design = link(read_netlist(read_sources([path])), cells)[0]
    text = gzip.decompress(path.read_bytes()).decode("latin-1")
    found = latches(design)

    expected = [line.split()[1] for line in text.splitlines() if "_L1 " in line]
    assert [design.name(pair.master) for pair in found.pairs] == expected
    assert [design.name(at.slave) for at in found.pairs] == [
        name.replace("_L1", "_L2") for name in expected
    ]
    assert found.findings == ()
