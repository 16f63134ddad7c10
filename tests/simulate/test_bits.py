"""Bit-parallel evaluation against a reference simulator of a few lines."""

import random

import numpy as np
import pytest
from circuits import Gates, design_of, random_gates, read_bench
from outside import outside

from insertdft.simulate.bits import Evaluator
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.words import Words, count_ones, pack, random_words, unpack


def as_int(words: Words) -> int:
    return int.from_bytes(words.astype("<u8").tobytes(), "little")


def outputs_both_ways(gates: Gates, rails: int) -> tuple[list[int], list[int]]:
    """Return outputs and flip-flop data of the product and of the reference, 128 patterns."""
    circuit = make_circuit(design_of(gates.verilog()))
    evaluator = Evaluator(circuit, rails)
    values = evaluator.blank(2)
    states = circuit.states
    sources = [circuit.inputs[name] for name in circuit.inputs if name != "clk"]
    words = random_words(np.random.default_rng(1), (len(sources) + len(states.slot), 2))
    evaluator.put(values, [*sources, *states.slot.tolist()], words)
    evaluator.run(values)
    mine = [as_int(values[0, slot]) for slot in circuit.outputs.values()]
    mine += [as_int(values[0, slot]) for slot in states.following.tolist()]

    names = [*gates.inputs, *gates.flops]
    ones = (1 << 128) - 1
    given = {name: as_int(word) for name, word in zip(names, words, strict=True)}
    reference = gates.simulate(given, ones)
    return mine, [reference[name] for name in (*gates.outputs, *gates.flops.values())]


@pytest.mark.parametrize("rails", [1, 2])
@pytest.mark.parametrize("seed", range(8))
def test_random_circuits_give_what_the_reference_gives(seed: int, rails: int) -> None:
    gates = random_gates(seed, inputs=9, flops=5, gates=120, outputs=4)

    mine, reference = outputs_both_ways(gates, rails)

    assert mine == reference


@pytest.mark.parametrize("name", ["c432", "c880", "c1908", "s1196", "s27"])
def test_benchmark_circuits_give_what_the_reference_gives(name: str) -> None:
    text = outside("bench", f"{name}.bench").read_text(encoding="utf-8")

    mine, reference = outputs_both_ways(read_bench(text), rails=1)

    assert mine == reference


def test_the_comparison_sees_a_wrong_gate() -> None:
    gates = random_gates(0, inputs=9, flops=5, gates=120, outputs=4)
    name = gates.outputs[0]
    kind, terms = gates.gates[name]
    other = {"and": "nand", "nand": "and", "or": "nor", "nor": "or"}.get(kind, "nand")
    mine, _ = outputs_both_ways(gates, rails=1)

    wrong = Gates(gates.inputs, gates.outputs, gates.flops, {**gates.gates, name: (other, terms)})

    assert outputs_both_ways(wrong, rails=1)[0] != mine


def test_an_unknown_input_is_unknown_only_where_it_matters() -> None:
    circuit = make_circuit(
        design_of(
            "module top (a, x, f, g, h); input a, x; output f, g, h;"
            " and u1 (f, a, x); xor u2 (g, a, x); or u3 (h, a, x); endmodule"
        )
    )
    evaluator = Evaluator(circuit, 2)
    values = evaluator.blank(1)

    evaluator.put(values, [circuit.inputs["a"]], pack(np.array([[False, True]])))
    evaluator.run(values)

    ones, zeros = (
        {name: as_int(rail[slot]) & 3 for name, slot in circuit.outputs.items()} for rail in values
    )
    assert ones == {"f": 0b00, "g": 0b00, "h": 0b10}
    assert zeros == {"f": 0b01, "g": 0b00, "h": 0b00}


def test_library_cells_with_two_outputs_and_with_a_mux() -> None:
    circuit = make_circuit(
        design_of(
            "module top (a, b, c, s, k, y, z); input a, b, c; output s, k, y, z;"
            " FA u1 (.A(a), .B(b), .C(c), .S(s), .CO(k));"
            " MUX u2 (.A(a), .B(b), .S(c), .Y(y));"
            " AOI21 u3 (.A(a), .B(b), .C(c), .Y(z)); endmodule"
        )
    )
    evaluator = Evaluator(circuit, 1)
    values = evaluator.blank(1)
    patterns = np.array([[p >> i & 1 for p in range(8)] for i in range(3)], np.bool_)

    evaluator.put(values, [circuit.inputs[name] for name in "abc"], pack(patterns))
    evaluator.run(values)

    found = {name: unpack(values[0, slot], 8).tolist() for name, slot in circuit.outputs.items()}
    for p in range(8):
        a, b, c = p & 1, p >> 1 & 1, p >> 2 & 1
        assert found["s"][p] == (a + b + c) % 2
        assert found["k"][p] == (a + b + c) // 2
        assert found["y"][p] == (b if c else a)
        assert found["z"][p] == (not ((a and b) or c))


def test_a_bus_says_what_its_active_driver_says_and_is_unknown_when_idle() -> None:
    circuit = make_circuit(
        design_of(
            "module top (a, b, e, f, y, p); input a, b, e, f; output y, p;"
            " TBUF u1 (.A(a), .E(e), .Y(y)); TBUF u2 (.A(b), .E(f), .Y(y));"
            " TBUF u3 (.A(a), .E(e), .Y(p)); pullup u4 (p); endmodule"
        )
    )
    evaluator = Evaluator(circuit, 2)
    values = evaluator.blank(1)
    for name, bits in {"a": [1, 0, 1], "b": [0, 1, 1], "e": [1, 0, 0], "f": [0, 1, 0]}.items():
        evaluator.put(values, [circuit.inputs[name]], pack(np.array([bits], np.bool_)))

    evaluator.run(values)

    ones, zeros = (
        {name: as_int(rail[slot]) & 7 for name, slot in circuit.outputs.items()} for rail in values
    )
    assert ones == {"y": 0b011, "p": 0b111}
    assert zeros == {"y": 0b000, "p": 0b000}


def test_packing_and_counting_lose_nothing() -> None:
    chance = random.Random(1)  # noqa: S311
    bits = np.array([[chance.random() < 0.5 for _ in range(131)] for _ in range(3)])

    words = pack(bits)

    assert words.shape == (3, 3)
    assert (unpack(words, 131) == bits).all()
    assert count_ones(words).tolist() == bits.sum(axis=1).tolist()
