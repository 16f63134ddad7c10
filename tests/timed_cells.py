"""A library whose delays can be worked out in the head, and timing of small netlists of it."""

from circuits import design_of

from insertdft.library import Library, read_library
from insertdft.text import SourceText
from insertdft.timing.analyse import NEVER, Assumptions, Timing, analyse
from insertdft.timing.paths import endpoint_needs
from insertdft.timing.wiring import wiring_of


def plane(kind: str, base: float, by_slew: float, by_load: float) -> str:
    """Return a table that is base + by_slew * slew + by_load * load everywhere."""
    rows = [
        ", ".join(f"{base + by_slew * slew + by_load * load:.6f}" for load in (0, 10))
        for slew in (0, 10)
    ]
    values = ", ".join(f'"{row}"' for row in rows)
    return f'{kind} (d) {{ index_1 ("0, 10"); index_2 ("0, 10"); values ({values}); }}'


def timing(related: str, sense: str, kind: str, rise: float, fall: float) -> str:
    return (
        f'timing () {{ related_pin : "{related}"; timing_sense : {sense}; timing_type : {kind}; '
        + plane("cell_rise", rise, 0.1, 1)
        + plane("cell_fall", fall, 0.1, 1)
        + plane("rise_transition", 0, 0, 2)
        + plane("fall_transition", 0, 0, 3)
        + "}"
    )


def setup(kind: str) -> str:
    rows = '"0.5, 0.5", "0.7, 0.7"'
    tables = "".join(
        f'{edge}_constraint (s) {{ index_1 ("0, 10"); index_2 ("0, 10"); values ({rows}); }}'
        for edge in ("rise", "fall")
    )
    return f'timing () {{ related_pin : "CK"; timing_type : {kind}; {tables} }}'


def pin(name: str, capacitance: float, more: str = "") -> str:
    return f"pin ({name}) {{ direction : input; capacitance : {capacitance}; {more} }}"


def out(name: str, function: str, *groups: str) -> str:
    return f'pin ({name}) {{ direction : output; function : "{function}"; {" ".join(groups)} }}'


#: Delays: inverter 1 up, 2 down; AND 3, 4; XOR 5, 6; flip-flop 7, 8; each plus 0.1 slew plus load.
TIMED = f"""library (timed) {{
  time_unit : "1ns"; capacitive_load_unit (1, pf);
  lu_table_template (d) {{ variable_1 : input_net_transition;
    variable_2 : total_output_net_capacitance; index_1 ("0, 10"); index_2 ("0, 10"); }}
  lu_table_template (s) {{ variable_1 : constrained_pin_transition;
    variable_2 : related_pin_transition; index_1 ("0, 10"); index_2 ("0, 10"); }}
  cell (INV) {{ {pin("A", 1)} {
    out("Y", "!A", timing("A", "negative_unate", "combinational", 1, 2))
} }}
  cell (BUF) {{ {pin("A", 1)} {
    out("Y", "A", timing("A", "positive_unate", "combinational", 2, 2))
} }}
  cell (AND) {{ {pin("A", 1)} {pin("B", 2)}
    {out("Y", "A B", timing("A B", "positive_unate", "combinational", 3, 4))} }}
  cell (XOR) {{ {pin("A", 1)} {pin("B", 1)}
    {out("Y", "A ^ B", timing("A B", "non_unate", "combinational", 5, 6))} }}
  cell (MUX) {{ {pin("A", 1)} {pin("B", 1)} {pin("S", 1)}
    {
    out(
        "Y",
        "(A S') | (B S)",
        timing("A B", "positive_unate", "combinational", 4, 4),
        timing("S", "non_unate", "combinational", 4, 4),
    )
} }}
  cell (DFF) {{ ff (IQ, IQN) {{ next_state : "D"; clocked_on : "CK"; }}
    {pin("D", 1, setup("setup_rising"))} {pin("CK", 1, "clock : true;")}
    {out("Q", "IQ", timing("CK", "non_unate", "rising_edge", 7, 8))} }}
  cell (SDFF) {{ ff (IQ, IQN) {{ next_state : "(SE SI) | (SE' D)"; clocked_on : "CK"; }}
    {pin("D", 3, setup("setup_rising"))} {pin("SI", 1, setup("setup_rising"))}
    {pin("SE", 1, setup("setup_rising"))} {pin("CK", 1, "clock : true;")}
    {out("Q", "IQ", timing("CK", "non_unate", "rising_edge", 9, 9))} }}
  cell (DFFN) {{ ff (IQ, IQN) {{ next_state : "D"; clocked_on : "CK'"; }}
    {pin("D", 1, setup("setup_falling"))} {pin("CK", 1, "clock : true;")}
    {out("Q", "IQ", timing("CK", "non_unate", "falling_edge", 7, 8))} }}
  cell (LATCH) {{ latch (IQ, IQN) {{ data_in : "D"; enable : "CK"; }}
    {pin("D", 1, setup("setup_falling"))} {pin("CK", 1)}
    {
    out(
        "Q",
        "IQ",
        timing("CK", "non_unate", "rising_edge", 7, 8),
        timing("D", "positive_unate", "combinational", 6, 6),
    )
} }}
}}
"""

NO_WIRE = Assumptions(wire_per_sink=0.0)


def timed_library() -> Library:
    return read_library([SourceText("timed.lib", TIMED)])


def timed(verilog: str, assumptions: Assumptions = NO_WIRE) -> Timing:
    return analyse(wiring_of(design_of(verilog, timed_library())), assumptions)


INVERTER_BETWEEN = (
    "module top (c, q); input c; output q; wire a, n; DFF f (.D(n), .CK(c), .Q(a));"
    " INV i (.A(a), .Y(n)); DFF g (.D(n), .CK(c), .Q(q)); endmodule"
)


def by_name(timing: Timing) -> dict[str, float]:
    """Return the need of each storage cell that has one."""
    names = [timing.wiring.instance_name(i) for i in timing.checks.instance.tolist()]
    needs = zip(names, endpoint_needs(timing).tolist(), strict=True)
    return {name: need for name, need in needs if need > NEVER}
