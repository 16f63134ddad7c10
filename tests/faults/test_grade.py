"""Fault simulation against simulation of one fault at a time."""

import numpy as np
import pytest
from circuits import Gates, design_of, random_gates, read_bench
from one_at_a_time import OneAtATime
from outside import outside

from insertdft.faults.access import full_access, scan_access
from insertdft.faults.collapse import FaultList, make_faults
from insertdft.faults.grade import Grade, Grader, grade_patterns, grade_random, sample
from insertdft.faults.observe import TOGETHER
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.words import random_words


def graded(
    gates: Gates, scanned: float, seed: int, together: int = TOGETHER
) -> tuple[Grade, list[int]]:
    """Return what the product and the reference say, for a share of scanned flip-flops."""
    design = design_of(gates.verilog())
    circuit = make_circuit(design)
    faults = make_faults(circuit)
    chance = np.random.default_rng(seed)
    flops = circuit.states.instance.tolist()
    control = [i for i in flops if chance.random() < scanned]
    observe = [i for i in control if chance.random() < 0.9] if scanned < 1 else control
    access = scan_access(circuit, control, observe, {"clk": 0})
    bits = random_words(chance, (len(access.free), 3))
    grader = Grader(faults, access, together=together)
    grader.apply(bits, 150)
    return (
        grader.result(),
        OneAtATime(gates, access, bits, 150).detected_at(faults),
    )


@pytest.mark.parametrize("scanned", [1.0, 0.5, 0.0])
@pytest.mark.parametrize("seed", range(6))
def test_each_fault_is_first_detected_where_it_is_alone(seed: int, scanned: float) -> None:
    gates = random_gates(seed, inputs=6, flops=8, gates=90, outputs=2)

    grade, reference = graded(gates, scanned, seed)

    assert grade.detected_at.tolist() == reference
    assert 0 < grade.detected < grade.faults.collapsed


@pytest.mark.parametrize("together", [1, 5, 40])
@pytest.mark.parametrize("scanned", [1.0, 0.6])
@pytest.mark.parametrize("seed", [21, 22, 23])
def test_what_is_known_of_a_joint_may_be_used_before_it(
    seed: int, scanned: float, together: int
) -> None:
    gates = random_gates(seed, inputs=8, flops=10, gates=150, outputs=1)

    grade, reference = graded(gates, scanned, seed, together)

    assert grade.detected_at.tolist() == reference


@pytest.mark.parametrize("name", ["c432", "s298", "s820"])
def test_benchmark_faults_are_first_detected_where_they_are_alone(name: str) -> None:
    gates = read_bench(outside("bench", f"{name}.bench").read_text(encoding="utf-8"))

    grade, reference = graded(gates, 1.0, 1)

    assert grade.detected_at.tolist() == reference


def test_the_comparison_notices_a_fault_moved_to_another_line() -> None:
    gates = random_gates(1, inputs=6, flops=8, gates=90, outputs=2)
    grade, reference = graded(gates, 1.0, 1)
    name = list(gates.gates)[40]
    kind, terms = gates.gates[name]
    other = "or" if kind not in ("or", "nor") else "and"
    changed = Gates(gates.inputs, gates.outputs, gates.flops, {**gates.gates, name: (other, terms)})

    again, _ = graded(changed, 1.0, 1)

    assert grade.detected_at.tolist() == reference
    assert again.detected_at.tolist() != reference


def test_classes_are_detected_as_one() -> None:
    gates = random_gates(5, inputs=6, flops=8, gates=90, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    access = full_access(circuit, {"clk": 0})
    apart = FaultList(
        faults.sites,
        np.arange(faults.total, dtype=np.int32),
        np.arange(faults.total, dtype=np.int32),
    )
    bits = random_words(np.random.default_rng(1), (len(access.free), 2))

    together = grade_patterns(faults, access, bits, 128)
    single = grade_patterns(apart, access, bits, 128)

    assert single.detected_at.tolist() == together.detected_at[faults.class_of].tolist()


def test_equal_seeds_give_equal_results_and_the_curve_ends_at_the_coverage() -> None:
    gates = random_gates(2, inputs=6, flops=8, gates=90, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    access = full_access(circuit, {"clk": 0})

    one, two, other = (grade_random(faults, access, 100, seed) for seed in (7, 7, 8))

    assert one.detected_at.tolist() == two.detected_at.tolist()
    assert one.detected_at.tolist() != other.detected_at.tolist()
    curve = one.curve()
    assert len(curve) == 100
    assert (np.diff(curve) >= 0).all()
    assert curve[-1] == pytest.approx(one.coverage)
    assert one.detected_at.max() < 100


def test_a_sample_is_graded_as_in_the_whole() -> None:
    gates = random_gates(2, inputs=6, flops=8, gates=90, outputs=2)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    access = full_access(circuit, {"clk": 0})
    chosen = sample(faults, 40, seed=1)

    part = grade_random(faults, access, 128, 1, chosen)
    whole = grade_random(faults, access, 128, 1)

    assert len(chosen) == 40
    assert part.detected_at[chosen].tolist() == whole.detected_at[chosen].tolist()
    assert part.detected == (whole.detected_at[chosen] >= 0).sum()
