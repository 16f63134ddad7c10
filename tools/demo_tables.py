"""State tables of the demo's scan cells, row by row.

A row is made of what the inputs must be and what each node becomes. Nodes that take data from
different inputs in the same row need a row for each value, as H/L walks through a row in step.
"""

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import product
from typing import Final


@dataclass(frozen=True)
class Way:
    """One way in which a node gets its next value.

    Attributes:
        when: Token of each clock or control pin concerned.
        source: Input or node whose value it takes, or None to keep its own.
    """

    when: tuple[tuple[str, str], ...]
    source: str | None


def state_table(
    inputs: Sequence[str],
    nodes: Sequence[str],
    ways: Sequence[Sequence[Way]],
    first_rows: Sequence[str] = (),
) -> str:
    """Return the Liberty statetable in which every node has its ways, in all combinations."""
    rows = list(first_rows)
    for chosen in product(*ways):
        needed: dict[str, str] = {}
        if any(needed.setdefault(pin, token) != token for way in chosen for pin, token in way.when):
            continue
        rows += _rows(inputs, nodes, chosen, needed)
    text = ", \\\n              ".join(rows)
    names = f'"{" ".join(inputs)}", "{" ".join(nodes)}"'
    return f'statetable ({names}) {{\n      table : "{text}";\n    }}'


def _rows(
    inputs: Sequence[str], nodes: Sequence[str], chosen: Sequence[Way], needed: dict[str, str]
) -> list[str]:
    """Return a row for each value of the sources."""
    origin: dict[str, str | None] = {}
    for node, way in zip(nodes, chosen, strict=True):
        source = way.source
        if source in origin:  # another node: what it takes now, or what it holds
            source = origin[source] or f"now {source}"
        origin[node] = source
    sources = sorted({source for source in origin.values() if source is not None})
    found = []
    for values in product("HL", repeat=len(sources)):
        value = dict(zip(sources, values, strict=True))
        ins = [needed.get(pin) or value.get(pin, "-") for pin in inputs]
        now = [value.get(f"now {node}", "-") for node in nodes]
        after = [value.get(origin[node] or "", "N") for node in nodes]
        found.append(f"{' '.join(ins)} : {' '.join(now)} : {' '.join(after)}")
    return found


def _forced(inputs: Sequence[str], count: int, asynchronous: Sequence[str]) -> list[str]:
    """Return the rows of reset (which wins) and set."""
    rows = []
    for number, pin in enumerate(asynchronous):
        tokens = ["H" if name in asynchronous[:number] else "-" for name in inputs]
        tokens[list(inputs).index(pin)] = "L"
        dashes, value = " ".join("-" * count), "L" if pin == "RN" else "H"
        rows.append(f"{' '.join(tokens)} : {dashes} : {' '.join(value * count)}")
    return rows


def _free(asynchronous: Sequence[str]) -> tuple[tuple[str, str], ...]:
    return tuple((pin, "H") for pin in asynchronous)


def clocked_scan_table(
    clock: str, asynchronous: Sequence[str], *, falling: bool, enable: bool
) -> str:
    """Return the table of a cell that takes D on its clock and SI on the rise of SCK.

    Each clock works while the other stays at either level; both edges at once give an unknown.
    """
    edge = "F" if falling else "R"
    free = _free(asynchronous)
    on = ((clock, edge), ("SCK", "~R"), *free)
    take = [Way((*on, ("E", "H")), "D"), Way((*on, ("E", "L")), None)] if enable else [Way(on, "D")]
    ways = [
        *take,
        Way(((clock, f"~{edge}"), ("SCK", "R"), *free), "SI"),
        Way(((clock, f"~{edge}"), ("SCK", "~R"), *free), None),
    ]
    inputs = ["D", *["E"] * enable, clock, "SI", "SCK", *asynchronous]
    return state_table(inputs, ["IQ"], [ways], _forced(inputs, 1, asynchronous))


def edge_table(clock: str, asynchronous: Sequence[str], *, falling: bool, enable: bool) -> str:
    """Return the table of a cell that takes D on its clock edge, I under A and L1 under B."""
    edge = "F" if falling else "R"
    free = _free(asynchronous)
    first = [Way((("A", "H"), *free), "I"), Way((("A", "L"), *free), None)]
    on = ((clock, edge), ("B", "L"))
    take = [Way((*on, ("E", "H")), "D"), Way((*on, ("E", "L")), None)] if enable else [Way(on, "D")]
    still = (clock, f"~{edge}")
    second = [*take, Way((still, ("B", "H")), "L1"), Way((still, ("B", "L")), None)]
    inputs = ["D", *["E"] * enable, "I", "A", "B", clock, *asynchronous]
    return state_table(inputs, ["L1", "L2"], [first, second], _forced(inputs, 2, asynchronous))


def _first(free: tuple[tuple[str, str], ...]) -> list[Way]:
    return [
        Way((("C", "L"), ("A", "L"), *free), None),
        Way((("C", "H"), ("A", "L"), *free), "D"),
        Way((("C", "L"), ("A", "H"), *free), "I"),
    ]


def first_latch_table(*, reset: bool) -> str:
    """Return the table of L1 alone."""
    forces = ["RN"] * reset
    inputs = ["D", "C", "I", "A", *forces]
    return state_table(inputs, ["L1M"], [_first(_free(forces))], _forced(inputs, 1, forces))


def pair_table(*, reset: bool) -> str:
    """Return the table of L1 (two ports) and L2 under B."""
    forces = ["RN"] * reset
    inputs = ["D", "C", "I", "A", "B", *forces]
    second = [Way((("B", "L"),), None), Way((("B", "H"),), "M")]
    return state_table(
        inputs, ["M", "S"], [_first(_free(forces)), second], _forced(inputs, 2, forces)
    )


STAR: Final = state_table(
    ["D", "C", "I", "A", "B", "D2", "C2"],
    ["M", "S"],
    [
        _first(()),
        [
            Way((("B", "L"), ("C2", "L")), None),
            Way((("B", "H"), ("C2", "L")), "M"),
            Way((("B", "L"), ("C2", "H")), "D2"),
        ],
    ],
)
"""The table of the L1/L2* form."""
