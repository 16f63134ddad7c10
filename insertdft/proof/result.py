"""What a proof says: a verdict, how it was reached, and what speaks against it."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import Enum
from typing import Any


class Verdict(Enum):
    """What is known at the end."""

    PROVEN = "proven"
    REFUTED = "refuted"
    UNDECIDED = "undecided"


@dataclass(frozen=True, slots=True)
class Counterexample:
    """Something that the converted netlist does otherwise.

    Attributes:
        kind: Which kind of obligation fails.
        subject: Cell, port, or chain position concerned, by hierarchical name.
        message: The fact in one sentence, without a full stop.
        ports: Value of top ports (bits) that matter.
        states: Value of states of the original that matter, by hierarchical name.
        states_after: Value of states that only the converted netlist has.
        others: Value of black-box outputs, undriven nets and the like, by kind and name.
        before: Value in the original, None where the obligation has no such side.
        after: Value in the converted netlist.
    """

    kind: str
    subject: str
    message: str
    ports: Mapping[str, int] = field(default_factory=dict)
    states: Mapping[str, int] = field(default_factory=dict)
    states_after: Mapping[str, int] = field(default_factory=dict)
    others: Mapping[str, int] = field(default_factory=dict)
    before: int | None = None
    after: int | None = None


@dataclass(frozen=True, slots=True)
class Count:
    """Obligations of one kind, by what became of them.

    Attributes:
        structure: Held because both sides are the same nodes.
        solver: Held by the solver.
        refuted: Failed.
        undecided: Not decided within the limit.
    """

    structure: int = 0
    solver: int = 0
    refuted: int = 0
    undecided: int = 0

    @property
    def total(self) -> int:
        """All of them."""
        return self.structure + self.solver + self.refuted + self.undecided

    def plus(self, other: "Count") -> "Count":
        """Return the sums."""
        return Count(
            self.structure + other.structure,
            self.solver + other.solver,
            self.refuted + other.refuted,
            self.undecided + other.undecided,
        )


@dataclass(frozen=True, slots=True)
class Proof:
    """The outcome.

    Attributes:
        verdict: What is known.
        counts: Obligations by kind, in the order in which they were looked at.
        counterexamples: Some of what fails, at most a few of each kind.
        reasons: Why something is undecided, a sentence each, cells named.
        assumptions: What the proof takes for granted, a sentence each.
    """

    verdict: Verdict
    counts: Mapping[str, Count]
    counterexamples: tuple[Counterexample, ...] = ()
    reasons: tuple[str, ...] = ()
    assumptions: tuple[str, ...] = ()

    @property
    def obligations(self) -> int:
        """Number of obligations."""
        return sum(count.total for count in self.counts.values())

    def to_json(self, stamp: Mapping[str, Any]) -> dict[str, Any]:
        """Return the certificate as plain data.

        Args:
            stamp: What the caller knows of the run (hashes of the inputs, version, time), put
                first as it is.
        """
        return {
            "format": "insertdft-proof",
            "version": 1,
            **stamp,
            "verdict": self.verdict.value,
            "obligations": {
                kind: {
                    "total": count.total,
                    "by_structure": count.structure,
                    "by_solver": count.solver,
                    "refuted": count.refuted,
                    "undecided": count.undecided,
                }
                for kind, count in self.counts.items()
            },
            "counterexamples": [_plain(item) for item in self.counterexamples],
            "reasons": list(self.reasons),
            "assumptions": list(self.assumptions),
        }


def _plain(item: Counterexample) -> dict[str, Any]:
    return {
        "kind": item.kind,
        "subject": item.subject,
        "message": item.message,
        "ports": dict(item.ports),
        "states": dict(item.states),
        "states_after": dict(item.states_after),
        "others": dict(item.others),
        "before": item.before,
        "after": item.after,
    }
