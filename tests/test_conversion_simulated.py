"""Conversions simulated with the libraries' own cell models, against the original netlist."""

import re
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from pathlib import Path

import pytest
from cores import core_netlist
from scan_bench import PLAIN, Outcome, Setup, simulate
from technologies import DEMO, Technology, technology
from yosys_runs import equivalent

from insertdft import api
from insertdft.description import Description
from insertdft.design.link import link
from insertdft.source import read_netlist
from insertdft.text import SourceText, apply_splices

PHASES_OFF = {"phase_1": 0, "phase_2": 0}

SAMPLE = """
module sample (clk, probe_clk, rst_n, a, b, y, z);
  input clk, probe_clk, rst_n, a, b;
  output y, z;
  wire q0, q1, q2, q3, q4, q5, n0, n1, n2, n3, n4;
  xor2_w1 x0 (.A(q1), .B(a), .Y(n0));
  nand2_w1 x1 (.A(q0), .B(q3), .Y(n1));
  and_nor21_w1 x2 (.A(q2), .B(b), .C(q0), .Y(n2));
  xor2_w1 x3 (.A(q3), .B(q2), .Y(n3));
  flop_r_w1 r0 (.D(n0), .CK(clk), .RN(rst_n), .Q(q0), .QN());
  flop_w1 r1 (.D(n1), .CK(clk), .Q(q1), .QN());
  flop_e_w1 r2 (.D(n2), .E(a), .CK(clk), .Q(q2), .QN());
  flop_inverse_w1 r3 (.D(n3), .CK(clk), .QN(q3));
  flop_n_w1 r4 (.D(n4), .CKN(probe_clk), .Q(q4), .QN());
  flop_s_w1 r5 (.D(q4), .CK(probe_clk), .SN(rst_n), .Q(q5), .QN());
  xnor2_w1 x4 (.A(q5), .B(a), .Y(n4));
  xor2_w1 x5 (.A(q4), .B(q5), .Y(y));
  nor2_w1 x6 (.A(q3), .B(q1), .Y(z));
endmodule
"""


@dataclass(frozen=True)
class Converted:
    """A conversion as text."""

    original: Sequence[str]
    texts: Sequence[str]
    description: Description

    def simulated(self, tech: Technology, folder: Path, setup: Setup = PLAIN) -> Outcome:
        return simulate(self.original, self.texts, tech, self.description, folder, setup)


def convert(text: str, tech: Technology, chains: int, style: str = "mux-d") -> Converted:
    netlist = read_netlist([SourceText("in.v", text)], None)
    done = api.convert(link(netlist, tech.library())[0], api.Wishes(style=style, chains=chains))
    texts = [apply_splices(patch.source, patch.splices) for patch in done.patches]
    return Converted([text], texts, done.description)


def assert_same(outcome: Outcome, cells: int) -> None:
    assert list(outcome.mismatches[:10]) == []
    assert outcome.flushed > 0
    assert outcome.measured > 0
    assert outcome.loaded >= cells
    assert outcome.captured >= cells


@pytest.mark.parametrize(
    ("kit", "hierarchical"), [("osu035", False), ("osu035", True), ("ihp", False), ("sky130", True)]
)
def test_a_processor_shifts_and_captures_like_the_original(
    kit: str, hierarchical: bool, tmp_path: Path
) -> None:
    tech = technology(kit)
    done = convert(core_netlist("serv", tech, hierarchical=hierarchical), tech, 4)

    outcome = done.simulated(tech, tmp_path)

    assert_same(outcome, 4 * 165)
    assert outcome.others == 0


@pytest.mark.parametrize("capture", ["capture", "launch_on_capture", "launch_on_shift"])
@pytest.mark.parametrize("style", ["mux-d", "clocked-scan", "lssd"])
def test_the_demo_chip_shifts_and_captures_like_the_original(
    style: str, capture: str, tmp_path: Path
) -> None:
    tech = technology("demo")
    done = convert((DEMO / "demo_chip.v").read_text(encoding="utf-8"), tech, 8, style)

    held = {} if style == "lssd" else PHASES_OFF  # the phases are clocks of the LSSD chains
    outcome = done.simulated(tech, tmp_path, Setup(held=held, capture=capture, rounds=2))

    assert_same(outcome, 2 * 370)
    assert outcome.others > 0


@pytest.mark.parametrize(
    ("kit", "capture"),
    [
        ("demo", "capture"),
        ("demo", "launch_on_capture"),
        ("demo", "launch_on_shift"),
        ("osu035", "capture"),
        ("osu035", "launch_on_capture"),
        ("ihp", "capture"),
        ("sky130", "launch_on_shift"),
    ],
)
def test_a_processor_of_latch_pairs_in_level_sensitive_scan(
    kit: str, capture: str, tmp_path: Path
) -> None:
    tech = technology(kit)
    done = convert(core_netlist("serv", tech, latches=True), tech, 4, "lssd")

    outcome = done.simulated(tech, tmp_path, Setup(capture=capture))

    assert_same(outcome, 4 * 165)


def test_two_captures_at_speed_do_what_the_original_does_in_two_cycles(tmp_path: Path) -> None:
    tech = technology("demo")
    done = convert(SAMPLE, tech, 3)

    for name in ("launch_on_capture", "launch_on_shift"):
        outcome = done.simulated(tech, tmp_path / name, Setup(capture=name, rounds=20))

        assert_same(outcome, 20 * 6)


def spoilt(done: Converted, pattern: str, by: str) -> Converted:
    text, count = re.subn(pattern, by, done.texts[0], count=1)
    assert count == 1, f"{pattern} is not in the converted text"
    return replace(done, texts=[text])


def first_cell(done: Converted, **changes: object) -> Converted:
    chain = done.description.chains[0]
    cell = replace(chain.cells[0], **changes)  # type: ignore[arg-type]
    chain = replace(chain, cells=(cell, *chain.cells[1:]))
    chains = (chain, *done.description.chains[1:])
    return replace(done, description=replace(done.description, chains=chains))


def without_first_cell(done: Converted) -> Converted:
    chain = done.description.chains[0]
    chains = (replace(chain, cells=chain.cells[1:]), *done.description.chains[1:])
    return replace(done, description=replace(done.description, chains=chains))


MISTAKES: dict[str, Callable[[Converted], Converted]] = {
    "mission data lost": lambda done: spoilt(done, r"(r1 \(\.D\()n1", r"\1n2"),
    "a gate changed": lambda done: spoilt(done, r"and_nor21_w1 x2", "or_nand21_w1 x2"),
    "scan enable tied": lambda done: spoilt(done, r"(r2 .*\.SE\()\w+", r"\g<1>1'b0"),
    "scan-in from elsewhere": lambda done: spoilt(done, r"(r0 .*\.SI\()\w+", r"\1b"),
    "the other edge": lambda done: spoilt(
        done, r"scan_flop_n_w1 r4 (.*)\.CKN", r"scan_flop_w1 r4 \1.CK"
    ),
    "an inversion too many": lambda done: first_cell(done, inverted=True),
    "a position too few": without_first_cell,
    "the wrong name": lambda done: first_cell(done, instance="r1"),
}


@pytest.mark.parametrize("mistake", MISTAKES)
def test_simulation_notices_a_planted_mistake(mistake: str, tmp_path: Path) -> None:
    tech = technology("demo")
    done = convert(SAMPLE, tech, 3)

    outcome = MISTAKES[mistake](done).simulated(tech, tmp_path, Setup(rounds=60))

    assert outcome.mismatches


def new_ports(done: Converted) -> list[str]:
    return [port.port for port in done.description.ports if port.role in ("scan_in", "scan_out")]


@pytest.mark.parametrize("hierarchical", [False, True])
def test_yosys_proves_mission_mode_with_scan_enable_at_rest(hierarchical: bool) -> None:
    tech = technology("osu035")
    done = convert(core_netlist("serv", tech, hierarchical=hierarchical), tech, 4)
    tied, hidden = {"scan_enable": 0}, new_ports(done)

    verdict = equivalent(
        done.original[0], done.texts[0], "serv_top", tech.liberty, tied=tied, hidden=hidden
    )

    assert verdict is True


def test_yosys_finds_a_planted_difference() -> None:
    tech = technology("demo")
    done = convert(SAMPLE, tech, 3)
    wrong = spoilt(done, r"and_nor21_w1 x2", "or_nand21_w1 x2")
    tied, hidden = {"scan_enable": 0}, new_ports(done)

    def verdict(texts: Sequence[str]) -> bool | None:
        return equivalent(
            done.original[0], texts[0], "sample", tech.models, tied=tied, hidden=hidden
        )

    assert verdict(done.texts) is True
    assert verdict(wrong.texts) is False
