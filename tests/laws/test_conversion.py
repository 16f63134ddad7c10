"""Every case of testdata/convert runs every law, and every law is shown to be able to fail."""

import re
import tomllib
from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path

import pytest
from designs import TESTDATA, design_of, small_library

from insertdft import api
from insertdft.chainfile import description_from_json, description_to_json
from insertdft.chains.plan_json import plan_from_json, plan_to_json
from insertdft.design.link import link
from insertdft.diagnostics import DesignError, render
from insertdft.source import read_netlist
from insertdft.text import SourceText, Splice, apply_splices, undo_splices

CASES = sorted(path for path in (TESTDATA / "convert").iterdir() if path.is_dir())
all_cases = pytest.mark.parametrize("case", CASES, ids=lambda case: case.name)


def run(case: Path) -> api.Conversion:
    asked = case / "wishes.toml"
    wishes = tomllib.loads(asked.read_text()) if asked.exists() else {}
    design = design_of((case / "in.v").read_text(encoding="latin-1"))
    return api.convert(design, api.Wishes(**wishes))


def text_of(done: api.Conversion) -> str:
    [patch] = done.patches
    return apply_splices(patch.source, patch.splices)


def test_there_are_cases() -> None:
    assert len(CASES) >= 10


@all_cases
def test_text_and_findings_are_the_reviewed_ones(
    case: Path, request: pytest.FixtureRequest
) -> None:
    done = run(case)
    for name, text in (
        ("out.v", text_of(done)),
        ("findings.txt", "".join(map(render, done.findings))),
    ):
        if request.config.getoption("--update-golden"):
            (case / name).write_text(text, encoding="latin-1")
        assert text == (case / name).read_text(encoding="latin-1")


@all_cases
def test_taking_the_splices_out_gives_back_the_input(case: Path) -> None:
    done = run(case)
    [patch] = done.patches

    assert undo_splices(text_of(done), patch.splices, patch.source) == patch.source.text


@all_cases
def test_every_chain_walks_as_described(case: Path) -> None:
    done = run(case)

    assert done.traced.problems == ()
    assert done.traced.chains == done.description.chains


@all_cases
def test_every_converted_cell_stands_in_one_chain(case: Path) -> None:
    done = run(case)

    names = [cell.instance for chain in done.description.chains for cell in chain.cells]
    left = [at.instance for at in done.plan.left_alone]
    assert len(set(names)) == len(names)
    design = done.survey.design
    assert {*names, *left} == {design.name(at) for at in done.survey.storage.tolist()}


@all_cases
def test_two_runs_give_the_same_bytes(case: Path) -> None:
    first, second = run(case), run(case)

    assert text_of(first) == text_of(second)
    assert plan_to_json(first.plan) == plan_to_json(second.plan)
    assert description_to_json(first.description) == description_to_json(second.description)


@all_cases
def test_the_plan_read_back_gives_the_same_splices(case: Path) -> None:
    done = run(case)
    kept = plan_from_json(plan_to_json(done.plan), "plan.json")

    assert api.apply_plan(done.survey.design, kept) == done.patches


@all_cases
def test_the_description_read_back_is_the_same(case: Path) -> None:
    description = run(case).description

    assert description_from_json(description_to_json(description), "x") == description


@all_cases
def test_the_written_text_converts_to_nothing_new(case: Path) -> None:
    """What is in chains already is not converted again."""
    done = run(case)
    again = design_of(text_of(done))

    second = _convert_again(again)
    twins = {at.instance for chain in done.description.chains for at in chain.cells}
    composed = {
        element.instance
        for module in done.plan.modules.values()
        for segment in module.segments
        for element in segment.elements
        if element.kind == "cell" and done.plan.conversions[element.number].parts
    }
    assert {name.rpartition(".")[2] for name in second & twins} <= composed


def _convert_again(design: api.Design) -> set[str]:
    try:
        done = api.convert(design, api.Wishes(ports={"scan_enable": "shift_again"}))
    except DesignError:
        return set()
    return {at.instance for chain in done.description.chains for at in chain.cells}


def planted(splices: tuple[Splice, ...]) -> Iterator[tuple[str, tuple[Splice, ...]]]:
    """Yield mistakes: each splice lost, alone and with the next; each name in it replaced."""
    for number, splice in enumerate(splices):
        before, after = splices[:number], splices[number + 1 :]
        # A scalar wire need not be declared (IEEE 1364-2005, 4.5), so losing that is no mistake.
        if re.sub(r"wire [^;]+;|\s", "", splice.text):
            yield f"lost: {splice}", (*before, *after)
        yield f"lost with the next: {splice}", (*before, *after[1:])
        for name in re.finditer(r"(?<!wire )\bscan_(?!\w+_buf\b)\w+", splice.text):
            text = splice.text[: name.start()] + "clk" + splice.text[name.end() :]
            yield f"{name[0]} -> clk: {splice}", (*before, splice._replace(text=text), *after)


@all_cases
def test_every_planted_mistake_is_noticed_by_the_walk(case: Path) -> None:
    done = run(case)
    [patch] = done.patches
    unnoticed = []
    for mistake, splices in planted(patch.splices):
        try:
            broken = read_netlist([SourceText("broken.v", apply_splices(patch.source, splices))])
            design, warnings = link(broken, small_library())
            noticed = bool(api.trace(design, done.description).problems) or bool(warnings)
        except DesignError:
            noticed = True
        if not noticed:
            unnoticed.append(mistake)
    assert unnoticed == []


@all_cases
def test_a_wrong_description_is_noticed(case: Path) -> None:
    done = run(case)
    after = api.read_again(done.patches, done.survey.design)
    for number, chain in enumerate(done.description.chains):
        cells = chain.cells
        wrong = [
            replace(chain, cells=cells[1:]),
            replace(chain, inverted_out=not chain.inverted_out),
            replace(chain, cells=(replace(cells[0], inverted=not cells[0].inverted), *cells[1:])),
            replace(chain, cells=(replace(cells[0], scan_in="X"), *cells[1:])),
        ]
        if len(cells) > 1:
            wrong.append(replace(chain, cells=(cells[1], cells[0], *cells[2:])))
        for other in wrong:
            chains = list(done.description.chains)
            chains[number] = other
            traced = api.trace(after, replace(done.description, chains=tuple(chains)))
            assert [item.slug for item in traced.problems] == ["chain-differs"]
