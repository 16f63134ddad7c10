"""The export command."""

from pathlib import Path

import pytest
from click.testing import CliRunner
from exports.made import made, run_bench
from technologies import DEMO

from insertdft.chainfile import description_to_json
from insertdft.cli.export import command
from insertdft.cli.main import COMMANDS
from insertdft.diagnostics import DesignError
from insertdft.exports.formats import FORMATS


@pytest.fixture
def inputs(tmp_path: Path) -> list[str]:
    good = made("mux-d", count=0)
    (tmp_path / "chains.json").write_text(description_to_json(good.description), "latin-1")
    (tmp_path / "scan.v").write_text(good.text, "latin-1")
    lib = str(DEMO / "demo.lib")
    return [str(tmp_path / "chains.json"), str(tmp_path / "scan.v"), "--lib", lib, "--top", "top"]


def test_every_format_is_written_and_two_runs_are_equal(inputs: list[str], tmp_path: Path) -> None:
    every = ["--to", ",".join(FORMATS)]
    for folder in ("one", "two"):
        done = CliRunner().invoke(command, [*inputs, *every, "--out", str(tmp_path / folder)])
        assert done.exit_code == 0, done.output

    one, two = (
        {path.name: path.read_bytes() for path in (tmp_path / name).iterdir()}
        for name in ("one", "two")
    )
    assert one == two
    assert len(one) == len(FORMATS) + 2  # three modes of SDC
    assert "values known" in done.output


def test_the_written_bench_passes(inputs: list[str], tmp_path: Path) -> None:
    words = [*inputs, "--to", "bench", "--out", str(tmp_path), "--period", "33.3"]
    CliRunner().invoke(command, [*words, "--patterns", "2"], catch_exceptions=False)

    bench = (tmp_path / "scan_bench.v").read_text("latin-1")
    lines = run_bench(tmp_path, bench, (tmp_path / "scan.v").read_text("latin-1"))
    assert lines[-1].startswith("PASS: ")


def test_a_date_appears_only_when_given(inputs: list[str], tmp_path: Path) -> None:
    words = [*inputs, "--to", "stil", "--patterns", "0", "--out", str(tmp_path)]
    CliRunner().invoke(command, words, catch_exceptions=False)
    assert "Date" not in (tmp_path / "scan.stil").read_text("latin-1")

    CliRunner().invoke(command, [*words, "--date", "day one"], catch_exceptions=False)
    assert 'Date "day one";' in (tmp_path / "scan.stil").read_text("latin-1")


def test_wrong_wishes_are_refused(inputs: list[str], tmp_path: Path) -> None:
    out = ["--out", str(tmp_path)]
    unknown = CliRunner().invoke(command, [*inputs, "--to", "still", *out])
    assert unknown.exit_code == 2
    assert "stil" in unknown.output

    words = [*inputs, "--to", "stil", "--period", "1", *out]
    with pytest.raises(DesignError, match="no room"):
        CliRunner().invoke(command, words, catch_exceptions=False)


def test_another_netlist_is_refused(inputs: list[str], tmp_path: Path) -> None:
    other = tmp_path / "other.v"
    other.write_text("module top (clk); input clk; endmodule\n", "latin-1")

    words = [inputs[0], str(other), *inputs[2:], "--to", "stil", "--out", str(tmp_path)]
    with pytest.raises(DesignError) as caught:
        CliRunner().invoke(command, words, catch_exceptions=False)
    assert caught.value.diagnostics[0].slug == "export-mismatch"
    assert not (tmp_path / "scan.stil").exists()


def test_the_command_is_listed() -> None:
    assert "export" in COMMANDS
