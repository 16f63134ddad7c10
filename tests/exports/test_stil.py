"""STIL as text: names, structures and calls; outside readers check it elsewhere."""

import re
from dataclasses import replace

import pytest
from exports.made import STYLES, made

from insertdft.exports.patterns import parity
from insertdft.exports.stil import quoted, to_stil, unquoted


@pytest.mark.parametrize("name", ["a", "d[3]", '\\a"b[3]', "\\50%22 .x", "u.\\g[0].p .\\q\x01é"])
def test_a_quoted_name_gives_the_name_back(name: str) -> None:
    text = quoted(name)

    assert unquoted(text) == name
    assert '"' not in text[1:-1]
    assert text.isprintable()
    assert text.isascii()


@pytest.mark.parametrize("style", STYLES)
def test_structures_are_those_of_the_description(style: str) -> None:
    given = made(style).given
    text = to_stil(given)

    for chain in given.description.chains:
        block = text.split(f"ScanChain {quoted(chain.name)} {{")[1].split("}")[0]
        cells = re.findall(r'"[^"]*"|!', block.split("ScanCells")[1])
        assert [unquoted(cell) for cell in cells if cell != "!"] == [
            cell.instance for cell in chain.cells
        ]
        assert f"ScanLength {chain.length};" in block
        assert f"ScanInversion {parity(chain)};" in block
        assert cells.count("!") % 2 == parity(chain)
        assert ("ScanSlaveClock" in block) == (style == "lssd")


def test_an_inversion_stands_before_the_cell_that_inverts() -> None:
    given = made("mux-d", chains=1, count=0).given
    [chain] = given.description.chains
    cells = (chain.cells[0], replace(chain.cells[1], inverted=True), *chain.cells[2:])
    description = replace(given.description, chains=(replace(chain, cells=cells),))

    text = to_stil(replace(given, description=description))

    block = text.split("ScanCells")[1]
    found = re.findall(r'"[^"]*"|!', block)
    assert found[:3] == [quoted(cells[0].instance), "!", quoted(cells[1].instance)]
    assert "ScanInversion 1;" in text
    last = text.split('"last_unload"')[1]
    assert f'"{chain.scan_out}" = HHLLH;' in last


def test_several_bits_are_named_apart() -> None:
    given = made("mux-d", chains=1, count=0).given
    [chain] = given.description.chains
    cells = (replace(chain.cells[0], bits=3), *chain.cells[1:])
    description = replace(given.description, chains=(replace(chain, cells=cells),))

    text = to_stil(replace(given, description=description))

    names = re.findall(r'^      ("[^"]*")$', text, re.M)
    assert len(set(names)) == len(names) == len(chain.cells) + 2
    assert f"ScanLength {len(names)};" in text


@pytest.mark.parametrize("style", STYLES)
def test_every_call_names_a_procedure_and_fits_its_groups(style: str) -> None:
    given = made(style).given
    text = to_stil(given)
    sizes = {
        name: members.count(" + ") + 1
        for name, members in re.findall(r"^  \"(\w+)\" = '(.*)';$", text, re.M)
    }

    vectors = re.findall(r"[VC] \{ (.*) \}$", text, re.M)
    assert vectors
    for vector in vectors:
        for group, data in re.findall(r'"(\w+)" = (\S+);', vector):
            assert len(data) == sizes[group], (group, data)
    procedures = re.findall(r'^  ("[^"]+") \{$', text.split("Procedures {")[1], re.M)
    called = re.findall(r'Call ("[^"]+")', text)
    assert set(called) <= set(procedures)
    assert {"capture", "launch_on_capture", "launch_on_shift"} <= {
        unquoted(name) for name in procedures
    }
    assert '"capture_by_clk"' in procedures


def test_a_pin_shared_with_the_mission_keeps_its_pattern_value_at_capture() -> None:
    given = made("mux-d", chains=1).given
    [chain] = given.description.chains
    ports = tuple(at for at in given.description.ports if at.port != chain.scan_in)
    description = replace(given.description, ports=ports)
    mine = replace(given, description=description, patterns=None)

    text = to_stil(mine)

    capture = text.split('"capture" {')[1].split("}\n  }")[0]
    assert '"scan_inputs" = #;' in capture
    assert '"scan_inputs" = #;' in text.split("Shift {")[1].split("}")[0]


def test_two_runs_give_the_same_bytes() -> None:
    assert to_stil(made("clocked-scan").given) == to_stil(made("clocked-scan").given)
