"""Mission equivalence: with test ports at their mission values, both netlists do the same.

Both share variables for inputs, matched states and what black boxes give. Equal outputs, clocks,
data, sets and resets, and black-box inputs under these then mean that two netlists that are in
matching states stay in matching states and show the same (induction over time steps, common
practice). States that only the converted netlist has are free variables, so that whatever they
reach is shown not to depend on them.
"""

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np

from insertdft.proof.aig import Lits
from insertdft.proof.circuit import at
from insertdft.proof.joint import AFTER, BEFORE, Joint
from insertdft.proof.obligations import Block
from insertdft.proof.order import Numbers
from insertdft.proof.storage import Forms, following, forms_of, state_name
from insertdft.proof.template import FLIP_FLOP, LATCH


@dataclass(frozen=True, slots=True, eq=False)
class Mission:
    """Obligations of mission mode.

    Attributes:
        blocks: What can be compared function by function.
        edges_to_levels: Rows of the matching that pair a flip-flop with a latch: these must be
            compared over a whole clock cycle.
        reasons: What cannot be compared, a sentence each.
    """

    blocks: tuple[Block, ...]
    edges_to_levels: tuple[int, ...]
    reasons: tuple[str, ...]


class _Pair(NamedTuple):
    """Values and forms of both sides."""

    values: tuple[Lits, Lits]
    forms: tuple[Forms, Forms]

    def kinds(self, rows: tuple[Numbers, Numbers]) -> list[Numbers]:
        """Return the kind of each matched state, side by side."""
        return [form.kind[places] for form, places in zip(self.forms, rows, strict=True)]


def capture_blocks(joint: Joint, held: Mapping[str, int]) -> list[Block]:
    """Return that states take the same data with ports at other values than those of mission mode.

    Args:
        joint: Both netlists.
        held: Values of ports; a port of that name of the original has it too.
    """
    pair, both = _compared(joint, held)
    edges, levels = np.flatnonzero(both == FLIP_FLOP), np.flatnonzero(both == LATCH)
    return [*_captures(joint, pair, edges), _latches(joint, pair, levels)]


def _compared(joint: Joint, held: Mapping[str, int]) -> tuple[_Pair, Numbers]:
    """Return values and forms of both sides, and the kind of matched states where it is one."""
    values = joint.values(BEFORE, held), joint.values(AFTER, held)
    forms = (
        forms_of(joint.before.circuit, joint.aig, values[BEFORE]),
        forms_of(joint.after.circuit, joint.aig, values[AFTER]),
    )
    pair = _Pair(values, forms)
    kinds = pair.kinds(_rows(joint))
    return pair, np.where(kinds[0] == kinds[1], kinds[0], -1)


def mission_obligations(joint: Joint, held: Mapping[str, int]) -> Mission:
    """Return what must hold in mission mode.

    Args:
        joint: Both netlists.
        held: Values of test ports in mission mode; a port of that name of the original has it too.
    """
    pair, both = _compared(joint, held)
    values, kinds = pair.values, pair.kinds(_rows(joint))
    edges = np.flatnonzero(both == FLIP_FLOP)
    levels = np.flatnonzero(both == LATCH)
    mixed = np.flatnonzero((kinds[0] == FLIP_FLOP) & (kinds[1] == LATCH))
    blocks = [
        *_flip_flops(joint, pair, edges),
        _latches(joint, pair, levels),
        *_ports(joint, values),
        *_buses(joint, values),
        _boxes(joint, values),
    ]
    odd = np.flatnonzero((both == -1) & ~((kinds[0] == FLIP_FLOP) & (kinds[1] == LATCH)))
    reasons = [*_unclear(joint, kinds, odd), *_no_counterpart(joint)]
    return Mission(tuple(blocks), tuple(mixed.tolist()), tuple(reasons))


def _rows(joint: Joint) -> tuple[Numbers, Numbers]:
    return joint.matching.before, joint.matching.after


def _subject(joint: Joint, rows: Numbers) -> Callable[[int], str]:
    before = joint.before
    places = joint.matching.before[rows]
    return lambda row: state_name(before.circuit, before.states, int(places[row]))


def _flip_flops(joint: Joint, pair: _Pair, rows: Numbers) -> list[Block]:
    aig = joint.aig
    one, two = _both(joint, pair, rows)
    name = _subject(joint, rows)
    known = one.unknown ^ 1
    idle = aig.conj(known, aig.conj(one.zero ^ 1, one.one ^ 1))
    clash = _says("set and reset of `{}` clash", name)
    return [
        Block("clock", one.clock, two.clock, None, name, _says("the clock of `{}` differs", name)),
        Block("reset", one.zero, two.zero, known, name, _says("the reset of `{}` differs", name)),
        Block("set", one.one, two.one, known, name, _says("the set of `{}` differs", name)),
        Block("reset", one.unknown, two.unknown, known, name, clash),
        Block("data", one.data, two.data, idle, name, _says("`{}` takes other data", name)),
    ]


def _captures(joint: Joint, pair: _Pair, rows: Numbers) -> list[Block]:
    """Compare what flip-flops take where sets and resets may be held off and clocks replaced."""
    aig = joint.aig
    one, two = _both(joint, pair, rows)
    name = _subject(joint, rows)
    idle = aig.conj(two.unknown ^ 1, aig.conj(two.zero ^ 1, two.one ^ 1))
    reset, preset = aig.conj(one.zero, two.zero), aig.conj(one.one, two.one)
    fact = "acts on `{}` where the original's does not"
    return [
        Block("reset", reset, two.zero, None, name, _says(f"a reset {fact}", name)),
        Block("set", preset, two.one, None, name, _says(f"a set {fact}", name)),
        Block("data", one.data, two.data, idle, name, _says("`{}` takes other data", name)),
    ]


class _Columns:
    """Some rows of forms."""

    def __init__(self, forms: Forms, places: Numbers) -> None:
        self.clock = forms.clock[places]
        self.data = forms.data[places]
        self.zero = forms.zero[places]
        self.one = forms.one[places]
        self.unknown = forms.unknown[places]


def _both(joint: Joint, pair: _Pair, rows: Numbers) -> tuple[_Columns, _Columns]:
    """Return the forms of matched states, those of the converted netlist as the original's."""
    one, two = (
        _Columns(form, places[rows]) for form, places in zip(pair.forms, _rows(joint), strict=True)
    )
    turned = joint.matching.inverted[rows].astype(np.int32)
    zero, high = two.zero, two.one
    two.zero = np.where(turned, high, zero).astype(np.int32)
    two.one = np.where(turned, zero, high).astype(np.int32)
    two.data = two.data ^ turned
    return one, two


def _says(words: str, name: Callable[[int], str]) -> Callable[[int], str]:
    return lambda row: words.format(name(row))


def _latches(joint: Joint, pair: _Pair, rows: Numbers) -> Block:
    """Compare what latches come to be, which counts enable, data, set and reset in."""
    found = []
    for side, places in enumerate(_rows(joint)):
        lits = joint.state_vars[side]
        whole = following(joint.aig, pair.forms[side], lits)
        found.append(whole[places[rows]])
    known = pair.forms[BEFORE].unknown[joint.matching.before[rows]] ^ 1
    turned = joint.matching.inverted[rows].astype(np.int32)
    name = _subject(joint, rows)
    fact = _says("latch `{}` opens otherwise or takes other data", name)
    return Block("latch", found[BEFORE], found[AFTER] ^ turned, known, name, fact)


def _ports(joint: Joint, values: tuple[Lits, Lits]) -> list[Block]:
    """Compare the outputs that the original has."""
    sides = joint.before, joint.after
    after = {port.name: port for port in joint.after.design.ports}
    both = [
        (port.name, port.net, after[port.name].net)
        for port in joint.before.design.ports
        if port.direction != "input" and port.name in after
    ]
    lits = []
    for side in (BEFORE, AFTER):
        nets = np.array([row[1 + side] for row in both], np.int64)
        lits.append(at(values[side], sides[side].circuit.net[nets]))
    names = [row[0] for row in both]

    def name(row: int) -> str:
        return names[row]

    return [Block("output", lits[0], lits[1], None, name, _says("output `{}` differs", name))]


def _buses(joint: Joint, values: tuple[Lits, Lits]) -> list[Block]:
    """Compare who drives a bus low and who drives it high, which counts letting go in."""
    there = {
        joint.after.design.net_name(net): place
        for place, net in enumerate(joint.after.circuit.buses.nets)
    }
    rows, names = [], []
    for place, net in enumerate(joint.before.circuit.buses.nets):
        own = joint.before.design.net_name(net)
        if own in there:
            rows.append((place, there[own]))
            names.append(own)
    where = np.array(rows, np.int64).reshape(-1, 2)

    def name(row: int) -> str:
        return names[row]

    fact = _says("bus `{}` is driven otherwise", name)
    blocks = []
    for level in ("low", "high"):
        lits = [
            at(values[side], getattr(part.circuit.buses, level)[where[:, side]])
            for side, part in enumerate((joint.before, joint.after))
        ]
        blocks.append(Block("bus", lits[0], lits[1], None, name, fact))
    return blocks


def _boxes(joint: Joint, values: tuple[Lits, Lits]) -> Block:
    """Compare what black boxes read."""
    sides = []
    for side, part in enumerate((joint.before, joint.after)):
        design = part.design
        sides.append(
            {
                f"{design.name(instance)}.{pin}": int(at(values[side], np.array([lit]))[0])
                for instance, pin, lit in part.circuit.observed
            }
        )
    names = [name for name in sides[BEFORE] if name in sides[AFTER]]
    lits = [np.array([side[name] for name in names], np.int32) for side in sides]

    def name(row: int) -> str:
        return names[row]

    fact = _says("black-box pin `{}` gets another value", name)
    return Block("black-box pin", lits[0], lits[1], None, name, fact)


def _unclear(joint: Joint, kinds: list[Numbers], odd: Numbers) -> list[str]:
    """Say which matched states cannot be compared, and why."""
    found: list[str] = []
    name = _subject(joint, odd)
    for row, place in enumerate(odd.tolist()):
        one, two = int(kinds[BEFORE][place]), int(kinds[AFTER][place])
        if -1 in (one, two):
            why = "its state table is neither a latch nor a flip-flop in mission mode"
        else:
            why = "it is a latch in the original and a flip-flop afterwards"
        found.append(f"`{name(row)}` cannot be compared: {why}")
    return found


def _no_counterpart(joint: Joint) -> list[str]:
    """Name what one side has and the other lacks."""
    found: list[str] = []
    before, after = joint.before, joint.after
    if joint.matching.left_before:
        names = [
            state_name(before.circuit, before.states, place)
            for place in joint.matching.left_before[:5]
        ]
        count = len(joint.matching.left_before)
        more = f" and {count - 5} more" if count > 5 else ""
        shown = ", ".join(f"`{name}`" for name in names)
        found.append(
            f"{count} of {len(before.states)} states have no counterpart in the converted netlist:"
            f" {shown}{more}"
        )
    there = {port.name for port in after.design.ports}
    lost = [port.name for port in before.design.ports if port.name not in there]
    if lost:
        shown = ", ".join(f"`{name}`" for name in lost[:5])
        found.append(f"the converted netlist lacks {len(lost)} ports of the original: {shown}")
    for part, words in ((before, "the original"), (after, "the converted netlist")):
        found += [
            f"`{part.design.name(instance)}` of {words} cannot be reasoned about: {why}"
            for instance, why in part.circuit.unsupported
        ]
    return found + _lost_boxes(joint)


def _lost_boxes(joint: Joint) -> list[str]:
    there = {
        f"{joint.after.design.name(instance)}.{pin}"
        for instance, pin, _ in joint.after.circuit.observed
    }
    own = [
        f"{joint.before.design.name(instance)}.{pin}"
        for instance, pin, _ in joint.before.circuit.observed
    ]
    lost = [name for name in own if name not in there]
    names = ", ".join(f"`{name}`" for name in lost[:5])
    return [f"{len(lost)} black-box pins have no counterpart: {names}"] if lost else []
