"""The command that draws clock sequences."""

import json
from pathlib import Path

import pytest
from click.testing import CliRunner

from insertdft.chainfile import description_to_json
from insertdft.cli.waves import command
from insertdft.description import Description
from insertdft.diagnostics import DesignError
from insertdft.styles.lssd_sequences import Form, LssdClocks, lssd_sequences


@pytest.fixture
def chains(tmp_path: Path) -> Path:
    sequences = lssd_sequences(Form.DOUBLE, LssdClocks(("clk_a",), ("clk_b",), ("clk",)))
    path = tmp_path / "chains.json"
    path.write_text(description_to_json(Description("top", (), (), sequences)), encoding="latin-1")
    return path


def test_every_sequence_is_drawn(chains: Path) -> None:
    done = CliRunner().invoke(command, [str(chains)])

    assert done.exit_code == 0
    heads = [line.partition(":")[0] for line in done.output.splitlines() if line[:1].isalpha()]
    assert heads == [
        "setup",
        "shift",
        "capture",
        "unload_start",
        "launch_on_capture",
        "launch_on_shift",
    ]


def test_one_sequence_is_drawn_and_written(chains: Path) -> None:
    folder = chains.parent / "pictures"

    done = CliRunner().invoke(
        command, [str(chains), "--sequence", "capture", "--svg", str(folder), "--json"]
    )

    assert [at["sequence"] for at in json.loads(done.output)] == ["capture"]
    assert [path.name for path in folder.iterdir()] == ["waves_capture.svg"]
    assert (folder / "waves_capture.svg").read_text(encoding="latin-1").startswith("<?xml")


def test_an_unknown_sequence_is_wrong_usage_with_a_hint(chains: Path) -> None:
    done = CliRunner().invoke(command, [str(chains), "--sequence", "captur"])

    assert done.exit_code == 2
    assert "did you mean `capture`" in done.output


def test_a_missing_or_broken_description_is_told(tmp_path: Path) -> None:
    (tmp_path / "broken.json").write_text("{}", encoding="latin-1")
    for name, slug in (("none.json", "file-unreadable"), ("broken.json", "description-unreadable")):
        with pytest.raises(DesignError) as caught:
            CliRunner().invoke(command, [str(tmp_path / name)], catch_exceptions=False)

        assert [item.slug for item in caught.value.diagnostics] == [slug]
