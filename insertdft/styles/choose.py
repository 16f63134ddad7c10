"""Choose the conversion of every storage cell, worked out once a kind of cell."""

from collections.abc import Mapping
from typing import Final, Protocol

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, Library
from insertdft.netlist import OPEN
from insertdft.simulate.constants import propagate
from insertdft.styles import clocked_scan, mux_d
from insertdft.styles.conversion import Conversion, Refusal


class StyleModule(Protocol):
    """What the module of a style answers."""

    def convert(self, library: Library, cell: Cell) -> Conversion | Refusal:
        """Return how a plain storage cell becomes a scan cell of the style."""

    def as_is(self, cell: Cell) -> Conversion | None:
        """Return how a cell that is a scan cell of the style already joins a chain."""


#: Every style by its name.
STYLES: Final[Mapping[str, StyleModule]] = {
    mux_d.NAME: mux_d,
    clocked_scan.NAME: clocked_scan,
}


class Chooser:
    """Conversions of one design in one style.

    Attributes:
        conversions: Those in use so far; a conversion is known by its place here.
    """

    def __init__(self, design: Design, style: str) -> None:
        """Take the design and the style's name.

        Raises:
            ValueError: The style is unknown.
        """
        if style not in STYLES:
            raise ValueError(f"unknown style {style!r}")
        self._style = STYLES[style]
        self.conversions: list[Conversion] = []
        self._design = design
        self._by_cell: dict[str, int | Refusal] = {}
        self._constants: Mapping[int, int] | None = None

    def choose(self, instance: int) -> int | Refusal:
        """Return the index of the conversion of a storage instance, or why there is none."""
        cell = self._design.cell_of(instance)
        if cell is None:
            raise ValueError(f"instance {instance} is a black box")
        ready = self._style.as_is(cell)
        if ready is not None and not self._scan_pins_free(instance, ready):
            return _in_use(cell)
        if cell.name not in self._by_cell:
            found = ready or self._style.convert(self._design.library, cell)
            self._by_cell[cell.name] = self._add(found)
        chosen = self._by_cell[cell.name]
        if not isinstance(chosen, Refusal) and not self._can_be_tapped(instance, chosen):
            return _no_tap(cell)
        return chosen

    def _can_be_tapped(self, instance: int, number: int) -> bool:
        """Return whether the output for the chain is a pin of its own or connected already.

        One bit of a bus that is unconnected cannot be given a net alone.
        """
        conversion = self.conversions[number]
        tap = conversion.taps[0].pin
        old = {new: old for old, new in conversion.pins.items()}.get(tap, tap)
        return "[" not in tap or self._design.net_at(instance, old) != OPEN

    def _add(self, found: Conversion | Refusal) -> int | Refusal:
        if isinstance(found, Refusal):
            return found
        self.conversions.append(found)
        return len(self.conversions) - 1

    def _scan_pins_free(self, instance: int, ready: Conversion) -> bool:
        """Return whether a scan cell's enable or clock is at its mission value or unconnected."""
        if self._constants is None:
            self._constants = propagate(self._design, {})
        pins = self._design.pins(instance)
        for pin in ready.test_pins:
            net = pins.get(pin, OPEN)
            if net != OPEN and self._constants.get(net) != 0:
                return False
        return True


def _no_tap(cell: Cell) -> Refusal:
    return Refusal(
        "no-scan-cell",
        f"the bit of `{cell.name}` that leads on to the next cell is unconnected",
        "connect the whole bus of that output to a wire",
    )


def _in_use(cell: Cell) -> Refusal:
    return Refusal(
        "scan-pins-in-use",
        f"`{cell.name}` is a scan cell whose scan pins are connected already",
        "it belongs to an existing chain or uses its scan pins in mission mode; leave it out",
    )
