"""Damaged files end in a library or in diagnostics with a place, never in anything else."""

from hypothesis import given, settings
from hypothesis import strategies as st
from kits import flip_flop, text

from insertdft.diagnostics import DesignError, Diagnostic
from insertdft.library import read_library
from insertdft.text import SourceText

LIBERTY = text(
    flip_flop("P", "D", "D R", clear="!R")
    + """cell (S) { statetable ("D G", "M") { table : "H/L H : - : H/L, - L : - : N"; }
    bus (D) { bus_type : two; direction : input; } pin (G) { direction : input; }
    pin (Q) { direction : output; internal_node : "M"; three_state : "!G"; }
    test_cell () { latch (A, B) { data_in : "D"; enable : "G"; } } }"""
).text
MODELS = """`ifdef FUNCTIONAL
primitive p (q, d, g); output q; reg q; input d, g;
 table 0 1 : ? : 0; 1 1 : ? : 1; ? 0 : ? : -; endtable endprimitive
`endif
module X (Q, D, C, R); output reg Q; input D, C, R;
  always @(posedge C or negedge R) if (!R) Q <= 1'b0; else Q <= D; endmodule
module Y (Q, D, G); output Q; input D, G; wire n; p u (n, D, G); buf (Q, n); endmodule
"""
INSERTED = ["{", "}", '"', "(", ")", ";", ":", "/*", "\\", "\x00", "`endif", "module", "[1:0]", "~"]


@settings(max_examples=150, deadline=None)
@given(
    st.sampled_from([LIBERTY, MODELS]),
    st.lists(
        st.tuples(st.integers(0, 2000), st.integers(0, 12), st.sampled_from(["", *INSERTED])),
        min_size=1,
        max_size=3,
    ),
)
def test_damaged_file_is_read_or_refused(whole: str, damage: list[tuple[int, int, str]]) -> None:
    for place, lost, put_in in damage:
        at = place % len(whole)
        whole = whole[:at] + put_in + whole[at + lost :]

    faults, cells = outcome(whole)

    assert faults or cells
    assert all(item.hint for item in faults)


def outcome(whole: str) -> tuple[tuple[Diagnostic, ...], int]:
    try:
        return (), len(read_library([SourceText("damaged", whole)]).cells)
    except DesignError as fault:
        return fault.diagnostics, 0
