"""Fault lists: published counts, and equivalence that is real."""

from itertools import combinations

import pytest
from circuits import bench_text, design_of, random_gates, read_bench

from insertdft.faults.collapse import equivalent_faults, make_faults
from insertdft.library import Cell, primitive_cell
from insertdft.library.expression import columns, evaluate
from insertdft.simulate.lower import make_circuit

#: Circuit -> faults before and after collapsing. The ISCAS'85 and ISCAS'89 circuits (F. Brglez,
#: H. Fujiwara, ISCAS 1985; F. Brglez, D. Bryan, K. Kozminski, ISCAS 1989). Published counts as
#: remembered, confirmed by a computation of our own in another language; no table was opened.
COUNTS = {
    "c17": (34, 22),
    "c432": (864, 524),
    "c499": (998, 758),
    "c880": (1760, 942),
    "c1355": (2710, 1574),
    "c1908": (3816, 1879),
    "c2670": (5340, 2747),
    "s27": (52, 32),
    "s298": (596, 308),
    "s344": (670, 342),
    "s349": (680, 350),
    "s382": (764, 399),
    "s386": (772, 384),
    "s400": (800, 424),
    "s444": (888, 474),
    "s510": (1020, 564),
    "s526": (1052, 555),
    "s641": (1278, 467),
    "s713": (1426, 581),
    "s820": (1640, 850),
    "s832": (1664, 870),
    "s1196": (2392, 1242),
    "s1238": (2476, 1355),
    "s1488": (2976, 1486),
}


@pytest.mark.parametrize("name", COUNTS)
def test_counts_are_the_published_ones(name: str) -> None:
    circuit = make_circuit(design_of(read_bench(bench_text(name)).verilog()))

    faults = make_faults(circuit)

    assert (faults.total, faults.collapsed) == COUNTS[name]


def test_the_smallest_benchmark_by_hand() -> None:
    # c17 of ISCAS'85, written out here so that this much is checked without any data.
    nands = {"10": "1 3", "11": "3 6", "16": "2 11", "19": "11 7", "22": "10 16", "23": "16 19"}
    text = "".join(f"INPUT({name})\n" for name in "12367") + "OUTPUT(22)\nOUTPUT(23)\n"
    text += "".join(f"{out} = NAND({ins.replace(' ', ', ')})\n" for out, ins in nands.items())

    faults = make_faults(make_circuit(design_of(read_bench(text).verilog())))

    assert (faults.total, faults.collapsed) == (34, 22)


@pytest.mark.parametrize(
    ("kind", "inputs", "groups"),
    [
        ("and", 2, [{"#1=0", "#2=0", "#0=0"}]),
        ("nand", 3, [{"#1=0", "#2=0", "#3=0", "#0=1"}]),
        ("or", 2, [{"#1=1", "#2=1", "#0=1"}]),
        ("nor", 12, [{"#0=0", *(f"#{i}=1" for i in range(1, 13))}]),
        ("not", 1, [{"#1=0", "#0=1"}, {"#1=1", "#0=0"}]),
        ("buf", 1, [{"#1=0", "#0=0"}, {"#1=1", "#0=1"}]),
        ("xor", 2, []),
        ("xnor", 3, []),
    ],
)
def test_gates_collapse_by_the_textbook_rule(
    kind: str, inputs: int, groups: list[set[str]]
) -> None:
    found = equivalent_faults(primitive_cell(kind, inputs + 1))

    assert [{f"{fault.pin}={fault.value}" for fault in group} for group in found] == groups


def library_cells() -> list[Cell]:
    design = design_of("module top (a, y); input a; output y; not u (y, a); endmodule")
    return [design.library.cells[name] for name in ("FA", "AOI21", "MUX")]


@pytest.mark.parametrize("cell", library_cells(), ids=lambda cell: cell.name)
def test_exactly_the_faults_of_one_function_are_equivalent(cell: Cell) -> None:
    groups = equivalent_faults(cell)
    together = {frozenset(pair) for group in groups for pair in combinations(sorted(group), 2)}

    names = [pin.name for pin in cell.inputs()]
    ones = (1 << (1 << len(names))) - 1
    free = dict(zip(names, columns(len(names)), strict=True))

    def outputs(pin: str, value: int) -> list[int]:
        stuck = ones * value
        seen = {name: stuck if name == pin else word for name, word in free.items()}
        return [
            stuck if out.name == pin else evaluate(out.function, seen, ones)
            for out in cell.outputs()
            if out.function is not None
        ]

    faults = [(pin, value) for pin in cell.pins for value in (0, 1)]
    expected = {
        frozenset(pair)
        for pair in combinations(sorted(faults), 2)
        if outputs(*pair[0]) == outputs(*pair[1])
    }
    assert together == expected


def test_storage_and_three_state_cells_collapse_nothing() -> None:
    cells = design_of("module top (a, y); input a; output y; buf u (y, a); endmodule").library.cells

    assert [equivalent_faults(cells[name]) for name in ("DFFE", "TBUF", "GATE")] == [(), (), ()]


def test_clock_nets_are_no_sites_and_a_clock_used_as_data_is() -> None:
    text = (
        "module top (c, k, d, q, y); input c, k, d; output q, y; wire b;"
        " buf u1 (b, c); DFF f (.D(d), .CK(b), .Q(q)); and u2 (y, k, d); endmodule"
    )
    as_data = text.replace("and u2 (y, k, d)", "and u2 (y, k, c)")

    sites, more = (make_faults(make_circuit(design_of(one))).sites for one in (text, as_data))

    names = [sites.circuit.design.net_name(net) for net in sites.net.tolist()]
    assert sorted(set(names)) == ["d", "k", "q", "y"]
    names = [more.circuit.design.net_name(net) for net in more.net.tolist()]
    assert "c" in names
    assert "b" not in names


def test_the_order_of_the_netlist_does_not_change_the_counts() -> None:
    gates = random_gates(3, inputs=6, flops=4, gates=80, outputs=3)
    turned = type(gates)(
        gates.inputs, gates.outputs, gates.flops, dict(reversed(list(gates.gates.items())))
    )

    one, two = (make_faults(make_circuit(design_of(item.verilog()))) for item in (gates, turned))

    assert (one.total, one.collapsed) == (two.total, two.collapsed)
