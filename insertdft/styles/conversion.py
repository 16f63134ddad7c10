"""What replaces a storage cell: one value for all styles."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from typing import Final

from insertdft.styles.gates import ComposedModule


class TestNet:
    """Kinds of nets that test adds beside the chains; each comes from a port of its own.

    Where several groups of cells have a net of one kind each, its name is the kind, a stroke and
    the group's number: ``scan_clk/2``.
    """

    __test__ = False  # not a pytest class

    TEST_MODE: Final = "test_mode"
    SCAN_ENABLE: Final = "scan_enable"
    SCAN_CLOCK: Final = "scan_clk"
    CLOCK_A: Final = "clk_a"
    CLOCK_B: Final = "clk_b"
    CLOCK_C: Final = "clk_c"


#: Kinds of test nets in port order.
TEST_NETS: Final = (
    TestNet.TEST_MODE,
    TestNet.SCAN_ENABLE,
    TestNet.SCAN_CLOCK,
    TestNet.CLOCK_A,
    TestNet.CLOCK_B,
    TestNet.CLOCK_C,
)


def kind_of(net: str) -> str:
    """Return the kind of a test net, without its group."""
    return net.partition("/")[0]


def in_port_order(nets: Iterable[str]) -> tuple[str, ...]:
    """Return test nets, each once, in the order that their ports get."""

    def place(net: str) -> tuple[int, int]:
        kind, _, group = net.partition("/")
        return TEST_NETS.index(kind), int(group or 0)

    return tuple(sorted(set(nets), key=place))


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
        pins: Pin -> MISSION, SCAN, DATA, a test net, a constant (``1'b1``), or the name of a net
            between parts.
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
        how: ``twin`` (another library cell), ``composed`` (cells around the old one), ``as-is``
            (already a scan cell whose scan pins are free), ``kept`` (it takes its data from the
            element before it already, as the slave of a latch pair does) or ``module`` (a module
            of library gates, written once into the netlist).
        before: Cell in the input.
        after: Cell that holds the state afterwards.
        pins: Pins whose name changes, old -> new.
        ties: Pins of ``after`` that need a constant.
        scan_in: Pin of ``after`` that shift data enters by (composed, kept: its data pin).
        scan_in_inverted: Whether the state becomes the inverse of what enters.
        taps: Outputs that can feed the next position, best first.
        test_pins: Pin of ``after`` -> test net that drives it.
        bits: Shift cycles through the cell; 0 for the second latch of a position.
        parts: What a composed cell adds; MISSION moves from the data pin to a part.
        area: Area added for each instance, None where the library states none.
        module: The module of gates that ``after`` names, None for a library cell.
    """

    style: str
    how: str
    before: str
    after: str
    scan_in: str
    taps: tuple[ScanTap, ...]
    test_pins: Mapping[str, str]
    pins: Mapping[str, str] = field(default_factory=dict)
    ties: Mapping[str, int] = field(default_factory=dict)
    scan_in_inverted: bool = False
    bits: int = 1
    parts: tuple[Part, ...] = ()
    area: float | None = None
    module: ComposedModule | None = None

    def test_nets(self) -> tuple[str, ...]:
        """Return the test nets that every instance needs, in port order."""
        return in_port_order([*self.test_pins.values(), *test_nets_of(self.parts)])


def test_nets_of(parts: Iterable[Part]) -> tuple[str, ...]:
    """Return the test nets that parts connect to."""
    named = [net for part in parts for net in part.pins.values()]
    return in_port_order(net for net in named if kind_of(net) in TEST_NETS)


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
