"""The convert command as a user runs it: files, screens, messages, exit codes."""

import contextlib
import gzip
import io
import json
import os
import subprocess
import sys
from pathlib import Path

import pytest
from designs import SMALL_LIB, flip_flops

from insertdft.cli import main


def run(*words: object, folder: Path) -> tuple[int, str, str]:
    """Run the command line in ``folder``; return exit code, output and messages."""
    out, err = io.StringIO(), io.StringIO()
    with (
        contextlib.chdir(folder),
        contextlib.redirect_stdout(out),
        contextlib.redirect_stderr(err),
        pytest.raises(SystemExit) as left,
    ):
        main.run([str(word) for word in words])
    assert "Traceback" not in out.getvalue() + err.getvalue()
    assert isinstance(left.value.code, int)
    return left.value.code, out.getvalue(), err.getvalue()


def run_apart(*words: object, folder: Path, seed: str = "0") -> int:
    """Run the command line as a process of its own; return the exit code."""
    done = subprocess.run(
        [sys.executable, "-m", "insertdft", *map(str, words)],
        cwd=folder,
        capture_output=True,
        check=False,
        env={**os.environ, "PYTHONHASHSEED": seed},
    )
    return done.returncode


@pytest.fixture
def netlist(tmp_path: Path) -> Path:
    path = tmp_path / "top.v"
    path.write_text(flip_flops(10))
    return path


def test_convert_writes_netlist_plan_and_chains(netlist: Path, tmp_path: Path) -> None:
    code, out, err = run(
        "convert", "top.v", "--lib", SMALL_LIB, "--chains", 3, "--out", "build", folder=tmp_path
    )

    assert (code, err) == (0, "")
    assert sorted(os.listdir(tmp_path / "build")) == ["chains.json", "plan.json", "top_scan.v"]
    assert "10 of 10 storage cells in 3 mux-d chains" in out
    assert "longest 4, shortest 3, lower bound 4" in out
    assert len(out.splitlines()) <= 24
    assert all(len(line) <= 120 for line in out.splitlines())


def test_json_says_the_same_for_machines(netlist: Path, tmp_path: Path) -> None:
    code, out, _ = run(
        "convert", "top.v", "--lib", SMALL_LIB, "--chains", 2, "--json", folder=tmp_path
    )

    data = json.loads(out)
    assert code == 0
    assert data["storage_cells"] == 10
    assert [chain["length"] for chain in data["chains"]] == [5, 5]
    assert data["area"]["after"] > data["area"]["before"]
    assert data["traced"] is True
    assert [Path(name).name for name in data["files"]] == ["top_scan.v", "plan.json", "chains.json"]


def test_the_written_netlist_traces_and_a_changed_one_does_not(
    netlist: Path, tmp_path: Path
) -> None:
    run("convert", "top.v", "--lib", SMALL_LIB, "--chains", 2, folder=tmp_path)
    words = ("--lib", SMALL_LIB, "--chains", "build/chains.json")
    good = run("trace", "build/top_scan.v", *words, folder=tmp_path)
    text = (tmp_path / "build/top_scan.v").read_text()
    assert ".SI(q3)" in text
    (tmp_path / "bad.v").write_text(text.replace(".SI(q3)", ".SI(q2)"))
    bad = run("trace", "bad.v", *words, folder=tmp_path)

    assert good[0] == 0
    assert bad[0] == 1
    assert "error, chain-" in bad[2]


def test_trace_finds_chains_without_a_description(netlist: Path, tmp_path: Path) -> None:
    run("convert", "top.v", "--lib", SMALL_LIB, "--chains", 2, folder=tmp_path)
    code, out, _ = run(
        "trace", "build/top_scan.v", "--lib", SMALL_LIB, "--out", "found", folder=tmp_path
    )

    assert code == 0
    assert "2 chains found" in out
    made = json.loads((tmp_path / "build/chains.json").read_text())["chains"]
    found = json.loads((tmp_path / "found/chains.json").read_text())["chains"]
    assert found == made


def test_trace_of_a_netlist_without_scan_says_so(netlist: Path, tmp_path: Path) -> None:
    code, _, err = run("trace", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert code == 1
    assert "error, chains-not-found" in err


def test_survey_changes_nothing_and_prints_facts(netlist: Path, tmp_path: Path) -> None:
    code, out, _ = run("survey", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert code == 0
    assert "10 storage cells among 21 instances" in out
    assert os.listdir(tmp_path) == ["top.v"]


def test_an_options_file_holds_the_same_options_and_flags_win(
    netlist: Path, tmp_path: Path
) -> None:
    (tmp_path / "insertdft.toml").write_text(
        f'netlist = ["top.v"]\nlib = ["{SMALL_LIB}"]\nchains = 2\n[ports]\nscan_in = "si"\n'
        '[convert]\nout = "from_file"\n'
    )
    run("convert", folder=tmp_path)
    code, out, _ = run("convert", "--chains", 5, "--out", "flags", folder=tmp_path)

    first = json.loads((tmp_path / "from_file/chains.json").read_text())["chains"]
    assert [chain["scan_in"] for chain in first] == ["si_1", "si_2"]
    assert code == 0
    assert "in 5 mux-d chains" in out


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("chians = 2\n", "did you mean `chains`"),
        ("chains = \n", "cannot be used as options file"),
        ("[twins]\nDFF = 3\n", "must map names to names"),
    ],
)
def test_a_wrong_options_file_is_refused(
    netlist: Path, tmp_path: Path, text: str, words: str
) -> None:
    (tmp_path / "insertdft.toml").write_text(text)
    code, _, err = run("convert", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert code == 1
    assert words in err


def test_an_options_file_that_is_named_but_missing_is_refused(tmp_path: Path) -> None:
    code, _, err = run("survey", "--options", "no.toml", folder=tmp_path)

    assert code == 1
    assert "options-unreadable" in err


def test_a_plan_can_be_edited_and_carried_out(netlist: Path, tmp_path: Path) -> None:
    run("convert", "top.v", "--lib", SMALL_LIB, "--out", "a", folder=tmp_path)
    plan = (tmp_path / "a/plan.json").read_text()
    first, second = '["r3", 0, "cell"]', '["r4", 0, "cell"]'
    assert first in plan
    swapped = plan.replace(first, "@").replace(second, first).replace("@", second)
    (tmp_path / "edited.json").write_text(swapped)
    words = ("convert", "top.v", "--lib", SMALL_LIB, "--plan", "edited.json", "--out", "b")
    code, _, _ = run(*words, folder=tmp_path)

    cells = json.loads((tmp_path / "b/chains.json").read_text())["chains"][0]["cells"]
    assert code == 0
    assert [cell["instance"] for cell in cells[2:6]] == ["r2", "r4", "r3", "r5"]


def test_gzip_input_gives_plain_output(netlist: Path, tmp_path: Path) -> None:
    (tmp_path / "packed.v.gz").write_bytes(gzip.compress(netlist.read_bytes()))
    code, _, _ = run("convert", "packed.v.gz", "--lib", SMALL_LIB, folder=tmp_path)

    assert code == 0
    assert (tmp_path / "build/packed_scan.v").read_text().startswith("module top")


def test_two_runs_give_the_same_bytes_whatever_the_hash_seed(netlist: Path, tmp_path: Path) -> None:
    for seed in ("1", "77"):
        words = ("convert", "top.v", "--lib", SMALL_LIB, "--chains", 3, "--out", seed)
        assert run_apart(*words, folder=tmp_path, seed=seed) == 0

    for name in ("top_scan.v", "plan.json", "chains.json"):
        assert (tmp_path / "1" / name).read_bytes() == (tmp_path / "77" / name).read_bytes()


def test_an_input_is_never_overwritten(netlist: Path, tmp_path: Path) -> None:
    (tmp_path / "top_scan.v").write_text(flip_flops(3))
    before = (tmp_path / "top_scan.v").read_text()
    words = ("convert", "top.v", "top_scan.v", "--lib", SMALL_LIB, "--out", ".", "--top", "top")
    code, _, err = run(*words, folder=tmp_path)
    assert code == 1
    assert "module-duplicate" in err

    (tmp_path / "top_scan.v").write_text(before.replace("module top", "module other"))
    before = (tmp_path / "top_scan.v").read_text()
    code, _, err = run(*words, folder=tmp_path)
    assert code == 1
    assert "output-exists-as-input" in err
    assert (tmp_path / "top_scan.v").read_text() == before
    assert not (tmp_path / "plan.json").exists()


def test_a_folder_that_cannot_be_written_is_reported(netlist: Path, tmp_path: Path) -> None:
    (tmp_path / "build").write_text("a file where the folder should be")
    code, _, err = run("convert", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert code == 1
    assert "output-unwritable" in err
    assert "--out" in err


def test_a_full_disk_leaves_nothing_half_written(netlist: Path, tmp_path: Path) -> None:
    # A limit on the size of any file stands in for the full disk: writes fail in the middle.
    script = (
        "import resource, signal, sys; signal.signal(signal.SIGXFSZ, signal.SIG_IGN);"
        "resource.setrlimit(resource.RLIMIT_FSIZE, (1500, 1500));"
        "from insertdft.cli.main import run; run()"
    )
    words = ["convert", "top.v", "--lib", str(SMALL_LIB), "--out", "build"]
    done = subprocess.run(
        [sys.executable, "-c", script, *words],
        cwd=tmp_path,
        capture_output=True,
        text=True,
        check=False,
        env={**os.environ, "PYTHONDONTWRITEBYTECODE": "1"},
    )

    assert done.returncode == 1
    assert "output-unwritable" in done.stderr
    assert os.listdir(tmp_path / "build") == []


BAD = {
    "missing": (None, "file-unreadable"),
    "empty": ("", "netlist-empty"),
    "binary": ("\x7fELF\x00\x00\x01", "not-text"),
    "truncated": (flip_flops(3)[:-60], "netlist-truncated"),
    "behavioural": (
        "module top(c); input c; reg q;\n  always @(posedge c) q <= 1;\nendmodule",
        "netlist-behavioural",
    ),
    "two drivers": (
        flip_flops(2).replace("BUF out", "BUF also (.A(a), .Y(q0));\n  BUF out"),
        "net-two-drivers",
    ),
    "width": (
        "module m(d); input [3:0] d; endmodule\n"
        "module top(a); input [1:0] a; m u (.d(a)); endmodule",
        "width-mismatch",
    ),
    "cycle": (
        "module a(); b u (); endmodule\nmodule b(); a u (); endmodule",
        "module-cycle",
    ),
    "duplicate": (flip_flops(1) + flip_flops(1), "module-duplicate"),
    "no storage": (
        "module top(a, y); input a; output y; BUF b (.A(a), .Y(y)); endmodule",
        "no-storage",
    ),
    "unknown pin": (flip_flops(1).replace(".CK(clk)", ".CLK(clk)"), "pin-unknown"),
}


@pytest.mark.parametrize("name", BAD)
def test_bad_netlists_end_in_a_message_with_place_and_mend(name: str, tmp_path: Path) -> None:
    text, slug = BAD[name]
    if text is not None:
        (tmp_path / "top.v").write_text(text, encoding="latin-1")
    code, out, err = run("convert", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert (code, out) == (1, "")
    assert f"error, {slug}" in err
    assert "to mend: " in err
    if slug not in ("file-unreadable", "netlist-empty", "not-text", "no-storage"):
        assert err.startswith("top.v:"), err
    assert not (tmp_path / "build").exists()


def test_an_unknown_cell_is_kept_as_a_black_box_and_reported(tmp_path: Path) -> None:
    text = flip_flops(2).replace("endmodule", "  RAM mem (.A(q0), .Q());\nendmodule")
    (tmp_path / "top.v").write_text(text)
    code, _, err = run("convert", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert code == 0
    assert "warning, cell-unknown" in err
    assert "RAM mem (.A(q0), .Q());" in (tmp_path / "build/top_scan.v").read_text()


@pytest.mark.parametrize(
    ("text", "slug"),
    [
        ("library (x) {\n  cell (A) {\n    area : ;;\n", "library-syntax"),
        ("library (x) { }\n", "library-empty"),
    ],
)
def test_bad_libraries_end_in_a_message(
    netlist: Path, tmp_path: Path, text: str, slug: str
) -> None:
    (tmp_path / "x.lib").write_text(text)
    code, _, err = run("convert", "top.v", "--lib", "x.lib", folder=tmp_path)

    assert code == 1
    assert f"error, {slug}" in err


def test_a_library_with_neither_mux_nor_scan_cell_says_what_is_missing(
    netlist: Path, tmp_path: Path
) -> None:
    (tmp_path / "x.lib").write_text(
        "library (x) { cell (DFF) { area : 1; "
        'ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; } '
        "pin (D) { direction : input; } pin (CK) { direction : input; } "
        'pin (Q) { direction : output; function : "IQ"; } } '
        "cell (BUF) { area : 1; pin (A) { direction : input; } "
        'pin (Y) { direction : output; function : "A"; } } }\n'
    )
    text = netlist.read_text().replace("NAND2", "RAM")
    netlist.write_text(text)
    code, _, err = run("convert", "top.v", "--lib", "x.lib", folder=tmp_path)

    assert code == 1
    assert "error, nothing-to-convert" in err
    assert "neither a mux nor NAND gates and an inverter" in err


@pytest.mark.parametrize(
    "words",
    [
        ("convert", "--chains", "0"),
        ("convert", "--style", "nothing"),
        ("convert", "--hold", "a=2"),
        ("convert", "--port", "scan_in"),
        ("nothing",),
        ("convert", "--nothing"),
    ],
)
def test_wrong_usage_leaves_with_2(netlist: Path, tmp_path: Path, words: tuple[str, ...]) -> None:
    extra = ("top.v", "--lib", SMALL_LIB) if words[0] == "convert" else ()
    code, _, err = run(*words, *extra, folder=tmp_path)

    assert code == 2
    assert err


@pytest.mark.parametrize("words", [("convert", "--lib", "x.lib"), ("convert", "top.v")])
def test_a_missing_netlist_or_library_is_wrong_usage(
    netlist: Path, tmp_path: Path, words: tuple[str, ...]
) -> None:
    code, _, err = run(*words, folder=tmp_path)

    assert code == 2
    assert "Error: " in err


def test_help_shows_an_example() -> None:
    for command in ("convert", "survey", "trace"):
        code, out, _ = run(command, "--help", folder=Path.cwd())
        assert code == 0
        assert f"insertdft {command} " in out


def test_nothing_is_shown_of_progress_in_a_pipe(netlist: Path, tmp_path: Path) -> None:
    _, _, err = run("convert", "top.v", "--lib", SMALL_LIB, folder=tmp_path)

    assert err == ""


def test_a_defect_of_ours_is_one_line_and_a_report_file(netlist: Path, tmp_path: Path) -> None:
    script = (
        "import sys; import insertdft.api as api\n"
        "def broken(*_, **__): raise ZeroDivisionError('planted')\n"
        "api.convert = broken\n"
        "from insertdft.cli.main import run; run()"
    )
    words = ["convert", "top.v", "--lib", str(SMALL_LIB)]
    done = subprocess.run(
        [sys.executable, "-c", script, *words],
        cwd=tmp_path,
        capture_output=True,
        text=True,
        check=False,
        env={**os.environ, "TMPDIR": str(tmp_path)},
    )

    assert done.returncode == 3
    assert "Traceback" not in done.stderr
    [report] = tmp_path.glob("insertdft-*.txt")
    assert "planted" in report.read_text()
