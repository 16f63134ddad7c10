"""STIL read by two independent readers, and replayed on the netlist by an independent simulator."""

import re
from functools import cache
from pathlib import Path
from typing import Any

import pytest
from exports.by_hand import CASES, by_hand
from exports.made import STYLES, Made, made
from exports.outside_readers import ReaderError, read
from exports.replay import replay
from technologies import technology

from insertdft.description import Chain
from insertdft.exports.stil import to_stil, unquoted
from insertdft.proof.trace import trace

CONVERTED = tuple(f"converted {style}" for style in STYLES)
every_case = pytest.mark.parametrize("case", [*CASES, *CONVERTED])


@cache
def exported(case: str) -> Made:
    style = case.removeprefix("converted ")
    return made(style) if style in STYLES else by_hand(case)


@pytest.fixture(scope="session")
def folder(tmp_path_factory: pytest.TempPathFactory) -> Path:
    return tmp_path_factory.mktemp("stil")


def file_of(folder: Path, name: str, text: str) -> Path:
    path = folder / f"{name.replace(' ', '_')}.stil"
    path.write_text(text, encoding="ascii")
    return path


def cells_of(chain: Chain) -> list[str]:
    """Return scan-in, cells and inversions, scan-out, as the standard lists them."""
    found = [chain.scan_in]
    for cell in chain.cells:
        found += ["!"] if cell.inverted else []
        bits = [f"{cell.instance} [{bit}]" for bit in range(cell.bits)]
        found += bits if cell.bits > 1 else [cell.instance]
    return [*found, *(["!"] if chain.inverted_out else []), chain.scan_out]


def plain(value: Any) -> Any:
    """Return what a reader found with the names as we have them."""
    if isinstance(value, str):
        return unquoted(f'"{value}"')
    if isinstance(value, dict):
        return {plain(key): plain(item) for key, item in value.items()}
    return [plain(item) for item in value]


@every_case
def test_the_netlist_has_the_chains_that_are_exported(case: str) -> None:
    given = exported(case)

    assert trace(given.design, given.description).problems == ()


@every_case
def test_the_first_reader_finds_chains_and_patterns_as_they_are(case: str, folder: Path) -> None:
    given = exported(case)
    chains = given.description.chains

    found = plain(read("by_kyupy", file_of(folder, case, to_stil(given.given))))

    assert found["chains"] == {chain.name: cells_of(chain) for chain in chains}
    assert {plain(name[1:-1]): int(length) for name, length in found["lengths"].items()} == {
        chain.name: chain.length for chain in chains
    }
    ports = given.given.program()
    assert tuple(found["groups"]["_pi"]) == ports.inputs
    assert tuple(found["groups"]["_po"]) == ports.outputs
    patterns = given.given.patterns or ()
    assert len(patterns) == len(found["patterns"]) > 0
    for mine, theirs in zip(patterns, found["patterns"], strict=True):
        loads = [row[: chain.length] for chain, row in zip(chains, mine.load, strict=True)]
        assert theirs["load"] == ends(chains, "scan_in", loads)
        assert theirs["unload"] == ends(chains, "scan_out", mine.unload)
        assert theirs["capture"]["_po"] == "".join(mine.measured)


def ends(chains: tuple[Chain, ...], end: str, rows: Any) -> dict[str, str]:
    return {getattr(chain, end): row for chain, row in zip(chains, rows, strict=True)}


@cache
def expanded(case: str, folder: Path) -> Any:
    return read("by_semi_ate", file_of(folder, case, to_stil(exported(case).given)))


def played(case: str, vectors: Any, netlist: str, folder: Path) -> tuple[int, int]:
    given = exported(case)
    top = given.description.design
    period = given.given.timing.period // 1000
    return replay(folder, vectors, period, given.given.ports, (top, netlist), technology("demo"))


@every_case
def test_the_second_readers_vectors_give_the_expected_values_in_simulation(
    case: str, folder: Path, tmp_path: Path
) -> None:
    given = exported(case)
    vectors = expanded(case, folder)
    patterns = given.given.all_patterns(given.given.program())

    compared, bad = played(case, vectors, given.text, tmp_path)

    expected = "".join("".join((*at.measured, *at.unload)) for at in patterns)
    assert bad == 0
    assert compared == len(expected) - expected.count("X")
    assert vectors["calls"].count("shift_load_unload") == len(patterns) + 1
    called = [at.sequence for at in patterns if at.sequence]
    assert [name for name in vectors["calls"] if name != "shift_load_unload"] == called


@every_case
def test_every_shift_of_the_second_reader_pulses_the_clocks_of_the_chains(
    case: str, folder: Path
) -> None:
    given = exported(case)
    found = expanded(case, folder)
    names = [unquoted(f'"{name}"') for name in found["signals"]]
    [shift] = given.description.sequences["shift"]
    wanted = {port: "PQRSTUVW"[place] for place, phase in enumerate(shift.pulses) for port in phase}

    rows = [dict(zip(names, row, strict=True)) for row in found["vectors"]]

    shifted = [row for row in rows if all(row[port] == letter for port, letter in wanted.items())]
    loads = found["calls"].count("shift_load_unload")
    assert len(shifted) >= loads * max(chain.length for chain in given.description.chains)


@every_case
def test_a_wrong_gate_differs_from_the_vectors(case: str, folder: Path, tmp_path: Path) -> None:
    given = exported(case)
    wrong = re.sub(r"\b(nand2|xor2)_w1 g", "and2_w1 g", given.text, count=2)
    assert wrong != given.text

    assert played(case, expanded(case, folder), wrong, tmp_path)[1] > 0


@pytest.mark.parametrize("case", ["mux_d", "lssd_single"])
def test_an_inversion_at_the_wrong_place_of_the_netlist_is_noticed(
    case: str, folder: Path, tmp_path: Path
) -> None:
    given = exported(case)
    wrong = re.sub(r"\binv_w1 (last|show)", r"buf_w1 \1", given.text)
    assert wrong != given.text

    assert played(case, expanded(case, folder), wrong, tmp_path)[1] > 0


def test_vectors_with_one_wrong_expected_bit_are_noticed(folder: Path, tmp_path: Path) -> None:
    text = to_stil(exported("clocked_scan").given)
    head, tail = text.rsplit("H", 1)
    vectors = read("by_semi_ate", file_of(folder, "wrong bit", head + "L" + tail))

    assert played("clocked_scan", vectors, exported("clocked_scan").text, tmp_path)[1] == 1


@pytest.mark.parametrize("reader", ["by_kyupy", "by_semi_ate"])
def test_the_readers_refuse_what_is_no_stil(reader: str, folder: Path) -> None:
    text = to_stil(exported("lssd_edges").given)

    with pytest.raises(ReaderError):
        read(reader, file_of(folder, "torn", text.replace("ScanChain", "ScanRow")))
