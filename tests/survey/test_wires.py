"""All nets followed at once give what one walk a net gives."""

import random

import pytest
from kits import osu
from outside import outside

from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.library import read_library
from insertdft.library.cell import Library
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import End, Walker
from insertdft.source import read_netlist, read_sources
from insertdft.survey.cone import cone, gates_between, net_graph, walk
from insertdft.survey.wires import find_wires
from insertdft.text import SourceText

CELLS = {"BUFX2": "A", "INVX1": "A", "NAND2X1": "A B", "NOR2X1": "A B", "MUX2X1": "A B S"}


def random_netlist(seed: int) -> str:
    chance = random.Random(seed)  # noqa: S311
    nets = ["a", "b", "h", "1'b0", "1'b1"]
    lines = []
    for number in range(120):
        cell, pins = chance.choice([*CELLS.items(), ("LATCH", "D CLK"), ("BUFX2", "A")])
        ins = ", ".join(f".{pin}({chance.choice(nets)})" for pin in pins.split())
        output = "Q" if cell == "LATCH" else "Y"
        lines.append(f"wire n{number}; {cell} u{number} ({ins}, .{output}(n{number}));")
        nets.append(f"n{number}")
    # A loop of inverters, and something behind it.
    lines.append(
        "wire l1, l2, l3; INVX1 v1 (.A(l1), .Y(l2)); INVX1 v2 (.A(l2), .Y(l1));"
        " BUFX2 v3 (.A(l1), .Y(l3));"
    )
    return f"module top (a, b, h, y); input a, b, h; output y; {' '.join(lines)} endmodule"


def check(design: Design, walker: Walker) -> int:
    wires = find_wires(walker)
    nets = sorted({net for net in design.pin_net.tolist() if net >= 4})
    for net in nets:
        source = walker.source(net)
        if source.end is End.LOOP:
            assert wires.root[net] == net
        elif source.end is not End.CONSTANT:
            assert (wires.root[net], wires.turned[net]) == (source.net, source.inverted)
    return len(nets)


def walker_of(text: str, library: Library, held: dict[str, int]) -> Walker:
    design = link(read_netlist([SourceText("in.v", text)]), library)[0]
    nets = {design.port_nets[port]: value for port, value in held.items()}
    return Walker(design, propagate(design, nets))


@pytest.mark.parametrize("held", [{}, {"h": 0}, {"h": 1, "a": 1}])
@pytest.mark.parametrize("seed", range(6))
def test_random_netlists_are_followed_as_net_by_net(seed: int, held: dict[str, int]) -> None:
    walker = walker_of(random_netlist(seed), osu("osu035"), held)

    assert check(walker.design, walker) > 100


def test_a_real_netlist_is_followed_as_net_by_net() -> None:
    library = read_library(read_sources([outside("libs", "sky130hd", "sky130hd_tt.lib.gz")]))
    netlist = read_netlist(read_sources([outside("netlists", "latch_serv.sky130hd.v.gz")]))
    design = link(netlist, library)[0]

    assert check(design, Walker(design, propagate(design, {}))) > 3000


@pytest.mark.parametrize("seed", range(6))
def test_forward_and_backward_walks_agree(seed: int) -> None:
    walker = walker_of(random_netlist(seed), osu("osu035"), {"h": 1})
    design, values = walker.design, walker.values
    graph = net_graph(design, values)
    nets = sorted({net for net in design.pin_net.tolist() if net >= 4 and net not in values})
    leaves_of = {net: set(cone(design, values, net).leaves) for net in nets}
    for leaf in sorted({at for leaves in leaves_of.values() for at in leaves}):
        reach = walk(graph, [leaf])
        for net in nets:
            assert bool(reach.reached[net]) is (leaf in leaves_of[net] or net == leaf)


def test_a_path_is_a_row_of_gates_each_fed_by_the_one_before() -> None:
    walker = walker_of(random_netlist(3), osu("osu035"), {})
    design = walker.design
    reach = walk(net_graph(design, walker.values), [design.port_nets["a"]])
    far = max(reach.reached.nonzero()[0].tolist(), key=lambda net: len(reach.path(net)))

    path = reach.path(far)
    gates = gates_between(design, path)

    assert path[0] == design.port_nets["a"]
    assert len(gates) == len(path) - 1 > 2
    for gate, before, after in zip(gates, path, path[1:], strict=False):
        assert {before, after} <= set(design.pins(gate).values())
