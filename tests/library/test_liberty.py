import pytest
from kits import cell, library, text

from insertdft.diagnostics import DesignError, Severity
from insertdft.library import StorageKind, read_library
from insertdft.library.expression import Not, Var, parse_expression, variables
from insertdft.library.functions import same
from insertdft.text import SourceText

BUSES = """
  type (two) { base_type : array; data_type : bit; bit_width : 2; bit_from : 1; bit_to : 0;
               downto : true; }
  type (up) { base_type : array; data_type : bit; bit_width : 2; bit_from : 0; bit_to : 1;
              downto : false; }
  cell (X) { area : 9;
    ff_bank (IQ, IQN, 2) { next_state : "D & E"; clocked_on : "CK"; clear : "!R"; }
    bus (D) { bus_type : two; direction : input; capacitance : 0.002;
              pin (D[1]) { capacitance : 0.003; } }
    pin (E, R) { direction : input; }
    pin (CK) { direction : input; clock : true; }
    bus (Q) { bus_type : two; direction : output; function : "IQ"; }
    bundle (QN) { members (QN0, QN1); direction : output; function : "IQN"; }
  }
  cell (GATES) { area : 2;
    bus (A) { bus_type : up; direction : input; }
    pin (S) { direction : input; }
    bus (Y) { bus_type : up; direction : output; function : "A ^ S"; three_state : "!S"; }
  }
"""


def test_bus_and_bundle_are_opened_into_bits() -> None:
    found = cell(BUSES)

    assert list(found.pins) == ["D[0]", "D[1]", "E", "R", "CK", "Q[0]", "Q[1]", "QN0", "QN1"]
    assert found.pins["D[0]"].capacitance == 0.002
    assert found.pins["D[1]"].capacitance == 0.003
    assert found.pins["CK"].is_clock


def test_bank_is_opened_into_one_storage_a_bit() -> None:
    found = cell(BUSES)

    assert [item.state for item in found.storage] == ["IQ[0]", "IQ[1]"]
    assert found.storage[1].data == parse_expression("D[1] & E")
    assert found.storage[1].clear == Not(Var("R"))
    assert found.pins["Q[1]"].function == Var("IQ[1]")
    assert found.pins["QN0"].function == Var("IQN[0]")


def test_least_significant_bit_comes_first_whichever_way_the_range_runs() -> None:
    found = cell(BUSES, "GATES")

    assert list(found.pins) == ["A[1]", "A[0]", "S", "Y[1]", "Y[0]"]
    assert found.pins["Y[1]"].function == parse_expression("A[1] ^ S")
    assert found.pins["Y[1]"].three_state == Not(Var("S"))


def test_latch_with_set_and_reset_alone_has_no_data() -> None:
    found = cell(
        """cell (X) { latch (IQ, IQN) { clear : "!R"; preset : "!S"; clear_preset_var1 : L; }
        pin (R) { direction : input; } pin (S) { direction : input; }
        pin (Q) { direction : output; function : "IQ"; } }"""
    )

    [latch] = found.storage
    assert latch.kind is StorageKind.LATCH
    assert (latch.data, latch.clock) == (None, None)
    assert latch.clear_preset == ("L", None)


def test_units_capacitances_and_flags_are_read() -> None:
    found = library(
        """default_input_pin_cap : 0.25;
        wire_load ("small") { resistance : 1; fanout_length (1, 2.5); }
        cell (X) { dont_use : true; dont_touch : "true"; cell_footprint : "x";
          pg_pin (VDD) { pg_type : primary_power; } pg_pin (VSS) { pg_type : primary_ground; }
          pin (A) { direction : input; }
          pin (B) { direction : input; rise_capacitance : 0.1; fall_capacitance : 0.3; }
          pin (Y) { direction : output; function : "A B"; max_capacitance : 0.5; } }"""
    )

    item = found.cells["X"]
    assert (found.time_unit_s, found.capacitance_unit_f) == (1e-9, 1e-12)
    assert (item.pins["A"].capacitance, item.pins["B"].capacitance) == (0.25, 0.3)
    assert item.pins["Y"].max_capacitance == 0.5
    assert (item.dont_use, item.dont_touch, item.footprint) == (True, True, "x")
    assert item.power_pins == ("VDD", "VSS")
    assert item.area is None
    assert "fanout_length" in found.wire_loads["small"]


@pytest.mark.parametrize(
    ("written", "seconds"), [("1ps", 1e-12), ("10ps", 1e-11), ("1ns", 1e-9), ("100ps", 1e-10)]
)
def test_time_unit_is_read(written: str, seconds: float) -> None:
    found = read_library(
        [SourceText("a", f'library (a) {{ time_unit : "{written}"; capacitive_load_unit (10, ff);'
                         " cell (X) { } }")]
    )  # fmt: skip

    assert found.time_unit_s == pytest.approx(seconds)
    assert found.capacitance_unit_f == pytest.approx(1e-14)


TABLES = """
  lu_table_template (square) { variable_1 : input_net_transition;
    variable_2 : total_output_net_capacitance; index_1 ("1, 2"); index_2 ("10, 20, 30"); }
  cell (X) {
    pin (A) { direction : input; }
    pin (Y) { direction : output; function : "A'";
      timing () { related_pin : "A"; timing_sense : negative_unate;
        cell_rise (square) { values ("1, 2, 3", \\
                                     "4, 5, 6"); }
        cell_fall (square) { index_2 ("100, 200, 300"); values ("1,2,3,4,5,6"); }
        rise_transition (scalar) { values ("7"); } }
      timing () { related_pin : "A B"; timing_type : three_state_enable; when : "B"; } } }
"""


def test_tables_inherit_the_indices_of_their_template() -> None:
    first, second = cell(TABLES).pins["Y"].arcs

    assert (first.related, first.kind, first.sense) == (("A",), "combinational", "negative_unate")
    rise, fall = first.tables["cell_rise"], first.tables["cell_fall"]
    assert rise.axes == ("input_net_transition", "total_output_net_capacitance")
    assert rise.indices == ((1.0, 2.0), (10.0, 20.0, 30.0))
    assert rise.values == (1.0, 2.0, 3.0, 4.0, 5.0, 6.0)
    assert fall.indices == ((1.0, 2.0), (100.0, 200.0, 300.0))
    assert first.tables["rise_transition"].values == (7.0,)
    assert list(first.tables) == ["cell_rise", "cell_fall", "rise_transition"]
    assert (second.related, second.kind, second.when) == (("A", "B"), "three_state_enable", "B")
    assert len(second.tables) == 0


def test_test_cell_is_read_beside_the_cell() -> None:
    found = cell(
        """cell (X) { ff (IQ, IQN) { next_state : "SE ^ D"; clocked_on : "CK"; }
        pin (D) { direction : input; } pin (SE) { direction : input; }
        pin (CK) { direction : input; }
        pin (Q) { direction : output; function : "IQ"; }
        test_cell () { ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; }
          pin (SE) { direction : input; signal_type : "test_scan_enable_inverted"; }
          pin (Q) { direction : output; function : "IQ"; signal_type : test_scan_out;
                    test_output_only : true; } } }"""
    )

    test = found.test_cell
    assert test is not None
    assert test.storage[0].data == Var("D")
    assert test.signal_types == {"SE": "test_scan_enable_inverted", "Q": "test_scan_out"}
    assert test.functions == {"Q": Var("IQ")}
    assert test.test_output_only == {"Q"}


def test_files_are_merged_and_a_cell_described_twice_is_reported() -> None:
    one = text("cell (A) { area : 1; } cell (B) { area : 2; }")
    two = SourceText("two.lib", "library (two) { cell (B) { area : 3; } cell (C) { area : 4; } }")

    found = read_library([one, two])

    assert list(found.cells) == ["A", "B", "C"]
    assert found.cells["B"].area == 2
    [warning] = found.diagnostics
    assert (warning.slug, warning.severity) == ("library-duplicate-cell", Severity.WARNING)
    assert warning.span is not None
    assert warning.span.place == "two.lib:1:17"
    assert warning.also[0][0].place == "small.lib:4:24"


@pytest.mark.parametrize(
    ("body", "place"),
    [
        ('cell (X) { ff (Q, QN) { next_state : "D &"; clocked_on : "CK"; } }', "small.lib:4:38"),
        ('cell (X) { pin (Y) { direction : output; function : "A @ B"; } }', "small.lib:4:53"),
    ],
)
def test_broken_expression_is_an_error_at_its_place(body: str, place: str) -> None:
    with pytest.raises(DesignError) as caught:
        library(body)

    [item] = caught.value.diagnostics
    assert item.slug == "library-expression"
    assert item.span is not None
    assert item.span.place == place


def test_all_broken_files_are_reported_at_once() -> None:
    with pytest.raises(DesignError) as caught:
        read_library([SourceText("a.lib", "library (a) { x"), SourceText("b.lib", "library (b) }")])

    assert [item.span.place for item in caught.value.diagnostics if item.span] == [
        "a.lib:1:15",
        "b.lib:1:13",
    ]


def test_function_of_an_unknown_name_is_reported_and_left_open() -> None:
    found = library('cell (X) { pin (A) { direction : input; } '
                    'pin (Y) { direction : output; function : "A & NOWHERE"; } }')  # fmt: skip

    assert found.cells["X"].pins["Y"].function is None
    [warning] = found.diagnostics
    assert (warning.slug, warning.severity) == ("library-expression", Severity.WARNING)
    assert "NOWHERE" in warning.message


def test_library_without_cells_is_refused() -> None:
    with pytest.raises(DesignError) as caught:
        read_library([SourceText("none.lib", "library (none) { }")])

    assert [item.slug for item in caught.value.diagnostics] == ["library-empty"]


def test_output_of_a_state_table_shows_its_node() -> None:
    found = cell(
        """cell (X) { statetable ("CK EN", "M") { table : "L L : - : L, L H : - : H, H - : - : N"; }
        pin (CK) { direction : input; } pin (EN) { direction : input; }
        pin (M) { direction : internal; internal_node : "M"; }
        pin (G) { direction : output; state_function : "CK & M"; } }"""
    )

    assert found.pins["G"].function == parse_expression("CK & M")
    [latch] = found.storage
    assert (latch.kind, latch.data) == (StorageKind.LATCH, Var("EN"))
    assert latch.clock is not None
    assert same(latch.clock, parse_expression("!CK"))


def test_row_of_a_state_table_that_does_not_fit_is_an_error() -> None:
    with pytest.raises(DesignError) as caught:
        library('cell (X) { statetable ("A B", "M") { table : "L L : - : L, L : - : H"; } }')

    assert [item.slug for item in caught.value.diagnostics] == ["library-syntax"]


def test_state_named_like_a_pin_is_told_apart_from_it() -> None:
    found = library(
        """cell (T) { statetable ("D G", "Q") { table : "H/L H : - : H/L, - L : - : N"; }
          pin (D) { direction : input; } pin (G) { direction : input; }
          pin (Q) { direction : output; internal_node : "Q"; } }
        cell (F) { ff (Q, QN) { next_state : "D E + Q E'"; clocked_on : "CK"; }
          pin (D, E, CK) { direction : input; }
          pin (Q) { direction : output; function : "Q"; }
          pin (Z) { direction : output; function : "QN"; } }"""
    ).cells

    table, flip_flop = found["T"], found["F"]
    assert table.storage[0].state not in table.pins
    assert table.pins["Q"].function == Var(table.storage[0].state)
    [storage] = flip_flop.storage
    assert storage.state not in flip_flop.pins
    assert flip_flop.pins["Q"].function == Var(storage.state)
    assert flip_flop.pins["Z"].function == Var("QN")
    assert storage.data is not None
    assert set(variables(storage.data)) == {"D", "E", storage.state}


def test_internal_pin_of_another_name_stands_for_its_node() -> None:
    found = cell(
        """cell (X) { statetable ("CK EN", "M") { table : "L L : - : L, L H : - : H, H - : - : N"; }
        pin (CK) { direction : input; } pin (EN) { direction : input; }
        pin (inner) { direction : internal; internal_node : "M"; }
        pin (G) { direction : output; state_function : "CK & inner"; } }"""
    )

    assert found.pins["G"].function == parse_expression("CK & M")
    assert found.pins["inner"].function is None
