"""The invented cell library of the demo, as values: what each cell has and does.

Names: function, then ``_w`` and its drive (``nand2_w1``). ``scan_`` cells shift through a mux,
``two_clock_`` cells by a scan clock of their own, ``srl_`` cells by the clocks A and B.
"""

from dataclasses import dataclass, field
from typing import Final


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


SHIFT_PORTS: Final = (
    Port("I", SMALL, signal="test_scan_in"),
    Port("A", CLOCK, signal="test_scan_clock_a", attributes=("clock : true;",)),
    Port("B", CLOCK, signal="test_scan_clock_b", attributes=("clock : true;",)),
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
    body = (
        "  reg [3:0] state;\n  always @(posedge CK or negedge RN)\n"
        "    if (!RN) state <= 4'b0000;\n    else {}\n"
    )
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
