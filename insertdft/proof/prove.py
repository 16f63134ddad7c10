"""The proof as a whole: two designs in, a verdict out."""

from collections.abc import Iterable, Mapping, Sequence
from typing import Final

import numpy as np

from insertdft.description import Description
from insertdft.design.flat import Design
from insertdft.proof.build import make_circuit
from insertdft.proof.capture import capture_obligations
from insertdft.proof.cycle import clocking_of, cycle_obligations
from insertdft.proof.joint import Joint, Names, join, make_side
from insertdft.proof.match import match_states
from insertdft.proof.mission import mission_obligations
from insertdft.proof.obligations import Failure, Settled, joined, settle
from insertdft.proof.options import ProofOptions, mission_values
from insertdft.proof.result import Count, Counterexample, Proof, Verdict
from insertdft.proof.shift import Shift, shift_obligations
from insertdft.proof.show import counterexample

_NO_OPTIONS: Final = ProofOptions()

INDUCTION: Final = (
    "both netlists begin in matching states, as they do once both were reset or loaded alike"
)
ONE_AT_A_TIME: Final = "clock ports that do not pulse together never change at the same time"


def prove(
    before: Design,
    after: Design,
    description: Description | None,
    options: ProofOptions = _NO_OPTIONS,
) -> Proof:
    """Return whether ``after`` does what ``before`` does, and shifts and captures as described.

    Args:
        before: The original.
        after: The converted netlist, read afresh.
        description: Its chains; None to compare mission mode alone.
        options: Wishes and limits.
    """
    joint = _joint(before, after, options)
    held = mission_values(description, options)
    mission = mission_obligations(joint, held)
    reasons = [*mission.reasons]
    parts = [Shift(mission.blocks)]
    counts: dict[str, Count] = {}
    assumptions = [INDUCTION]
    if mission.edges_to_levels:
        clocking = clocking_of(joint, description, options.phases)
        rows = np.array(mission.edges_to_levels, np.int32)
        parts.append(cycle_obligations(joint, rows, clocking, held))
        assumptions += [
            f"one cycle of clock `{clock}` is a pulse of each of {', '.join(phases)}, one after the"
            " other, and inputs change while all clocks rest"
            for clock, phases in clocking.phases.items()
        ]
    if description is not None and description.chains:
        assumptions.append(ONE_AT_A_TIME)
        parts.append(shift_obligations(joint, description))
        capture, known = capture_obligations(joint, description, held)
        parts.append(capture)
        counts["capture"] = known
    settled = settle(
        joint.aig, [block for part in parts for block in part.blocks], options.conflicts
    )
    settled = joined(settled, Settled(counts, ()))
    wrong = [pair for part in parts for pair in part.wrong]
    reasons += [reason for part in parts for reason in part.reasons]
    return _verdict(joint, settled, wrong, reasons, assumptions, options)


def _joint(before: Design, after: Design, options: ProofOptions) -> Joint:
    one, two = make_side(make_circuit(before)), make_side(make_circuit(after))
    return join(one, two, match_states(one, two, options.mapping))


def _verdict(
    joint: Joint,
    settled: Settled,
    wrong: Sequence[tuple[str, str]],
    reasons: Iterable[str],
    assumptions: Iterable[str],
    options: ProofOptions,
) -> Proof:
    failed = [failure for failure in settled.failures if failure.model is not None]
    open_ = [failure for failure in settled.failures if failure.model is None]
    shown = [Counterexample("chain", subject, message) for subject, message in wrong]
    shown = shown[: options.examples] + _examples(joint, failed, options.examples)
    told = [*reasons, *(_undecided(failure) for failure in open_[: options.examples])]
    counts = _with_wrong(settled.counts, len(wrong))
    verdict = Verdict.PROVEN
    if failed or wrong:
        verdict = Verdict.REFUTED
    elif told or not settled.counts or all(count.total == 0 for count in counts.values()):
        verdict = Verdict.UNDECIDED
        told = told or ["there is nothing to compare"]
    return Proof(verdict, counts, tuple(shown), tuple(told), tuple(assumptions))


def _with_wrong(counts: Mapping[str, Count], wrong: int) -> dict[str, Count]:
    found = {kind: count for kind, count in counts.items() if count.total}
    if wrong:
        found["chain"] = found.get("chain", Count()).plus(Count(refuted=wrong))
    return found


def _examples(joint: Joint, failed: list[Failure], most: int) -> list[Counterexample]:
    names = Names(joint)
    seen: dict[str, int] = {}
    found: list[Counterexample] = []
    for failure in failed:
        kind = failure.block.kind
        seen[kind] = seen.get(kind, 0) + 1
        if seen[kind] <= most:
            found.append(counterexample(joint, names, failure))
    return found


def _undecided(failure: Failure) -> str:
    subject = failure.block.name(failure.row)
    return f"whether the {failure.block.kind} of `{subject}` is the same was not decided in time"
