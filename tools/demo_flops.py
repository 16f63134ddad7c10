"""Flip-flops of the demo library: plain, and with each of the three ways to shift."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from demo_cells import CLOCK, SHIFT_PORTS, SMALL, Cell, Port, Timing
from demo_tables import clocked_scan_table, edge_table


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

    def verilog(self, captured: Mapping[str, str]) -> str:
        """Return a model that does at each event what ``captured`` says, unless set or reset."""
        events, forced, wires = "", [], ""
        if self.reset:
            events += " or negedge RN"
            forced.append("if (!RN) state <= 1'b0;")
        if self.preset and self.reset:
            events += " or posedge preset"
            wires = "  wire preset = RN & ~SN;  // so that SN acts when RN goes away first\n"
            forced.append("if (preset) state <= 1'b1;")
        elif self.preset:
            events += " or negedge SN"
            forced.append("if (!SN) state <= 1'b1;")
        blocks = ""
        for edge, taken in captured.items():
            body = "\n    else ".join([*forced, taken])
            blocks += f"  always @({edge}{events})\n    {body}\n"
        return f"  reg state;\n{wires}{blocks}{self.shown()}"

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
        verilog=kind.verilog({kind.edge(): captured}),
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
        kind.verilog({kind.edge(): captured}),
        timing=flop_timing(kind, (("SI", kind.clock, word), ("SE", kind.clock, word))),
    )


def two_clock_flop(kind: Kind, drive: int) -> Cell:
    """Return the flip-flop with a scan clock SCK beside its own clock."""
    extra = (
        Port("SI", SMALL, signal="test_scan_in"),
        Port("SCK", CLOCK, signal="test_scan_clock", attributes=("clock : true;",)),
    )
    captured = "if (E) state <= D;" if kind.enable else "state <= D;"
    timing = flop_timing(kind, (("SI", "SCK", "rising"),))
    outs = tuple(kind.outputs.split())
    return Cell(
        f"two_clock_flop{kind.suffix}_w{drive}",
        drive,
        flop_size(kind, drive) + 10,
        state_ports(flop_ports(kind, extra, tested=True), "IQ"),
        clocked_scan_table(kind.clock, kind.asynchronous, falling=kind.falling, enable=kind.enable),
        kind.group(kind.mission),
        kind.verilog({kind.edge(): captured, "posedge SCK": "state <= SI;"}),
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


def edge_srl(kind: Kind, drive: int) -> Cell:
    """Return the flip-flop on its own clock edge that shifts under A, then B."""
    data = "E ? D : state" if kind.enable else "D"
    forced = "    if (!RN) {0} <= 1'b0;\n    else " if kind.reset else "    "
    events = " or RN" * kind.reset + " or SN" * kind.preset
    if kind.preset:
        forced += "if (!SN) {0} <= 1'b1;\n    else "
    held = " & ".join(["~B", *kind.asynchronous])
    verilog = (
        "  reg state, first;\n"
        f"  always @({kind.edge()}) if ({held}) state <= {data};\n"
        f"  always @(A or I{events})\n{forced.format('first')}if (A) first <= I;\n"
        f"  always @(B or first{events})\n{forced.format('state')}if (B) state <= first;\n"
        f"{kind.shown()}"
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
