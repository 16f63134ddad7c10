"""Obligations: pairs of functions that must be equal, by kind, and their settling."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass

import numpy as np

from insertdft.proof.aig import FALSE, TRUE, Aig, Lits
from insertdft.proof.result import Count
from insertdft.proof.sat import Answer, decide


@dataclass(frozen=True, slots=True, eq=False)
class Block:
    """Obligations of one kind.

    Attributes:
        kind: In plain words.
        left: Shape (n,), what is expected.
        right: Shape (n,), what is there.
        care: Shape (n,), condition under which they must be equal; None for always.
        name: What one of them is about.
        fact: The sentence to say when one fails.
    """

    kind: str
    left: Lits
    right: Lits
    care: Lits | None
    name: Callable[[int], str]
    fact: Callable[[int], str]


@dataclass(frozen=True, slots=True, eq=False)
class Failure:
    """One obligation that is not known to hold.

    Attributes:
        block: Its block.
        row: Its place in the block.
        model: Values of variables under which it fails, None if it is undecided.
    """

    block: Block
    row: int
    model: Mapping[int, bool] | None


@dataclass(frozen=True, slots=True, eq=False)
class Settled:
    """What became of obligations.

    Attributes:
        counts: By kind.
        failures: All that failed or are undecided, in order.
    """

    counts: Mapping[str, Count]
    failures: tuple[Failure, ...]


def settle(aig: Aig, blocks: Sequence[Block], conflicts: int) -> Settled:
    """Decide every obligation.

    Args:
        aig: The graph that the literals are of.
        blocks: Obligations.
        conflicts: Limit of the solver for one obligation.
    """
    counts: dict[str, Count] = {}
    open_: list[tuple[Block, int]] = []
    questions: list[Lits] = []
    for block in blocks:
        differ = _difference(aig, block)
        rows = np.flatnonzero(differ != FALSE)
        same = Count(structure=len(differ) - len(rows))
        counts[block.kind] = counts.get(block.kind, Count()).plus(same)
        questions.append(differ[rows])
        open_ += [(block, row) for row in rows.tolist()]
    asked = np.concatenate(questions) if questions else np.zeros(0, np.int32)
    failures: list[Failure] = []
    for (block, row), answer in zip(open_, decide(aig, asked, conflicts), strict=True):
        counts[block.kind] = counts[block.kind].plus(_count(answer))
        if answer.by == "undecided" or answer.model is not None:
            failures.append(Failure(block, row, answer.model))
    return Settled(counts, tuple(failures))


def _difference(aig: Aig, block: Block) -> Lits:
    """Return the literal of "they differ" of each row; only rows not alike are looked at."""
    found = np.zeros(len(block.left), np.int32)
    rows = np.flatnonzero(block.left != block.right)
    if len(rows):
        differ = aig.parity(block.left[rows], block.right[rows])
        care = np.full(len(rows), TRUE, np.int32) if block.care is None else block.care[rows]
        found[rows] = aig.conj(differ, care)
    return found


def _count(answer: Answer) -> Count:
    if answer.by == "undecided":
        return Count(undecided=1)
    return Count(refuted=1) if answer.model is not None else Count(solver=1)


def joined(first: Settled, second: Settled) -> Settled:
    """Return both in one."""
    counts = dict(first.counts)
    for kind, count in second.counts.items():
        counts[kind] = counts.get(kind, Count()).plus(count)
    return Settled(counts, (*first.failures, *second.failures))
