"""Latches of the demo library: plain, and the shift-register latches of level-sensitive scan."""

from demo_cells import CLOCK, SHIFT_PORTS, SMALL, Cell, Port, Timing
from demo_tables import STAR, first_latch_table, pair_table


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
        f"    {forced}if ({on}) state <= D;\n"
        "  assign `TIDE_DELAY Q = state;\n  assign `TIDE_DELAY QN = ~state;\n"
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
