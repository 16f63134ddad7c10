"""Sequential fault simulation against one faulty machine at a time."""

import numpy as np
import pytest
from circuits import Gates, design_of, random_gates
from one_at_a_time import Pair, place_of, simulate

from insertdft.faults.access import full_access
from insertdft.faults.collapse import FaultList, make_faults
from insertdft.faults.grade import grade_random, sample
from insertdft.faults.unscanned import grade_unscanned
from insertdft.simulate.lower import make_circuit


def vectors(faults: FaultList, gates: Gates, cycles: int, seed: int) -> list[dict[str, Pair]]:
    """Return the vectors that the product's documented generator makes, as pairs."""
    generator = np.random.default_rng(seed)
    rows = [generator.integers(0, 2, len(gates.inputs)).tolist() for _ in range(cycles)]
    return [
        {name: (value, 1 - value) for name, value in zip(gates.inputs, row, strict=True)}
        for row in rows
    ]


def detected_at(
    faults: FaultList, gates: Gates, order: list[str], fault: int, rows: list[dict[str, Pair]]
) -> int:
    """Return the first cycle in which an output is known to be wrong."""
    stem, branch, end, stuck = place_of(gates, faults, fault, 1)
    good: dict[str, Pair] = dict.fromkeys(gates.flops, (0, 0))
    bad = dict(good)
    for cycle, row in enumerate(rows):
        right = simulate(gates, order, {**row, **good}, {}, {})
        wrong = simulate(gates, order, {**row, **bad}, stem, branch)
        for number, name in enumerate(gates.outputs):
            one, zero = right[name]
            bad_one, bad_zero = stuck if end == f"po_{number}" else wrong[name]
            if one & bad_zero | zero & bad_one:
                return cycle
        good = {state: right[data] for state, data in gates.flops.items()}
        bad = {
            state: stuck if end == f"f{number}" else wrong[data]
            for number, (state, data) in enumerate(gates.flops.items())
        }
    return -1


@pytest.mark.parametrize("seed", range(4))
def test_each_fault_is_first_detected_where_it_is_alone(seed: int) -> None:
    gates = random_gates(seed, inputs=6, flops=5, gates=70, outputs=2)
    faults = make_faults(make_circuit(design_of(gates.verilog())))
    chosen = np.arange(faults.collapsed, dtype=np.int32)

    found = grade_unscanned(faults, 25, seed, chosen, held={"clk": 0})

    rows = vectors(faults, gates, 25, seed)
    order, first = gates.order(), faults.first.tolist()
    expected = [detected_at(faults, gates, order, fault, rows) for fault in first]
    assert found.detected_at.tolist() == expected
    assert 0 < found.coverage < 1
    assert found.error == 0


def test_scan_finds_more_than_the_ports_alone() -> None:
    gates = random_gates(2, inputs=6, flops=12, gates=150, outputs=1)
    circuit = make_circuit(design_of(gates.verilog()))
    faults = make_faults(circuit)
    chosen = np.arange(faults.collapsed, dtype=np.int32)

    without = grade_unscanned(faults, 100, 1, chosen, held={"clk": 0})

    assert (
        without.coverage < grade_random(faults, full_access(circuit, {"clk": 0}), 100, 1).coverage
    )


def test_a_sample_estimates_the_whole_within_its_stated_error() -> None:
    gates = random_gates(4, inputs=6, flops=12, gates=300, outputs=4)
    faults = make_faults(make_circuit(design_of(gates.verilog())))
    every = np.arange(faults.collapsed, dtype=np.int32)

    part = grade_unscanned(faults, 30, 1, sample(faults, 200, 3), held={"clk": 0})
    whole = grade_unscanned(faults, 30, 1, every, held={"clk": 0})

    assert part.error > 0
    assert abs(part.coverage - whole.coverage) <= part.error


def test_states_that_are_never_reset_stay_unknown_and_a_reset_helps() -> None:
    text = (
        "module top (c, r, d, q); input c, r, d; output q; wire n, m;"
        " xor u1 (n, q, d); DFFR f (.D(n), .CK(c), .R(r), .Q(q)); endmodule"
    )
    faults = make_faults(make_circuit(design_of(text)))
    every = np.arange(faults.collapsed, dtype=np.int32)

    never = grade_unscanned(faults, 30, 1, every, held={"c": 0, "r": 1})
    reset = grade_unscanned(faults, 30, 1, every, held={"c": 0}, start={"r": 0})

    assert never.coverage < 0.5
    assert reset.coverage > never.coverage
