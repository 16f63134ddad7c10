r"""The nets of one module, and a number for every expression met so far.

Reading a pin must cost one dictionary look-up and no more. So there is one table from the text of
an expression to a number, and the declared bits are put into it beforehand in the spelling that
expressions use (``n1``, ``bus[3]``, ``\esc[3] `` with its closing blank). Whatever else turns up
(slices, concatenations, constants in odd bases, undeclared names) just gets the next number and is
looked at once, when the module ends.
"""

import re
from bisect import bisect_right
from collections import defaultdict, deque
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from itertools import compress, count
from typing import Final

import numpy as np

from insertdft.netlist import CONSTANT_NAMES, Ids, Vector
from insertdft.netlist.names import canonical

#: In place of a net: the number stands for no declared bit.
UNRESOLVED: Final = -2


@dataclass(slots=True)
class PortDeclaration:
    """What a module's text says about one port."""

    direction: str
    offset: int
    is_net: bool = False  # whether it is also declared as a net


@dataclass(slots=True)
class _Run:
    """Numbers ``number``, ``number + 1``, ... are the nets ``net``, ``net + 1``, ..."""

    number: int
    net: int
    length: int


_PLAIN_ESCAPED: Final = re.compile(r"\\[A-Za-z_][\w$]*+;", re.ASCII)


def kept(names: Sequence[str]) -> Sequence[str]:
    """Return the kept spelling of many names, as ``canonical`` does for one."""
    if _PLAIN_ESCAPED.search(";".join(names) + ";"):
        return [canonical(name) if name else name for name in names]
    return names


def spelling(name: str) -> str:
    """Return a kept name as expressions spell it."""
    return name + " " if name[0] == "\\" else name


class Nets:
    """Declared bits, vectors and expression numbers of one module.

    Attributes:
        number: Expression text -> number. Asking for an unknown one gives it the next.
        names: Net bits by id, the four constants first.
        vectors: Declared ranges.
        kinds: Whole names that are not plain wires.
        ports: Directions declared so far.
    """

    def __init__(self) -> None:
        """Start with the constants."""
        self.number: defaultdict[str, int] = defaultdict(count().__next__)
        self.names: list[str] = list(CONSTANT_NAMES)
        self.vectors: dict[str, Vector] = {}
        self.kinds: dict[str, str] = {}
        self.ports: dict[str, PortDeclaration] = {}
        self._late: dict[int, int] = {}  # numbers given out before the declaration was met
        deque(map(self.number.__getitem__, CONSTANT_NAMES), 0)
        self._runs = [_Run(0, 0, len(CONSTANT_NAMES))]

    def declare_fresh(self, names: Sequence[str]) -> list[int]:
        """Declare those of the scalars that were never met before.

        Args:
            names: As written, escaped ones without closing blank.

        Returns:
            Places in ``names`` of those that were met before, come twice, and are not declared.
        """
        kept_names = kept(names)
        keys = [name + " " if name[0] == "\\" else name for name in kept_names]
        first = len(self.number)
        numbers = np.fromiter(map(self.number.__getitem__, keys), np.int32, len(keys))
        fresh = len(self.number) - first
        if fresh == len(keys):
            self._note_run(first, kept_names)
            return []
        # New names get ascending numbers; what gets no higher one than before it is not new.
        highest = np.maximum.accumulate(np.concatenate(([first - 1], numbers[:-1])))
        is_fresh = numbers > highest
        self._note_run(first, list(compress(kept_names, is_fresh.tolist())))
        odd: list[int] = np.flatnonzero(~is_fresh).tolist()
        return odd

    def is_declared(self, name: str) -> bool:
        """Whether the kept ``name`` is a declared scalar or vector."""
        return name in self.vectors or self.net_of(spelling(name)) is not None

    def net_of(self, key: str) -> int | None:
        """Return the net of a bit in its expression spelling, or None if nothing declares it."""
        number = self.number.get(key)
        if number is None:
            return None
        if number in self._late:
            return self._late[number]
        run = self._runs[bisect_right(self._runs, number, key=lambda run: run.number) - 1]
        place = number - run.number
        return run.net + place if place < run.length else None

    def declare_scalar(self, name: str) -> int:
        """Declare a new scalar by its kept name and return its net."""
        return self._add([spelling(name)], [name])

    def declare_vector(self, name: str, msb: int, lsb: int) -> None:
        """Declare a new vector by its kept name."""
        head = spelling(name)
        keys = [f"{head}[{index}]" for index in Vector(msb, lsb, 0).indices()]
        # The kept spelling of a bit is the one that expressions use.
        self.vectors[name] = Vector(msb, lsb, self._add(keys, keys))

    def _add(self, keys: Sequence[str], names: Sequence[str]) -> int:
        if not any(map(self.number.__contains__, keys)):
            return self._add_run(keys, names)
        first = len(self.names)
        self._late.update(
            zip(map(self.number.__getitem__, keys), range(first, 2**31), strict=False)
        )
        self.names.extend(names)
        return first

    def _add_run(self, keys: Sequence[str], names: Sequence[str]) -> int:
        first = len(self.number)
        deque(map(self.number.__getitem__, keys), 0)
        return self._note_run(first, names)

    def _note_run(self, number: int, names: Sequence[str]) -> int:
        """Make nets of the numbers from ``number`` on; return the first."""
        first = len(self.names)
        self._runs.append(_Run(number, first, len(names)))
        self.names.extend(names)
        return first

    def net_by_number(self) -> Ids:
        """Return the net of every number, UNRESOLVED for those that are no declared bit."""
        nets = np.full(len(self.number), UNRESOLVED, np.int32)
        for run in self._runs:
            nets[run.number : run.number + run.length] = np.arange(run.net, run.net + run.length)
        for number, net in self._late.items():
            nets[number] = net
        return nets

    def unresolved(self, nets: Ids) -> Mapping[int, str]:
        """Return the text of every number that is no declared bit, in ascending order."""
        if not (nets == UNRESOLVED).any():
            return {}
        texts = compress(self.number, (nets == UNRESOLVED).tolist())
        return dict(zip(np.flatnonzero(nets == UNRESOLVED).tolist(), texts, strict=True))
