"""Chains are as even as they can be; checked against exhaustive search on small cases."""

from itertools import combinations_with_replacement, product

import pytest
from hypothesis import given
from hypothesis import strategies as st

from insertdft.chains.balance import allot, deal


def lengths_of(lengths: list[int], dealt: list[list[int]]) -> list[int]:
    return [sum(lengths[item] for item in chain) for chain in dealt]


def shortest_possible(lengths: list[int], chains: int) -> int:
    return min(
        max(
            sum(n for n, at in zip(lengths, places, strict=True) if at == chain)
            for chain in range(chains)
        )
        for places in product(range(chains), repeat=len(lengths))
    )


@given(st.integers(1, 400), st.integers(1, 40))
def test_unit_cells_make_chains_that_differ_by_one_at_most(cells: int, chains: int) -> None:
    dealt = deal([1] * cells, chains)

    found = sorted(map(len, dealt))
    assert sum(found) == cells
    assert found[-1] - found[0] <= 1


@given(st.integers(1, 60), st.integers(1, 9))
def test_unit_cells_keep_their_order(cells: int, chains: int) -> None:
    assert [item for chain in deal([1] * cells, chains) for item in chain] == list(range(cells))


@given(st.lists(st.integers(1, 12), min_size=1, max_size=30), st.integers(1, 6))
def test_every_item_is_in_one_chain_and_none_is_empty(lengths: list[int], chains: int) -> None:
    dealt = deal(lengths, chains)

    assert sorted(item for chain in dealt for item in chain) == list(range(len(lengths)))
    assert all(dealt) or len(lengths) < chains


@pytest.mark.parametrize("chains", [1, 2, 3])
@pytest.mark.parametrize("size", [1, 2, 3, 4, 5, 6])
def test_the_longest_chain_is_within_grahams_bound_of_the_best(chains: int, size: int) -> None:
    # Bound of the longest-first rule: R. L. Graham, SIAM J. Appl. Math. 17(2), 1969.
    for lengths in combinations_with_replacement((1, 2, 3, 5), size):
        found = max(lengths_of(list(lengths), deal(lengths, chains)))

        best = shortest_possible(list(lengths), chains)
        assert 3 * chains * found <= (4 * chains - 1) * best


def test_unit_cells_level_what_long_items_leave_uneven() -> None:
    lengths = [7, 1, 1, 1, 4, 1, 1, 1]

    assert sorted(lengths_of(lengths, deal(lengths, 2))) == [8, 9]


def test_order_is_kept_where_cutting_is_as_short_as_packing() -> None:
    assert deal([5, 5, 5, 5], 2) == [[0, 1], [2, 3]]


@pytest.mark.parametrize(("lengths", "chains"), [([1], 0), ([0, 1], 2)])
def test_nonsense_is_refused_with_the_values(lengths: list[int], chains: int) -> None:
    with pytest.raises(ValueError, match=str(lengths[0])):
        deal(lengths, chains)


@pytest.mark.parametrize("chains", [2, 3, 4, 5, 6])
def test_groups_get_the_counts_that_make_the_longest_chain_shortest(chains: int) -> None:
    for sizes in product(range(1, 9), repeat=2):

        def longest(counts: tuple[int, ...], sizes: tuple[int, ...] = sizes) -> int:
            return max(-(-size // count) for size, count in zip(sizes, counts, strict=True))

        best = min(longest((first, chains - first)) for first in range(1, chains))
        counts = allot(sizes, chains)
        assert sum(counts) == chains
        assert longest(tuple(counts)) == best


def test_fewer_chains_than_groups_is_refused() -> None:
    with pytest.raises(ValueError, match="1 chains"):
        allot([3, 4], 1)
