"""Every counterexample of mission mode shows in a simulator: both netlists, two values."""

import re
from pathlib import Path

import pytest
from icarus import run_icarus
from proof.conversions import Converted, conversion, read
from proof.planted import mistakes
from technologies import technology

from insertdft.proof.options import ProofOptions
from insertdft.proof.prove import prove
from insertdft.proof.result import Counterexample, Verdict
from insertdft.proof.witness import REPLAYED, witness_bench

#: Conversion -> every how many of its mistakes is replayed.
SOME = {
    "edges, mux-D": 3,
    "edges, clocked scan": 4,
    "edges, LSSD": 9,
    "pairs, LSSD": 4,
    "phases, LSSD": 9,
    "serv, mux-D composed": 600,
    "serv of latches, LSSD composed": 900,
}


def replayed(case: Converted, spoiled: str, item: Counterexample, folder: Path) -> list[str]:
    """Return what the bench prints on the original and on the spoiled netlist."""
    before, after = read(case.before, case.library), read(spoiled, case.library)
    bench = witness_bench(before, after, case.description, item, ProofOptions())
    assert bench is not None
    kit = technology(case.technology)
    (folder / "bench.v").write_text(bench, encoding="latin-1")
    found = []
    for name, text, flags in (("before", case.before, ()), ("after", spoiled, ("-DAFTER",))):
        (folder / f"{name}.v").write_text(text, encoding="latin-1")
        files = [folder / "bench.v", folder / f"{name}.v", *kit.model_files(folder)]
        lines = run_icarus(folder, files, "witness", (*kit.flags, *flags))
        found += [match[1] for line in lines if (match := re.match("witness: (.)", line))]
    return found


@pytest.mark.parametrize("name", SOME)
def test_a_simulator_shows_each_counterexample(name: str, tmp_path: Path) -> None:
    case = conversion(name)
    design = read(case.after, case.library)
    ports = [port.name for port in design.ports if port.direction == "input"][:3]
    shown = 0
    for number, mistake in enumerate(mistakes(case.before, case.after, design, ports)):
        if number % SOME[name]:
            continue
        proof = prove(
            read(case.before, case.library), read(mistake.text, case.library), case.description
        )
        assert proof.verdict is Verdict.REFUTED
        for item in [at for at in proof.counterexamples if at.kind in REPLAYED][:1]:
            values = replayed(case, mistake.text, item, tmp_path)

            assert values == [str(item.before), str(item.after)], (mistake.kind, mistake.where)
            shown += 1
    assert shown


def test_what_needs_a_sequence_has_no_bench() -> None:
    case = conversion("edges, mux-D")
    item = Counterexample("shift", "r0", "r0 does not shift")

    assert witness_bench(*case.designs, case.description, item, ProofOptions()) is None
