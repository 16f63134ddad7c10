"""Times reading at several sizes, flat and in blocks, beside two other readers.

    python tests/benchmarks/read.py [--sizes 10000 100000] [--layout lines] [--skip-others]

Every row is a process of its own. Seconds are those the processor worked, of reading alone, the
text being in memory already; memory is the peak of the process less what it had before it read.
"""

import argparse
import subprocess
import sys
import tempfile
from pathlib import Path

HERE = Path(__file__).parent
MEASURE = """
import resource, sys, time
{prepare}
def peak(): return resource.getrusage(resource.RUSAGE_SELF).ru_maxrss / 1024
before, start = peak(), time.process_time()
result = {read}
print(time.process_time() - start, peak() - before)
"""
READERS = {
    "insertdft": (
        "from insertdft.source import read_netlist, read_sources\n"
        "sources = read_sources(sys.argv[1:])",
        "read_netlist(sources)",
    ),
    "str.split": (
        "text = open(sys.argv[1], encoding='latin-1').read()",
        "text.split()",
    ),
    "pyslang parse": (
        "from pyslang.syntax import SyntaxTree",
        "SyntaxTree.fromFile(sys.argv[1])",
    ),
}


def main() -> None:
    """Generate netlists and print one row a reader and size."""
    parser = argparse.ArgumentParser(description=__doc__.partition("\n")[0])
    parser.add_argument("--sizes", type=int, nargs="+", default=[10_000, 100_000])
    parser.add_argument("--layout", choices=("lines", "dense"), default="lines")
    parser.add_argument("--profile", choices=("full", "clean", "gates"), default="full")
    parser.add_argument("--skip-others", action="store_true")
    asked = parser.parse_args()
    names = ["insertdft"] if asked.skip_others else list(READERS)
    print(f"{'reader':14} {'shape':7} {'instances':>10} {'seconds':>8} {'us each':>8} {'MB':>6}")
    with tempfile.TemporaryDirectory() as folder:
        path = Path(folder, "top.v")
        for size in asked.sizes:
            for shape in ("blocks", "flat"):
                _generate(path, size, shape, asked)
                for name in names:
                    seconds, megabytes = _measure(name, path)
                    each = seconds / size * 1e6
                    row = f"{name:14} {shape:7} {size:10,} {seconds:8.2f} {each:8.1f}"
                    print(f"{row} {megabytes:6.0f}", flush=True)


def _generate(path: Path, size: int, shape: str, asked: argparse.Namespace) -> None:
    words = [str(size), str(path), "--layout", asked.layout, "--profile", asked.profile]
    words += ["--flat"] if shape == "flat" else []
    subprocess.run([sys.executable, str(HERE / "netlist_generator.py"), *words], check=True)


def _measure(name: str, path: Path) -> tuple[float, float]:
    prepare, read = READERS[name]
    code = MEASURE.format(prepare=prepare, read=read)
    done = subprocess.run(
        [sys.executable, "-c", code, str(path)], capture_output=True, text=True, check=True
    )
    seconds, megabytes = map(float, done.stdout.split())
    return seconds, megabytes


if __name__ == "__main__":
    main()
