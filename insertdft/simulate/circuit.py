"""A design as Boolean functions in order of evaluation.

Every value has a *slot*. Slots of sources (constants, ports, states, what nobody models) come
first; behind them those of *nodes*, one function each, sorted by level and function so that the
outputs of a *group* (same level, same function) lie side by side. An *edge* is one input of one
node.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import NamedTuple

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.expression import Expression
from insertdft.netlist import Ids


class Function(NamedTuple):
    """What a node does: an expression over ``"0"``, ``"1"``, ... and the number of its inputs."""

    expression: Expression
    arity: int


class Group(NamedTuple):
    """Nodes of one level and one function.

    Attributes:
        function: Index into ``Circuit.functions``.
        level: 1 or more; inputs come from lower levels.
        first: Slot of the first node.
        end: Slot behind the last.
        inputs: Shape (arity, end - first), slots.
        first_edge: Input ``i`` of the k-th node is edge ``first_edge + i * (end - first) + k``.
    """

    function: int
    level: int
    first: int
    end: int
    inputs: Ids
    first_edge: int


@dataclass(frozen=True, slots=True, eq=False)
class States:
    """The state variables, one row each.

    Attributes:
        instance: Leaf instance that holds it.
        storage: Index into the storages of its cell.
        latch: Whether it is a latch (else a flip-flop).
        slot: Where its value stands.
        following: Slot of what it takes. Without clocks: at a capture, with set and reset counted
            in. With clocks: its data alone.
        clock: Slot of its clock (or enable) expression; -1 where it has none, or without clocks.
        to_zero: Slot of "is cleared", or -1.
        to_one: Slot of "is preset", or -1.
    """

    instance: Ids
    storage: Ids
    latch: Ids
    slot: Ids
    following: Ids
    clock: Ids
    to_zero: Ids
    to_one: Ids


@dataclass(frozen=True, slots=True, eq=False)
class Circuit:
    """Functions of a design in order of evaluation.

    Attributes:
        design: What it was made from.
        slots: Number of slots.
        first_node: Slots below it are sources.
        slot_of_net: Shape (nets,), slot of each flat net.
        functions: Distinct functions.
        groups: In order of evaluation.
        level: Shape (slots,), 0 for sources.
        node_instance: Shape (slots,), instance whose pin or state the slot is the value of, -1 for
            sources that are no state.
        node_row: Shape (slots,), row of the output pin, -1 where it is no pin's value.
        edge_slot: Shape (edges,), slot that the edge reads.
        edge_node: Shape (edges,), slot of the node that it is an input of.
        edge_row: Shape (edges,), row of the input pin, -1 where it is none (a state, a bus).
        states: State variables.
        unknown: Source slots whose value nothing gives: x and z, black boxes, undriven nets,
            floating buses, cut loops.
        inputs: Name of an input (or inout) port bit -> its slot.
        outputs: Name of an output (or inout) port bit -> its slot.
        at_rest: Clock port bits that pulse at a capture, and their off values; empty where clocks
            are taken to arrive at every state.
        loops: Instances of each combinational loop.
        unmodelled: Instances whose outputs nothing describes (black boxes among them).
    """

    design: Design
    slots: int
    first_node: int
    slot_of_net: Ids = field(repr=False)
    functions: tuple[Function, ...] = field(repr=False)
    groups: tuple[Group, ...] = field(repr=False)
    level: Ids = field(repr=False)
    node_instance: Ids = field(repr=False)
    node_row: Ids = field(repr=False)
    edge_slot: Ids = field(repr=False)
    edge_node: Ids = field(repr=False)
    edge_row: Ids = field(repr=False)
    states: States = field(repr=False)
    unknown: Ids = field(repr=False)
    inputs: Mapping[str, int] = field(repr=False)
    outputs: Mapping[str, int] = field(repr=False)
    at_rest: Mapping[str, int]
    loops: tuple[tuple[int, ...], ...]
    unmodelled: tuple[int, ...]

    @property
    def depth(self) -> int:
        """Highest level."""
        return self.groups[-1].level if self.groups else 0

    @property
    def nodes(self) -> int:
        """Number of nodes, which is the number of function evaluations for one pattern."""
        return self.slots - self.first_node

    def slot(self, net: int) -> int:
        """Return the slot of a flat net."""
        return int(self.slot_of_net[net])

    def net_of_slot(self) -> Ids:
        """Return shape (slots,): a flat net with that value, -1 where there is none."""
        nets = np.full(self.slots, -1, np.int32)
        order = np.arange(len(self.slot_of_net) - 1, -1, -1, dtype=np.int32)
        nets[self.slot_of_net[order]] = order
        return nets
