"""Random netlists agree with pyslang; mutilated ones are refused, or still agree."""

import random

import pytest
from hypothesis import HealthCheck, given, settings
from source import by_pyslang
from source.cases import CASES, read, text_of
from source.random_text import netlist
from source.reference import expand, ours

from insertdft.diagnostics import DesignError
from insertdft.netlist import Netlist
from insertdft.source import locate

WORDS = """; , ( ) . [ ] { } ` \\ " /* */ // (* *) # = wire assign endmodule module 1 0 ' x : ~
    input always or"""
FRAGMENTS = [*WORDS.split(), " ", "\n", "`ifdef X\n", "`endif\n"]


@settings(max_examples=60, deadline=None, derandomize=True, suppress_health_check=list(HealthCheck))
@given(netlist())
def test_random_netlist_agrees_with_pyslang(text: str) -> None:
    found = read(text, top="m0")

    assert ours(found) == expand(by_pyslang.read(text))
    _every_part_is_found(found)


def _every_part_is_found(netlist: Netlist) -> None:
    for module in netlist.modules.values():
        for view in netlist.instances(module):
            text = locate(module, view.number)
            written = len({pin.partition("[")[0] for pin in view.pins})
            assert len(text.connections) >= min(written, 1)
            assert module.source.text[text.list_end] == ")"


def mutilated(text: str, chance: random.Random) -> str:
    at = chance.randrange(len(text))
    way = chance.random()
    if way < 0.35:
        return text[:at] + text[at + 1 :]
    if way < 0.8:
        return text[:at] + chance.choice(FRAGMENTS) + text[at:]
    if way < 0.9:
        return text[:at] + text[at + chance.randrange(20) :]
    return text[:at] + text[at : at + 10][::-1] + text[at + 10 :]


@pytest.mark.parametrize("case", [case for case in CASES if case != "attributes"])
def test_mutilated_text_is_refused_or_still_agrees(case: str) -> None:
    chance = random.Random(case)  # noqa: S311 (no secrets here)
    whole = text_of(case).text
    refused = 0
    for _ in range(40):
        text = mutilated(whole, chance)
        try:
            found = read(text)
        except DesignError:
            refused += 1
            continue
        assert ours(found) == expand(by_pyslang.read(text)), text

    assert refused > 10
