"""The chain description as a file: back and forth, its schema, and what is said of wrong files."""

import json
from dataclasses import replace
from pathlib import Path
from typing import Any

import jsonschema
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

import insertdft
from insertdft.chainfile import description_from_json, description_to_json, schema
from insertdft.description import Chain, ChainCell, Cycle, Description, LockUp, TestPort
from insertdft.diagnostics import DesignError

SCHEMA = Path(insertdft.__file__).parent / "schemas" / "chains.schema.json"

FULL = Description(
    design='\\top"level ',
    chains=(
        Chain(
            name="chain_1",
            style="lssd",
            scan_in="\\si[0] ",
            scan_out="so[1]",
            cells=(
                ChainCell('u1.\\a"b[3] ', "srl", "I", "L2", inverted=True),
                ChainCell("m.\\x/y .l1", "l1", "I", "Q", slave="m.\\x/y .l2"),
                ChainCell("bank", "bank4", "SI", "SO", bits=4),
            ),
            clocks=("a", "b"),
            edge=None,
            inverted_out=True,
            lock_ups=(LockUp(1, "lock", "latch", "c"),),
        ),
        Chain("chain_2", "mux-d", "si2", "so2", (), ("clk",), "fall", scan_enable="se"),
    ),
    ports=(
        TestPort("se", "scan_enable", added=True, mission=0, shift=1, capture=0),
        TestPort("clk", "clock", off=0),
    ),
    sequences={
        "setup": (Cycle(force=(("se", 1), ("rst_n", 0)), why="reset"),),
        "shift": (Cycle(scan=True, pulses=(("a",), ("b", "b2"))),),
        "capture": (Cycle(inputs=True, measure=True, pulses=(("c",),), at_speed=True),),
    },
)


def data() -> dict[str, Any]:
    """Return the full description as plain data, to be spoilt."""
    found: dict[str, Any] = json.loads(description_to_json(FULL))
    return found


def complaint(found: object) -> str:
    with pytest.raises(DesignError) as caught:
        description_from_json(json.dumps(found), "x.json")
    [item] = caught.value.diagnostics
    assert item.slug == "description-unreadable"
    assert item.message.startswith("`x.json` is no chain description")
    return item.message


def test_everything_written_is_read_back() -> None:
    assert description_from_json(description_to_json(FULL), "x") == FULL


def test_equal_descriptions_give_equal_bytes() -> None:
    again = description_from_json(description_to_json(FULL), "x")

    assert description_to_json(again) == description_to_json(FULL)


name = st.text(st.characters(min_codepoint=32, max_codepoint=255), min_size=1)


@settings(max_examples=60, deadline=None)
@given(name, name, name)
def test_any_name_survives(design: str, port: str, instance: str) -> None:
    cells = (ChainCell(instance, port, design, instance),)
    chain = Chain(port, "mux-d", port, port, cells, (port,), "rise")
    given = Description(design, (chain,), (TestPort(port, "clock", off=0),))

    assert description_from_json(description_to_json(given), "x") == given


def test_the_shipped_schema_is_the_one_of_the_types(request: pytest.FixtureRequest) -> None:
    if request.config.getoption("--update-golden"):
        SCHEMA.write_text(json.dumps(schema(), indent=1) + "\n", encoding="utf-8")

    assert json.loads(SCHEMA.read_text(encoding="utf-8")) == json.loads(json.dumps(schema()))


def test_the_schema_accepts_what_is_written_and_refuses_a_misspelt_value() -> None:
    jsonschema.Draft202012Validator.check_schema(schema())
    checker = jsonschema.Draft202012Validator(schema())
    wrong = data()
    wrong["chains"][0]["cells"][1]["bits"] = "four"

    assert list(checker.iter_errors(data())) == []
    assert [list(item.path) for item in checker.iter_errors(wrong)] == [
        ["chains", 0, "cells", 1, "bits"]
    ]


def test_a_wrong_value_is_reported_with_its_place() -> None:
    wrong = data()
    wrong["chains"][0]["cells"][1]["bits"] = "four"

    assert "$.chains[0].cells[1].bits" in complaint(wrong)


def test_a_missing_value_is_reported_with_its_name() -> None:
    wrong = data()
    del wrong["chains"][1]["scan_in"]

    assert "`scan_in`" in complaint(wrong)


@pytest.mark.parametrize("change", [{"version": 2}, {"format": "other"}])
def test_another_format_or_version_is_refused(change: dict[str, object]) -> None:
    assert "is not `insertdft-chains` version 1" in complaint(data() | change)


@pytest.mark.parametrize("text", ["", "{", "[]", "\xff", "null"])
def test_what_is_no_json_object_is_refused(text: str) -> None:
    with pytest.raises(DesignError) as caught:
        description_from_json(text, "x.json")

    assert [item.slug for item in caught.value.diagnostics] == ["description-unreadable"]


def test_length_counts_the_shift_cycles_of_banks() -> None:
    chain = FULL.chains[0]

    assert chain.length == 6
    assert replace(chain, cells=chain.cells[:2]).length == 2
