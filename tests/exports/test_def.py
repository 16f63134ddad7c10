"""DEF scan chains: written, read back, shuffled, refused where a cell left its place."""

import re
from dataclasses import replace

import pytest
from exports.made import STYLES, made

from insertdft.description import Chain, ChainCell, Description, LockUp
from insertdft.diagnostics import DesignError
from insertdft.exports.def_ import def_name, name_of, orders_from_def, runs_of, to_def

CELLS = tuple(ChainCell(f"r{n}", "sff", "SI", "Q") for n in range(6))
CHAIN = Chain("c", "mux-d", "si", "so", CELLS, ("clk",), "rise", "se")


def orders(description: Description) -> dict[str, list[str]]:
    return {chain.name: [cell.instance for cell in chain.cells] for chain in description.chains}


@pytest.mark.parametrize("style", STYLES)
def test_what_is_written_reads_back(style: str) -> None:
    given = made(style, count=0).given

    text = to_def(given)

    assert orders_from_def(text, "x.def", given.description) == orders(given.description)


@pytest.mark.parametrize("name", ["a.b", '\\a"b[3]', "\\x/y .q", "u.\\p.q/r .\\s[0]", "\\b\\c"])
def test_names_survive(name: str) -> None:
    assert name_of(def_name(name)) == name


def test_a_shuffled_floating_run_gives_the_new_order() -> None:
    given = made("mux-d", chains=1, count=0).given
    rows = re.findall(r"^    .*\n", to_def(given), re.M)
    text = to_def(given).replace("".join(rows), "".join(reversed(rows)))

    found = orders_from_def(text, "x.def", given.description)

    [chain] = given.description.chains
    assert (
        found[chain.name]
        == [cell.instance for cell in chain.cells][::-1]
        != orders(given.description)[chain.name]
    )


def test_lock_ups_and_inversions_bound_the_runs() -> None:
    cells = (*CELLS[:4], replace(CELLS[4], inverted=True), CELLS[5])
    chain = replace(CHAIN, cells=cells, lock_ups=(LockUp(1, "lock", "lat", "clk"),))

    found = runs_of(chain)

    assert [[cell.instance for cell in run.cells] for run in found] == [
        ["r0", "r1"],
        ["r2", "r3"],
        ["r4"],
        ["r5"],
    ]
    assert [run.floating for run in found] == [True, True, False, False]
    assert found[0].stop == ("lock", "") == found[1].start


@pytest.mark.parametrize(
    ("change", "words"),
    [
        (lambda text: text.replace("last ( IN", "lost ( IN"), "other cells"),
        (lambda text: re.sub(r"^    last .*\n", "", text, flags=re.M), "other cells"),
        (lambda text: text.replace("- chain_1_run_1", "- another"), "missing"),
        (lambda text: text.replace("END SCANCHAINS", ""), "no SCANCHAINS"),
    ],
)
def test_an_illegal_order_is_refused(change: object, words: str) -> None:
    given = made("mux-d", count=0).given
    text = to_def(given)
    wrong = change(text)  # type: ignore[operator]
    assert wrong != text

    with pytest.raises(DesignError, match=words):
        orders_from_def(wrong, "x.def", given.description)


def test_an_ordered_run_may_not_change() -> None:
    given = made("mux-d", chains=1, count=0).given
    [chain] = given.description.chains
    inverted = tuple(replace(cell, inverted=True) for cell in chain.cells[:1])
    description = replace(
        given.description, chains=(replace(chain, cells=inverted + chain.cells[1:]),)
    )
    mine = replace(given, description=description)
    first, second = chain.cells[0].instance, chain.cells[1].instance
    swapped = to_def(mine).replace(def_name(first) + " ", "@").replace(def_name(second) + " ", "#")
    swapped = swapped.replace("@", def_name(second) + " ").replace("#", def_name(first) + " ")

    with pytest.raises(DesignError, match="other cells"):
        orders_from_def(swapped, "x.def", description)
