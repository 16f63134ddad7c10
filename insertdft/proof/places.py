"""Where each position of a chain shows its state."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

import numpy as np

from insertdft.description import Chain, ChainCell
from insertdft.design.flat import Design
from insertdft.netlist import FIRST_NET, OPEN
from insertdft.netlist.names import join_path
from insertdft.proof.aig import Lits
from insertdft.proof.match import Side, shown_at
from insertdft.proof.order import Numbers
from insertdft.proof.template import LOOP

BY_LOOP: Final = -1


@dataclass(frozen=True, slots=True)
class Position:
    """Where a chain position shows its state.

    Attributes:
        net: Flat net, OPEN if there is none.
        turned: Whether the net shows the inverse of the state; BY_LOOP for a position made of
            gates, whose state is that of the cell it replaced.
        states: Places of the states of its instance.
    """

    net: int
    turned: int
    states: tuple[int, ...]


@dataclass(frozen=True, slots=True, eq=False)
class ChainPlaces:
    """The positions of one chain.

    Attributes:
        chain: As described.
        positions: One a cell of the chain.
        nets: Shape (n,), their nets.
        turned: Shape (n,), see ``Position``.
        out: Net of the scan-out.
    """

    chain: Chain
    positions: Sequence[Position]
    nets: Numbers
    turned: Lits
    out: int


def find_places(side: Side, chains: Sequence[Chain]) -> list[ChainPlaces]:
    """Return where the positions of all chains are."""
    finder = _Finder(side)
    found: list[ChainPlaces] = []
    for chain in chains:
        positions = [finder.position(cell) for cell in chain.cells]
        nets = np.array([at.net for at in positions], np.int64)
        turned = np.array([at.turned for at in positions], np.int32)
        out = side.design.port_nets[chain.scan_out]
        found.append(ChainPlaces(chain, positions, nets, turned, out))
    return found


class _Finder:
    """Finds the net at which a position shows its state."""

    def __init__(self, side: Side) -> None:
        self._side = side
        design = side.design
        self._states: dict[str, list[int]] = {}
        for place, instance in enumerate(side.states.instance.tolist()):
            if side.states.kind[place] != LOOP:
                self._states.setdefault(design.name(instance), []).append(place)
        self._occurrences = {
            join_path(design.path(number)): number for number in range(1, len(design.occurrences))
        }

    def position(self, cell: ChainCell) -> Position:
        """Return where a position shows its state."""
        name = cell.slave or cell.instance
        states = self._states.get(name, [])
        if states:
            return self._of_cell(cell, states)
        number = self._occurrences.get(name)
        return Position(OPEN, 0, ()) if number is None else self._of_module(cell, number)

    def _of_cell(self, cell: ChainCell, states: list[int]) -> Position:
        side = self._side
        design = side.design
        instance = int(side.states.instance[states[0]])
        net = design.net_at(instance, cell.scan_out)
        library_cell = design.cell_of(instance)
        if library_cell is None:
            return Position(OPEN, 0, ())
        turned = [
            inverted
            for state in states
            for pin, inverted in shown_at(library_cell, int(side.states.state[state]))
            if pin == cell.scan_out
        ]
        own = self._states.get(cell.instance, states)
        return Position(net, turned[0] if turned else 0, tuple(own))

    def _of_module(self, cell: ChainCell, number: int) -> Position:
        """Return the net of a port of a module; whether it is inverted is left to its loop."""
        design = self._side.design
        return Position(_port_net(design, number, cell.scan_out), BY_LOOP, ())


def _port_net(design: Design, occurrence: int, pin: str) -> int:
    place = design.occurrences[occurrence]
    for port in design.netlist.modules[place.module].ports:
        for name, net in zip(port.bit_names(), port.nets, strict=True):
            if name == pin:
                return int(design.net_of[place.net_base + net - FIRST_NET])
    return OPEN
