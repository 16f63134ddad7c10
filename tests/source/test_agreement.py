"""Two independent readers see the same instances, pins and nets as ours, bit by bit."""

import pytest
from outside import outside
from source import by_pyslang, by_pyverilog
from source.cases import CASES, text_of
from source.reference import expand, ours

from insertdft.source import read_netlist, read_sources

#: What pyverilog, as it comes, cannot read or reads wrongly.
BEYOND_PYVERILOG = {
    "assigns": "several assigns in one statement",
    "attributes": "several attributes in one",
    "by_position": "an empty first or last place",
    "carriage_returns": "carriage returns",
    "comments": "comments like /***/",
    "constants": "blanks inside sized constants",
    "directives": "macros and conditions",
    "gates": "delays and strengths of gates",
    "net_kinds": "most kinds of nets",
    "parameters": "a single parameter without brackets",
    "part_selects": "[b +: w] comes out one bit too wide",
    "ports_renamed": "ports under another name",
}
NETLISTS = """awkward.ihp cluster8_hier.sky130hd counter.ihp counter_attr.sky130hd icg_regs.sky130hd
    icg_regs_te.ihp latch_counter.osu035 latch_counter.sky130hd latch_serv.sky130hd
    picorv32.sky130hd s27.ihp s27.sky130hd serv.ihp serv_hier.sky130hd tribus.sky130hd
    twoclk.osu035""".split()
#: Small enough for pyverilog, which is quadratic in the number of items of a module.
SMALL = [name for name in NETLISTS if name.split("_")[0].split(".")[0] not in (
    "cluster8", "latch", "picorv32", "serv")]  # fmt: skip


def test_there_are_feature_files() -> None:
    assert len(CASES) > 25


@pytest.mark.parametrize("case", CASES)
def test_pyslang_reads_the_same(case: str) -> None:
    source = text_of(case)

    assert ours(read_netlist([source])) == expand(by_pyslang.read(source.text))


@pytest.mark.parametrize("case", [case for case in CASES if case not in BEYOND_PYVERILOG])
def test_pyverilog_reads_the_same(case: str) -> None:
    source = text_of(case)

    assert ours(read_netlist([source])) == expand(by_pyverilog.read(source.text))


@pytest.mark.parametrize("case", sorted(BEYOND_PYVERILOG))
def test_the_list_of_what_pyverilog_cannot_read_is_true(case: str) -> None:
    source = text_of(case)
    try:
        other = expand(by_pyverilog.read(source.text))
    except (by_pyverilog.ParseError, AssertionError):
        return

    assert ours(read_netlist([source])) != other


@pytest.mark.parametrize("name", NETLISTS)
def test_pyslang_reads_the_same_in_synthesized_netlists(name: str) -> None:
    [source] = read_sources([outside("netlists", f"{name}.v.gz")])

    assert ours(read_netlist([source])) == expand(by_pyslang.read(source.text))


@pytest.mark.parametrize("name", SMALL)
def test_pyverilog_reads_the_same_in_synthesized_netlists(name: str) -> None:
    [source] = read_sources([outside("netlists", f"{name}.v.gz")])

    assert ours(read_netlist([source])) == expand(by_pyverilog.read(source.text))


def test_a_swapped_bit_is_noticed() -> None:
    source = text_of("hierarchy")
    swapped = source.text.replace("{d[3], d[2]}", "{d[2], d[3]}")
    assert swapped != source.text

    assert ours(read_netlist([source])) != expand(by_pyslang.read(swapped))
