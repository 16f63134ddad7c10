"""Where to cut loops of gates, so that each latch made of gates becomes one state.

Two gates that read each other are a latch: one of their nets is its state. A design whose latches
are all made of gates is one large loop through its logic, so these pairs are cut first, everywhere,
and only what is still a loop then is cut at the outermost net it has.
"""

from typing import Final, NamedTuple

import numpy as np

from insertdft.design.flat import OUTPUT, Design
from insertdft.proof.aig import Lits
from insertdft.proof.order import Flags, Numbers, strong_parts

_NONE: Final = np.zeros(0, np.int64)


class NetNodes(NamedTuple):
    """Which nodes are values of nets.

    Attributes:
        node: Shape (nets,), node of each net that a gate drives alone, else -1.
        driver: Shape (nets,), the instance that drives it, else -1.
    """

    node: Lits
    driver: Numbers


def choose_cuts(design: Design, nets: NetNodes, left: Lits, right: Lits, on_loops: Lits) -> Lits:
    """Return nodes to cut among ``on_loops``: at least one of a loop."""
    looped = np.zeros(len(left), np.bool_)
    looped[on_loops] = True
    candidates = np.flatnonzero((nets.node >= 0) & looped[np.maximum(nets.node, 0)])
    chosen = nets.node[_pairs(design, nets, candidates)]
    if not len(chosen):
        chosen = _one_a_part(nets, left, right, on_loops, candidates)
    return np.unique(chosen).astype(np.int32)


def _pairs(design: Design, nets: NetNodes, candidates: Numbers) -> Numbers:
    """Return one net of each two gates that read each other (or of a gate that reads itself)."""
    wanted: Flags = np.zeros(design.net_count, np.bool_)
    wanted[candidates] = True
    read = (design.pin_direction != OUTPUT) & (design.pin_net >= 0)
    rows = np.flatnonzero(read)
    rows = rows[wanted[design.pin_net[rows]]]
    through = design.pin_net[rows].astype(np.int64)
    tails, heads = nets.driver[through], design.pin_instance[rows].astype(np.int64)
    forward = (tails << 32) | heads
    order = np.argsort(forward, kind="stable")
    back = (heads << 32) | tails
    if not len(order):
        return _NONE
    place = np.minimum(np.searchsorted(forward[order], back), len(order) - 1)
    mutual = forward[order][place] == back
    other = through[order][place]
    # Nets of outer levels have lower numbers, and those are the ones with names that stay.
    return np.unique(np.minimum(through[mutual], other[mutual]))


def _one_a_part(
    nets: NetNodes, left: Lits, right: Lits, on_loops: Lits, candidates: Numbers
) -> Lits:
    part, _ = strong_parts(left, right, on_loops)
    if not len(candidates):
        return on_loops[np.unique(part, return_index=True)[1]]
    number = np.zeros(len(left), np.int64)
    number[on_loops] = part
    of_net = number[nets.node[candidates]]
    _, first = np.unique(of_net, return_index=True)  # candidates ascend
    return nets.node[candidates[first]]
