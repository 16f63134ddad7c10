"""Cells derived from Verilog models, style by style; what cannot be derived is reported by cell."""

import subprocess
import sys
from pathlib import Path

import pytest
from kits import flip_flop, text

import insertdft
from insertdft.diagnostics import DesignError, Severity
from insertdft.library import Cell, StorageKind, Style, read_library, read_models, scan_twins
from insertdft.library.expression import Expression, parse_expression
from insertdft.library.functions import same
from insertdft.text import SourceText

UDPS = """
primitive p_mux (z, a, b, s); output z; input a, b, s;
  table // a b s : z
    0 ? 0 : 0; 1 ? 0 : 1; ? 0 1 : 0; ? 1 1 : 1; 0 0 x : 0; 1 1 x : 1;
  endtable
endprimitive
primitive p_dff (q, d, c, r, notifier); output q; reg q; input d, c, r, notifier;
  table
    0 (01) ? ? : ? : 0; 1 (01) 0 ? : ? : 1; ? (10) ? ? : ? : -; * b ? ? : ? : -;
    ? ? 1 ? : ? : 0; ? b (?0) ? : ? : -; 1 (x1) 0 ? : 1 : 1; ? ? ? * : ? : x;
  endtable
endprimitive
primitive p_latch (output reg q, input d, input g);
  table
    ?0:?:-; 01:?:0; 11:?:1;
  endtable
endprimitive
primitive p_edges (q, d, g, power); output q; reg q; input d, g, power;
  table
    * 0 1 : ? : -; ? (?0) 1 : ? : -; (?0) 1 1 : ? : 0; (?1) 1 1 : ? : 1;
    0 (01) 1 : ? : 0; 1 (01) 1 : ? : 1; 0 1 (?1) : ? : 0; 1 1 (?1) : ? : 1;
  endtable
endprimitive
primitive p_odd (q, c); output q; reg q; input c;
  table r : 0 : 1; r : 1 : 0; f : 0 : 1; f : 1 : 0; endtable
endprimitive
"""


def models(body: str) -> dict[str, Cell]:
    return dict(read_models([SourceText("models.v", UDPS + body)]).cells)


def check(own: Expression | None, wanted: str | None) -> None:
    assert (own is None) == (wanted is None), (own, wanted)
    if own is not None and wanted is not None:
        assert same(own, parse_expression(wanted)), (own, wanted)


@pytest.mark.parametrize(
    ("ports", "body", "function"),
    [
        ("A, B", "assign Y = A & ~B;", "A B'"),
        ("A, B", "assign Y = A ? B : 1'b0;", "A B"),
        ("A, B", "assign Y = A == B;", "!(A ^ B)"),
        ("A, B", "assign Y = (A !== B) || (A && B);", "A + B"),
        ("A, B", "wire n; assign n = A ^ B, Y = !n;", "!(A ^ B)"),
        ("A, B", "wire n = A | B; assign Y = ~n;", "!(A + B)"),
        ("A, B", "nand (Y, A, B);", "!(A B)"),
        ("A, B", "wire n; nor #0.1 g1 (n, A, B); not #(1, 2) g2 (Y, n);", "A + B"),
        ("A, B", "wire n; and g1 (n, A, B), g2 (Y, n, B);", "A B"),
        ("A, B, S", "p_mux (Y, A, B, S);", "S B + S' A"),
        ("A, B, S", "p_mux u (Y, B, A, S);", "S A + S' B"),
        ("A, B", "reg Y; always @(A or B) if (A) Y = B; else Y = 0;", "A B"),
        ("A, B", "reg Y; always @* case (A) 1'b0: Y = B; default: Y = ~B; endcase", "A ^ B"),
        ("A, B", "inner u (.Z(Y), .P(B), .Q(A));", "B A'"),
        ("A, B", "inner u (Y, A, B);", "A B'"),
        ("A, B", "supply1 one; and (Y, A, B, one);", "A B"),
        ("A", "buf (strong1, pull0) (Y, A);", "A"),
        ("", "pullup (Y);", "1"),
        ("", "assign Y = 1'b0;", "0"),
        ("A", "wire \\\\a+b ; buf (\\\\a+b , A); not (Y, \\\\a+b );", "!A"),
    ],
)
def test_gate_styles(ports: str, body: str, function: str) -> None:
    inner = "module inner (Z, P, Q); output Z; input P, Q; assign Z = P & ~Q; endmodule\n"
    inputs = f"input {ports};" if ports else ""
    names = f"Y, {ports}" if ports else "Y"

    found = models(f"{inner}module X ({names}); output Y; {inputs} {body} endmodule")["X"]

    check(found.pins["Y"].function, function)
    assert found.pin_order == tuple(names.split(", "))
    assert found.storage == ()


FLIP_FLOPS = [
    ("always @(posedge C) Q <= D;", "D", "C", None, None),
    ("always @(negedge C) Q = #1 D;", "D", "!C", None, None),
    ("always @(posedge C) if (E) Q <= D;", "E D + E' IQ", "C", None, None),
    ("always @(posedge C) begin if (R) Q <= 1'b0; else Q <= D; end", "R' D", "C", None, None),
    ("always @(posedge C or negedge R) if (!R) Q <= 0; else Q <= D;", "D", "C", "!R", None),
    ("always @(posedge C, posedge S) if (S) Q <= 1; else Q <= D;", "D", "C", None, "S"),
    (
        """always @(posedge C or negedge R or negedge S)
             if (~R) Q <= 0; else if (~S) Q <= 1; else if (E) Q <= D;""",
        "E D + E' IQ", "C", "!R", "!S",
    ),
    ("p_dff (Q, D, C, R, n);", "D", "C", "R", None),
    ("wire d; p_mux (d, Q, D, E); p_dff (Q, d, C, R, n);", "E D + E' IQ", "C", "R", None),
    ("wire c; not (c, C); p_dff u (Q, D, c, R, );", "D", "!C", "R", None),
]  # fmt: skip


@pytest.mark.parametrize(("body", "data", "clock", "clear", "preset"), FLIP_FLOPS)
def test_flip_flop_styles(
    body: str, data: str, clock: str, clear: str | None, preset: str | None
) -> None:
    reg = "reg Q;" if "always" in body else "reg n;"

    found = models(
        f"module X (Q, D, C, R, S, E); output Q; input D, C, R, S, E; {reg} {body} endmodule"
    )["X"]

    [storage] = found.storage
    assert storage.kind is StorageKind.FLIP_FLOP
    check(storage.data, data)
    check(storage.clock, clock)
    check(storage.clear, clear)
    check(storage.preset, preset)
    check(found.pins["Q"].function, storage.state)


def test_first_test_of_a_procedure_dominates() -> None:
    body = "always @(posedge C or posedge R or posedge S) if ({}) Q <= {}; else if ({}) Q <= {};"
    both = {
        order: models(
            "module X (output reg Q, input D, C, R, S); "
            + body.format(*order) + " else Q <= D; endmodule"
        )["X"].storage[0].clear_preset
        for order in (("R", 0, "S", 1), ("S", 1, "R", 0))
    }  # fmt: skip

    assert both == {("R", 0, "S", 1): ("L", "H"), ("S", 1, "R", 0): ("H", "L")}


LATCHES = [
    ("always @(G or D) if (G) Q = D;", "D", "G", None),
    ("always @* if (!G) Q <= ~D;", "!D", "!G", None),
    ("always @(*) if (!R) Q = 0; else if (G) Q = D;", "D", "G", "!R"),
    ("p_latch (Q, D, G);", "D", "G", None),
    ("wire g; and (g, G, R); p_latch u (Q, D, g);", "D", "G R", None),
    ("always @* case (G) 1: Q = D; endcase", "D", "G", None),
    ("supply1 p; p_edges (Q, D, G, p);", "D", "G", None),
]


@pytest.mark.parametrize(("body", "data", "enable", "clear"), LATCHES)
def test_latch_styles(body: str, data: str, enable: str, clear: str | None) -> None:
    reg = "reg Q;" if "always" in body else ""

    found = models(f"module X (Q, D, G, R); output Q; input D, G, R; {reg} {body} endmodule")["X"]

    [storage] = found.storage
    assert storage.kind is StorageKind.LATCH
    check(storage.data, data)
    check(storage.clock, enable)
    check(storage.clear, clear)


@pytest.mark.parametrize(
    "body",
    ["bufif1 (Y, A, E);", "assign Y = E ? A : 1'bz;", "assign Y = ~E ? 1'bz : A;",
     "drive u (Y, A, E);"],
)  # fmt: skip
def test_three_state_styles(body: str) -> None:
    inner = "module drive (Z, P, Q); output Z; input P, Q; bufif1 (Z, P, Q); endmodule\n"

    pin = models(f"{inner}module X (Y, A, E); output Y; input A, E; {body} endmodule")["X"].pins[
        "Y"
    ]

    check(pin.function, "A")
    check(pin.three_state, "!E")


def test_pad_reads_what_stands_at_its_pin() -> None:
    found = models(
        "module PAD (P, I, O, E); inout P; input I, E; output O; bufif1 (P, I, E); buf (O, P); "
        "endmodule"
    )["PAD"]

    assert found.pins["P"].direction == "inout"
    check(found.pins["O"].function, "P")
    check(found.pins["P"].three_state, "!E")


def test_two_registers_are_two_storages_with_names_of_their_own() -> None:
    found = models(
        """module SRL (output IQ1, output L2, input D, C, I, A, B); reg m, s;
        always @* if (A & C) m = 1'bx; else if (A) m = I; else if (C) m = D;
        always @* if (B) s = m;
        assign IQ1 = m; assign L2 = s; endmodule
        module LAT (output reg Q, input D, C); always @* if (C) Q = D; endmodule"""
    )["SRL"]

    assert [item.state for item in found.storage] == ["_IQ1", "IQ2"]
    check(found.storage[1].data, "_IQ1")
    [role] = found.scan
    assert (role.style, role.clock_a, role.clock_b, role.scan_in) == (Style.LSSD, "A", "B", "I")


def test_timing_checks_and_notifiers_do_not_matter() -> None:
    found = models(
        """`timescale 1ns/1ps
        `celldefine
        module X (Q, D, C); output Q; input D, C; reg n; wire delayed_D, delayed_C;
        p_dff #1 u (Q, delayed_D, delayed_C, 1'b0, n);
        specify
          specparam t = 1.0;
          (posedge C => (Q +: D)) = (t, t);
          $setuphold (posedge C &&& n, posedge D, 0.1, 0.2, n, , , delayed_C, delayed_D);
        endspecify
        endmodule
        `endcelldefine"""
    )["X"]

    check(found.storage[0].data, "D")
    check(found.storage[0].clock, "C")


CONDITIONAL = """
`ifdef FUNCTIONAL
 module X (Y, A); output Y; input A; buf (Y, A); endmodule
`else
 module X (Y, A); output Y; input A; not (Y, A); `undefined_macro endmodule
`endif
`ifndef GUARD
`define GUARD 1
 module Z (Y, A); output Y; input A; /* `endif */ not (Y, A); endmodule // `else
`elsif FUNCTIONAL
 module Z (Y, A); output Y; input A; buf (Y, A); endmodule
`endif
`ifdef GUARD `ifdef POWER
 module W (Y, A, VDD);
`else
 module W (Y, A);
`endif `endif
 output Y; input A; buf (Y, A); endmodule
"""


def test_functional_branch_is_taken_and_guards_are_followed() -> None:
    found = models(CONDITIONAL)

    check(found["X"].pins["Y"].function, "A")
    check(found["Z"].pins["Y"].function, "!A")
    assert found["W"].pin_order == ("Y", "A")


def test_wrapped_modules_are_no_cells() -> None:
    found = models(
        """module kit_inv (Y, A); output Y; input A; not (Y, A); endmodule
        module kit_inv_1 (Y, A); output Y; input A; kit_inv base (.Y(Y), .A(A)); endmodule
        module kit_inv_2 (Y, A); output Y; input A; kit_inv base (.Y(Y), .A(A)); endmodule
        module spare (Y); output Y; supply0 a; kit_inv_2 u (Y, a); endmodule"""
    )

    assert list(found) == ["kit_inv_1", "kit_inv_2", "spare"]
    check(found["spare"].pins["Y"].function, "1")


@pytest.mark.parametrize(
    ("body", "because"),
    [
        ("wire n; assign Y = n;", "nothing drives `n`"),
        ("wire n; and (n, A, m); and (m, n, A); assign Y = n;", "depends on itself"),
        ("nowhere u (Y, A);", "`nowhere` is not among the models"),
        ("assign Y = A; assign Y = A;", "`Y` has two drivers"),
        ("assign Y = A + A;", "it uses `Plus`"),
        ("p_odd u (Y, A);", "primitive `p_odd` is neither gate, latch nor flip-flop"),
        ("reg Y; always @(posedge A or B) Y = B;", "the reader of models stops in line 28"),
        (
            "reg Y; always @(posedge A or posedge B) if (A) Y <= ~Y; else Y <= 0;",
            "takes data at the edge of a set or reset",
        ),
        ("reg Y; always @(posedge A or posedge B) Y <= 1;", "cannot be told from"),
        ("reg Y; always @* Y = ~Y;", "neither latch nor gate"),
        ("assign Y = ;", "the reader of models stops in line 28"),
        ("nmos (Y, A, B);", "`nmos` is not among the models"),
        ("wire [1:0] v; assign v[0] = A; assign Y = v[0];", "part of a vector"),
    ],
)
def test_what_cannot_be_derived_is_reported_by_cell(body: str, because: str) -> None:
    found = read_models(
        [SourceText("models.v", f"""{UDPS}module X (Y, A, B);
            output Y; input A, B; {body} endmodule
            module GOOD (Y, A); output Y; input A; buf (Y, A); endmodule""")]
    )  # fmt: skip

    [item] = found.diagnostics
    assert (item.slug, item.severity) == ("cell-model-unsupported", Severity.WARNING)
    assert item.message.startswith("the model of `X` gives no function, because ")
    assert because in item.message
    assert item.span is not None
    assert item.span.text == "module X"
    assert found.cells["X"].pins["Y"].function is None
    assert found.cells["X"].pins["Y"].direction == "output"
    check(found.cells["GOOD"].pins["Y"].function, "A")


def test_models_give_pin_order_to_cells_of_liberty() -> None:
    verilog = SourceText("m.v", "module X (QN, Q, CK, D); output QN, Q; input CK, D; endmodule")

    found = read_library([verilog, text(flip_flop("X", "D", "D"))]).cells["X"]

    assert found.pin_order == ("QN", "Q", "CK", "D")
    check(found.storage[0].data, "D")
    assert found.area == 8


def test_models_give_functions_where_liberty_has_none() -> None:
    liberty = text(
        """cell (X) { area : 3; pin (D) { direction : input; capacitance : 0.5; }
        pin (C) { direction : input; } pin (Q) { direction : output; } }"""
    )
    verilog = SourceText(
        "m.v", "module X (Q, D, C); output reg Q; input D, C; always @(posedge C) Q <= D; endmodule"
    )

    found = read_library([liberty, verilog]).cells["X"]

    assert (found.area, found.pins["D"].capacitance) == (3, 0.5)
    assert found.is_storage
    check(found.pins["Q"].function, found.storage[0].state)


def test_scan_cells_of_models_have_twins() -> None:
    found = read_models(
        [SourceText("m.v", """
        module DFF_1 (output reg Q, input D, C); always @(posedge C) Q <= D; endmodule
        module SDFF_1 (output reg Q, input D, C, SI, SE);
          always @(posedge C) Q <= SE ? SI : D; endmodule""")]
    )  # fmt: skip

    [twin] = scan_twins(found, "DFF_1", Style.MUX_D)
    assert (twin.cell, dict(twin.pins)) == ("SDFF_1", {"Q": "Q", "D": "D", "C": "C"})


def test_file_without_modules_is_refused() -> None:
    with pytest.raises(DesignError) as caught:
        read_models([SourceText("empty.v", "// nothing\n")])

    assert [item.slug for item in caught.value.diagnostics] == ["library-empty"]


def test_reading_models_leaves_no_files_and_says_nothing(
    tmp_path: Path,
    tmp_path_factory: pytest.TempPathFactory,
    monkeypatch: pytest.MonkeyPatch,
    capfd: pytest.CaptureFixture[str],
) -> None:
    """In a process of its own: the grammar is built once a process, and compiling may warn."""
    monkeypatch.chdir(tmp_path)
    elsewhere = tmp_path_factory.mktemp("compiled")
    program = """if True:
        from insertdft.library import read_models
        from insertdft.text import SourceText
        text = "module X (Y, A); output Y; input A; buf (Y, A); endmodule"
        read_models([SourceText("m.v", text)])
    """
    root = str(Path(insertdft.__file__).parent.parent)

    done = subprocess.run(
        [sys.executable, "-X", f"pycache_prefix={elsewhere}", "-c", program],
        env={"PYTHONPATH": root},
        check=False,
    )

    assert done.returncode == 0
    assert list(tmp_path.iterdir()) == []
    assert capfd.readouterr() == ("", "")
