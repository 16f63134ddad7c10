"""The chain description: what a pattern tool, the trace and the proof are told about a netlist.

It names ports and instances, never our own structures, so it can describe any scan netlist. The
file form is ``chains.json``; its schema is ``insertdft/schemas/chains.schema.json``.

A *sequence* is a row of cycles. In a cycle, inputs are forced first, then outputs are measured,
then the clocks pulse, one phase after the other ("force, measure, pulse": common practice). Clock
ports named in no phase stay at their off value.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field


@dataclass(frozen=True, slots=True)
class ChainCell:
    """One position of a chain, one shift cycle long (``bits`` of them in a multi-bit cell).

    Attributes:
        instance: Hierarchical name of the cell that captures mission data (LSSD: of L1, or of the
            whole SRL).
        cell: Its library cell or module.
        scan_in: Pin path that shift data enters by, relative to ``instance`` (``SI``); for a
            composed cell the pin of the flip-flop (``D``), as mission and shift share it.
        scan_out: Output pin that feeds the next position.
        inverted: Whether its state is the inverse of what the position before it (or the scan-in
            port) held one shift earlier.
        slave: LSSD: instance of L2 where it is an instance of its own.
        bits: Shift cycles through it.
    """

    instance: str
    cell: str
    scan_in: str
    scan_out: str
    inverted: bool = False
    slave: str | None = None
    bits: int = 1


@dataclass(frozen=True, slots=True)
class LockUp:
    """A lock-up latch behind a position of a chain; it adds no shift cycle.

    Attributes:
        after: Index into ``Chain.cells`` of the position before it.
        instance: Hierarchical name.
        cell: Library cell.
        clock: Clock port that opens it.
    """

    after: int
    instance: str
    cell: str
    clock: str


@dataclass(frozen=True, slots=True)
class Chain:
    """One scan chain, cells from scan-in to scan-out.

    Attributes:
        name: Unique in the description.
        style: ``mux-d``, ``clocked-scan`` or ``lssd``.
        scan_in: Top port (bit) that feeds it.
        scan_out: Top port (bit) that shows its end.
        cells: Positions in shift order.
        clocks: Ports that shift it: the clock, or the scan clock, or A and B (in that order).
        edge: ``rise`` or ``fall`` of the shifting clock for edge-triggered cells; None for LSSD,
            and ``mixed`` if the chain holds both.
        scan_enable: Port that puts it into shift mode, None if none is needed.
        inverted_out: Whether scan-out shows the inverse of the last state.
        lock_ups: Lock-up latches on the way.
    """

    name: str
    style: str
    scan_in: str
    scan_out: str
    cells: tuple[ChainCell, ...]
    clocks: tuple[str, ...]
    edge: str | None
    scan_enable: str | None = None
    inverted_out: bool = False
    lock_ups: tuple[LockUp, ...] = ()

    @property
    def length(self) -> int:
        """Shift cycles from scan-in to scan-out."""
        return sum(cell.bits for cell in self.cells)


@dataclass(frozen=True, slots=True)
class TestPort:
    """A top port (bit) with a part in test.

    Attributes:
        port: Its name.
        role: ``scan_in``, ``scan_out``, ``scan_enable``, ``test_mode``, ``clock``, ``scan_clock``,
            ``clock_a``, ``clock_b``, ``clock_c``, ``set_reset``.
        added: Whether the conversion added it.
        mission: Value in mission mode; None if it is the user's (clocks, shared pins).
        shift: Value while shifting; None for clocks and scan data.
        capture: Value during capture; None if free.
        off: Clocks: the value at rest.
    """

    __test__ = False  # not a pytest class

    port: str
    role: str
    added: bool = False
    mission: int | None = None
    shift: int | None = None
    capture: int | None = None
    off: int | None = None


@dataclass(frozen=True, slots=True)
class Cycle:
    """One tester cycle.

    Attributes:
        force: (port, value) pairs set before anything else; they stay until set again.
        scan: Whether every chain's scan-in takes its next bit and every scan-out is compared.
        inputs: Whether free mission inputs take the values of the pattern in this cycle.
        measure: Whether mission outputs are compared.
        pulses: Phases in time order; all ports of a phase pulse together, phases never overlap.
        at_speed: Whether the time from the end of the cycle before to this one is the one tested.
        why: A few words for pictures and comments.
    """

    force: tuple[tuple[str, int], ...] = ()
    scan: bool = False
    inputs: bool = False
    measure: bool = False
    pulses: tuple[tuple[str, ...], ...] = ()
    at_speed: bool = False
    why: str = ""


@dataclass(frozen=True, slots=True)
class Description:
    """All that test needs to know about one netlist.

    Attributes:
        design: Top module.
        chains: In port order.
        ports: Every top port with a part in test.
        sequences: By name: ``setup`` (once, first), ``shift`` (one bit; repeat length times),
            ``capture``, ``unload_start`` (before the first unload bit; may be missing),
            ``launch_on_shift``, ``launch_on_capture`` (each replaces ``capture``).
    """

    design: str
    chains: tuple[Chain, ...]
    ports: tuple[TestPort, ...] = ()
    sequences: Mapping[str, tuple[Cycle, ...]] = field(default_factory=dict)
