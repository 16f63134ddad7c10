"""Mistakes planted into good conversions of all styles: every one must be refuted.

Here a part of them, spread evenly; ``tests/benchmarks/planted.py`` plants all of them.
"""

import re
from collections.abc import Iterator

import pytest
from proof.conversions import CORES, SMALL, Converted, conversion, read
from proof.planted import Mistake, mistakes

from insertdft.proof.prove import prove
from insertdft.proof.result import Verdict

#: Every how many of the mistakes of a conversion is planted here.
EVERY = {
    "edges, mux-D": 1,
    "edges, clocked scan": 2,
    "edges, LSSD": 23,
    "pairs, LSSD": 2,
    "phases, LSSD": 11,
    "serv, mux-D composed": 151,
    "serv, mux-D": 211,
    "serv, clocked scan": 607,
    "serv, LSSD edge": 1501,
    "serv, LSSD two-phase composed": 1201,
    "serv of latches, LSSD composed": 801,
}

#: Pattern of a mistake -> kinds of which at least one must be told.
RIGHT_KIND = {
    r"scan_in (inverted|tied|of )": {"shift"},
    r"data (inverted|tied|of )": {"data", "latch", "clock cycle"},
    r"reset (inverted|tied)": {"reset", "latch", "clock cycle", "shift"},
    r"scan_enable tied to 0": {"shift"},
    r"scan_enable tied to 1": {"data"},
    r"clock (inverted|tied|from)": {"clock", "latch", "clock cycle", "shift", "chain"},
    r"(clock_a|clock_b|scan_clock) tied to 0": {"shift", "clock cycle"},
    r"data and scan_in swapped": {"shift", "data", "latch"},
}


def some(case: Converted, every: int) -> Iterator[Mistake]:
    design = read(case.after, case.library)
    ports = [port.name for port in design.ports if port.direction == "input"][:4]
    for number, mistake in enumerate(mistakes(case.before, case.after, design, ports)):
        if number % every == 0:
            yield mistake


def test_every_conversion_has_mistakes_planted() -> None:
    assert EVERY.keys() == SMALL.keys() | CORES.keys()


@pytest.mark.parametrize("name", EVERY)
def test_a_good_conversion_is_proven(name: str) -> None:
    case = conversion(name)

    proof = prove(*case.designs, case.description)

    assert proof.verdict is Verdict.PROVEN, (proof.reasons, proof.counterexamples)


@pytest.mark.parametrize("name", EVERY)
def test_every_planted_mistake_is_refuted(name: str) -> None:
    case = conversion(name)
    before = read(case.before, case.library)
    planted = refuted = 0
    for mistake in some(case, EVERY[name]):
        proof = prove(before, read(mistake.text, case.library), case.description)
        planted += 1
        refuted += proof.verdict is Verdict.REFUTED
        told = {item.kind for item in proof.counterexamples}
        for pattern, kinds in RIGHT_KIND.items():
            if re.match(pattern, mistake.kind):
                assert told & kinds, (mistake.kind, mistake.where, told)
    print(f"{name}: {refuted} of {planted} planted mistakes refuted")
    assert planted >= 5
    assert refuted == planted
