"""Compare what the two benches of ``scan_bench`` printed."""

from collections.abc import Sequence
from dataclasses import dataclass

from bench_parts import Log, Outcome, Setup, Side, by_name, flush_shifts, leading_scans, positions
from wrapped import output_inversions

from insertdft.description import Description


@dataclass(frozen=True)
class Comparison:
    """What was simulated.

    Attributes:
        before: The original netlist.
        after: The converted one.
        description: Its chains.
        setup: How it was simulated.
        others: Storage outside the chains.
        stream: Scan-in values of every shift, by chain.
        wanted_states: What the original was set to in each round.
    """

    before: Side
    after: Side
    description: Description
    setup: Setup
    others: Sequence[str]
    stream: Sequence[Sequence[int]]
    wanted_states: Sequence[str]

    @property
    def longest(self) -> int:
        """Length of the longest chain."""
        return max(chain.length for chain in self.description.chains)


def flipped(before: Side, after: Side, name: str) -> bool:
    """Return whether the new cell keeps the inverse of the state that the old one kept."""
    old = output_inversions(before.storage[name].cell)
    new = output_inversions(after.storage[name].cell)
    common = [pin for pin in old if pin in new]
    return bool(common) and old[common[0]] != new[common[0]]


def compare(run: Comparison, before: Log, after: Log) -> Outcome:
    """Compare the two logs."""
    faults: list[str] = []
    _check_setting(run, before, faults)
    counts = [
        _compare_flush(run, after, faults),
        _compare_load(run, after, faults),
        _compare_capture(run, before, after, faults),
        _compare_others(run, before, after, faults),
        _compare_lines(before.of("O"), after.of("O"), run.before.outputs, "output", faults),
    ]
    return Outcome(*counts, tuple(faults))


def _check_setting(run: Comparison, before: Log, faults: list[str]) -> None:
    """Make sure that the original holds the states it was set to (open latches may not)."""
    for wanted, line in zip(run.wanted_states, before.of("X"), strict=True):
        held, asked = by_name(line, run.before.storage), by_name(wanted, run.before.storage)
        faults += [
            f"the original's `{name}` holds {held[name]}, not {asked[name]} as set"
            for name, wrapping in run.before.storage.items()
            if not wrapping.is_latch and held[name] != asked[name]
        ]


def _compare_flush(run: Comparison, after: Log, faults: list[str]) -> int:
    count = 0
    for number, chain in enumerate(run.description.chains):
        parity = sum(cell.inverted for cell in chain.cells) & 1 ^ chain.inverted_out
        for shift, line in enumerate(after.of("F")):
            if shift < chain.length:
                continue
            wanted = run.stream[shift - chain.length][number] ^ parity
            count += 1
            if line[number] != str(wanted):
                faults.append(f"{chain.name}: shift {shift} shows {line[number]}, not {wanted}")
    return count


def _loads(run: Comparison) -> list[list[list[int]]]:
    """Return the bits shifted into each chain in each round, first bit first."""
    flush = flush_shifts(run.description)
    leading = leading_scans(run.description.sequences[run.setup.capture])
    capture = run.description.sequences[run.setup.capture]
    scans = run.longest + sum(cycle.scan for cycle in capture)
    unload = run.longest + sum(
        cycle.scan for cycle in run.description.sequences.get("unload_start", ())
    )
    found = []
    for round_ in range(run.setup.rounds):
        end = flush + round_ * (scans + unload) + run.longest + leading
        rows = run.stream[:end]
        found.append(
            [
                [row[number] for row in rows[end - chain.length :]]
                for number, chain in enumerate(run.description.chains)
            ]
        )
    return found


def _compare_load(run: Comparison, after: Log, faults: list[str]) -> int:
    count = 0
    for line, loads in zip(after.of("X"), _loads(run), strict=True):
        held = by_name(line, run.after.storage)
        for chain, bits in zip(run.description.chains, loads, strict=True):
            for position, bit in zip(positions(chain), reversed(bits), strict=True):
                if position.instance not in held:
                    continue
                count += 1
                seen = held[position.instance][-1 - position.bit]
                if seen != str(bit ^ position.turned):
                    faults.append(f"{chain.name}: `{position.instance}` holds {seen} after loading")
    return count


def _compare_capture(run: Comparison, before: Log, after: Log, faults: list[str]) -> int:
    count = 0
    unloaded = after.of("U")
    for round_, line in enumerate(before.of("Y")):
        following = by_name(line, run.before.storage)
        rows = unloaded[round_ * run.longest : (round_ + 1) * run.longest]
        for number, chain in enumerate(run.description.chains):
            parity = sum(cell.inverted for cell in chain.cells) & 1 ^ chain.inverted_out
            for shift, position in enumerate(reversed(positions(chain))):
                name = position.instance
                value = following[name][-1 - position.bit] if name in following else "x"
                if value not in "01":
                    continue
                flip = flipped(run.before, run.after, name) if name in run.after.storage else False
                wanted = int(value) ^ position.turned ^ parity ^ flip
                count += 1
                if rows[shift][number] != str(wanted):
                    faults.append(
                        f"{chain.name}: `{name}` captured {rows[shift][number]} in round"
                        f" {round_}, the original {wanted}"
                    )
    return count


def _compare_others(run: Comparison, before: Log, after: Log, faults: list[str]) -> int:
    if not run.others:
        return 0
    picked = []
    for line in before.of("Y"):
        following = by_name(line, run.before.storage)
        picked.append("".join(following[name] for name in run.others))
    names = [name for name in run.others for _ in range(run.after.storage[name].bits)]
    return _compare_lines(picked, after.of("Y"), names, "next state of", faults)


def _compare_lines(
    before: Sequence[str], after: Sequence[str], names: Sequence[str], what: str, faults: list[str]
) -> int:
    count = 0
    for row, (old, new) in enumerate(zip(before, after, strict=True)):
        for name, wanted, seen in zip(names, old, new, strict=True):
            count += wanted in "01"
            if wanted != seen and wanted in "01":
                faults.append(f"{what} `{name}` is {seen} in row {row}, the original {wanted}")
    return count
