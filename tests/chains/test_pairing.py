"""Pairs of system latches in the L1/L2* form, against brute force."""

import random
from collections import Counter
from collections.abc import Iterator

import pytest

from insertdft.chains import pairing
from insertdft.chains.pairing import MOST_EXACT, Pairing, SystemLatch, distance, pair_latches

Pair = tuple[int, int]


def matchings(edges: list[Pair]) -> Iterator[list[Pair]]:
    """Every set of pairs in which no latch stands twice."""
    if not edges:
        yield []
        return
    first, *rest = edges
    yield from matchings(rest)
    for more in matchings([at for at in rest if not set(at) & set(first)]):
        yield [first, *more]


def edges_of(latches: list[SystemLatch], forbidden: set[Pair]) -> list[Pair]:
    return [
        (one.number, two.number)
        for at, one in enumerate(latches)
        for two in latches[at + 1 :]
        if one.phase != two.phase and (one.number, two.number) not in forbidden
    ]


def best(latches: list[SystemLatch], forbidden: set[Pair]) -> tuple[int, int]:
    """The most pairs, and their smallest total distance."""
    by_number = {latch.number: latch for latch in latches}
    scores = [
        (-len(those), sum(distance(by_number[a], by_number[b]) for a, b in those))
        for those in matchings(edges_of(latches, forbidden))
    ]
    count, total = min(scores)
    return -count, total


def random_latches(seed: int, count: int, phases: int) -> list[SystemLatch]:
    chance = random.Random(seed)  # noqa: S311
    paths = [(), ("u1",), ("u2",), ("u1", "v1"), ("u1", "v2"), ("u2", "v1")]
    return [
        SystemLatch(100 + at, chance.choice(paths), f"c{chance.randrange(phases)}")
        for at in range(count)
    ]


def check(latches: list[SystemLatch], found: Pairing, forbidden: set[Pair]) -> None:
    by_number = {latch.number: latch for latch in latches}
    used = Counter(number for pair in found.pairs for number in pair)
    assert set(used.values()) <= {1}
    assert sorted([*used, *found.unpaired]) == sorted(by_number)
    for one, two in found.pairs:
        assert by_number[one].phase != by_number[two].phase
        assert (one, two) not in forbidden
        assert (two, one) not in forbidden


@pytest.mark.parametrize("seed", range(25))
def test_small_designs_are_paired_as_well_as_can_be(seed: int) -> None:
    chance = random.Random(seed)  # noqa: S311
    latches = random_latches(seed, chance.randint(2, 8), chance.choice((2, 3)))
    edges = edges_of(latches, set())
    forbidden = set(chance.sample(edges, len(edges) // 3))

    found = pair_latches(latches, forbidden)

    check(latches, found, forbidden)
    by_number = {latch.number: latch for latch in latches}
    total = sum(distance(by_number[a], by_number[b]) for a, b in found.pairs)
    assert (found.saved, total) == best(latches, forbidden)


@pytest.mark.parametrize("phases", [2, 3])
@pytest.mark.parametrize("seed", range(12))
def test_the_way_for_many_latches_finds_as_many_pairs_as_brute_force(
    monkeypatch: pytest.MonkeyPatch, seed: int, phases: int
) -> None:
    monkeypatch.setattr(pairing, "MOST_EXACT", 0)
    latches = random_latches(seed, 8, phases)

    found = pair_latches(latches)

    check(latches, found, set())
    count, total = best(latches, set())
    assert found.saved == count
    if phases == 2:
        by_number = {latch.number: latch for latch in latches}
        assert sum(distance(by_number[a], by_number[b]) for a, b in found.pairs) <= total + 2


@pytest.mark.parametrize("phases", [2, 3, 5])
def test_many_latches_are_paired_as_often_as_their_phases_allow(phases: int) -> None:
    latches = random_latches(phases, 20_000, phases)
    largest = max(Counter(latch.phase for latch in latches).values())

    found = pair_latches(latches)

    check(latches, found, set())
    assert found.saved == min(len(latches) // 2, len(latches) - largest)


def test_pairs_are_opened_where_that_makes_room() -> None:
    count = MOST_EXACT
    inner = [SystemLatch(at, ("u",), f"c{at % 2}") for at in range(count)]
    outer = [SystemLatch(count + at, ("v",), "c2") for at in range(count)]

    found = pair_latches([*inner, *outer])

    assert found.saved == count
    assert found.unpaired == ()


def test_latches_of_one_module_are_paired_before_those_of_others() -> None:
    latches = [SystemLatch(at, (f"u{at // 10}",), f"c{at % 2}") for at in range(10 * MOST_EXACT)]

    found = pair_latches(latches)

    assert found.saved == 5 * MOST_EXACT
    assert all(one // 10 == two // 10 for one, two in found.pairs)
    assert all(one % 2 == 0 for one, _ in found.pairs)


def test_forbidden_pairs_of_a_large_design_are_kept_apart() -> None:
    latches = [SystemLatch(at, (), f"c{at % 2}") for at in range(4 * MOST_EXACT)]
    forbidden = {(at, at + 1) for at in range(0, len(latches), 2)}

    found = pair_latches(latches, forbidden)

    check(latches, found, forbidden)
    assert found.saved >= 2 * MOST_EXACT - 1


def test_one_phase_alone_saves_nothing() -> None:
    found = pair_latches([SystemLatch(at, (), "c1") for at in range(100)])

    assert (found.pairs, found.saved, len(found.unpaired)) == ((), 0, 100)
    assert pair_latches([]) == Pairing((), ())
