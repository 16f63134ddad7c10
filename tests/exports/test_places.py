"""Loads set at once give the patterns of loads shifted in bit by bit; wrong places are noticed."""

from dataclasses import replace

import pytest
from exports.by_hand import CASES, by_hand
from exports.made import STYLES, Made, made

from insertdft.exports import patterns
from insertdft.exports.patterns import random_patterns
from insertdft.exports.places import places_of
from insertdft.simulate.state import Machine
from insertdft.simulate.two_clocks import with_two_clock_cells

every_case = pytest.mark.parametrize("case", [*CASES, *STYLES])


def exported(case: str) -> Made:
    return made(case) if case in STYLES else by_hand(case)


@every_case
def test_a_load_set_at_once_gives_the_patterns_of_one_shifted_in(
    case: str, monkeypatch: pytest.MonkeyPatch
) -> None:
    given = exported(case)
    program = given.given.program()

    at_once = random_patterns(given.design, given.description, program, 5)
    monkeypatch.setattr(patterns, "places_of", lambda *_: None)
    bit_by_bit = random_patterns(given.design, given.description, program, 5)

    assert at_once == bit_by_bit
    assert len(at_once) == 5 * len(program.captures)


@every_case
def test_every_bit_of_every_chain_has_a_place_of_its_own(case: str) -> None:
    given = exported(case)
    circuit = Machine(with_two_clock_cells(given.design)).circuit

    found = places_of(circuit, given.description.chains)

    assert found is not None
    rows = [row for places in found for row in places.rows.tolist()]
    assert len(set(rows)) == len(rows) == sum(at.length for at in given.description.chains)


def test_a_description_with_a_wrong_inversion_is_not_believed() -> None:
    given = by_hand("mux_d")
    first, *others = given.description.chains
    cells = (replace(first.cells[0], inverted=True), *first.cells[1:])
    wrong = replace(given.description, chains=(replace(first, cells=cells), *others))
    program = given.given.program()

    assert random_patterns(given.design, wrong, program, 3) == random_patterns(
        given.design, given.description, program, 3
    )


def test_a_cell_that_is_not_there_has_no_place() -> None:
    given = by_hand("lssd_pairs")
    [chain] = given.description.chains
    cells = (replace(chain.cells[0], instance="nobody"), *chain.cells[1:])
    circuit = Machine(with_two_clock_cells(given.design)).circuit

    assert places_of(circuit, (replace(chain, cells=cells),)) is None
