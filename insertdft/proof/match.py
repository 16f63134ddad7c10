"""Which state of the converted netlist stands for which of the original.

By instance name first (or the name that the caller maps it to), then by the net that shows the
state: where one instance holds several states, where latches became loops of gates, where one cell
took the place of two. A wrong match can make a proof fail but never succeed, as everything is
compared under it.
"""

from collections import defaultdict
from collections.abc import Iterable, Mapping
from dataclasses import dataclass

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.cell import Cell
from insertdft.netlist import FIRST_NET
from insertdft.netlist.names import join_path
from insertdft.proof.circuit import Circuit
from insertdft.proof.order import Numbers
from insertdft.proof.storage import States
from insertdft.proof.template import LOOP, make_template

#: Instances looked at to learn whether a cell's state is the inverse of another cell's.
_SAMPLES = 8


@dataclass(frozen=True, slots=True, eq=False)
class Matching:
    """Matched states as columns of places in ``States``.

    Attributes:
        before: Shape (n,).
        after: Shape (n,).
        inverted: Shape (n,), 1 where one is the inverse of the other.
        left_before: States of the original without a counterpart.
        left_after: States of the converted netlist without one.
    """

    before: Numbers
    after: Numbers
    inverted: Numbers
    left_before: tuple[int, ...]
    left_after: tuple[int, ...]


@dataclass(frozen=True, slots=True, eq=False)
class Side:
    """One netlist with its states."""

    circuit: Circuit
    states: States

    @property
    def design(self) -> Design:
        """The design."""
        return self.circuit.design


#: Place of a state -> its counterpart and whether inverted.
_Pairs = dict[int, tuple[int, int]]


def match_states(before: Side, after: Side, mapping: Mapping[str, str]) -> Matching:
    """Return the matching of all states.

    Args:
        before: The original.
        after: The converted netlist.
        mapping: Instance of the original -> its name in the converted netlist, where they differ.
    """
    pairs: _Pairs = {}
    there = _by_instance(after)
    for name, own in _by_instance(before).items():
        others = there.get(mapping.get(name, name), [])
        if len(own) == len(others):
            for one, other in zip(own, others, strict=True):
                pairs[one] = (other, 0)
        elif others:
            pairs |= _by_nets(before, after, own, others) or _shown_first(after, own, others)
    pairs = _with_polarity(before, after, pairs)
    taken = {other for other, _ in pairs.values()}
    left = [at for at in range(len(before.states)) if at not in pairs]
    free = [at for at in range(len(after.states)) if at not in taken]
    if left:
        pairs |= _by_nets(before, after, left, free)
        taken = {other for other, _ in pairs.values()}
    return Matching(
        before=np.array(list(pairs), np.int64),
        after=np.array([other for other, _ in pairs.values()], np.int64),
        inverted=np.array([inverted for _, inverted in pairs.values()], np.int64),
        left_before=tuple(at for at in left if at not in pairs),
        left_after=tuple(at for at in free if at not in taken),
    )


def _by_instance(side: Side) -> dict[str, list[int]]:
    """Return the states of cells by the name of their instance."""
    found: dict[str, list[int]] = {}
    columns = (side.states.instance.tolist(), side.states.kind.tolist())
    for at, (instance, kind) in enumerate(zip(*columns, strict=True)):
        if kind != LOOP:
            found.setdefault(side.design.name(instance), []).append(at)
    return found


def shown_at(cell: Cell, state: int) -> list[tuple[str, int]]:
    """Return the output pins that show a state of a cell, and whether inverted."""
    template = make_template(cell)
    if not template.states:
        return []
    own = template.variables.index(template.states[state]) + 1
    return [
        (pin, value & 1)
        for pin, (value, drives) in template.outputs.items()
        if value >> 1 == own and drives == 1
    ]


def shown_nets(side: Side, chosen: Iterable[int]) -> list[tuple[int, int, int]]:
    """Return (state, net that shows it, whether inverted) of the chosen states."""
    pins: dict[tuple[int, int], list[tuple[str, int]]] = {}
    states, design = side.states, side.design
    found: list[tuple[int, int, int]] = []
    for at in chosen:
        instance, state = int(states.instance[at]), int(states.state[at])
        if states.kind[at] == LOOP:
            net = int(states.net[at])
            found += [(at, net, int(side.circuit.net[net]) & 1)] if net >= 0 else []
            continue
        key = int(design.cell[instance]), state
        cell = design.cells[key[0]]
        if key not in pins:
            pins[key] = shown_at(cell, state) if cell else []
        for pin, inverted in pins[key]:
            net = design.net_at(instance, pin)
            found += [(at, net, inverted)] if net >= FIRST_NET else []
    return found


def names_of_nets(design: Design, nets: Iterable[int]) -> dict[int, list[str]]:
    """Return every hierarchical name that each of ``nets`` has."""
    wanted = np.zeros(design.net_count, np.bool_)
    wanted[list(nets)] = True
    bases = np.array([place.net_base for place in design.occurrences])
    found: defaultdict[int, list[str]] = defaultdict(list)
    local = np.flatnonzero(wanted[design.net_of])
    local = local[local >= FIRST_NET]
    homes = np.searchsorted(bases, local, side="right") - 1
    for number, home in zip(local.tolist(), homes.tolist(), strict=True):
        module = design.netlist.modules[design.occurrences[home].module]
        name = module.net_name(number - int(bases[home]) + FIRST_NET)
        found[int(design.net_of[number])].append(join_path((*design.path(home), name)))
    return dict(found)


def _by_nets(before: Side, after: Side, own: Iterable[int], others: Iterable[int]) -> _Pairs:
    """Match states that nets of one name show."""
    here, there = shown_nets(before, own), shown_nets(after, others)
    here_names = names_of_nets(before.design, {net for _, net, _ in here})
    there_names = names_of_nets(after.design, {net for _, net, _ in there})
    by_name = {
        name: (at, inverted) for at, net, inverted in there for name in there_names.get(net, ())
    }
    found: _Pairs = {}
    taken: set[int] = set()
    for at, net, inverted in here:
        for name in here_names.get(net, ()):
            other = by_name.get(name)
            if at not in found and other is not None and other[0] not in taken:
                found[at] = (other[0], inverted ^ other[1])
                taken.add(other[0])
    return found


def _shown_first(after: Side, own: list[int], others: list[int]) -> _Pairs:
    """Match a state alone to the only one of several that an output shows."""
    shown = list(dict.fromkeys(at for at, _, _ in shown_nets(after, others)))
    return {own[0]: (shown[0], 0)} if len(own) == 1 and len(shown) == 1 else {}


def _with_polarity(before: Side, after: Side, pairs: _Pairs) -> _Pairs:
    """Return the pairs with what their nets say of inversion, a kind of cell at a time."""
    kinds: defaultdict[tuple[int, int, int, int], list[int]] = defaultdict(list)
    for one, (other, _) in pairs.items():
        cells = _cell(before, one), _cell(after, other)
        if before.design.cell_names[cells[0]] != after.design.cell_names[cells[1]]:
            key = (*cells, int(before.states.state[one]), int(after.states.state[other]))
            kinds[key].append(one)
    found = dict(pairs)
    for members in kinds.values():
        sample = members[:_SAMPLES]
        seen = _by_nets(before, after, sample, [pairs[one][0] for one in sample])
        turned = [inverted for one, (other, inverted) in seen.items() if pairs[one][0] == other]
        for one in members if turned else ():
            found[one] = (pairs[one][0], turned[0])
    return found


def _cell(side: Side, state: int) -> int:
    return int(side.design.cell[int(side.states.instance[state])])
