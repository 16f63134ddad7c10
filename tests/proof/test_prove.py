"""Verdicts on small netlists by hand: proven, refuted and why, undecided and why."""

from dataclasses import replace

import pytest
from proof.conversions import conversion, read
from technologies import technology

from insertdft.description import Chain, ChainCell, Cycle, Description, TestPort
from insertdft.proof.options import ProofOptions
from insertdft.proof.prove import prove
from insertdft.proof.result import Proof, Verdict


def proved(
    before: str, after: str, description: Description | None = None, **options: object
) -> Proof:
    library = technology("demo").library()
    asked = ProofOptions(**options)  # type: ignore[arg-type]
    return prove(read(before, library), read(after, library), description, asked)


def kinds(proof: Proof) -> set[str]:
    return {item.kind for item in proof.counterexamples}


# Two flip-flops on two clocks, one chain over both with a lock-up latch between.
TWO = """
module two (c1, c2, a, b, y);
  input c1, c2, a, b; output y; wire p, q, d;
  flop_w1 r1 (.D(a), .CK(c1), .Q(p));
  xor2_w1 g (.A(p), .B(b), .Y(d));
  flop_w1 r2 (.D(d), .CK(c2), .Q(q));
  buf_w1 o (.A(q), .Y(y));
endmodule
"""
TWO_SCAN = """
module two (c1, c2, a, b, y, se, si, so);
  input c1, c2, a, b, se, si; output y, so; wire p, q, d, l;
  scan_flop_w1 r1 (.D(a), .CK(c1), .Q(p), .SI(si), .SE(se));
  latch_low_w1 hold (.D(p), .GN(c1), .Q(l));
  xor2_w1 g (.A(p), .B(b), .Y(d));
  scan_flop_w1 r2 (.D(d), .CK(c2), .Q(q), .SI(l), .SE(se));
  buf_w1 o (.A(q), .Y(y));
  buf_w1 os (.A(q), .Y(so));
endmodule
"""


def scan_cell(instance: str, **more: object) -> ChainCell:
    return ChainCell(instance, "scan_flop_w1", "SI", "Q", **more)  # type: ignore[arg-type]


def described(
    cells: tuple[ChainCell, ...],
    clocks: tuple[str, ...],
    *,
    edge: str | None = "rise",
    more: tuple[TestPort, ...] = (),
    held: tuple[tuple[str, int], ...] = (),
) -> Description:
    chain = Chain("chain", "mux-d", "si", "so", cells, clocks[:1], edge, scan_enable="se")
    ports = (
        *(TestPort(clock, "clock", off=0) for clock in clocks),
        TestPort("se", "scan_enable", True, mission=0, shift=1, capture=0),
        TestPort("si", "scan_in", True),
        *more,
    )
    sequences = {
        "setup": (Cycle(force=held),),
        "shift": (Cycle(force=(("se", 1),), scan=True, pulses=(clocks,)),),
        "capture": (Cycle(force=(("se", 0),), pulses=tuple((at,) for at in clocks)),),
    }
    return Description("top", (chain,), ports, sequences)


TWO_CHAIN = described((scan_cell("r1"), scan_cell("r2")), ("c1", "c2"))


def test_a_chain_over_two_clocks_with_a_lock_up_is_proven() -> None:
    proof = proved(TWO, TWO_SCAN, TWO_CHAIN)

    assert proof.verdict is Verdict.PROVEN
    assert proof.counts["shift, clocks in the other order"].total == 2


@pytest.mark.parametrize(
    ("good", "bad"),
    [
        ("latch_low_w1 hold (.D(p), .GN(c1)", "latch_w1 hold (.D(p), .G(c1)"),
        ("latch_low_w1 hold (.D(p), .GN(c1), .Q(l))", "buf_w1 hold (.A(p), .Y(l))"),
        ("latch_low_w1 hold (.D(p)", "latch_low_w1 hold (.D(a)"),
    ],
)
def test_a_lock_up_on_the_wrong_phase_or_lost_is_refuted(good: str, bad: str) -> None:
    assert good in TWO_SCAN

    proof = proved(TWO, TWO_SCAN.replace(good, bad), TWO_CHAIN)

    assert proof.verdict is Verdict.REFUTED
    assert kinds(proof) <= {"shift", "shift, clocks in the other order"}
    assert any("`r2`, position 2" in item.message for item in proof.counterexamples)


# A gated clock, a divided clock, a reset made by logic: mended for test.
WILD = """
module wild (clk, rst_n, en, a, y);
  input clk, rst_n, en, a; output y; wire g, s, h, r, qg, qd, qr, n;
  clock_gate_test_w4 gate (.CK(clk), .E(en), .T(1'b0), .GCK(g));
  flop_w1 rg (.D(a), .CK(g), .Q(qg));
  flop_w1 rh (.D(n), .CK(clk), .Q(h));
  inv_w1 i (.A(h), .Y(n));
  flop_w1 rd (.D(qg), .CK(h), .Q(qd));
  and2_w1 m (.A(rst_n), .B(h), .Y(r));
  flop_r_w1 rr (.D(qd), .CK(clk), .RN(r), .Q(qr));
  buf_w1 o (.A(qr), .Y(y));
endmodule
"""
WILD_SCAN = """
module wild (clk, rst_n, en, a, y, se, si, so, tm);
  input clk, rst_n, en, a, se, si, tm; output y, so; wire g, s, h, r, qg, qd, qr, n, k, q;
  clock_gate_test_w4 gate (.CK(clk), .E(en), .T(tm), .GCK(g));
  scan_flop_w1 rg (.D(a), .CK(g), .Q(qg), .SI(si), .SE(se));
  scan_flop_w1 rh (.D(n), .CK(clk), .Q(h), .SI(qg), .SE(se));
  inv_w1 i (.A(h), .Y(n));
  mux2_w1 bypass (.A(h), .B(clk), .S(tm), .Y(k));
  scan_flop_w1 rd (.D(qg), .CK(k), .Q(qd), .SI(h), .SE(se));
  and2_w1 m (.A(rst_n), .B(h), .Y(r));
  or2_w1 off (.A(r), .B(tm), .Y(q));
  scan_flop_r_w1 rr (.D(qd), .CK(clk), .RN(q), .Q(qr), .SI(qd), .SE(se));
  buf_w1 o (.A(qr), .Y(y));
  buf_w1 os (.A(qr), .Y(so));
endmodule
"""
WILD_CHAIN = described(
    tuple(scan_cell(name) for name in ("rg", "rh", "rd", "rr")),
    ("clk",),
    more=(TestPort("tm", "test_mode", True, mission=0, shift=1, capture=1),),
    held=(("tm", 1), ("rst_n", 1)),
)


def test_mends_of_clocks_and_resets_are_proven_harmless_and_to_help() -> None:
    proof = proved(WILD, WILD_SCAN, WILD_CHAIN)

    assert proof.verdict is Verdict.PROVEN, proof.counterexamples


WRONG_MENDS = {
    "gate not opened": (".E(en), .T(tm)", ".E(en), .T(1'b0)", "shift"),
    "gate always open": (".E(en), .T(tm)", ".E(en), .T(1'b1)", "latch"),
    "bypass on the wrong polarity": (".A(h), .B(clk), .S(tm)", ".A(clk), .B(h), .S(tm)", "clock"),
    "bypass never taken": (".S(tm), .Y(k)", ".S(1'b0), .Y(k)", "shift"),
    "reset gate on the wrong polarity": (
        "or2_w1 off (.A(r), .B(tm), .Y(q))",
        "and2_w1 off (.A(r), .B(tm), .Y(q))",
        "reset",
    ),
    "reset lost": (".RN(q)", ".RN(1'b1)", "reset"),
    "reset not held off": (".RN(q)", ".RN(r)", "shift"),
}


@pytest.mark.parametrize("name", WRONG_MENDS)
def test_a_wrong_mend_is_refuted_for_its_own_reason(name: str) -> None:
    good, bad, kind = WRONG_MENDS[name]
    assert good in WILD_SCAN

    proof = proved(WILD, WILD_SCAN.replace(good, bad), WILD_CHAIN)

    assert proof.verdict is Verdict.REFUTED
    assert kind in kinds(proof)


# Both edges: falling ones go first.
EDGES = """
module both (clk, a, b, y);
  input clk, a, b; output y; wire p, q;
  flop_n_w1 f (.D(a), .CKN(clk), .Q(p));
  flop_w1 r (.D(b), .CK(clk), .Q(q));
  xor2_w1 g (.A(p), .B(q), .Y(y));
endmodule
"""


def both_edges(first: str) -> str:
    to_f, to_r, last = ("si", "p", "q") if first == "f" else ("q", "si", "p")
    return f"""
module both (clk, a, b, y, se, si, so);
  input clk, a, b, se, si; output y, so; wire p, q;
  scan_flop_n_w1 f (.D(a), .CKN(clk), .Q(p), .SI({to_f}), .SE(se));
  scan_flop_w1 r (.D(b), .CK(clk), .Q(q), .SI({to_r}), .SE(se));
  xor2_w1 g (.A(p), .B(q), .Y(y));
  buf_w1 os (.A({last}), .Y(so));
endmodule
"""


def test_falling_before_rising_shifts_and_the_other_way_loses_a_bit() -> None:
    good = described((scan_cell("f"), scan_cell("r")), ("clk",), edge="mixed")
    bad = described((scan_cell("r"), scan_cell("f")), ("clk",), edge="mixed")

    assert proved(EDGES, both_edges("f"), good).verdict is Verdict.PROVEN
    proof = proved(EDGES, both_edges("r"), bad)
    assert proof.verdict is Verdict.REFUTED
    assert kinds(proof) == {"shift"}


BANK = """
module bank (clk, rst_n, a, y);
  input clk, rst_n; input [3:0] a; output [3:0] y;
  flop_bank4_w1 r (.D(a), .CK(clk), .RN(rst_n), .Q(y));
endmodule
"""
BANK_SCAN = """
module bank (clk, rst_n, a, y, se, si, so);
  input clk, rst_n, se, si; input [3:0] a; output [3:0] y; output so;
  scan_bank4_w1 r (.D(a), .CK(clk), .RN(rst_n), .Q(y), .SI(si), .SE(se));
  buf_w1 os (.A(y[3]), .Y(so));
endmodule
"""


def test_a_bank_with_an_inner_chain_moves_as_many_positions_as_it_has_bits() -> None:
    cell = ChainCell("r", "scan_bank4_w1", "SI", "Q[3]", bits=4)
    held = (("rst_n", 1),)

    right = proved(BANK, BANK_SCAN, described((cell,), ("clk",), held=held))
    wrong = proved(BANK, BANK_SCAN, described((replace(cell, bits=3),), ("clk",), held=held))

    assert right.verdict is Verdict.PROVEN
    assert wrong.verdict is Verdict.REFUTED
    assert kinds(wrong) == {"shift"}


BUS = """
module bus (clk, a, b, e, y);
  input clk, a, b, e; output y; wire n, q;
  bus_drive_w1 d1 (.A(a), .E(e), .Y(y));
  inv_w1 i (.A(e), .Y(n));
  bus_drive_w1 d2 (.A(b), .E(n), .Y(y));
endmodule
"""


@pytest.mark.parametrize(
    ("good", "bad"),
    [(".A(b), .E(n)", ".A(b), .E(e)"), (".A(b), .E(n)", ".A(b), .E(1'b1)"), (".A(b)", ".A(a)")],
)
def test_who_drives_a_bus_is_compared(good: str, bad: str) -> None:
    assert proved(BUS, BUS).verdict is Verdict.PROVEN
    proof = proved(BUS, BUS.replace(good, bad))

    assert proof.verdict is Verdict.REFUTED
    assert "bus" in kinds(proof)


BOX = """
module box (clk, a, y);
  input clk, a; output y; wire p, q;
  flop_w1 r (.D(a), .CK(clk), .Q(p));
  memory m (.address(p), .data(q));
  inv_w1 i (.A(q), .Y(y));
endmodule
"""


def test_black_boxes_are_compared_at_their_pins() -> None:
    assert proved(BOX, BOX).verdict is Verdict.PROVEN
    read_wrong = proved(BOX, BOX.replace(".address(p)", ".address(a)"))
    used_wrong = proved(BOX, BOX.replace("i (.A(q)", "i (.A(p)"))

    assert kinds(read_wrong) == {"black-box pin"}
    assert read_wrong.counterexamples[0].subject == "m.address"
    assert kinds(used_wrong) == {"output"}


def test_a_lost_black_box_leaves_the_question_open() -> None:
    lost = BOX.replace("memory m (.address(p), .data(q));", "buf_w1 m (.A(p), .Y(q));")

    proof = proved(BOX, lost)

    assert proof.verdict is not Verdict.PROVEN
    assert any("`m.address`" in reason for reason in proof.reasons)


def test_a_state_without_counterpart_is_named() -> None:
    renamed = TWO.replace(
        "flop_w1 r2 (.D(d), .CK(c2), .Q(q))", "flop_w1 other (.D(d), .CK(c2), .Q(z))"
    )
    renamed = renamed.replace(".A(q), .Y(y)", ".A(z), .Y(y)").replace("wire p, q", "wire p, z")

    proof = proved(TWO, renamed)
    mapped = proved(TWO, renamed, mapping={"r2": "other"})

    assert proof.verdict is not Verdict.PROVEN
    assert "1 of 2 states have no counterpart in the converted netlist: `r2`" in proof.reasons
    assert mapped.verdict is Verdict.PROVEN


def test_a_wrong_mapping_proves_nothing() -> None:
    crossed = proved(TWO, TWO, mapping={"r1": "r2", "r2": "r1"})

    assert crossed.verdict is Verdict.REFUTED


def test_a_missing_output_leaves_the_question_open() -> None:
    other = TWO.replace("a, b, y);", "a, b);", 1).replace("output y;", "wire y;")

    proof = proved(TWO, other)

    assert proof.verdict is Verdict.UNDECIDED
    assert "the converted netlist lacks 1 ports of the original: `y`" in proof.reasons


def test_netlists_of_different_designs_are_not_proven() -> None:
    proof = proved(TWO, BANK)

    assert proof.verdict is not Verdict.PROVEN
    assert any("have no counterpart" in reason for reason in proof.reasons)


def test_an_enable_that_mission_mode_leaves_open_is_refuted() -> None:
    ports = tuple(
        replace(port, mission=None) if port.port == "se" else port for port in TWO_CHAIN.ports
    )

    proof = proved(TWO, TWO_SCAN, replace(TWO_CHAIN, ports=ports))

    assert proof.verdict is Verdict.REFUTED
    assert proof.counterexamples[0].ports["se"] == 1


def test_logic_that_is_written_otherwise_needs_the_solver() -> None:
    other = TWO.replace(
        "xor2_w1 g (.A(p), .B(b), .Y(d));",
        "nand2_w1 k1 (.A(p), .B(b), .Y(t)); nand2_w1 k2 (.A(p), .B(t), .Y(u));"
        " nand2_w1 k3 (.A(b), .B(t), .Y(v)); nand2_w1 g (.A(u), .B(v), .Y(d)); wire t, u, v;",
    )

    proof = proved(TWO, other)

    assert proof.verdict is Verdict.PROVEN


def test_a_flip_flop_among_latches_of_its_clock_is_a_race() -> None:
    case = conversion("edges, LSSD two-phase beside a flip-flop")

    proof = prove(*case.designs, case.description)

    assert proof.verdict is Verdict.REFUTED
    assert kinds(proof) == {"clock cycle"}


def test_clocks_that_overlap_race_through_a_chain() -> None:
    case = conversion("pairs, LSSD")
    [shift] = case.description.sequences["shift"]
    both = replace(shift, pulses=(tuple(port for phase in shift.pulses for port in phase),))
    sequences = {**case.description.sequences, "shift": (both,)}

    proof = prove(*case.designs, replace(case.description, sequences=sequences))

    assert proof.verdict is Verdict.REFUTED
    assert kinds(proof) <= {"shift", "shift, clocks in the other order", "shift clocks", "chain"}


def test_a_description_of_another_chain_order_is_refuted() -> None:
    case = conversion("edges, mux-D")
    [chain] = case.description.chains
    turned = replace(chain, cells=chain.cells[::-1])

    proof = prove(*case.designs, replace(case.description, chains=(turned,)))

    assert proof.verdict is Verdict.REFUTED
    assert {"shift", "scan-out"} <= kinds(proof)


def test_an_inversion_that_the_description_does_not_tell_is_refuted() -> None:
    case = conversion("edges, mux-D")
    [chain] = case.description.chains
    cells = (replace(chain.cells[0], inverted=True), *chain.cells[1:])

    proof = prove(*case.designs, replace(case.description, chains=(replace(chain, cells=cells),)))

    assert kinds(proof) == {"shift"}


def test_a_capture_without_clock_is_refuted() -> None:
    case = conversion("edges, mux-D")
    [capture] = case.description.sequences["capture"]
    still = replace(capture, pulses=(("a",),))
    sequences = {**case.description.sequences, "capture": (still,)}

    proof = prove(*case.designs, replace(case.description, sequences=sequences))

    assert proof.verdict is Verdict.REFUTED
    assert "no clock of the capture sequence reaches `r0`" in {
        item.message for item in proof.counterexamples
    }


def test_the_certificate_says_what_was_proved_and_how() -> None:
    data = proved(TWO, TWO_SCAN, TWO_CHAIN).to_json({"tool": "1.2"})

    assert data["tool"] == "1.2"
    assert data["verdict"] == "proven"
    assert data["obligations"]["data"]["total"] == 2
    assert data["assumptions"]
