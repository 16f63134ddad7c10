"""The invented cell library of the demo, as values: what each cell has and does.

Names: function, then ``_w`` and its drive (``nand2_w1``). ``scan_`` cells shift through a mux,
``two_clock_`` cells by a scan clock of their own, ``srl_`` cells by the clocks A and B.
"""

from dataclasses import dataclass, field
from typing import Final

from demo_tables import STAR, clocked_scan_table, edge_table, first_latch_table, pair_table


@dataclass(frozen=True)
class Port:
    """One pin, or one bus when ``bits`` is more than 1.

    Attributes:
        name: As netlists write it.
        load: Input load in pF; 0 for outputs.
        function: Liberty function of an output.
        hidden: Test-only output.
        attributes: Further Liberty attributes.
        signal: ``signal_type`` within the test cell.
        mission: Function of an output within the test cell.
        bits: Width.
    """

    name: str
    load: float = 0.0
    function: str | None = None
    hidden: bool = False
    attributes: tuple[str, ...] = ()
    signal: str | None = None
    mission: str | None = None
    bits: int = 1


@dataclass(frozen=True)
class Timing:
    """What delay and constraint arcs a storage cell has.

    Attributes:
        launch: (clock pin, ``rising_edge`` or ``falling_edge``, outputs) arcs.
        checks: (data pin, clock pin, ``rising`` or ``falling``) set-up and hold pairs.
        through: (data pin, outputs) arcs of transparent latches.
        clear: Pins that force outputs low (their inverses high) at 0.
        preset: Pins that force outputs high at 0.
    """

    launch: tuple[tuple[str, str, tuple[str, ...]], ...] = ()
    checks: tuple[tuple[str, str, str], ...] = ()
    through: tuple[tuple[str, tuple[str, ...]], ...] = ()
    clear: str | None = None
    preset: str | None = None


@dataclass(frozen=True)
class Cell:
    """One cell.

    Attributes:
        name: As netlists write it.
        drive: Strength of its outputs, 1 for the weakest.
        transistors: Area is 0.9 um2 for each, and 1.8 um2 for the cell.
        ports: In order.
        storage: Liberty text of its storage group, empty for gates.
        test: Liberty text of the storage group of its test cell.
        verilog: Body of the Verilog model; empty where the functions say all.
        attributes: Further Liberty attributes.
        timing: Arcs of storage cells.
        three_state: High-impedance condition of the output.
    """

    name: str
    drive: int
    transistors: int
    ports: tuple[Port, ...]
    storage: str = ""
    test: str = ""
    verilog: str = ""
    attributes: tuple[str, ...] = ()
    timing: Timing = field(default_factory=Timing)
    three_state: str | None = None


SMALL: Final = 0.0016
"""Input load of a weak gate, pF."""
CLOCK: Final = 0.0021
"""Input load of a clock pin, pF."""


def gate(name: str, drive: int, transistors: int, pins: str, function: str) -> Cell:
    """Return a gate whose function needs no more words than Liberty's."""
    load = SMALL * (drive if transistors <= 4 else 1)
    ports = [Port(pin, load) for pin in pins.split()]
    return Cell(f"{name}_w{drive}", drive, transistors, (*ports, Port("Y", 0.0, function)))


def gates() -> list[Cell]:
    """Return the combinational cells."""
    found = [gate("inv", w, 2 * w, "A", "!A") for w in (1, 2, 4)]
    found += [gate("buf", w, 2 + 2 * w, "A", "A") for w in (1, 2, 4)]
    found += [gate("clock_buf", w, 4 + 2 * w, "A", "A") for w in (4, 8)]
    letters = "A B C D".split()
    for count in (2, 3, 4):
        pins = letters[:count]
        for drive in (1, 2):
            size = 2 * count * drive
            both = " ".join(pins)
            found.append(gate(f"nand{count}", drive, size, both, f"!({' & '.join(pins)})"))
            found.append(gate(f"nor{count}", drive, size, both, f"!({' | '.join(pins)})"))
        found.append(gate(f"and{count}", 1, 2 * count + 2, " ".join(pins), " & ".join(pins)))
        found.append(gate(f"or{count}", 1, 2 * count + 2, " ".join(pins), " | ".join(pins)))
    found += [
        gate("xor2", 1, 10, "A B", "A ^ B"),
        gate("xnor2", 1, 10, "A B", "!(A ^ B)"),
        gate("and_nor21", 1, 6, "A B C", "!((A & B) | C)"),
        gate("and_nor22", 1, 8, "A B C D", "!((A & B) | (C & D))"),
        gate("or_nand21", 1, 6, "A B C", "!((A | B) & C)"),
        gate("or_nand22", 1, 8, "A B C D", "!((A | B) & (C | D))"),
        gate("mux2", 1, 12, "A B S", "(A & !S) | (B & S)"),
        gate("mux2", 2, 14, "A B S", "(A & !S) | (B & S)"),
        Cell("tie_high", 1, 2, (Port("Y", 0.0, "1"),)),
        Cell("tie_low", 1, 2, (Port("Y", 0.0, "0"),)),
    ]
    bus_ports = (Port("A", SMALL), Port("E", SMALL), Port("Y", 0.0, "A"))
    found += [Cell(f"bus_drive_w{w}", w, 6 + 2 * w, bus_ports, three_state="!E") for w in (1, 2)]
    return found


@dataclass(frozen=True)
class Kind:
    """A kind of flip-flop.

    Attributes:
        suffix: Of its name.
        falling: Whether it acts on the falling edge (its clock pin is then CKN).
        reset: Whether it has RN, active low.
        preset: Whether it has SN, active low; RN wins.
        enable: Whether it has E and keeps its state while E is 0.
        outputs: Of Q and QN.
    """

    suffix: str
    falling: bool = False
    reset: bool = False
    preset: bool = False
    enable: bool = False
    outputs: str = "Q QN"

    @property
    def clock(self) -> str:
        """Name of the clock pin."""
        return "CKN" if self.falling else "CK"

    @property
    def mission(self) -> str:
        """Next state in Liberty."""
        return "(E & D) | (!E & IQ)" if self.enable else "D"

    @property
    def asynchronous(self) -> tuple[str, ...]:
        """Set and reset pins."""
        return ("RN",) * self.reset + ("SN",) * self.preset

    def group(self, following: str) -> str:
        """Return the Liberty ff group with one next state."""
        clock = "!CKN" if self.falling else "CK"
        words = [f'clocked_on : "{clock}";', f'next_state : "{following}";']
        return f"ff (IQ, IQN) {{ {' '.join([*words, *self.forces()])} }}"

    def forces(self) -> list[str]:
        """Return the Liberty attributes of set and reset."""
        words = ['clear : "!RN";'] * self.reset + ['preset : "!SN";'] * self.preset
        if self.reset and self.preset:
            words += ["clear_preset_var1 : L;", "clear_preset_var2 : H;"]
        return words

    def verilog(self, edges: str, captured: str) -> str:
        """Return a model that captures ``captured`` (an ``if`` chain may stand before it)."""
        events, lines, wires = edges, [], []
        if self.reset:
            events += " or negedge RN"
            lines.append("if (!RN) state <= 1'b0;")
        if self.preset and self.reset:
            events += " or posedge preset"
            wires.append("  wire preset = RN & ~SN;  // so that SN acts when RN goes away first\n")
            lines.append("if (preset) state <= 1'b1;")
        elif self.preset:
            events += " or negedge SN"
            lines.append("if (!SN) state <= 1'b1;")
        lines.append(captured)
        body = "\n    else ".join(lines)
        return f"  reg state;\n{''.join(wires)}  always @({events})\n    {body}\n{self.shown()}"

    def shown(self, state: str = "state") -> str:
        """Return the assigns of the outputs."""
        lines = {
            "Q": f"  assign `TIDE_DELAY Q = {state};",
            "QN": f"  assign `TIDE_DELAY QN = ~{state};",
        }
        return "\n".join(lines[name] for name in self.outputs.split()) + "\n"

    def edge(self, pin: str | None = None) -> str:
        """Return the Verilog event of the clock."""
        return f"{'negedge' if self.falling else 'posedge'} {pin or self.clock}"


KINDS: Final = (
    Kind(""),
    Kind("_r", reset=True),
    Kind("_s", preset=True),
    Kind("_rs", reset=True, preset=True),
    Kind("_n", falling=True),
    Kind("_nr", falling=True, reset=True),
    Kind("_e", enable=True),
    Kind("_er", enable=True, reset=True),
    Kind("_inverse", outputs="QN"),
)


def flip_flops() -> list[Cell]:
    """Return plain flip-flops, their mux-D, scan-clock and A/B forms."""
    found: list[Cell] = []
    for make in (plain_flop, scan_flop, two_clock_flop, edge_srl):
        for kind in KINDS:
            drives = (1, 2) if kind.suffix in ("", "_r") else (1,)
            found += [make(kind, drive) for drive in drives]
    return found


def flop_ports(kind: Kind, extra: tuple[Port, ...], *, tested: bool) -> tuple[Port, ...]:
    """Return data, extra, clock, set and reset pins and the outputs."""
    data = [Port("D", SMALL), *[Port("E", SMALL)] * kind.enable]
    clocks = [Port(kind.clock, CLOCK, attributes=("clock : true;",))]
    forces = [Port(name, SMALL) for name in kind.asynchronous]
    outs = []
    for name in kind.outputs.split():
        state = "IQ" if name == "Q" else "IQN"
        signal = "test_scan_out" if name == "Q" else "test_scan_out_inverted"
        outs.append(Port(name, 0.0, state, signal=signal if tested else None, mission=state))
    return (*data, *extra, *clocks, *forces, *outs)


def flop_timing(kind: Kind, more: tuple[tuple[str, str, str], ...] = ()) -> Timing:
    """Return the arcs of an edge-triggered cell."""
    word = "falling" if kind.falling else "rising"
    outs = tuple(kind.outputs.split())
    data = [("D", kind.clock, word)] + [("E", kind.clock, word)] * kind.enable
    return Timing(
        ((kind.clock, f"{word}_edge", outs),),
        (*data, *more),
        clear="RN" if kind.reset else None,
        preset="SN" if kind.preset else None,
    )


def flop_size(kind: Kind, drive: int) -> int:
    """Return the transistors of a plain flip-flop."""
    return 20 + 2 * drive + 4 * len(kind.asynchronous) + 8 * kind.enable


def plain_flop(kind: Kind, drive: int) -> Cell:
    """Return a flip-flop without scan."""
    captured = "if (E) state <= D;" if kind.enable else "state <= D;"
    return Cell(
        f"flop{kind.suffix}_w{drive}",
        drive,
        flop_size(kind, drive),
        flop_ports(kind, (), tested=False),
        kind.group(kind.mission),
        verilog=kind.verilog(kind.edge(), captured),
        timing=flop_timing(kind),
    )


def scan_flop(kind: Kind, drive: int) -> Cell:
    """Return the flip-flop with a scan mux; scan enable wins over the data enable."""
    word = "falling" if kind.falling else "rising"
    extra = (
        Port("SI", SMALL, signal="test_scan_in", attributes=("nextstate_type : scan_in;",)),
        Port(
            "SE",
            2 * SMALL,
            signal="test_scan_enable",
            attributes=("nextstate_type : scan_enable;",),
        ),
    )
    captured = "if (SE) state <= SI;\n    else " + (
        "if (E) state <= D;" if kind.enable else "state <= D;"
    )
    return Cell(
        f"scan_flop{kind.suffix}_w{drive}",
        drive,
        flop_size(kind, drive) + 8,
        flop_ports(kind, extra, tested=True),
        kind.group(f"(SE & SI) | (!SE & ({kind.mission}))"),
        kind.group(kind.mission),
        kind.verilog(kind.edge(), captured),
        timing=flop_timing(kind, (("SI", kind.clock, word), ("SE", kind.clock, word))),
    )


def two_clock_flop(kind: Kind, drive: int) -> Cell:
    """Return the flip-flop with a scan clock SCK beside its own clock."""
    extra = (
        Port("SI", SMALL, signal="test_scan_in"),
        Port("SCK", CLOCK, signal="test_scan_clock", attributes=("clock : true;",)),
    )
    on = f"!{kind.clock}" if kind.falling else kind.clock
    data = "if (E) state <= D;" if kind.enable else "state <= D;"
    captured = f"if (SCK & {on}) state <= 1'bx;  // never both\n    else if (SCK) state <= SI;\n    else {data}"
    timing = flop_timing(kind, (("SI", "SCK", "rising"),))
    outs = tuple(kind.outputs.split())
    return Cell(
        f"two_clock_flop{kind.suffix}_w{drive}",
        drive,
        flop_size(kind, drive) + 10,
        state_ports(flop_ports(kind, extra, tested=True), "IQ"),
        clocked_scan_table(kind.clock, kind.asynchronous, falling=kind.falling, enable=kind.enable),
        kind.group(kind.mission),
        kind.verilog(f"{kind.edge()} or posedge SCK", captured),
        timing=Timing(
            (*timing.launch, ("SCK", "rising_edge", outs)),
            timing.checks,
            clear=timing.clear,
            preset=timing.preset,
        ),
    )


def state_ports(ports: tuple[Port, ...], node: str) -> tuple[Port, ...]:
    """Return the ports with outputs that show a node of the state table."""
    shown = {"IQ": node, "IQN": f"!{node}"}
    return tuple(
        Port(
            p.name, p.load, shown.get(p.function or ""), p.hidden, p.attributes, p.signal, p.mission
        )
        for p in ports
    )


SHIFT_PORTS: Final = (
    Port("I", SMALL, signal="test_scan_in"),
    Port("A", CLOCK, signal="test_scan_clock_a", attributes=("clock : true;",)),
    Port("B", CLOCK, signal="test_scan_clock_b", attributes=("clock : true;",)),
)


def edge_srl(kind: Kind, drive: int) -> Cell:
    """Return the flip-flop on its own clock edge that shifts under A, then B."""
    data = "E ? D : state" if kind.enable else "D"
    clear = "RN" if kind.reset else None
    forced = f"    if (!RN) {{0}} <= 1'b0;\n    else " if clear else "    "
    events = " or RN" * kind.reset + " or SN" * kind.preset
    if kind.preset:
        forced += "if (!SN) {0} <= 1'b1;\n    else "
    held = " & ".join(["~B", *kind.asynchronous])
    verilog = (
        "  reg state, first;\n"
        f"  always @({kind.edge()}) if ({held}) state <= {data};\n"
        f"  always @(A or I{events})\n{forced.format('first')}if (A) first <= I;\n"
        f"  always @(B or first{events})\n{forced.format('state')}if (B) state <= first;\n{kind.shown()}"
    )
    timing = flop_timing(kind, (("I", "A", "falling"),))
    outs = tuple(kind.outputs.split())
    return Cell(
        f"srl_edge{kind.suffix}_w{drive}",
        drive,
        flop_size(kind, drive) + 16,
        state_ports(flop_ports(kind, SHIFT_PORTS, tested=True), "L2"),
        edge_table(kind.clock, kind.asynchronous, falling=kind.falling, enable=kind.enable),
        kind.group(kind.mission),
        verilog,
        timing=Timing(
            (*timing.launch, ("B", "rising_edge", outs)),
            timing.checks,
            clear=timing.clear,
            preset=timing.preset,
        ),
    )


def latches() -> list[Cell]:
    """Return the plain latches and the LSSD cells made of latches."""
    return [
        plain_latch("latch", "G"),
        plain_latch("latch_low", "GN"),
        plain_latch("latch_r", "G", reset=True),
        plain_latch("latch_low_r", "GN", reset=True),
        *[make(reset) for reset in (False, True) for make in (first_latch, single_srl, double_srl)],
        star_srl(),
    ]


def latch_group(enable: str, data: str, *, reset: bool) -> str:
    """Return a Liberty latch group."""
    clear = ' clear : "!RN";' if reset else ""
    return f'latch (IQ, IQN) {{ enable : "{enable}"; data_in : "{data}";{clear} }}'


def plain_latch(name: str, enable: str, *, reset: bool = False) -> Cell:
    """Return a latch open while G is 1 or GN is 0."""
    low = enable == "GN"
    edge, opening = ("rising", "falling_edge") if low else ("falling", "rising_edge")
    on = "!GN" if low else "G"
    forced = "if (!RN) state <= 1'b0;\n    else " if reset else ""
    body = (
        f"  reg state;\n  always @({enable} or D{' or RN' * reset})\n"
        f"    {forced}if ({on}) state <= D;\n{Kind('').shown()}"
    )
    return Cell(
        f"{name}_w1",
        1,
        14 + 4 * reset,
        (
            Port("D", SMALL),
            Port(enable, CLOCK, attributes=("clock : true;",)),
            *[Port("RN", SMALL)] * reset,
            Port("Q", 0.0, "IQ"),
            Port("QN", 0.0, "IQN"),
        ),
        latch_group(on, "D", reset=reset),
        verilog=body,
        timing=Timing(
            ((enable, opening, ("Q", "QN")),),
            (("D", enable, edge),),
            (("D", ("Q", "QN")),),
            "RN" if reset else None,
        ),
    )


def _first_model(*, reset: bool) -> str:
    forced = "if (!RN) first <= 1'b0;\n    else " if reset else ""
    return (
        f"  always @(C or D or A or I{' or RN' * reset})\n    {forced}"
        "if (C & A) first <= 1'bx;  // never both\n"
        "    else if (C) first <= D;\n    else if (A) first <= I;\n"
    )


def _second_model(*, reset: bool) -> str:
    forced = "if (!RN) second <= 1'b0;\n    else " if reset else ""
    return f"  always @(B or first{' or RN' * reset})\n    {forced}if (B) second <= first;\n"


def _srl_ports(reset: bool, shift: tuple[Port, ...]) -> tuple[Port, ...]:
    clock = Port("C", CLOCK, attributes=("clock : true;",))
    return (Port("D", SMALL), clock, *shift, *[Port("RN", SMALL)] * reset)


def first_latch(reset: bool) -> Cell:
    """Return L1 alone: system data under C, scan data under A."""
    outs = (
        Port("L1", 0.0, "L1M", signal="test_scan_out", mission="IQ"),
        Port("L1N", 0.0, "!L1M", signal="test_scan_out_inverted", mission="IQN"),
    )
    names = ("L1", "L1N")
    return Cell(
        f"srl_first{'_r' * reset}_w1",
        1,
        20 + 4 * reset,
        (*_srl_ports(reset, SHIFT_PORTS[:2]), *outs),
        first_latch_table(reset=reset),
        latch_group("C", "D", reset=reset),
        f"  reg first;\n{_first_model(reset=reset)}"
        "  assign `TIDE_DELAY L1 = first;\n  assign `TIDE_DELAY L1N = ~first;\n",
        timing=Timing(
            (("C", "rising_edge", names), ("A", "rising_edge", names)),
            (("D", "C", "falling"), ("I", "A", "falling")),
            (("D", names),),
            "RN" if reset else None,
        ),
    )


def single_srl(reset: bool) -> Cell:
    """Return a whole shift-register latch whose system output is L1; L2 serves scan alone."""
    outs = (
        Port("L1", 0.0, "M", mission="IQ"),
        Port("L1N", 0.0, "!M", mission="IQN"),
        Port("L2", 0.0, "S", hidden=True, signal="test_scan_out"),
    )
    return Cell(
        f"srl_single{'_r' * reset}_w1",
        1,
        32 + 6 * reset,
        (*_srl_ports(reset, SHIFT_PORTS), *outs),
        pair_table(reset=reset),
        latch_group("C", "D", reset=reset),
        f"  reg first, second;\n{_first_model(reset=reset)}{_second_model(reset=reset)}"
        "  assign `TIDE_DELAY L1 = first;\n  assign `TIDE_DELAY L1N = ~first;\n"
        "  assign `TIDE_DELAY L2 = second;\n",
        timing=Timing(
            (
                ("C", "rising_edge", ("L1", "L1N")),
                ("A", "rising_edge", ("L1", "L1N")),
                ("B", "rising_edge", ("L2",)),
            ),
            (("D", "C", "falling"), ("I", "A", "falling")),
            (("D", ("L1", "L1N")),),
            "RN" if reset else None,
        ),
    )


def double_srl(reset: bool) -> Cell:
    """Return a whole shift-register latch whose system output is L2."""
    outs = (
        Port("L2", 0.0, "S", signal="test_scan_out", mission="IQ"),
        Port("L2N", 0.0, "!S", signal="test_scan_out_inverted", mission="IQN"),
    )
    clear = ' clear : "!RN";' if reset else ""
    return Cell(
        f"srl_double{'_r' * reset}_w1",
        1,
        30 + 6 * reset,
        (*_srl_ports(reset, SHIFT_PORTS), *outs),
        pair_table(reset=reset),
        f'ff (IQ, IQN) {{ next_state : "D"; clocked_on : "C"; clocked_on_also : "B";{clear} }}',
        f"  reg first, second;\n{_first_model(reset=reset)}{_second_model(reset=reset)}"
        "  assign `TIDE_DELAY L2 = second;\n  assign `TIDE_DELAY L2N = ~second;\n",
        timing=Timing(
            (("B", "rising_edge", ("L2", "L2N")),),
            (("D", "C", "falling"), ("I", "A", "falling")),
            clear="RN" if reset else None,
        ),
    )


def star_srl() -> Cell:
    """Return the L1/L2* form: both latches carry system data, each under a clock of its own."""
    second = (Port("D2", SMALL), Port("C2", CLOCK, attributes=("clock : true;",)))
    outs = (
        Port("L1", 0.0, "M", mission="IQ"),
        Port("L2", 0.0, "S", signal="test_scan_out"),
    )
    verilog = (
        f"  reg first, second;\n{_first_model(reset=False)}"
        "  always @(B or first or C2 or D2)\n    if (B & C2) second <= 1'bx;  // never both\n"
        "    else if (B) second <= first;\n    else if (C2) second <= D2;\n"
        "  assign `TIDE_DELAY L1 = first;\n  assign `TIDE_DELAY L2 = second;\n"
    )
    return Cell(
        "srl_star_w1",
        1,
        34,
        (*_srl_ports(False, SHIFT_PORTS), *second, *outs),
        STAR,
        latch_group("C", "D", reset=False),
        verilog,
        timing=Timing(
            (
                ("C", "rising_edge", ("L1",)),
                ("A", "rising_edge", ("L1",)),
                ("B", "rising_edge", ("L2",)),
                ("C2", "rising_edge", ("L2",)),
            ),
            (("D", "C", "falling"), ("I", "A", "falling"), ("D2", "C2", "falling")),
            (("D", ("L1",)), ("D2", ("L2",))),
        ),
    )


def clock_gates() -> list[Cell]:
    """Return the clock gates, without and with a test pin ahead of the latch."""
    found = []
    for test in (False, True):
        enable = "E | T" if test else "E"
        ports = [
            Port("CK", CLOCK, attributes=("clock : true;", "clock_gate_clock_pin : true;")),
            Port("E", SMALL, attributes=("clock_gate_enable_pin : true;",)),
        ]
        if test:
            ports.append(Port("T", SMALL, attributes=("clock_gate_test_pin : true;",)))
        ports.append(Port("GCK", 0.0, "CK & IQ", attributes=("clock_gate_out_pin : true;",)))
        kind = "latch_posedge_precontrol" if test else "latch_posedge"
        found.append(
            Cell(
                f"clock_gate{'_test' * test}_w4",
                4,
                22 + 4 * test,
                tuple(ports),
                f'latch (IQ, IQN) {{ enable : "!CK"; data_in : "{enable}"; }}',
                verilog=(
                    f"  reg state;\n  always @(CK or E{' or T' * test})\n"
                    f"    if (!CK) state <= {enable};\n  assign `TIDE_DELAY GCK = CK & state;\n"
                ),
                attributes=(f"clock_gating_integrated_cell : {kind};",),
                timing=Timing(
                    (("CK", "clock_gate", ("GCK",)),),
                    (("E", "CK", "rising"), *[("T", "CK", "rising")] * test),
                ),
            )
        )
    return found


def banks() -> list[Cell]:
    """Return the four-bit flip-flop bank and its scan form with the chain inside."""
    bits = 4
    clock, reset = Port("CK", CLOCK, attributes=("clock : true;",)), Port("RN", SMALL)
    data = Port("D", SMALL, bits=bits)
    plain = 'ff_bank (IQ, IQN, 4) { clocked_on : "CK"; next_state : "D"; clear : "!RN"; }'
    scanned = plain.replace('"D"', '"(SE & SI) | (!SE & D)"')
    scan = (
        Port("SI", SMALL, signal="test_scan_in", attributes=("nextstate_type : scan_in;",)),
        Port(
            "SE",
            2 * SMALL,
            signal="test_scan_enable",
            attributes=("nextstate_type : scan_enable;",),
        ),
    )
    inner = ("scan_start_pin : Q[0];", "scan_pin_inverted : false;")
    body = "  reg [3:0] state;\n  always @(posedge CK or negedge RN)\n    if (!RN) state <= 4'b0000;\n    else {}\n"
    shown = "  assign `TIDE_DELAY Q = state;\n"
    checks = (("D", "CK", "rising"),)
    more = (("SI", "CK", "rising"), ("SE", "CK", "rising"))
    launch = (("CK", "rising_edge", ("Q",)),)
    return [
        Cell(
            "flop_bank4_w1",
            1,
            72,
            (data, clock, reset, Port("Q", 0.0, "IQ", bits=bits)),
            plain,
            verilog=body.format("state <= D;") + shown,
            timing=Timing(launch, checks, clear="RN"),
        ),
        Cell(
            "scan_bank4_w1",
            1,
            104,
            (
                data,
                *scan,
                clock,
                reset,
                Port(
                    "Q",
                    0.0,
                    "IQ",
                    attributes=inner,
                    signal="test_scan_out",
                    mission="IQ",
                    bits=bits,
                ),
            ),
            scanned,
            plain,
            body.format("if (SE) state <= {state[2:0], SI};\n    else state <= D;") + shown,
            timing=Timing(launch, checks + more, clear="RN"),
        ),
    ]


def all_cells() -> list[Cell]:
    """Return the whole library."""
    return [*gates(), *flip_flops(), *latches(), *clock_gates(), *banks()]
