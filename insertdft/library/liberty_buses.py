"""Pins, buses and bundles of a Liberty cell, opened into single bits.

Bits are listed from the least significant (``bit_to`` of the type) up; a bundle's members in the
order of its list. Bit k of a bank belongs to bit k of the buses it is written with.
"""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from insertdft.library.liberty_syntax import Group, Place


@dataclass(frozen=True, slots=True, eq=False)
class PinText:
    """One bit and the groups that describe it, the closest first.

    Attributes:
        name: ``D``, or ``D[0]`` for a bit of a bus.
        bit: Position within its bus or bundle, 0 for a pin.
        groups: The pin group, then the bus group around it.
    """

    name: str
    bit: int
    groups: tuple[Group, ...]

    def text(self, attribute: str) -> str | None:
        """Return the value of an attribute from the closest group that has it."""
        for group in self.groups:
            if (found := group.text(attribute)) is not None:
                return found
        return None

    def number(self, attribute: str) -> float | None:
        """Return the value of an attribute as a number."""
        for group in self.groups:
            if (found := group.number(attribute)) is not None:
                return found
        return None

    def flag(self, attribute: str) -> bool:
        """Return whether an attribute is true."""
        text = self.text(attribute)
        return text is not None and text.strip().lower() == "true"

    def owner(self, attribute: str) -> Group:
        """Return the group that has ``attribute``, or the closest."""
        for group in self.groups:
            if attribute in group.simple:
                return group
        return self.groups[0]


@dataclass(frozen=True, slots=True)
class Range:
    """A declared bus range.

    Attributes:
        left: ``bit_from``.
        right: ``bit_to``, the least significant.
    """

    left: int
    right: int

    def indices(self) -> range:
        """Return the indices from the least significant up."""
        step = 1 if self.left >= self.right else -1
        return range(self.right, self.left + step, step)


#: Bits by bus or bundle name, least significant first.
Buses = Mapping[str, tuple[str, ...]]
MOST_BITS: Final = 1 << 16


def read_types(group: Group) -> dict[str, Range]:
    """Return the ``type`` groups directly inside a library or a cell."""
    found: dict[str, Range] = {}
    for item in group.all_of("type"):
        width = int(item.number("bit_width") or 1)
        left, right = item.number("bit_from"), item.number("bit_to")
        down = item.flag("downto")
        if left is None or right is None:
            left, right = (width - 1, 0) if down else (0, width - 1)
        found[item.name] = Range(int(left), int(right))
    return found


def open_pins(cell: Group, types: Mapping[str, Range]) -> tuple[list[PinText], Buses]:
    """Return every bit of a cell (or test_cell) in the order of the text, and its buses."""
    pins: list[PinText] = []
    buses: dict[str, tuple[str, ...]] = {}
    for group in cell.groups:
        if group.kind == "pin":
            pins += [PinText(name, 0, (group,)) for name in _words(group)]
        elif group.kind == "bus":
            for name in _words(group):
                own = types.get(group.text("bus_type") or "", Range(0, 0))
                bits = tuple(f"{name}[{index}]" for index in own.indices()[:MOST_BITS])
                buses[name] = bits
                pins += _members(group, bits)
        elif group.kind == "bundle":
            bits = group.arguments("members") or ()
            buses[group.name] = bits
            pins += _members(group, bits)
    return pins, buses


def _members(group: Group, bits: tuple[str, ...]) -> list[PinText]:
    own: dict[str, Group] = {}
    for inner in group.all_of("pin"):
        for word in _words(inner):
            for name in _range_of(word):
                own[name] = inner
    return [
        PinText(name, bit, (own[name], group) if name in own else (group,))
        for bit, name in enumerate(bits)
    ]


def _words(group: Group) -> list[str]:
    """Return the names in the head of a group; one quoted text may hold several."""
    return [word for name in group.names for word in name.split()]


def _range_of(word: str) -> list[str]:
    """Return the bits that ``D[3:0]`` names, or the name itself."""
    head, bracket, inside = word.partition("[")
    left, colon, right = inside.rstrip("]").partition(":")
    if not bracket or not colon or not left.strip().isdigit() or not right.strip().isdigit():
        return [word]
    return [f"{head}[{index}]" for index in Range(int(left), int(right)).indices()]


def place_of(group: Group, attribute: str) -> Place:
    """Return where the value of an attribute stands."""
    return group.simple[attribute]
