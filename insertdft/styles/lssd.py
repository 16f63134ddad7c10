"""LSSD: two latches a position, shifted by A and B; no clock edge matters.

Which element becomes what: a master latch gets a second port (I under A), its slave stays; a
system latch that stands alone gets an L2 for shifting; two system latches of different phases can
share a position, the second one's scan port being clocked by B (L1/L2*); a flip-flop becomes a
whole shift-register latch. Form and rules: E. B. Eichelberger, T. W. Williams, DAC 1977; L1/L2*:
S. DasGupta, P. Goel, R. G. Walther, T. W. Williams, ITC 1982 (from memory).
"""

from collections.abc import Collection
from dataclasses import replace
from typing import Final

from insertdft.library.cell import Cell, Library, Style
from insertdft.library.expression import Not, Var
from insertdft.styles.conversion import Conversion, Refusal, ScanTap, TestNet
from insertdft.styles.srl_fit import Fit, SrlKind, fit

NAME = Style.LSSD.value

#: Names that a composed module must not have.
Taken = Collection[str]
NONE: Final = frozenset[str]()

#: B of cells that their system clock's edge loads whole.
EDGE_CLOCK_B: Final = f"{TestNet.CLOCK_B}/2"

KINDS = {"edge": SrlKind.EDGE, "two-phase": SrlKind.DOUBLE}


def first_latch(library: Library, cell: Cell, taken: Taken = NONE) -> Conversion | Refusal:
    """Return how a latch gets a scan port: the L1 of a position whose L2 is there already."""
    return _best(library, cell, SrlKind.FIRST, taken)


def single_latch(library: Library, cell: Cell, taken: Taken = NONE) -> Conversion | Refusal:
    """Return how a system latch that stands alone gets a scan port and an L2 for shifting."""
    return _best(library, cell, SrlKind.SINGLE, taken)


def second_latch(library: Library, cell: Cell, taken: Taken = NONE) -> Conversion | Refusal:
    """Return how a system latch becomes the L2* of a position: its scan port is under B."""
    found = _best(library, cell, SrlKind.FIRST, taken)
    if isinstance(found, Refusal):
        return found
    pins = {
        pin: TestNet.CLOCK_B if net == TestNet.CLOCK_A else net
        for pin, net in found.test_pins.items()
    }
    return replace(found, test_pins=pins, bits=0)


def slave_latch(cell: Cell, inverted: bool) -> Conversion | Refusal:
    """Return the conversion of a slave that stays as it is: L2 of the master before it.

    Args:
        cell: The slave's cell.
        inverted: Whether its state is the inverse of what the master's best output shows.
    """
    storage = cell.storage[0]
    data = storage.data.part if isinstance(storage.data, Not) else storage.data
    taps = [
        ScanTap(pin.name, pin.function != Var(storage.state))
        for pin in cell.outputs()
        if pin.function in (Var(storage.state), Var(storage.state_inverted), _not(storage.state))
    ]
    if not isinstance(data, Var) or not taps:
        return Refusal(
            "no-scan-cell",
            f"`{cell.name}` does not show the state of one data pin and cannot be an L2",
            "leave it out, or give a library that describes it as a plain latch",
        )
    return Conversion(
        style=NAME,
        how="kept",
        before=cell.name,
        after=cell.name,
        scan_in=data.name,
        scan_in_inverted=inverted,
        taps=tuple(sorted(taps, key=lambda tap: tap.inverted)),
        test_pins={},
        bits=0,
        area=0.0,
    )


def flip_flop(library: Library, cell: Cell, form: str, taken: Taken = NONE) -> Conversion | Refusal:
    """Return how a flip-flop becomes a shift-register latch.

    Args:
        library: What there is.
        cell: The flip-flop.
        form: ``edge`` or ``two-phase``, see ``Wishes.flip_flops``.
        taken: Names that a composed module must not have.
    """
    found = _best(library, cell, KINDS[form], taken)
    if form != "edge" or isinstance(found, Refusal):
        return found
    # The edge loads the cell whole; a B after it would bring back what L1 held before. So these
    # cells get a B of their own, which pulses while shifting and at no other time.
    pins = {
        pin: EDGE_CLOCK_B if net == TestNet.CLOCK_B else net for pin, net in found.test_pins.items()
    }
    return replace(found, test_pins=pins)


def _not(name: str) -> Not:
    return Not(Var(name))


def _best(library: Library, cell: Cell, kind: SrlKind, taken: Taken) -> Conversion | Refusal:
    for found in fit(library, cell, (kind,), taken):
        if found.kind is SrlKind.DOUBLE and found.falling:
            return Refusal(
                "negative-edge-in-lssd",
                f"`{cell.name}` takes data at the falling edge, and its clock at rest would leave"
                " C on",
                "give these cells a clock port of their own that rests at 1, or leave them out",
            )
        return _conversion(cell, found)
    return Refusal(
        "no-scan-cell",
        f"the library has no level-sensitive scan cell for `{cell.name}` ({kind.value}), and none"
        " can be composed from its NAND gates and inverters",
        "give a library that has one (signal_type test_scan_clock_a, test_scan_clock_b); a"
        " flip-flop can become a double latch with --flip-flops two-phase, whose B has to be driven"
        " in mission too",
    )


def _conversion(cell: Cell, found: Fit) -> Conversion:
    return Conversion(
        style=NAME,
        how="module" if found.module else "twin",
        before=cell.name,
        after=found.cell,
        pins={old: new for old, new in found.pins.items() if old != new},
        ties=dict(found.ties),
        scan_in=found.scan_in,
        scan_in_inverted=found.scan_in_inverted,
        taps=found.taps,
        test_pins=dict(found.test_pins),
        area=None if found.area is None or cell.area is None else found.area - cell.area,
        module=found.module,
    )
