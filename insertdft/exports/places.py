"""Where the bits of chains stand among the states of the simulator.

With these a load need not be shifted in bit by bit: the states are set as they are one shift before
the end, and only the last shift is simulated. That shift, compared with what must come out of it,
shows whether the places are right. An unload is one shift too: what every place has then is what
the place before it held.
"""

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Final

import numpy as np
import numpy.typing as npt

from insertdft.description import Chain, ChainCell
from insertdft.library.cell import Cell, Storage
from insertdft.library.expression import Const, Not, Var, substitute, variables
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.lowering import storages
from insertdft.simulate.state import Machine
from insertdft.simulate.two_clocks import mark_rows, mission_copy
from insertdft.simulate.words import Words, pack, unpack

Bits = npt.NDArray[np.bool_]
_NONE: Final = -1


@dataclass(frozen=True, slots=True, eq=False)
class Places:
    """The bits of one chain, from scan-in on, n of them.

    Attributes:
        rows: Shape (n,), rows of ``Circuit.states`` that shift data enters.
        copies: Shape (n,), further rows that must hold the same value, or -1.
        inverted: Shape (n,), whether the state is the inverse of what entered at scan-in.
        turned: Whether scan-out shows the inverse of what entered.
    """

    rows: npt.NDArray[np.int64]
    copies: npt.NDArray[np.int64]
    inverted: Bits
    turned: bool


def places_of(circuit: Circuit, chains: Sequence[Chain]) -> tuple[Places, ...] | None:
    """Return the places of every chain, None if one has a cell that is not understood."""
    rows: dict[int, dict[int, int]] = {}
    states = circuit.states
    pairs = zip(states.instance.tolist(), states.storage.tolist(), strict=True)
    for row, (instance, number) in enumerate(pairs):
        rows.setdefault(instance, {})[number] = row
    names = {circuit.design.name(instance): instance for instance in rows}
    found: list[Places] = []
    for chain in chains:
        each = [_bits(circuit, rows, names, cell) for cell in chain.cells]
        bits = [bit for bits in each if bits for bit in bits]
        if len(bits) != chain.length or not bits:
            return None
        turns = np.array([turn for _, _, turn in bits], np.bool_)
        inverted = np.logical_xor.accumulate(turns)
        found.append(
            Places(
                np.array([row for row, _, _ in bits], np.int64),
                np.array([copy for _, copy, _ in bits], np.int64),
                inverted,
                bool(inverted[-1]) ^ chain.inverted_out,
            )
        )
    return tuple(found)


def _bits(
    circuit: Circuit,
    rows: Mapping[int, Mapping[int, int]],
    names: Mapping[str, int],
    position: ChainCell,
) -> list[tuple[int, int, bool]]:
    """Return row, copy and inversion of each bit of a position; none if it is not understood."""
    instance = names.get(position.instance)
    cell = circuit.design.cell_of(instance) if instance is not None else None
    if cell is None or instance is None:
        return []
    kept = storages(cell)
    order = list(_order(cell, kept, position.scan_in))
    if len(order) < position.bits:
        return []
    row_of = rows[instance]
    copy = row_of.get(mission_copy(cell), _NONE)
    turns = [position.inverted, *(turn for _, turn in order[1:])]
    return [
        (row_of[number], copy, turn)
        for (number, _), turn in zip(order[: position.bits], turns, strict=False)
    ]


def _order(cell: Cell, kept: Sequence[Storage], scan_in: str) -> Iterator[tuple[int, bool]]:
    """Yield the storage that reads ``scan_in``, the one that reads that, and so on."""
    left = dict(enumerate(kept))
    reads = {number: variables(at.data) if at.data else () for number, at in left.items()}
    wanted, turn = scan_in, False
    while True:
        following = [number for number in left if wanted in reads[number]]
        if len(following) != 1:
            return
        [number] = following
        yield number, turn
        here = left.pop(number)
        behind = [(other, _copied(cell, kept[other], here)) for other in left]
        exact = [(other, inverse) for other, inverse in behind if inverse is not None]
        if len(exact) != 1:
            return
        wanted, turn = here.state, exact[0][1]


def _copied(cell: Cell, storage: Storage, source: Storage) -> bool | None:
    """Return whether a storage takes the inverse of another's state in shift mode, or neither."""
    roles = [role for role in cell.scan if role.scan_enable is not None]
    held = {role.scan_enable: Const(role.shift_value == 1) for role in roles[:1]}
    enables = {name: value for name, value in held.items() if name is not None}
    data = substitute(storage.data, enables) if storage.data is not None else None
    names = {source.state: False, source.state_inverted: True}
    match data:
        case Var(name) if name in names:
            return names[name]
        case Not(Var(name)) if name in names:
            return not names[name]
        case _:
            return None


def set_before_last_shift(
    machine: Machine, places: Sequence[Places], loads: Sequence[Bits]
) -> None:
    """Give the states what they hold when all but the last bit of a load is in; others unknown.

    Args:
        machine: Clocks at rest; a three-valued one.
        places: Of every chain.
        loads: For each chain, shape (n, lanes), first shifted first.
    """
    before = machine.states()
    one, zero = (np.zeros_like(rail) for rail in before)
    marks = mark_rows(machine.circuit)
    one[marks], zero[marks] = before[0][marks], before[1][marks]
    for at, load in zip(places, loads, strict=True):
        # Place p holds bit n - 2 - p; the last place holds what is about to leave.
        bits = load[-2::-1] ^ at.inverted[:-1, None]
        for rows in (at.rows[:-1], at.copies[:-1]):
            known = rows >= 0
            one[rows[known]] = pack(bits[known])
            zero[rows[known]] = ~pack(bits[known])
    machine.put_states(one, zero)


def hold_load(machine: Machine, places: Sequence[Places], loads: Sequence[Bits]) -> bool:
    """Return whether every place holds its bit of a load that has been shifted in."""
    one, zero = machine.states()
    for at, load in zip(places, loads, strict=True):
        wanted = load[::-1] ^ at.inverted[:, None]
        lanes = load.shape[1]
        ones, zeros = unpack(one[at.rows], lanes), unpack(zero[at.rows], lanes)
        if not (ones == wanted).all() or not (zeros == ~wanted).all():
            return False
    return True


def unloaded(machine: Machine, places: Places) -> tuple[Words, Words]:
    """Return what a scan-out shows from the second shift of an unload on, after the first.

    Returns:
        Surely 1 and surely 0, shape (n - 1, words).
    """
    one, zero = (rail[places.rows[:0:-1]] for rail in machine.states())
    flip = (places.inverted[:0:-1] ^ places.turned)[:, None]
    return np.where(flip, zero, one), np.where(flip, one, zero)
