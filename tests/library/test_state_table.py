"""State tables against what they stand for, stepped by hand-written models."""

from itertools import pairwise, product

import pytest
from hypothesis import given
from hypothesis import strategies as st

from insertdft.library import StateTable, StorageKind
from insertdft.library.expression import Var, evaluate, parse_expression
from insertdft.library.functions import same
from insertdft.library.state_table import TableModel, edge_inputs, expanded_rows, table_storages


def table(inputs: str, nodes: str, rows: str) -> StateTable:
    parts = [tuple(tuple(part.split()) for part in row.split(":")) for row in rows.split(",")]
    return StateTable(
        tuple(inputs.split()), tuple(nodes.split()), tuple((a, b, c) for a, b, c in parts)
    )


CLOCKED = table(
    "D CK SI SCK", "IQ",
    "H/L R - ~R : - : H/L, - ~R H/L R : - : H/L, - ~R - ~R : - : N",
)  # fmt: skip
SRL = table(
    "D C I A B", "M S",
    """- L - L L : - - : N N, H/L H - L L : - - : H/L N, - L H/L H L : - - : H/L N,
       - L - L H : H/L - : N H/L, H/L H - L H : - - : H/L H/L, - L H/L H H : - - : H/L H/L""",
)  # fmt: skip

bits = st.integers(0, 1)


def test_row_of_two_sides_is_two_rows() -> None:
    assert [row.inputs + row.following for row in expanded_rows(CLOCKED)] == [
        ("H", "R", "-", "~R", "H"),
        ("L", "R", "-", "~R", "L"),
        ("-", "~R", "H", "R", "H"),
        ("-", "~R", "L", "R", "L"),
        ("-", "~R", "-", "~R", "N"),
    ]
    assert edge_inputs(CLOCKED) == ("CK", "SCK")
    assert edge_inputs(SRL) == ()


@given(st.lists(st.tuples(bits, bits, bits, bits), min_size=2, max_size=8), bits)
def test_clocked_scan_table_is_two_edges_on_one_state(
    walk: list[tuple[int, int, int, int]], state: int
) -> None:
    model = TableModel(CLOCKED)
    nodes: dict[str, int | None] = {"IQ": state}
    wanted: int | None = state
    for old, new in pairwise(walk):
        before, after = (dict(zip(CLOCKED.inputs, step, strict=True)) for step in (old, new))
        rose, scan_rose = before["CK"] < after["CK"], before["SCK"] < after["SCK"]
        if rose and scan_rose:
            wanted = None
        elif rose:
            wanted = after["D"]
        elif scan_rose:
            wanted = after["SI"]
        nodes = model.step(before, after, nodes)

        assert nodes["IQ"] == wanted


def test_shift_register_latch_table_is_two_latches() -> None:
    model = TableModel(SRL)
    for d, c, i, a, b, m, s in product((0, 1), repeat=7):
        own = dict(zip(SRL.inputs, (d, c, i, a, b), strict=True))
        found = model.settle(own, own, {"M": m, "S": s})
        first = d if c else i if a else m
        if c and a:
            assert found == {"M": None, "S": None}
        else:
            assert found == {"M": first, "S": first if b else s}


def test_latches_of_a_table_are_written_out() -> None:
    first, second = table_storages(SRL)

    assert first.clock is not None
    assert same(first.clock, parse_expression("A + C"))
    assert first.data is not None
    for own in ({"A": 1, "C": 0}, {"A": 0, "C": 1}):
        for d, i in product((0, 1), repeat=2):
            assert evaluate(first.data, {**own, "D": d, "I": i}, 1) == (i if own["A"] else d)
    assert (second.data, second.clock) == (Var("M"), Var("B"))


@pytest.mark.parametrize(
    ("written", "kind", "data", "clock", "clear", "preset"),
    [
        (("D G", "Q", "H/L H : - : H/L, - L : - : N"), "latch", "D", "G", None, None),
        (("D G", "Q", "H/L L : - : L/H, - H : - : N"), "latch", "!D", "!G", None, None),
        (
            ("D G R", "Q", "- - L : - : L, H/L H H : - : H/L, - L H : - : N"),
            "latch", "D", "G", "!R", None,
        ),
        (("D CK", "Q", "H/L R : - : H/L, - ~R : - : N"), "flip-flop", "D", "CK", None, None),
        (("D CK", "Q", "H/L F : - : H/L, - ~F : - : N"), "flip-flop", "D", "!CK", None, None),
        (
            ("D CK R S", "Q",
             "- - L - : - : L, - - H L : - : H, H/L R H H : - : H/L, - ~R H H : - : N"),
            "flip-flop", "D", "CK", "!R", "!S",
        ),
        (
            ("J K CK", "Q", """L L R : - : N, H L R : - : H, L H R : - : L, H H R : H/L : L/H,
             - - ~R : - : N"""),
            "flip-flop", "J !Q + !K Q", "CK", None, None,
        ),
    ],
)  # fmt: skip
def test_table_of_one_node_becomes_storage(
    written: tuple[str, str, str],
    kind: str,
    data: str,
    clock: str,
    clear: str | None,
    preset: str | None,
) -> None:
    [found] = table_storages(table(*written))

    assert found.kind is StorageKind(kind)
    pairs = [(found.data, data), (found.clock, clock), (found.clear, clear), (found.preset, preset)]
    for own, wanted in pairs:
        assert (own is None) == (wanted is None)
        if own is not None and wanted is not None:
            assert same(own, parse_expression(wanted))


def test_dominance_of_reset_over_set_is_kept() -> None:
    [found] = table_storages(
        table("D CK R S", "Q",
              "- - L - : - : L, - - H L : - : H, H/L R H H : - : H/L, - ~R H H : - : N")
    )  # fmt: skip

    assert found.clear_preset == ("L", "H")


@pytest.mark.parametrize(
    "written",
    [
        ("D CK SI SCK", "IQ", "H/L R - ~R : - : H/L, - ~R H/L R : - : H/L, - ~R - ~R : - : N"),
        ("A", "Q", "H : H/L : L/H, L : - : N"),  # it would oscillate
        ("A B", "Q", "H - : - : H, L H : - : L, L L : - : H"),  # a gate
    ],
)
def test_table_that_is_no_storage_stays_a_table(written: tuple[str, str, str]) -> None:
    assert table_storages(table(*written)) == ()
