"""In which patterns a change on a line is seen, for all lines of a block at once.

Backwards from what the tester sees: a change on an input of a node is seen when the node passes it
on and a change of the node is seen. That is exact within a region without fan-out; at a joint root
the change is followed forward (``events``).
"""

from typing import Final, NamedTuple

import numpy as np

from insertdft.faults.events import Known, follow
from insertdft.faults.network import Network
from insertdft.netlist import Ids
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.circuit import Group
from insertdft.simulate.words import ONES, Flags, Words, differs, inverse

#: Joint roots that are followed together: enough to keep numpy busy, few enough for the cache.
TOGETHER: Final = 2048


class Observed(NamedTuple):
    """Patterns in which a change is seen, as words.

    Attributes:
        slot: Shape (slots, words).
        edge: Shape (edges, words).
        valid: Shape (slots,), False where a root was not asked for (words are then 0).
    """

    slot: Words
    edge: Words
    valid: Flags


def observe(
    network: Network,
    evaluator: Evaluator,
    values: Words,
    wanted: Flags,
    together: int = TOGETHER,
) -> Observed:
    """Return in which patterns a change of each slot, or of one reader alone, is seen.

    Args:
        network: Readers of every slot.
        evaluator: Functions.
        values: Fault-free values of all slots.
        wanted: Joint roots that matter, shape (slots,).
        together: How many joint roots to follow at once, about; only speed depends on it.
    """
    circuit, words = network.circuit, values.shape[-1]
    found = Observed(
        np.zeros((circuit.slots, words), np.uint64),
        np.zeros((len(circuit.edge_slot), words), np.uint64),
        np.zeros(circuit.slots, np.bool_),
    )
    found.slot[network.seen] = ONES
    found.valid[:] = ~network.joint[network.root]
    roots = np.flatnonzero(network.joint & wanted).astype(np.int32)
    groups = list(circuit.groups)
    done = circuit.depth + 1  # levels from here on are finished
    while done > 0:
        floor, batch = _next_batch(network, roots, done, together)
        roots = roots[: len(roots) - len(batch)]
        _follow_batch(network, evaluator, values, batch, found, done)
        for level in range(done - 1, floor - 1, -1):
            _trace_level(network, found, level)
            while groups and groups[-1].level == level:
                _trace_group(evaluator, values, groups.pop(), found)
        done = floor
    return found


def _next_batch(network: Network, roots: Ids, done: int, together: int) -> tuple[int, Ids]:
    """Return the lowest level of the next batch, and its roots (the last ones of ``roots``)."""
    if len(roots) <= together:
        return 0, roots
    floor = int(network.circuit.level[roots[-together]])
    first = int(np.searchsorted(roots, network.level_start[floor]))
    return min(floor, done - 1), roots[first:]


def _follow_batch(
    network: Network,
    evaluator: Evaluator,
    values: Words,
    batch: Ids,
    found: Observed,
    done: int,
) -> None:
    settled = found.valid.copy()
    settled[: network.level_start[min(done, len(network.level_start) - 1)]] = False
    settled |= network.seen
    known = Known(settled, found.slot)
    for begin in range(0, len(batch), 2 * TOGETHER):
        some = batch[begin : begin + 2 * TOGETHER]
        found.slot[some] = follow(network, evaluator, values, some, known)
    is_done = np.zeros(network.circuit.slots, np.bool_)
    is_done[batch] = True
    found.valid[is_done[network.root]] = True


def _trace_level(network: Network, found: Observed, level: int) -> None:
    begin, end = network.level_start[level], network.level_start[level + 1]
    link = network.link[begin:end]
    slots = np.flatnonzero(link >= 0)
    found.slot[begin + slots] = found.edge[link[slots]]


def _trace_group(evaluator: Evaluator, values: Words, group: Group, found: Observed) -> None:
    inputs = evaluator.read(values, group)
    good = tuple(rail[group.first : group.end] for rail in values)
    above = found.slot[group.first : group.end]
    step, count = evaluator.steps[group.function], group.end - group.first
    for number, rails in enumerate(inputs):
        turned = [*inputs[:number], inverse(rails), *inputs[number + 1 :]]
        first = group.first_edge + number * count
        found.edge[first : first + count] = differs(step(turned), good) & above
