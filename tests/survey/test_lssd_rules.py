"""Every rule of level-sensitive scan: one netlist that breaks it and one that keeps it."""

from functools import cache
from pathlib import Path

import pytest
from designs import TESTDATA

from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.diagnostics import SLUGS, DesignError, Diagnostic, render
from insertdft.library import read_library
from insertdft.library.cell import Library
from insertdft.source import read_netlist, read_sources
from insertdft.survey.lssd_rules import MOST, Srl, check_rules, check_scan_state, check_srls
from insertdft.text import SourceText

FOLDER = TESTDATA / "survey" / "lssd"
RULES = sorted(path.name for path in FOLDER.iterdir() if path.is_dir())


@cache
def library() -> Library:
    return read_library(read_sources([FOLDER / "cells.lib"]))


def design_of(path: Path | str) -> Design:
    text = path if isinstance(path, str) else path.read_text(encoding="latin-1")
    return link(read_netlist([SourceText("in.v", text)]), library())[0]


def found(rule: str, name: str) -> tuple[Diagnostic, ...]:
    design = design_of(FOLDER / rule / f"{name}.v")
    ports = design.port_nets
    clocks = {port: 0 for port in ("c", "c1", "c2", "a", "b") if port in ports}
    latches = {design.name(at): at for at in range(len(design.cell))}
    problems = check_rules(design, clocks)
    if {"x", "y"} <= latches.keys() and "b" in clocks:
        srls = [Srl(latches["x"], latches["y"])]
        problems += check_srls(design, srls)
        if "a" in clocks:
            problems += check_scan_state(design, srls, clocks, ("a", "b"))
    return problems


def test_every_rule_has_its_two_netlists() -> None:
    assert {f"lssd-{rule}" for rule in RULES} == {at for at in SLUGS if at.startswith("lssd-")}


@pytest.mark.parametrize("rule", RULES)
def test_the_netlist_that_breaks_a_rule_is_found_out(rule: str) -> None:
    slugs = {item.slug for item in found(rule, "breaks")}

    assert f"lssd-{rule}" in slugs


@pytest.mark.parametrize("rule", RULES)
def test_the_netlist_that_keeps_a_rule_breaks_none(rule: str) -> None:
    assert found(rule, "keeps") == ()


@pytest.mark.parametrize(
    ("rule", "path"),
    [
        ("same-phase-path", ("x", "g1", "g2", "y")),
        ("gates-own-clock", ("x", "g1", "y")),
        ("clock-into-data", ("g1", "g2", "y")),
    ],
)
def test_the_offending_path_is_named_cell_by_cell(rule: str, path: tuple[str, ...]) -> None:
    [item] = [item for item in found(rule, "breaks") if item.slug == f"lssd-{rule}"]

    assert item.names == path
    gates = [span.text.split()[1] for span, _ in item.also]
    assert gates == [name for name in path if name.startswith("g")]
    assert all(f"`{name}`" in item.message for name in gates)


def test_what_gates_a_clock_is_told_with_its_path() -> None:
    [item] = [at for at in found("clocks-anded", "breaks") if at.slug == "lssd-clocks-anded"]

    assert "`c1` gated by another clock, `c2`" in item.message
    assert "through `i` (INV), `a` (AND2)" in item.message
    assert "lssd-clocks-anded" in render(item)


def test_two_clocks_that_must_be_on_together_are_both_rules_broken() -> None:
    design = design_of("""module top (c1, c2, d, q); input c1, c2, d; output q; wire g;
      AND2 a (.A(c1), .B(c2), .Y(g)); LAT y (.D(d), .G(g), .Q(q)); endmodule""")

    slugs = [item.slug for item in check_rules(design, {"c1": 0, "c2": 0})]

    assert slugs == ["lssd-clock-cannot-turn-on", "lssd-clocks-anded"]


def test_a_clock_that_rests_at_one_is_checked_at_its_own_level() -> None:
    text = """module top (c1, d, q); input c1, d; output q;
      LATN y (.D(d), .GN(c1), .Q(q)); endmodule"""

    assert check_rules(design_of(text), {"c1": 1}) == ()
    [item] = check_rules(design_of(text), {"c1": 0})
    assert item.slug == "lssd-clock-not-off"


def test_a_latch_that_no_clock_port_opens_is_reported() -> None:
    design = design_of("""module top (c1, d, q); input c1, d; output q; wire m;
      LAT x (.D(d), .G(c1), .Q(m)); LAT y (.D(d), .G(m), .Q(q)); endmodule""")

    [item] = check_rules(design, {"c1": 0})

    assert item.slug == "lssd-clock-not-off"
    assert item.names == ("y",)


def test_clock_gate_cells_are_gating_by_latches() -> None:
    text = """module top (c1, c2, d, q); input c1, c2, d; output q; wire e, g;
      LAT x (.D(d), .G({clock}), .Q(e)); GATE k (.CK(c1), .EN(e), .GCK(g));
      LAT y (.D(d), .G(g), .Q(q)); endmodule"""

    good = check_rules(design_of(text.replace("{clock}", "c2")), {"c1": 0, "c2": 0})
    bad = check_rules(design_of(text.replace("{clock}", "c1")), {"c1": 0, "c2": 0})

    assert good == ()
    assert [item.slug for item in bad] == ["lssd-gates-own-clock"]
    assert bad[0].names == ("x", "k", "y")


def test_a_held_port_opens_what_it_gates() -> None:
    design = design_of(FOLDER / "shift-clock-blocked" / "breaks.v")
    clocks = {"c": 0, "a": 0, "b": 0}
    names = {design.name(at): at for at in range(len(design.cell))}
    srls = [Srl(names["x"], names["y"])]

    assert check_scan_state(design, srls, clocks, ("a", "b"), {"en": 1}) == ()
    [item] = check_scan_state(design, srls, clocks, ("a", "b"))
    assert item.names == ("y",)
    assert "`gate` (AND2)" in item.message


def test_each_port_of_a_latch_is_held_to_its_own_clock() -> None:
    single = """module top (c1, c2, a, b, d, i, q); input c1, c2, a, b, d, i; output q;
      wire m, s, n;
      L1 x (.D(d), .C(c1), .I(i), .A(a), .Q(m)); LAT l (.D(m), .G(b), .Q(s));
      INV g (.A(m), .Y(n));
      L1 y (.D(n), .C(c2), .I(s), .A(a), .Q(q)); endmodule"""
    clocks = {"c1": 0, "c2": 0, "a": 0, "b": 0}

    assert check_rules(design_of(single), clocks) == ()
    crossed = single.replace(".I(s)", ".I(m)")
    [item] = check_rules(design_of(crossed), clocks)
    assert item.slug == "lssd-same-phase-path"
    assert "pin `I` of latch `y`, and clock `a`" in item.message


def test_a_clock_at_a_reset_pin_is_reported() -> None:
    design = design_of("""module top (c1, c2, d, q); input c1, c2, d; output q;
      LATR y (.D(d), .G(c1), .RN(c2), .Q(q)); endmodule""")

    [item] = check_rules(design, {"c1": 0, "c2": 0})

    assert item.slug == "lssd-clock-into-data"
    assert "pin `RN`" in item.message


def test_many_breaks_of_a_rule_are_counted_not_listed() -> None:
    count = MOST + 7
    latches = "".join(f"LAT y{k} (.D(m), .G(c1), .Q(q[{k}]));\n" for k in range(count))
    design = design_of(f"""module top (c1, d, q); input c1, d; output [{count - 1}:0] q; wire m;
      LAT x (.D(d), .G(c1), .Q(m)); {latches} endmodule""")

    items = check_rules(design, {"c1": 0})

    assert len(items) == MOST + 1
    assert items[-1].message.startswith("7 more")


def test_a_clock_that_is_no_port_is_refused_with_a_hint() -> None:
    design = design_of(FOLDER / "clocks-anded" / "keeps.v")

    with pytest.raises(DesignError) as caught:
        check_rules(design, {"c_1": 0})

    [item] = caught.value.diagnostics
    assert (item.slug, "`c1`" in (item.hint or "")) == ("port-unknown", True)


def test_gating_by_more_signals_than_can_be_enumerated_is_still_judged() -> None:
    count = 14
    gates = "".join(f"AND2 g{k} (.A(w{k}), .B(e[{k}]), .Y(w{k + 1}));\n" for k in range(count))
    wires = ", ".join(f"w{k}" for k in range(1, count + 1))
    text = f"""module top (c1, e, d, q); input c1, d; input [{count - 1}:0] e; output q;
      wire {wires}; {gates.replace("w0", "c1")} LAT y (.D(d), .G(w{count}), .Q(q)); endmodule"""

    turned = text.replace(f".G(w{count})", ".G(low)")
    turned = turned.replace("LAT y", f"wire low; INV i (.A(w{count}), .Y(low)); LAT y")

    assert check_rules(design_of(text), {"c1": 0}) == ()
    assert "lssd-clock-not-off" in [at.slug for at in check_rules(design_of(turned), {"c1": 0})]
