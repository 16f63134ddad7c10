"""The graph against truth tables, the solver and the patterns against counting."""

import numpy as np
from hypothesis import given, settings
from hypothesis import strategies as st

from insertdft.proof.aig import FALSE, TRUE, Aig, Lits, cone, read, simulate
from insertdft.proof.sat import decide

COLUMNS = (0xAAAA, 0xCCCC, 0xF0F0, 0xFF00)
ONES = 0xFFFF

#: One operation: which, and two operands with inversions.
Operation = tuple[int, int, bool, int, bool]
OPERATIONS = st.lists(
    st.tuples(
        st.integers(0, 3), st.integers(0, 40), st.booleans(), st.integers(0, 40), st.booleans()
    ),
    min_size=1,
    max_size=40,
)


def one(lit: int) -> Lits:
    return np.array([lit], np.int32)


def built(operations: list[Operation]) -> tuple[Aig, list[int], list[int]]:
    """Return a graph, its literals, and the truth table of each."""
    aig = Aig()
    lits = [FALSE, TRUE, *aig.variables(4).tolist()]
    tables = [0, ONES, *COLUMNS]
    for which, first, turn_first, second, turn_second in operations:
        a, b = first % len(lits), second % len(lits)
        left, right = lits[a] ^ turn_first, lits[b] ^ turn_second
        x, y = tables[a] ^ ONES * turn_first, tables[b] ^ ONES * turn_second
        make = (aig.conj, aig.disj, aig.parity)[which % 3]
        lits.append(int(make(one(left), one(right))[0]))
        tables.append((x & y, x | y, x ^ y)[which % 3])
    return aig, lits, tables


@settings(max_examples=200, deadline=None)
@given(OPERATIONS)
def test_every_literal_has_the_function_it_was_made_for(operations: list[Operation]) -> None:
    aig, lits, tables = built(operations)
    roots = np.array(lits, np.int32)
    nodes = cone(aig, roots)
    variables = nodes[(aig.left[nodes] < 0) & (nodes > 0)]
    sources = np.array([[COLUMNS[node - 1]] for node in variables.tolist()], np.uint64)

    values = simulate(aig, nodes, sources.reshape(-1, 1), 1)

    assert [int(at) & ONES for at in read(values, nodes, roots)[:, 0]] == tables


@settings(max_examples=100, deadline=None)
@given(OPERATIONS)
def test_what_can_be_true_is_told_with_a_model_and_what_cannot_is_not(
    operations: list[Operation],
) -> None:
    aig, lits, tables = built(operations)

    answers = decide(aig, np.array(lits, np.int32), 1000)

    for answer, table in zip(answers, tables, strict=True):
        assert answer.by != "undecided"
        assert (answer.model is None) == (table == 0)
        if answer.model is not None:
            pattern = sum(answer.model.get(node, False) << (node - 1) for node in range(1, 5))
            assert table >> pattern & 1


def test_equal_pairs_of_a_batch_become_one_node() -> None:
    aig = Aig()
    a, b = aig.variables(2).tolist()

    found = aig.conj(np.array([a, b, a], np.int32), np.array([b, a, b], np.int32))

    assert len(set(found.tolist())) == 1


def test_a_large_batch_is_hashed_as_pair_by_pair() -> None:
    chance = np.random.default_rng(7)
    aig = Aig()
    lits = aig.variables(3000)
    for _ in range(4):
        left = lits[chance.integers(0, len(lits), 20000)] ^ chance.integers(0, 2, 20000)
        right = lits[chance.integers(0, len(lits), 20000)]
        made = aig.conj(left.astype(np.int32), right)

        assert (aig.conj(right, left.astype(np.int32)) == made).all()
        lits = np.concatenate((lits, made))
    inner = aig.left >= 0
    pairs = set(zip(aig.left[inner].tolist(), aig.right[inner].tolist(), strict=True))
    assert len(pairs) == inner.sum()


def test_a_question_beyond_the_limit_is_undecided_not_denied() -> None:
    aig = Aig()
    bits = 9
    a, b = aig.variables(bits).tolist(), aig.variables(bits).tolist()
    one_way, other_way = product(aig, a, b), product(aig, b, a)
    differ = FALSE
    for left, right in zip(one_way, other_way, strict=True):
        parity = aig.parity(one(left), one(right))
        differ = int(aig.disj(one(differ), parity)[0])

    [answer] = decide(aig, one(differ), 10)

    assert answer.by == "undecided"
    assert answer.model is None


def product(aig: Aig, a: list[int], b: list[int]) -> list[int]:
    """Return the bits of a times b, row by row with ripple carries."""
    total = [FALSE] * (2 * len(a))
    for shift, bit in enumerate(b):
        carry = FALSE
        for place, other in enumerate(a):
            row = int(aig.conj(one(other), one(bit))[0])
            total[shift + place], carry = full_adder(aig, total[shift + place], row, carry)
        total[shift + len(a)] = carry
    return total


def full_adder(aig: Aig, x: int, y: int, z: int) -> tuple[int, int]:
    half = int(aig.parity(one(x), one(y))[0])
    first, second = aig.conj(one(x), one(y)), aig.conj(one(half), one(z))
    return int(aig.parity(one(half), one(z))[0]), int(aig.disj(first, second)[0])
