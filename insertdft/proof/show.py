"""A failed obligation in terms of the user: values of ports and states."""

import numpy as np

from insertdft.proof.aig import cone, read, simulate
from insertdft.proof.joint import AFTER, STATE, Joint, Names
from insertdft.proof.lay import PORT
from insertdft.proof.obligations import Failure
from insertdft.proof.result import Counterexample


def counterexample(joint: Joint, names: Names, failure: Failure) -> Counterexample:
    """Return a failure with the values under which it shows, named."""
    block, row = failure.block, failure.row
    model = dict(failure.model or {})
    ports: dict[str, int] = {}
    states: dict[str, int] = {}
    extra: dict[str, int] = {}
    others: dict[str, int] = {}
    for node in sorted(model):
        kind, name, side = names.of(node)
        value = int(model[node])
        if kind == PORT:
            ports[name] = value
        elif kind == STATE:
            (extra if side == AFTER else states)[name] = value
        else:
            others[f"{kind} {name}"] = value
    pair = np.array([block.left[row], block.right[row]], np.int32)
    nodes = cone(joint.aig, pair)
    sources = nodes[(joint.aig.left[nodes] < 0) & (nodes > 0)]
    words = np.array([[int(model.get(node, False))] for node in sources.tolist()], np.uint64)
    values = simulate(joint.aig, nodes, words.reshape(-1, 1), 1)
    left, right = (int(at) & 1 for at in read(values, nodes, pair)[:, 0].tolist())
    return Counterexample(
        kind=block.kind,
        subject=block.name(row),
        message=block.fact(row),
        ports=ports,
        states=states,
        states_after=extra,
        others=others,
        before=left,
        after=right,
    )
