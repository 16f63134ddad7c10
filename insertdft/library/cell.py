"""What a library says about its cells, as values."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import Enum

from insertdft.diagnostics import Diagnostic
from insertdft.library.expression import Expression
from insertdft.text import Span


class StorageKind(Enum):
    """How a storage element takes its data."""

    FLIP_FLOP = "flip-flop"
    LATCH = "latch"
    TABLE = "state table"


@dataclass(frozen=True, slots=True)
class Storage:
    """One ff, latch, ff_bank or latch_bank group.

    Attributes:
        kind: FLIP_FLOP or LATCH.
        state: Name of the state variable (Liberty's first).
        state_inverted: Name of the inverted state variable (Liberty's second).
        bits: Always 1: a bank of n bits is opened into n of these, ``IQ[0]``, ``IQ[1]``, ...
        data: ``next_state`` of a flip-flop, ``data_in`` of a latch; None if the group has none
            (a latch of set and reset alone).
        clock: ``clocked_on`` (rising of the expression), or ``enable`` (open while it is true).
        clock_also: ``clocked_on_also`` or ``enable_also``: the slave's own clock.
        clear: State becomes 0 while true.
        preset: State becomes 1 while true.
        clear_preset: What state and inverted state become while both are true, of L H N T X
            (``clear_preset_var1``, ``clear_preset_var2``); None where not given.
    """

    kind: StorageKind
    state: str
    state_inverted: str
    bits: int
    data: Expression | None
    clock: Expression | None
    clock_also: Expression | None = None
    clear: Expression | None = None
    preset: Expression | None = None
    clear_preset: tuple[str | None, str | None] = (None, None)


@dataclass(frozen=True, slots=True)
class StateTable:
    """A statetable group, tokens as written (L H - H/L L/H R F ~R ~F N X).

    Attributes:
        inputs: Input names.
        nodes: Internal node names.
        rows: (input tokens, current tokens, next tokens) a row; the first that matches holds.
    """

    inputs: tuple[str, ...]
    nodes: tuple[str, ...]
    rows: tuple[tuple[tuple[str, ...], tuple[str, ...], tuple[str, ...]], ...]


@dataclass(frozen=True, slots=True, eq=False)
class Table:
    """A delay, transition or constraint table.

    Attributes:
        axes: Meaning of each index (``input_net_transition``, ``total_output_net_capacitance``...).
        indices: Values of each axis, in library units.
        values: Row-major values, in the library's time unit.
    """

    axes: tuple[str, ...]
    indices: tuple[tuple[float, ...], ...]
    values: tuple[float, ...]


@dataclass(frozen=True, slots=True, eq=False)
class Arc:
    """One timing group of a pin.

    Attributes:
        related: Names of the related pins.
        kind: ``timing_type`` (``combinational`` where not given).
        sense: ``timing_sense`` or None.
        when: Condition text or None.
        tables: By name: ``cell_rise``, ``fall_transition``, ``rise_constraint``, ...
    """

    related: tuple[str, ...]
    kind: str
    sense: str | None
    when: str | None
    tables: Mapping[str, Table] = field(repr=False)


@dataclass(frozen=True, slots=True, eq=False)
class Pin:
    """One pin, or one bit of a bus or bundle.

    Attributes:
        name: Bits of a bus are ``D[0]``, ``D[1]``, ...
        direction: ``input``, ``output``, ``inout`` or ``internal``.
        function: Output value over inputs and state variables.
        three_state: Condition under which the output is at high impedance.
        capacitance: Input load in the library's capacitive unit, None where not given.
        max_capacitance: Largest load an output may drive, same unit.
        is_clock: ``clock : true``.
        signal_type: Of the cell's own pin group (rare); see ``TestCell.signal_types``.
        nextstate_type: data, scan_in, scan_enable, ... as declared.
        clock_gate_role: ``clock``, ``enable``, ``test``, ``obs`` or ``out`` in a clock-gate cell.
        internal_node: Node of the state table that an output shows.
        state_function: ``state_function`` text, or None.
        test_output_only: Output exists for scan alone.
        arcs: Timing groups.
    """

    name: str
    direction: str
    function: Expression | None = None
    three_state: Expression | None = None
    capacitance: float | None = None
    max_capacitance: float | None = None
    is_clock: bool = False
    signal_type: str | None = None
    nextstate_type: str | None = None
    clock_gate_role: str | None = None
    internal_node: str | None = None
    state_function: str | None = None
    test_output_only: bool = False
    arcs: tuple[Arc, ...] = field(default=(), repr=False)


@dataclass(frozen=True, slots=True, eq=False)
class TestCell:
    """A test_cell group: the cell's mission behaviour and the test meaning of its pins.

    Attributes:
        storage: Mission behaviour.
        functions: Mission function of the outputs.
        signal_types: Pin name -> ``test_scan_in``, ``test_scan_enable``, ...
        test_output_only: Outputs that exist for scan alone.
    """

    __test__ = False  # not a pytest class

    storage: tuple[Storage, ...]
    functions: Mapping[str, Expression]
    signal_types: Mapping[str, str]
    test_output_only: frozenset[str] = frozenset()


class Style(Enum):
    """The three scan styles."""

    MUX_D = "mux-d"
    CLOCKED_SCAN = "clocked-scan"
    LSSD = "lssd"


@dataclass(frozen=True, slots=True)
class ScanOutput:
    """An output that shows the scan cell's state.

    Attributes:
        pin: Its name.
        inverted: Whether it shows the inverse of the state.
        test_only: Whether it exists for scan alone.
    """

    pin: str
    inverted: bool
    test_only: bool = False


@dataclass(frozen=True, slots=True)
class ScanRole:
    """How a cell shifts, derived from its function.

    The state meant by "inverted" is the first state variable of the cell.

    Attributes:
        style: Which style the cell serves.
        data: Mission data pin (None if the mission function has no single data pin).
        scan_in: Pin that shift data enters by.
        scan_in_inverted: Whether the state becomes the inverse of ``scan_in`` when shifting.
        outputs: Outputs that show the state, those for scan alone first.
        scan_enable: mux-D: the pin that chooses shift.
        shift_value: mux-D: value of ``scan_enable`` that shifts.
        clock: Mission clock pin (LSSD: C).
        scan_clock: Clocked scan: the shift clock pin.
        clock_a: LSSD: shift clock of L1.
        clock_b: LSSD: clock of L2 (None where the cell is L1 alone).
        bits: Length in shift cycles.
        off_values: Value at rest of each clock pin named above: 0 for a clock that acts on its
            rising edge or while it is 1, else 1.
        data_2: LSSD with L1/L2*: system data pin of L2.
        clock_2: LSSD with L1/L2*: system clock pin of L2.
    """

    style: Style
    data: str | None
    scan_in: str
    scan_in_inverted: bool
    outputs: tuple[ScanOutput, ...]
    scan_enable: str | None = None
    shift_value: int = 1
    clock: str | None = None
    scan_clock: str | None = None
    clock_a: str | None = None
    clock_b: str | None = None
    bits: int = 1
    off_values: tuple[tuple[str, int], ...] = ()
    data_2: str | None = None
    clock_2: str | None = None


@dataclass(frozen=True, slots=True, eq=False)
class Cell:
    """One library cell.

    Attributes:
        name: As the library writes it.
        area: In the library's area unit, None where not given.
        pins: By name, in the library's order.
        power_pins: Names of its supply pins (``pg_pin``); a netlist may connect them.
        pin_order: Order of connection by position where it is known (from a Verilog model).
        storage: ff and latch groups.
        state_table: The statetable group, if any.
        test_cell: The test_cell group, if any.
        clock_gate: ``clock_gating_integrated_cell`` value, or None.
        dont_use: The library asks not to use it.
        dont_touch: The library asks not to replace it.
        power_management: It isolates, shifts levels, retains, switches or stays powered; never
            chosen for anything else.
        footprint: ``cell_footprint`` or None.
        stand_in: Whether it is a behavioural stand-in that we wrote.
        scan: How it shifts, for each style it serves; empty for a plain cell.
        span: Where its description stands.
    """

    name: str
    area: float | None
    pins: Mapping[str, Pin] = field(repr=False)
    pin_order: tuple[str, ...] | None = None
    power_pins: tuple[str, ...] = ()
    storage: tuple[Storage, ...] = ()
    state_table: StateTable | None = None
    test_cell: TestCell | None = None
    clock_gate: str | None = None
    dont_use: bool = False
    dont_touch: bool = False
    power_management: bool = False
    footprint: str | None = None
    stand_in: bool = False
    scan: tuple[ScanRole, ...] = ()
    span: Span | None = None

    @property
    def is_storage(self) -> bool:
        """Whether the cell keeps state and is no clock gate."""
        return self.clock_gate is None and bool(self.storage or self.state_table)

    def inputs(self) -> tuple[Pin, ...]:
        """Pins that are read, in the library's order."""
        return tuple(pin for pin in self.pins.values() if pin.direction in ("input", "inout"))

    def outputs(self) -> tuple[Pin, ...]:
        """Pins that are driven, in the library's order."""
        return tuple(pin for pin in self.pins.values() if pin.direction in ("output", "inout"))


@dataclass(frozen=True, slots=True, eq=False)
class Library:
    """All cells of the kit, from one or several files.

    Attributes:
        name: Name of the first library.
        cells: By name, in file order.
        time_unit_s: Seconds of one time unit.
        capacitance_unit_f: Farads of one capacitive unit.
        wire_loads: Wire-load text groups kept for later use, by name.
        twins_by_hand: The user's mapping, plain cell -> scan cell.
        diagnostics: Warnings of the reading; errors are raised instead.
    """

    name: str
    cells: Mapping[str, Cell] = field(repr=False)
    time_unit_s: float = 1e-9
    capacitance_unit_f: float = 1e-12
    wire_loads: Mapping[str, str] = field(default_factory=dict, repr=False)
    twins_by_hand: Mapping[str, str] = field(default_factory=dict)
    diagnostics: tuple[Diagnostic, ...] = field(default=(), repr=False)


@dataclass(frozen=True, slots=True)
class Twin:
    """The scan cell that can replace a plain storage cell.

    Attributes:
        cell: Name of the scan cell.
        role: Which of its roles serves.
        pins: Pin of the plain cell -> pin of the scan cell.
        ties: Pins of the scan cell that mission use needs at a constant, with that constant.
    """

    cell: str
    role: ScanRole
    pins: Mapping[str, str]
    ties: Mapping[str, int] = field(default_factory=dict)
