"""CSV and JSON of chains, and an edited CSV read back."""

import pytest
from exports.made import STYLES, made
from exports.test_def import orders

from insertdft.chainfile import description_from_json
from insertdft.diagnostics import DesignError
from insertdft.exports.tables import COLUMNS, orders_from_csv, to_csv, to_json


@pytest.mark.parametrize("style", STYLES)
def test_csv_and_json_read_back(style: str) -> None:
    given = made(style, count=0).given

    assert orders_from_csv(to_csv(given), "c", given.description) == orders(given.description)
    assert description_from_json(to_json(given), "j") == given.description


def test_rows_may_be_moved_between_places_and_chains() -> None:
    given = made("mux-d", count=0).given
    head, *rows = to_csv(given).splitlines()

    found = orders_from_csv("\n".join([head, *reversed(rows)]), "c", given.description)

    assert found == {name: row[::-1] for name, row in orders(given.description).items()}


def test_hard_names_stand_in_both_spellings() -> None:
    text = to_csv(made("mux-d", count=0).given)

    assert '\\a""b[3]' in text
    assert 'u[0].p/a""b[3]' in text


@pytest.mark.parametrize(
    ("change", "words"),
    [
        (lambda rows: rows[:-1], "other cells"),
        (lambda rows: [*rows, rows[-1]], "other cells"),
        (lambda rows: [rows[0], "nowhere" + rows[1][7:], *rows[2:]], "no chain is called"),
        (lambda rows: [",".join(COLUMNS[1:]), *rows[1:]], "no column `chain`"),
    ],
)
def test_a_wrong_order_is_refused(change: object, words: str) -> None:
    given = made("mux-d", count=0).given
    rows = change(to_csv(given).splitlines())  # type: ignore[operator]

    with pytest.raises(DesignError) as caught:
        orders_from_csv("\n".join(rows), "c", given.description)
    assert any(words in at.message for at in caught.value.diagnostics)
