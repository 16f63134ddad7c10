"""Each scan style as converted by hand: what the simulation must accept, and what it must not.

No conversion of ours takes part, so these tests stand on the bench, the demo's cell models and the
clock sequences alone.
"""

from collections.abc import Callable, Mapping
from dataclasses import dataclass, replace
from pathlib import Path

import pytest
from scan_bench import Outcome, Setup, simulate
from technologies import technology
from yosys_runs import equivalent

from insertdft.description import Chain, ChainCell, Cycle, Description, TestPort
from insertdft.styles.lssd_sequences import Form, LssdClocks, lssd_sequences
from insertdft.styles.sequences import Clocking, make_sequences

BY_HAND = Path(__file__).parent.parent / "testdata" / "by_hand"


@dataclass(frozen=True)
class Case:
    """One conversion by hand: files, and what they are said to be."""

    before: str
    after: str
    description: Description
    clocks: Mapping[str, str]

    def simulated(self, folder: Path, capture: str = "capture", rounds: int = 24) -> Outcome:
        texts = [(BY_HAND / f"{name}.v").read_text() for name in (self.before, self.after)]
        return self.compared(folder, texts[0], texts[1], capture, rounds)

    def compared(
        self, folder: Path, before: str, after: str, capture: str = "capture", rounds: int = 24
    ) -> Outcome:
        setup = Setup(rounds=rounds, capture=capture, clocks=self.clocks)
        return simulate([before], [after], technology("demo"), self.description, folder, setup)


def ports(**roles: str) -> tuple[TestPort, ...]:
    return tuple(
        TestPort(name, role, off=0 if "clock" in role else None) for name, role in roles.items()
    )


def lssd_case(
    files: tuple[str, str],
    cells: tuple[ChainCell, ...],
    form: Form,
    clocks: LssdClocks,
    **changed: object,
) -> Case:
    named = dict.fromkeys(clocks.a, "clock_a") | dict.fromkeys(clocks.b, "clock_b")
    named |= dict.fromkeys(clocks.c, "clock_c") | {"rst_n": "set_reset"}
    chain = Chain("chain", "lssd", "scan_in", "scan_out", cells, (*clocks.a, *clocks.b), None)
    top = files[0]
    chain = replace(chain, **changed)  # type: ignore[arg-type]
    description = Description(top, (chain,), ports(**named), lssd_sequences(form, clocks))
    return Case(*files, description, {"clk_c": "clk"} if "clk_c" in clocks.c else {})


def cell(instance: str, kind: str, out: str, slave: str | None = None) -> ChainCell:
    return ChainCell(instance, kind, "I", out, slave=slave)


DOUBLE = lssd_case(
    ("pairs", "pairs_double"),
    (
        cell("master0", "srl_double_w1", "L2"),
        cell("master1", "srl_first_w1", "Q", "slave1"),
        cell("master2", "srl_first_w1", "Q", "slave2"),
    ),
    Form.DOUBLE,
    LssdClocks(("clk_a",), ("phase_2",), ("phase_1",), held={"rst_n": 1}),
)

SINGLE = lssd_case(
    ("phases", "phases_single"),
    tuple(cell(name, "srl_single_w1", "L2") for name in ("one0", "one1", "two0", "two1")),
    Form.SINGLE,
    LssdClocks(("clk_a",), ("clk_b",), ("phase_1", "phase_2")),
    inverted_out=True,
)

FLOPS = lssd_case(
    ("edges", "edges_double"),
    (
        cell("r0", "srl_double_r_w1", "L2"),
        cell("r1", "srl_double_w1", "L2"),
        cell("r2", "srl_double_w1", "L2"),
    ),
    Form.DOUBLE,
    LssdClocks(("clk_a",), ("clk_b",), ("clk_c",), held={"rst_n": 1}),
)

EDGES = Case(
    "edges",
    "edges_ab",
    Description(
        "edges",
        (
            Chain(
                "chain",
                "lssd",
                "scan_in",
                "scan_out",
                (
                    cell("r0", "srl_edge_r_w1", "Q"),
                    cell("r1", "srl_edge_w1", "Q"),
                    cell("r2", "srl_edge_e_w1", "Q"),
                ),
                ("clk_a", "clk_b"),
                None,
            ),
        ),
        ports(clk_a="clock_a", clk_b="clock_b", clk="clock", rst_n="set_reset"),
        make_sequences(
            Clocking(held={"rst_n": 1}, shift=(("clk_a",), ("clk_b",)), capture=(("clk",),))
        ),
    ),
    {},
)

CASES = {"double latch": DOUBLE, "single latch": SINGLE, "flops to SRLs": FLOPS, "edge, A/B": EDGES}


@pytest.mark.parametrize("name", CASES)
def test_a_right_conversion_shifts_and_captures(name: str, tmp_path: Path) -> None:
    case = CASES[name]
    length = case.description.chains[0].length

    outcome = case.simulated(tmp_path)

    assert outcome.mismatches == ()
    assert outcome.flushed > length
    assert outcome.captured == 24 * length


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("launch", ["launch_on_capture", "launch_on_shift"])
def test_two_pattern_sequences_follow_the_original(name: str, launch: str, tmp_path: Path) -> None:
    case = CASES[name]

    outcome = case.simulated(tmp_path, launch)

    assert outcome.mismatches == ()
    assert outcome.captured == 24 * case.description.chains[0].length


def overlapping(cycle: Cycle) -> Cycle:
    """The same cycle with all its clocks on together."""
    return replace(cycle, pulses=(tuple(port for phase in cycle.pulses for port in phase),))


def with_sequence(case: Case, **changed: tuple[Cycle, ...]) -> Case:
    sequences = {**case.description.sequences, **changed}
    return replace(case, description=replace(case.description, sequences=sequences))


def swapped(text: str, one: str, other: str) -> str:
    assert one in text, f"{one} is not in the netlist"
    return text.replace(one, other, 1)


def test_a_race_through_both_latches_is_seen_when_a_and_b_overlap(tmp_path: Path) -> None:
    shift = DOUBLE.description.sequences["shift"]

    outcome = with_sequence(DOUBLE, shift=(overlapping(shift[0]),)).simulated(tmp_path)

    assert any("shift" in fault for fault in outcome.mismatches)


def test_unloading_without_b_first_loses_the_response(tmp_path: Path) -> None:
    outcome = with_sequence(DOUBLE, unload_start=()).simulated(tmp_path)

    assert any("captured" in fault for fault in outcome.mismatches)
    assert not any("shift" in fault for fault in outcome.mismatches)


WRONG: dict[str, tuple[Case, Callable[[str], str]]] = {
    "B on the wrong phase": (
        SINGLE,
        lambda text: swapped(
            text, ".A(clk_a), .B(clk_b), .L1(p1)", ".A(clk_a), .B(clk_a), .L1(p1)"
        ),
    ),
    "A lost": (DOUBLE, lambda text: swapped(text, ".I(s0), .A(clk_a)", ".I(s0), .A(1'b0)")),
    "scan-in of the wrong latch": (
        DOUBLE,
        lambda text: swapped(text, ".I(s1), .A(clk_a)", ".I(m1), .A(clk_a)"),
    ),
    "mission data lost": (FLOPS, lambda text: swapped(text, "r1 (.D(d1)", "r1 (.D(q0)")),
    "the wrong system clock": (
        SINGLE,
        lambda text: swapped(text, "two0 (.D(e0), .C(phase_2)", "two0 (.D(e0), .C(phase_1)"),
    ),
    "reset lost": (EDGES, lambda text: swapped(text, ".RN(rst_n)", ".RN(a)")),
}


@pytest.mark.parametrize("mistake", WRONG)
def test_the_bench_notices_a_mistake_of_the_hand(mistake: str, tmp_path: Path) -> None:
    case, spoil = WRONG[mistake]
    before, after = ((BY_HAND / f"{name}.v").read_text() for name in (case.before, case.after))

    outcome = case.compared(tmp_path, before, spoil(after))

    assert outcome.mismatches


WHOLE_PAIR = (
    "srl_double_w1 master0 "
    "(.D(d0), .C(phase_1), .I(scan_in), .A(clk_a), .B(phase_2), .L2(s0), .L2N());"
)
FIRST_AND_SLAVE = """
  wire m0;
  srl_first_w1 master0 (.D(d0), .C(phase_1), .I(scan_in), .A(clk_a), .L1(m0), .L1N());
  latch_w1 slave0 (.D(m0), .G(phase_2), .Q(s0), .QN());
"""


@pytest.mark.parametrize(
    ("name", "at_rest"), [("double latch", ("clk_a",)), ("single latch", ("clk_a", "clk_b"))]
)
def test_yosys_proves_mission_mode_with_the_shift_clocks_at_rest(
    name: str, at_rest: tuple[str, ...]
) -> None:
    case, models = CASES[name], technology("demo").models
    before, after = ((BY_HAND / f"{file}.v").read_text() for file in (case.before, case.after))
    # With its L1 hidden inside, the whole cell could only be matched while the phases are apart.
    after = after.replace(WHOLE_PAIR, FIRST_AND_SLAVE)
    tied, hidden = dict.fromkeys(at_rest, 0), ["scan_in", "scan_out"]

    def verdict(text: str) -> bool | None:
        return equivalent(before, text, case.before, models, tied=tied, hidden=hidden)

    assert verdict(after) is True
    assert verdict(swapped(after, "nand2_w1", "nor2_w1")) is False


CROSSING = """
module crossing (clk_1, clk_2, a, y);
  input clk_1, clk_2, a;
  output y;
  wire q0, q1, q2, q3, d1;
  flop_w1 r0 (.D(q3), .CK(clk_1), .Q(q0), .QN());
  xor2_w1 g (.A(q0), .B(a), .Y(d1));
  flop_w1 r1 (.D(d1), .CK(clk_1), .Q(q1), .QN());
  flop_w1 r2 (.D(a), .CK(clk_2), .Q(q2), .QN());
  flop_w1 r3 (.D(q2), .CK(clk_2), .Q(q3), .QN());
  buf_w1 out (.A(q1), .Y(y));
endmodule
"""

CROSSED = """
module crossing (clk_1, clk_2, a, y, scan_enable, scan_in, scan_out);
  input clk_1, clk_2, a, scan_enable, scan_in;
  output y, scan_out;
  wire q0, q1, q2, q3, d1, over;
  scan_flop_w1 r0 (.D(q3), .SI(scan_in), .SE(scan_enable), .CK(clk_1), .Q(q0), .QN());
  xor2_w1 g (.A(q0), .B(a), .Y(d1));
  scan_flop_w1 r1 (.D(d1), .SI(q0), .SE(scan_enable), .CK(clk_1), .Q(q1), .QN());
  CONNECT
  scan_flop_w1 r2 (.D(a), .SI(over), .SE(scan_enable), .CK(clk_2), .Q(q2), .QN());
  scan_flop_w1 r3 (.D(q2), .SI(q2), .SE(scan_enable), .CK(clk_2), .Q(q3), .QN());
  buf_w1 out (.A(q1), .Y(y));
  buf_w1 show (.A(q3), .Y(scan_out));
endmodule
"""


def crossed(folder: Path, connect: str, skew: Mapping[str, int]) -> Outcome:
    cells = tuple(ChainCell(f"r{n}", "scan_flop_w1", "SI", "Q") for n in range(4))
    clocks = ("clk_1", "clk_2")
    chain = Chain("chain", "mux-d", "scan_in", "scan_out", cells, clocks, "rise", "scan_enable")
    sequences = make_sequences(
        Clocking(enable=("scan_enable",), shift=(clocks,), capture=(("clk_1",), ("clk_2",)))
    )
    named = ports(clk_1="clock", clk_2="clock", scan_enable="scan_enable")
    description = Description("crossing", (chain,), named, sequences)
    texts = [CROSSING], [CROSSED.replace("CONNECT", connect)]
    return simulate(*texts, technology("demo"), description, folder, Setup(rounds=8, skew=skew))


@pytest.mark.parametrize("skew", [{}, {"clk_2": 8}, {"clk_1": 8}])
def test_a_chain_across_two_clocks_stands_skew_with_a_lock_up_latch_only(
    skew: Mapping[str, int], tmp_path: Path
) -> None:
    lock_up = "latch_low_w1 lock (.D(q1), .GN(clk_1), .Q(over), .QN());"

    plain = crossed(tmp_path / "plain", "buf_w1 lock (.A(q1), .Y(over));", skew)
    locked = crossed(tmp_path / "locked", lock_up, skew)

    assert locked.mismatches == ()
    assert bool(plain.mismatches) is ("clk_2" in skew)  # late at the destination: a hold violation
