"""Fault simulation beside an independent simulator, on the same circuit, in one run.

    python tests/benchmarks/faults.py [--gates 20000] [--patterns 1024] [--bench FILE]

The other simulator is kyupy 0.0.5 (MIT; installed with numba into a virtual environment of its own
in a temporary folder, or take one that has it with --python). It simulates one injected fault a
run, so its rate for faults is measured on a few and compared as a rate. Printed: evaluations of
gates per second, fault-free; and (fault, gate, pattern) combinations decided per second. Ours
decides most of them without touching the gate, by regions and dropped faults; that is its point.
"""

import argparse
import json
import random
import subprocess
import sys
import tempfile
import time
import venv
from pathlib import Path

import numpy as np

sys.path.insert(0, str(Path(__file__).parents[1]))
from circuits import Gates, design_of, random_gates, read_bench

from insertdft.faults.access import full_access
from insertdft.faults.collapse import make_faults
from insertdft.faults.grade import grade_random
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.words import random_words

OTHER = """
import json, sys, time
import numpy as np
from kyupy import bench, logic
from kyupy.logic_sim import LogicSim
patterns, some = int(sys.argv[2]), int(sys.argv[3])
circuit = bench.parse(open(sys.argv[1]).read())
sim = LogicSim(circuit, patterns, m=2)
bits = np.random.default_rng(1).integers(0, 2, (len(circuit.s_nodes), patterns)).astype(np.uint8)
sim.s[0] = logic.mv_to_bp(bits * 3)
sim.s_to_c(); sim.c_prop()  # compiles
begin = time.perf_counter()
for _ in range(5):
    sim.c_prop()
plain = (time.perf_counter() - begin) / 5
lines = [int(line) for line in sim.ops[:, 1]]
step = max(1, len(lines) // some)
begin = time.perf_counter()
for line in lines[::step]:
    sim.c_prop(fault_line=line, fault_model=0)
one = (time.perf_counter() - begin) / len(lines[::step])
print(json.dumps({"plain": plain, "one": one}))
"""


def main() -> None:
    """Run both and print a table."""
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--gates", type=int, default=20_000)
    parser.add_argument("--patterns", type=int, default=1024)
    parser.add_argument("--bench", type=Path)
    parser.add_argument("--python", type=Path, help="an interpreter that can import kyupy")
    asked = parser.parse_args()
    if asked.bench:
        gates = narrow(read_bench(asked.bench.read_text(encoding="utf-8")))
    else:
        gates = shallow_gates(asked.gates)
    with tempfile.TemporaryDirectory() as folder:
        python = asked.python or make_environment(Path(folder, "venv"))
        path = Path(folder, "circuit.bench")
        path.write_text(bench_text(gates), encoding="utf-8")
        other = run_other(python, path, asked.patterns)
    report(gates, asked.patterns, other, run_ours(gates, asked.patterns))


def shallow_gates(count: int) -> Gates:
    """Return blocks of random logic side by side, as deep as real netlists are."""
    blocks = [random_gates(seed, 24, 40, 500, 8) for seed in range(max(1, count // 500))]
    chance = random.Random(1)  # noqa: S311
    flops = [f"b{b}{name}" for b, block in enumerate(blocks) for name in block.flops]

    def named(number: int, name: str) -> str:
        # Inputs of a block come from flip-flops of any block.
        return chance.choice(flops) if name[0] == "i" else f"b{number}{name}"

    return Gates(
        inputs=("in",),
        outputs=tuple(f"b{b}{name}" for b, block in enumerate(blocks) for name in block.outputs),
        flops={
            f"b{b}{name}": f"b{b}{data}"
            for b, block in enumerate(blocks)
            for name, data in block.flops.items()
        },
        gates={
            f"b{b}{name}": (kind, tuple(named(b, term) for term in terms))
            for b, block in enumerate(blocks)
            for name, (kind, terms) in block.gates.items()
        },
    )


def narrow(gates: Gates) -> Gates:
    """Split gates of more than four inputs: the other simulator ignores the fifth (0.0.5)."""
    found: dict[str, tuple[str, tuple[str, ...]]] = {}
    for name, (kind, every) in gates.gates.items():
        terms, part = every, 0
        while len(terms) > 4:
            core = {"nand": "and", "nor": "or", "xnor": "xor"}.get(kind, kind)
            found[f"{name}_w{part}"] = (core, terms[:4])
            terms, part = (f"{name}_w{part}", *terms[4:]), part + 1
        found[name] = (kind, terms)
    return Gates(gates.inputs, gates.outputs, gates.flops, found)


def bench_text(gates: Gates) -> str:
    """Return the circuit as .bench text."""
    lines = [f"INPUT({name})" for name in gates.inputs]
    lines += [f"OUTPUT({name})" for name in dict.fromkeys(gates.outputs)]
    lines += [f"{name} = DFF({data})" for name, data in gates.flops.items()]
    lines += [
        f"{name} = {'BUFF' if kind == 'buf' else kind.upper()}({', '.join(terms)})"
        for name, (kind, terms) in gates.gates.items()
    ]
    return "\n".join(lines) + "\n"


def make_environment(folder: Path) -> Path:
    """Install the other simulator into an environment of its own; return its interpreter."""
    venv.create(folder, with_pip=True)
    python = folder / "bin" / "python"
    wanted = ["kyupy==0.0.5", "numpy<2", "numba"]
    subprocess.run([python, "-m", "pip", "install", "--quiet", *wanted], check=True)
    return python


def run_other(python: Path, path: Path, patterns: int) -> dict[str, float]:
    """Return seconds for all patterns: fault-free, and for one fault."""
    command = [python, "-c", OTHER, path, str(patterns), "40"]
    done = subprocess.run(command, check=True, capture_output=True, text=True)
    found: dict[str, float] = json.loads(done.stdout.splitlines()[-1])
    return found


def run_ours(gates: Gates, patterns: int) -> dict[str, float]:
    """Return seconds for all patterns: fault-free, and for all faults; and their number."""
    circuit = make_circuit(design_of(gates.verilog()))
    faults, access = make_faults(circuit), full_access(circuit, {"clk": 0})
    evaluator = Evaluator(circuit, 1)
    values = evaluator.blank(-(-patterns // 64))
    words = random_words(np.random.default_rng(1), (len(access.free), values.shape[-1]))
    evaluator.put(values, access.free, words)
    evaluator.run(values)
    begin = time.perf_counter()
    for _ in range(5):
        evaluator.run(values)
    plain = (time.perf_counter() - begin) / 5
    begin = time.perf_counter()
    grade = grade_random(faults, access, patterns, seed=1)
    every = time.perf_counter() - begin
    return {
        "plain": plain,
        "every": every,
        "faults": faults.collapsed,
        "coverage": grade.coverage,
        "depth": circuit.depth,
    }


def report(gates: Gates, patterns: int, other: dict[str, float], ours: dict[str, float]) -> None:
    """Print both rates."""
    work = len(gates.gates) * patterns
    print(f"{len(gates.gates)} gates, depth {ours['depth']:.0f}, {patterns} patterns")
    for name, plain in (("kyupy 0.0.5", other["plain"]), ("insertdft", ours["plain"])):
        print(f"  {name:12} fault-free {work / plain:10.3e} gate evaluations a second")
    one = ours["every"] / ours["faults"]
    for name, seconds in (("kyupy 0.0.5", other["one"]), ("insertdft", one)):
        print(f"  {name:12} faults     {work / seconds:10.3e} fault-gate-patterns a second")
    print(
        f"  {ours['faults']:.0f} collapsed faults in {ours['every']:.2f} s, coverage"
        f" {ours['coverage']:.2%}; ratio to the other simulator {other['one'] / one:.0f}"
    )


if __name__ == "__main__":
    main()
