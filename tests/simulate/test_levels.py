"""Levels, loops and cuts of graphs."""

import networkx as nx
import numpy as np
import pytest
from circuits import design_of

from insertdft.simulate.levels import levelize
from insertdft.simulate.lower import make_circuit


def columns(edges: list[tuple[int, int]]) -> tuple[np.ndarray, np.ndarray]:
    table = np.array(edges, np.int32).reshape(-1, 2)
    return table[:, 0], table[:, 1]


@pytest.mark.parametrize("seed", range(5))
def test_levels_are_the_longest_ways(seed: int) -> None:
    chance = np.random.default_rng(seed)
    pairs = chance.integers(0, 60, (150, 2))
    edges = [(min(a, b), max(a, b)) for a, b in pairs.tolist() if a != b]

    found = levelize(60, *columns(edges))

    graph = nx.DiGraph(edges)
    graph.add_nodes_from(range(60))
    expected = [0] * 60
    for node in nx.topological_sort(graph):
        expected[node] = max((expected[p] + 1 for p in graph.predecessors(node)), default=0)
    assert found.level.tolist() == expected
    assert found.loops == ()


@pytest.mark.parametrize("seed", range(5))
def test_every_loop_is_cut_and_no_node_outside_loops_is(seed: int) -> None:
    chance = np.random.default_rng(seed)
    edges = [(int(a), int(b)) for a, b in chance.integers(0, 40, (55, 2))]

    found = levelize(40, *columns(edges))

    cut = set(found.cut.tolist())
    left = nx.DiGraph([(a, b) for a, b in edges if a not in cut])
    on_loops = {
        node
        for part in nx.strongly_connected_components(nx.DiGraph(edges))
        for node in part
        if len(part) > 1 or (node, node) in edges
    }
    assert nx.is_directed_acyclic_graph(left)
    assert cut <= on_loops
    assert {int(node) for loop in found.loops for node in loop} == on_loops


def test_a_loop_of_a_netlist_is_named_and_the_rest_still_works() -> None:
    design = design_of(
        "module top (s, r, a, q, y); input s, r, a; output q, y; wire p;"
        " nor u1 (q, r, p); nor u2 (p, s, q); not u3 (y, a); endmodule"
    )

    circuit = make_circuit(design)

    assert [sorted(design.name(i) for i in loop) for loop in circuit.loops] == [["u1", "u2"]]


def test_a_netlist_without_loops_has_none() -> None:
    design = design_of(
        "module top (s, r, q); input s, r; output q; wire p;"
        " nor u1 (q, r, p); nor u2 (p, s, r); endmodule"
    )

    assert make_circuit(design).loops == ()
