"""ff, latch, bank and statetable groups of a Liberty cell.

A bank is opened into one ``Storage`` a bit, its variables named ``IQ[0]``, ``IQ[1]``, ...
"""

import re
from collections.abc import Collection, Mapping
from itertools import pairwise
from typing import Final

from insertdft.diagnostics import error
from insertdft.library.cell import StateTable, Storage, StorageKind
from insertdft.library.expression import Expression, Not, Var, substitute
from insertdft.library.liberty_expressions import Reader, for_bit
from insertdft.library.liberty_syntax import Group

STORAGE_GROUPS: Final = ("ff", "latch", "ff_bank", "latch_bank")
MOST_BANK_BITS: Final = 4096


def read_storages(
    cell: Group, reader: Reader, buses: Mapping[str, tuple[str, ...]], pins: Collection[str]
) -> tuple[tuple[Storage, ...], dict[str, tuple[str, ...]]]:
    """Return the storage of a cell (or test_cell), and what its variables are called by bit.

    A variable that has the name of one of ``pins`` gets another, so that names stay apart.
    """
    found: list[Storage] = []
    variables: dict[str, tuple[str, ...]] = {}
    for group in cell.all_of(*STORAGE_GROUPS):
        names = (*group.names, "", "")[:3]
        bits = _bank_bits(names[2]) if group.kind.endswith("_bank") else 0
        for name in names[:2]:
            own = _apart(name, pins)
            variables[name] = tuple(f"{own}[{bit}]" for bit in range(bits)) or (own,)
        vectors = {**buses, **variables}
        whole = _storage(group, reader, names[0], names[1])
        found += [_bit_of(whole, bit, vectors) for bit in range(bits or 1)]
    return tuple(found), variables


def _apart(name: str, pins: Collection[str]) -> str:
    return f"state {name}" if name in pins else name


def _bank_bits(text: str) -> int:
    return min(int(text), MOST_BANK_BITS) if text.isdigit() else 1


def _storage(group: Group, reader: Reader, state: str, inverted: str) -> Storage:
    flip_flop = group.kind.startswith("ff")
    clock, data = ("clocked_on", "next_state") if flip_flop else ("enable", "data_in")
    return Storage(
        StorageKind.FLIP_FLOP if flip_flop else StorageKind.LATCH,
        state,
        inverted,
        1,
        reader.read(group, data),
        reader.read(group, clock),
        reader.read(group, clock + "_also"),
        reader.read(group, "clear"),
        reader.read(group, "preset"),
        (group.text("clear_preset_var1"), group.text("clear_preset_var2")),
    )


def _bit_of(whole: Storage, bit: int, vectors: Mapping[str, tuple[str, ...]]) -> Storage:
    def own(expression: Expression | None) -> Expression | None:
        return None if expression is None else for_bit(expression, bit, vectors)

    return Storage(
        whole.kind,
        vectors[whole.state][bit],
        vectors[whole.state_inverted][bit],
        1,
        own(whole.data),
        own(whole.clock),
        own(whole.clock_also),
        own(whole.clear),
        own(whole.preset),
        whole.clear_preset,
    )


def chained(
    storages: tuple[Storage, ...], scan_in: str, *, inverted: bool, from_msb: bool
) -> tuple[Storage, ...]:
    """Return the bits of a bank linked as its ``scan_start_pin`` says.

    The library writes the scan input once for all bits; only the first takes it, each other takes
    its neighbour's state (inverted where ``scan_pin_inverted`` says so).
    """
    order = list(reversed(storages)) if from_msb else list(storages)
    linked = {order[0].state: order[0]}
    for before, this in pairwise(order):
        source: Expression = Not(Var(before.state)) if inverted else Var(before.state)
        data = None if this.data is None else substitute(this.data, {scan_in: source})
        linked[this.state] = _with_data(this, data)
    return tuple(linked[item.state] for item in storages)


def _with_data(storage: Storage, data: Expression | None) -> Storage:
    return Storage(
        storage.kind,
        storage.state,
        storage.state_inverted,
        storage.bits,
        data,
        storage.clock,
        storage.clock_also,
        storage.clear,
        storage.preset,
        storage.clear_preset,
    )


def read_state_table(
    cell: Group, reader: Reader, pins: Collection[str]
) -> tuple[StateTable | None, dict[str, str]]:
    """Return the statetable group of a cell, and what its nodes are called in it.

    A node that has the name of one of ``pins`` gets another, so that names stay apart.
    """
    groups = cell.all_of("statetable")
    if not groups:
        return None, {}
    group = groups[0]
    inputs, nodes = (*(tuple(name.split()) for name in group.names), (), ())[:2]
    rows = []
    for line in _rows(group.text("table") or ""):
        parts = [tuple(part.split()) for part in line.split(":")]
        widths = [len(part) for part in parts]
        if widths != [len(inputs), len(nodes), len(nodes)]:
            message = f"row `{line.strip()}` of the state table does not fit its inputs and nodes"
            hint = "write one token for each input, each node and each next node, parted by `:`"
            reader.diagnostics.append(error("library-syntax", message, group.span("table"), hint))
            continue
        rows.append((parts[0], parts[1], parts[2]))
    called = {node: _apart(node, pins) for node in nodes}
    return StateTable(inputs, tuple(called.values()), tuple(rows)), called


def _rows(text: str) -> list[str]:
    return [line for line in re.split(r"[,\n]", text.replace("\\", " ")) if line.strip()]
