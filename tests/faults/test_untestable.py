"""Untestable faults: known counts, never detected, and every test found works."""

import pytest
from circuits import bench_text, design_of, random_gates, read_bench

from insertdft.faults.access import full_access, scan_access
from insertdft.faults.collapse import make_faults
from insertdft.faults.grade import grade_patterns, grade_random
from insertdft.faults.untestable import Verdict, as_words, prove_untestable
from insertdft.simulate.lower import make_circuit

#: Untestable collapsed faults under full scan: from a computation of our own in another language
#: (random patterns, then SAT), which agrees with published redundancy counts as remembered.
UNTESTABLE = {
    "c432": 4,
    "c499": 8,
    "c1355": 8,
    "c1908": 9,
    "s349": 2,
    "s400": 6,
    "s444": 14,
    "s526": 1,
    "s641": 0,
    "s713": 38,
    "s832": 14,
    "s1196": 0,
    "s1238": 69,
}


@pytest.mark.parametrize("name", UNTESTABLE)
def test_untestable_counts_of_the_benchmarks(name: str) -> None:
    circuit = make_circuit(design_of(read_bench(bench_text(name)).verilog()))
    faults, access = make_faults(circuit), full_access(circuit, {"clk": 0})
    left = grade_random(faults, access, 4000, seed=1).undetected().tolist()

    proofs = prove_untestable(faults, access, left)

    verdicts = [proof.verdict for proof in proofs.values()]
    assert verdicts.count(Verdict.UNTESTABLE) == UNTESTABLE[name]
    assert verdicts.count(Verdict.UNDECIDED) == 0
    words, count = as_words(proofs, access)
    hit = grade_patterns(faults, access, words, count).detected_at >= 0
    assert [bool(hit[number]) for number in left] == [v is Verdict.TESTABLE for v in verdicts]


@pytest.mark.parametrize("scanned", [1.0, 0.5])
@pytest.mark.parametrize("seed", range(3))
def test_every_verdict_on_random_circuits_agrees_with_simulation(seed: int, scanned: float) -> None:
    gates = random_gates(seed, inputs=5, flops=6, gates=70, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    flops = circuit.states.instance.tolist()
    kept = flops[: round(len(flops) * scanned)]
    faults, access = make_faults(circuit), scan_access(circuit, kept, kept, {"clk": 0})
    random = grade_random(faults, access, 4096, seed=seed)

    proofs = prove_untestable(faults, access, range(faults.collapsed))

    words, count = as_words(proofs, access)
    hit = grade_patterns(faults, access, words, count).detected_at >= 0
    for number, proof in proofs.items():
        assert hit[number] == (proof.verdict is Verdict.TESTABLE)
        if proof.verdict is Verdict.UNTESTABLE:
            assert random.detected_at[number] < 0
    assert any(proof.verdict is Verdict.UNTESTABLE for proof in proofs.values())


def test_a_redundant_gate_is_found_and_its_twin_without_redundancy_is_not() -> None:
    redundant = (
        "module top (a, b, y); input a, b; output y; wire n;"
        " and u1 (n, a, b); or u2 (y, a, n); endmodule"
    )
    needed = redundant.replace("or u2 (y, a, n)", "xor u2 (y, a, n)")
    counts = []
    for text in (redundant, needed):
        circuit = make_circuit(design_of(text))
        faults = make_faults(circuit)
        proofs = prove_untestable(faults, full_access(circuit, {}), range(faults.collapsed))
        counts.append(sum(p.verdict is Verdict.UNTESTABLE for p in proofs.values()))

    assert counts[0] > 0
    assert counts[1] == 0


def test_a_search_that_is_given_up_says_so() -> None:
    gates = random_gates(11, inputs=12, flops=0, gates=200, outputs=1)
    circuit = make_circuit(design_of(gates.verilog()))
    faults, access = make_faults(circuit), full_access(circuit, {"clk": 0})
    left = grade_random(faults, access, 2000, seed=1).undetected().tolist()

    proofs = prove_untestable(faults, access, left, give_up=1)

    assert any(proof.verdict is Verdict.UNDECIDED for proof in proofs.values())
