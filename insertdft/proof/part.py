"""What of a circuit matters to some of its values while some ports never change.

In shift mode most of the logic is cut off by constants, so that only the chains are left to
simulate.
"""

import numpy as np

from insertdft.proof.aig import TRUE, Lits
from insertdft.proof.circuit import Circuit, TableBlock
from insertdft.proof.order import Flags, Numbers
from insertdft.proof.phases import Part


def part_for(circuit: Circuit, values: Lits, roots: Lits) -> Part:
    """Return the part that the literals ``roots`` of a circuit depend on, through states too.

    Args:
        circuit: The graph.
        values: Literals of all nodes while everything that ever changes is a variable; nodes that
            are constant all the same stay so.
        roots: Literals of the circuit.
    """
    needed = np.zeros(len(circuit.left), np.bool_)
    elements = circuit.elements
    rows = np.zeros(len(elements.leaf), np.bool_)
    columns = [np.zeros(block.nodes.shape[1], np.bool_) for block in circuit.tables]
    front = roots >> 1
    while len(front):
        _mark(circuit, values, needed, front)
        fresh = needed[elements.leaf] & ~rows
        rows |= fresh
        functions = [
            column[fresh] >> 1
            for column in (
                elements.data,
                elements.clock,
                elements.zero,
                elements.one,
                elements.unknown,
            )
        ]
        for block, seen in zip(circuit.tables, columns, strict=True):
            hit = needed[block.nodes].any(axis=0) & ~seen
            seen[hit] = True
            functions.append(block.inputs[:, hit].ravel() >> 1)
        front = np.unique(np.concatenate(functions))
        front = front[~needed[front]]
    order, bounds = _kept(circuit, values, needed)
    tables = [
        TableBlock(block.table, block.instances[seen], block.inputs[:, seen], block.nodes[:, seen])
        for block, seen in zip(circuit.tables, columns, strict=True)
        if seen.any()
    ]
    return Part(np.flatnonzero(rows), tuple(tables), order, bounds)


def cone_of(circuit: Circuit, roots: Lits) -> tuple[Lits, Numbers]:
    """Return order and levels of what literals depend on without passing a state."""
    free = np.full(len(circuit.left), TRUE + 1, np.int32)
    return _kept(circuit, free, reached(circuit, roots))


def reached(circuit: Circuit, roots: Lits) -> Flags:
    """Return which nodes literals depend on without passing a state."""
    needed = np.zeros(len(circuit.left), np.bool_)
    free = np.full(len(circuit.left), TRUE + 1, np.int32)
    _mark(circuit, free, needed, np.unique(roots >> 1))
    return needed


def _mark(circuit: Circuit, values: Lits, needed: Flags, front: Lits) -> None:
    """Mark what ``front`` depends on, not looking behind constants."""
    while len(front):
        needed[front] = True
        inner = front[(circuit.left[front] >= 0) & (values[front] > TRUE)]
        operands = np.concatenate((circuit.left[inner], circuit.right[inner])) >> 1
        operands = operands[~needed[operands] & (values[operands] > TRUE)]
        front = np.unique(operands)


def _kept(circuit: Circuit, values: Lits, needed: Flags) -> tuple[Lits, Numbers]:
    keep = needed[circuit.order] & (values[circuit.order] > TRUE)
    sizes = np.add.reduceat(keep, circuit.bounds[:-1]) if len(circuit.order) else np.zeros(0)
    bounds = np.concatenate(([0], np.cumsum(sizes))).astype(np.int64)
    return circuit.order[keep], bounds
