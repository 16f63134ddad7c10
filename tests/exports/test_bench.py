"""The test bench in Icarus: passes on what was converted, fails on anything else."""

import re
import subprocess
from pathlib import Path

import pytest
from exports.made import STYLES, Made, made, run_bench

from insertdft.exports.bench import to_bench


@pytest.fixture(scope="module", params=STYLES)
def every_style(request: pytest.FixtureRequest) -> Made:
    return made(request.param)


def test_the_bench_passes_on_the_converted_netlist(every_style: Made, tmp_path: Path) -> None:
    [*_, last] = run_bench(tmp_path, to_bench(every_style.given), every_style.text)

    assert last.startswith("PASS: ")
    flushed = sum(chain.length for chain in every_style.description.chains)
    assert int(last.split()[1]) >= flushed


def test_a_swapped_scan_connection_fails_in_every_style(every_style: Made, tmp_path: Path) -> None:
    wrong = re.sub(r"\bscan_in_1\b(?=\W*\))", "1'b0", every_style.text, count=1)
    assert wrong != every_style.text

    assert run_bench(tmp_path, to_bench(every_style.given), wrong)[-1].startswith("FAIL: ")


def test_a_wrong_gate_fails_where_captures_are_compared(every_style: Made, tmp_path: Path) -> None:
    good = every_style
    for number in range(2):
        parts = good.text.split("nand2_w1")
        wrong = (
            "nand2_w1".join(parts[: number + 1]) + "nor2_w1" + "nand2_w1".join(parts[number + 1 :])
        )
        lines = run_bench(tmp_path, to_bench(good.given), wrong)

        assert lines[-1].startswith("FAIL: ")
        assert any("expected" in line for line in lines)


def test_all_sequences_and_all_values_are_compared(every_style: Made) -> None:
    patterns = every_style.given.patterns or ()

    assert {at.sequence for at in patterns} == {"capture", "launch_on_capture", "launch_on_shift"}
    assert not any("X" in row for at in patterns for row in (*at.measured, *at.unload))


def test_the_bench_dumps_waves_only_when_asked(tmp_path: Path) -> None:
    good = made("mux-d", count=1)
    run_bench(tmp_path, to_bench(good.given), good.text)
    assert not list(tmp_path.glob("*.vcd"))

    words = ["vvp", "-n", "program.vvp", "+vcd=waves.vcd"]
    subprocess.run(words, cwd=tmp_path, check=True, capture_output=True)
    assert "$enddefinitions" in (tmp_path / "waves.vcd").read_text("latin-1")


def test_two_runs_give_the_same_bytes() -> None:
    assert to_bench(made("lssd").given) == to_bench(made("lssd").given)
