"""A flat design as one graph of and-nodes over leaves, before any value is given.

The graph keeps the design's own nodes, one for one, so that it can be evaluated again and again:
each evaluation gives every leaf a literal of a shared ``Aig`` and returns the literal of every
node. Loops of gates are cut; a cut node is a leaf like a state, and its own function is kept.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field

import numpy as np
import numpy.typing as npt

from insertdft.design.flat import Design
from insertdft.library.cell import StateTable
from insertdft.proof.aig import Aig, Lits

Numbers = npt.NDArray[np.int64]


@dataclass(frozen=True, slots=True, eq=False)
class Elements:
    """Flip-flops, latches and cut loops as columns; functions are literals of the circuit.

    Attributes:
        instance: Leaf instance, for a loop the one that drives the cut net.
        state: Which element of the instance.
        kind: FLIP_FLOP, LATCH or LOOP.
        leaf: Node of its state.
        data: What it takes; of a loop, what drives the cut net.
        clock: See ``StateTemplate``; literal 1 for a loop.
        zero: See ``StateTemplate``.
        one: See ``StateTemplate``.
        unknown: See ``StateTemplate``.
        net: The cut net of a loop, -1 for others.
    """

    instance: Numbers
    state: Numbers
    kind: Numbers
    leaf: Lits
    data: Lits
    clock: Lits
    zero: Lits
    one: Lits
    unknown: Lits
    net: Numbers


@dataclass(frozen=True, slots=True, eq=False)
class TableBlock:
    """All instances of one cell that a state table describes.

    Attributes:
        table: The table.
        instances: Shape (n,).
        inputs: Shape (inputs, n), literals at the table's inputs.
        nodes: Shape (nodes, n), leaves of its nodes.
    """

    table: StateTable
    instances: Numbers
    inputs: Lits
    nodes: Lits


@dataclass(frozen=True, slots=True, eq=False)
class Buses:
    """Nets that can be let go.

    Attributes:
        nets: The nets.
        low: Literal of "someone drives 0", by bus.
        high: Literal of "someone drives 1", by bus.
    """

    nets: tuple[int, ...]
    low: Lits
    high: Lits


@dataclass(frozen=True, slots=True, eq=False)
class Circuit:
    """The graph.

    Attributes:
        design: What it was made from.
        left: Shape (nodes,), first operand of each node, -1 for leaves.
        right: Shape (nodes,), second operand.
        order: Nodes that are no leaves, in an order of evaluation.
        bounds: Where each level of ``order`` begins, and its end.
        net: Shape (nets,), literal of each net.
        leaves: Leaf of everything but states: (kind, name) -> node.
        elements: States with functions.
        tables: States with tables.
        buses: Nets that can be let go.
        observed: Input pins of black boxes: (instance, pin, literal).
        unsupported: What cannot be reasoned about: (instance, why).
    """

    design: Design
    left: Lits = field(repr=False)
    right: Lits = field(repr=False)
    order: Lits = field(repr=False)
    bounds: Numbers = field(repr=False)
    net: Lits = field(repr=False)
    leaves: Mapping[tuple[str, str], int] = field(repr=False)
    elements: Elements = field(repr=False)
    tables: Sequence[TableBlock] = field(repr=False)
    buses: Buses = field(repr=False)
    observed: tuple[tuple[int, str, int], ...] = field(repr=False)
    unsupported: tuple[tuple[int, str], ...] = ()


def evaluate(circuit: Circuit, aig: Aig, values: Lits, order: Lits, bounds: Numbers) -> None:
    """Work out the literals of the nodes of ``order``, level by level, in place.

    Args:
        circuit: The graph.
        aig: Where the functions are made.
        values: Shape (nodes,), literal of each node; leaves must be given.
        order: ``circuit.order`` or a part of it that is closed under operands.
        bounds: Levels of ``order``.
    """
    left, right = circuit.left[order], circuit.right[order]
    for first, end in zip(bounds[:-1].tolist(), bounds[1:].tolist(), strict=True):
        one, other = left[first:end], right[first:end]
        values[order[first:end]] = aig.conj(
            values[one >> 1] ^ (one & 1), values[other >> 1] ^ (other & 1)
        )


def at(values: Lits, literals: Lits) -> Lits:
    """Return the values of literals of a circuit."""
    found: Lits = values[literals >> 1] ^ (literals & 1)
    return found
