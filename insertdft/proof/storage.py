"""States of a design with their functions as literals: what is compared.

All kinds of storage come out as flip-flops or latches: elements as the library describes them,
loops of gates as latches that are always open onto themselves, state tables reduced under the
constants at their pins.
"""

from dataclasses import dataclass, field

import numpy as np

from insertdft.library.cell import StateTable, Storage, StorageKind
from insertdft.library.expression import Const, Expression, Var
from insertdft.proof.aig import FALSE, TRUE, Aig, Lits
from insertdft.proof.circuit import Circuit, TableBlock, at
from insertdft.proof.order import Numbers
from insertdft.proof.tables import Known, reduced
from insertdft.proof.template import FLIP_FLOP, LATCH, LOOP, TABLE
from insertdft.proof.word import literals


@dataclass(frozen=True, slots=True, eq=False)
class States:
    """All states of a design, elements first, then those of tables, block by block, node by node.

    Attributes:
        instance: Shape (n,).
        state: Shape (n,).
        kind: Shape (n,).
        leaf: Shape (n,).
        net: Shape (n,), cut net of a loop, else -1.
    """

    instance: Numbers
    state: Numbers
    kind: Numbers
    leaf: Lits
    net: Numbers

    def __len__(self) -> int:
        """Return the number of states."""
        return len(self.leaf)


def states_of(circuit: Circuit) -> States:
    """Return the states of a circuit in their order."""
    elements = circuit.elements
    instance, state, kind = [elements.instance], [elements.state], [elements.kind]
    leaf, net = [elements.leaf], [elements.net]
    for block in circuit.tables:
        for place in range(len(block.nodes)):
            count = len(block.instances)
            instance.append(block.instances)
            state.append(np.full(count, place, np.int64))
            kind.append(np.full(count, TABLE, np.int64))
            leaf.append(block.nodes[place])
            net.append(np.full(count, -1, np.int64))
    return States(
        np.concatenate(instance).astype(np.int64),
        np.concatenate(state).astype(np.int64),
        np.concatenate(kind).astype(np.int64),
        np.concatenate(leaf).astype(np.int32),
        np.concatenate(net).astype(np.int64),
    )


@dataclass(frozen=True, slots=True, eq=False)
class Forms:
    """What every state does, in the order of ``States``; literals.

    Attributes:
        kind: FLIP_FLOP or LATCH; -1 where a state table is neither.
        data: What it takes.
        clock: Rising edge takes data, or open while true.
        zero: Forced to 0.
        one: Forced to 1.
        unknown: Forced to something the library leaves open.
    """

    kind: Numbers
    data: Lits
    clock: Lits
    zero: Lits
    one: Lits
    unknown: Lits = field(repr=False)


def forms_of(circuit: Circuit, aig: Aig, values: Lits) -> Forms:
    """Return the forms of all states under the literals ``values`` of a circuit's nodes."""
    elements = circuit.elements
    kind = [np.where(elements.kind == LOOP, LATCH, elements.kind)]
    columns = {
        name: [at(values, getattr(elements, name))]
        for name in ("data", "clock", "zero", "one", "unknown")
    }
    for block in circuit.tables:
        for place in range(len(block.nodes)):
            part = _table_forms(aig, values, block, place)
            kind.append(part.kind)
            for name, rows in columns.items():
                rows.append(getattr(part, name))
    return Forms(
        np.concatenate(kind).astype(np.int64),
        **{name: np.concatenate(rows).astype(np.int32) for name, rows in columns.items()},
    )


def _table_forms(aig: Aig, values: Lits, block: TableBlock, place: int) -> Forms:
    """Return one node's forms of a block, worked out for each pattern of constants at its pins."""
    inputs, nodes = at(values, block.inputs), values[block.nodes]
    count = len(block.instances)
    forms = _nothing(count)
    patterns = np.where(inputs <= TRUE, inputs, -1)
    _, first, which = np.unique(patterns, axis=1, return_index=True, return_inverse=True)
    for number, column in enumerate(first.tolist()):
        here = np.flatnonzero(which.ravel() == number)
        known = _known(block.table, patterns[:, column])
        item = reduced(block.table, block.table.nodes[place], known)
        if item is None:
            continue
        names = (*block.table.inputs, *block.table.nodes)
        rows = np.concatenate((inputs[:, here], nodes[:, here]))
        _write(aig, forms, here, item, dict(zip(names, rows, strict=True)))
    return forms


def _known(table: StateTable, pattern: Lits) -> Known:
    pairs = zip(table.inputs, pattern.tolist(), strict=True)
    return tuple((name, value) for name, value in pairs if value >= 0)


def _nothing(count: int) -> Forms:
    blank = [np.zeros(count, np.int32) for _ in range(5)]
    return Forms(np.full(count, -1, np.int64), *blank)


def _write(aig: Aig, forms: Forms, here: Numbers, item: Storage, values: dict[str, Lits]) -> None:
    values[item.state_inverted] = values[item.state] ^ 1

    def lits(expression: Expression | None, otherwise: Expression) -> Lits:
        return literals(aig, expression or otherwise, values)

    clear, preset = lits(item.clear, Const(False)), lits(item.preset, Const(False))
    both = aig.conj(clear, preset)
    token = item.clear_preset[0]
    forms.kind[here] = FLIP_FLOP if item.kind is StorageKind.FLIP_FLOP else LATCH
    forms.data[here] = lits(item.data, Var(item.state))
    forms.clock[here] = lits(item.clock, Const(False))
    forms.zero[here] = clear if token == "L" else aig.conj(clear, preset ^ 1)
    forms.one[here] = preset if token == "H" else aig.conj(preset, clear ^ 1)
    forms.unknown[here] = both if token not in ("L", "H") else np.full_like(both, FALSE)


def following(aig: Aig, forms: Forms, states: Lits) -> Lits:
    """Return what each latch comes to be; for a flip-flop, what it is without an edge."""
    open_ = np.where(forms.kind == LATCH, forms.clock, FALSE).astype(np.int32)
    free = aig.choose(open_, forms.data, states)
    return aig.disj(forms.one, aig.conj(forms.zero ^ 1, free))


def state_name(circuit: Circuit, states: States, number: int) -> str:
    """Return the hierarchical name of a state, for people: instance, and variable if several."""
    design = circuit.design
    instance = int(states.instance[number])
    if states.kind[number] == LOOP:
        net = int(states.net[number])
        return design.net_name(net) if net >= 0 else "a loop of gates"
    name = design.name(instance)
    cell = design.cell_of(instance)
    if cell is None:
        return name
    names = cell.state_table.nodes if cell.state_table else [at.state for at in cell.storage]
    return f"{name}:{names[int(states.state[number])]}" if len(names) > 1 else name
