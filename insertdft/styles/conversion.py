"""What replaces a storage cell: one value for all styles."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import Enum
from typing import Final


class TestNet(Enum):
    """Nets that test adds beside the chains; each comes from a port of its own."""

    __test__ = False  # not a pytest class

    SCAN_ENABLE = "scan_enable"
    SCAN_CLOCK = "scan_clk"
    CLOCK_A = "clk_a"
    CLOCK_B = "clk_b"
    CLOCK_C = "clk_c"


#: Nets that the parts of a composed cell connect to, beside test nets and nets of their own.
MISSION: Final = "$mission"  # what drove the data pin before
SCAN: Final = "$scan"  # the position before it in the chain
DATA: Final = "$data"  # what drives the data pin afterwards


@dataclass(frozen=True, slots=True)
class Part:
    """One cell that a composed scan cell adds beside the storage cell it keeps.

    Attributes:
        role: What it is, for its instance name (``mux``).
        cell: Library cell.
        pins: Pin -> MISSION, SCAN, DATA, the name of a ``TestNet``, or the name of a net between
            parts.
    """

    role: str
    cell: str
    pins: Mapping[str, str]


@dataclass(frozen=True, slots=True)
class ScanTap:
    """An output that can feed the next position of a chain.

    Attributes:
        pin: Pin of the scan cell.
        inverted: Whether it shows the inverse of the cell's state.
        test_only: Whether it exists for scan alone.
    """

    pin: str
    inverted: bool
    test_only: bool = False


@dataclass(frozen=True, slots=True)
class Conversion:
    """How instances of one cell become scan cells.

    Attributes:
        style: ``mux-d``, ``clocked-scan`` or ``lssd``.
        how: ``twin`` (another library cell), ``composed`` (cells around the old one) or ``as-is``
            (already a scan cell whose scan pins are free).
        before: Cell in the input.
        after: Cell that holds the state afterwards.
        pins: Pins whose name changes, old -> new.
        ties: Pins of ``after`` that need a constant.
        scan_in: Pin of ``after`` that shift data enters by (composed: its data pin).
        scan_in_inverted: Whether the state becomes the inverse of what enters.
        taps: Outputs that can feed the next position, best first.
        test_pins: Pin of ``after`` -> test net that drives it.
        bits: Shift cycles through the cell.
        parts: What a composed cell adds; MISSION moves from the data pin to a part.
        area: Area added for each instance, None where the library states none.
    """

    style: str
    how: str
    before: str
    after: str
    scan_in: str
    taps: tuple[ScanTap, ...]
    test_pins: Mapping[str, TestNet]
    pins: Mapping[str, str] = field(default_factory=dict)
    ties: Mapping[str, int] = field(default_factory=dict)
    scan_in_inverted: bool = False
    bits: int = 1
    parts: tuple[Part, ...] = ()
    area: float | None = None

    def test_nets(self) -> tuple[TestNet, ...]:
        """Return the test nets that every instance needs, in the order of ``TestNet``."""
        named = {net for part in self.parts for net in part.pins.values()}
        used = set(self.test_pins.values())
        return tuple(net for net in TestNet if net in used or net.value in named)


@dataclass(frozen=True, slots=True)
class Refusal:
    """Why a cell cannot be converted.

    Attributes:
        slug: Key into ``SLUGS``.
        message: The fact.
        hint: What to do.
    """

    slug: str
    message: str
    hint: str
