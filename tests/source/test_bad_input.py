"""Every mistake in a netlist ends in a message with its place, cause and what to do."""

import re

import pytest
from source.cases import read

from insertdft.diagnostics import DesignError, Diagnostic, render
from insertdft.source import read_netlist
from insertdft.text import SourceText

BODY = "module top (a, y);\n  input a;\n  output [1:0] y;\n"


def problems(text: str, **options: object) -> list[Diagnostic]:
    with pytest.raises(DesignError) as caught:
        read(text, **options)
    return list(caught.value.diagnostics)


#: What is wrong in a module's body: text, slug, line and column of the blame.
IN_A_MODULE = {
    "bracket missing": ("INV u (.A(a), .Y(y[0];\n", "netlist-syntax", "4:22"),
    "comma missing": ("INV u (.A(a) .Y(y[0]));\n", "netlist-syntax", "4:14"),
    "comma too much": ("INV u (.A(a), );\n", "netlist-syntax", "4:15"),
    "two commas": ("INV u (.A(a),, .Y(y[0]));\n", "netlist-syntax", "4:14"),
    "bracket too much": ("INV u (.A(a), .Y(y[0])));\n", "netlist-syntax", "4:24"),
    "semicolon missing": ("INV u (.A(a))\nINV v (.A(a));\n", "netlist-syntax", "5:1"),
    "word too much": ("INV u v (.A(a));\n", "netlist-syntax", "4:7"),
    "two nets in a pin": ("INV u (.A(a y));\n", "netlist-syntax", "4:11"),
    "stray character": ("INV u (.A(a)); \x80\n", "netlist-truncated", "4:16"),
    "stray word": ("INV u (.A(a)); hello;\n", "netlist-syntax", "4:21"),
    "hash in a pin": ("INV u (.#0(a));\n", "netlist-syntax", "4:9"),
    "both ways to connect": ("INV u (.A(a), y[0]);\n", "netlist-syntax", "4:15"),
    "keyword as a net": ("INV u (.A(always));\n", "netlist-syntax", "4:11"),
    "keyword as a name": ("INV begin (.A(a));\n", "netlist-syntax", "4:1"),
    "keyword as a cell": ("while u (.A(a));\n", "netlist-syntax", "4:1"),
    "keyword as a wire": ("wire end;\n", "netlist-syntax", "4:6"),
    "module without instance name": ("INV (.A(a));\n", "netlist-syntax", "4:1"),
    "gate by name": ("and g (.A(a), .Y(y[0]));\n", "netlist-syntax", "4:1"),
    "always": ("always @(posedge a) begin q <= a; if (a) q <= 0; else q <= 1; end\n",
               "netlist-behavioural", "4:1"),
    "initial": ("initial y = 0;\n", "netlist-behavioural", "4:1"),
    "function": ("function f; input x; f = x; endfunction\n", "netlist-behavioural", "4:1"),
    "generate": ("generate genvar i; for (i=0;i<2;i=i+1) INV u (.A(a)); endgenerate\n",
                 "netlist-behavioural", "4:1"),
    "specify": ("specify (a => y) = 1; endspecify\n", "netlist-behavioural", "4:1"),
    "reg": ("reg q;\n", "netlist-behavioural", "4:1"),
    "output reg": ("output reg q;\n", "netlist-behavioural", "4:8"),
    "logic in an assign": ("assign y[0] = a & y[1];\n", "netlist-behavioural", "4:15"),
    "logic in a pin": ("INV u (.A(~a));\n", "netlist-behavioural", "4:11"),
    "choice in an assign": ("assign y = a ? 2'b01 : 2'b10;\n", "netlist-behavioural", "4:12"),
    "call in a pin": ("INV u (.A(f(a)));\n", "netlist-behavioural", "4:11"),
    "string in a pin": ('INV u (.A("text"));\n', "netlist-behavioural", "4:11"),
    "net of another module": ("INV u (.A(v.n));\n", "netlist-behavioural", "4:11"),
    "defparam": ("defparam u.W = 1;\n", "netlist-unsupported", "4:1"),
    "instance array": ("INV u[3:0] (.A(a));\n", "netlist-unsupported", "4:1"),
    "array of nets": ("wire [3:0] m [0:7];\n", "netlist-unsupported", "4:12"),
    "range of a parameter": ("parameter W = 2;\nwire [W-1:0] n;\n", "netlist-unsupported", "5:7"),
    "value of a parameter": ("parameter W = 2;\nINV u (.A(W));\n", "netlist-unsupported", "5:11"),
    "far too wide": ("wire [99999999:0] n;\n", "netlist-unsupported", "4:19"),
    "undeclared vector": ("INV u (.A(n[3]));\n", "name-undeclared", "4:11"),
    "bit outside": ("INV u (.A(y[2]));\n", "name-undeclared", "4:11"),
    "part outside": ("INV u (.A(y[2:1]));\n", "name-undeclared", "4:11"),
    "bit of a scalar": ("INV u (.A(a[0]));\n", "name-undeclared", "4:11"),
    "bit outside in a concatenation": ("INV u (.A({a, y[7]}));\n", "name-undeclared", "4:11"),
    "part the wrong way round": ("INV u (.A(y[0:1]));\n", "netlist-syntax", "4:11"),
    "only read, never declared": ("assign y[0] = nobody;\n", "name-undeclared", "4:15"),
    "no width in a concatenation": ("INV u (.A({a, 0}));\n", "netlist-syntax", "4:11"),
    "digit of another base": ("INV u (.A(4'b12));\n", "netlist-syntax", "4:11"),
    "widths of an assign": ("assign y = a;\n", "width-mismatch", "4:1"),
    "wire twice": ("wire n;\nwire n;\n", "name-duplicate", "5:6"),
    "wire twice in a list": ("wire n, m, n;\n", "name-duplicate", "4:12"),
    "vector twice": ("wire [1:0] n;\nwire [1:0] n;\n", "name-duplicate", "5:12"),
    "direction twice": ("input a;\n", "name-duplicate", "4:7"),
    "wire of a port twice": ("wire a;\nwire a;\n", "name-duplicate", "5:6"),
    "another range": ("wire [2:0] y;\n", "width-mismatch", "4:12"),
    "a range for a scalar": ("wire [1:0] a;\n", "width-mismatch", "4:12"),
    "instance twice": ("INV u (.A(a));\nBUF u (.A(a));\n", "name-duplicate", "5:1"),
    "pin twice": ("INV u (.A(a), .A(y[0]));\n", "name-duplicate", "4:1"),
    "port not listed": ("input b;\n", "port-unknown", "4:7"),
    "grave accent": ("INV u (.A(`NOBODY));\n", "directive-unknown", "4:11"),
}  # fmt: skip


@pytest.mark.parametrize("what", IN_A_MODULE)
def test_mistake_in_a_module_has_its_place(what: str) -> None:
    text, slug, place = IN_A_MODULE[what]

    first = problems(f"{BODY}{text}endmodule\n")[0]

    assert (first.slug, first.span and first.span.place) == (slug, f"in.v:{place}")


@pytest.mark.parametrize("what", IN_A_MODULE)
def test_message_is_a_fact_and_says_what_to_do(what: str) -> None:
    found = problems(f"{BODY}{IN_A_MODULE[what][0]}endmodule\n")

    for item in found:
        assert item.hint
        assert not item.message.endswith(".")
        assert render(item)


@pytest.mark.parametrize("what", IN_A_MODULE)
def test_the_same_body_without_the_mistake_is_read(what: str) -> None:
    assert read(f"{BODY}INV u (.A(a));\nendmodule\n").top == "top"


#: Whole texts.
WHOLE = {
    "nothing": ("\n", "netlist-empty", None),
    "only comments": ("// nothing\n/* here */\n", "netlist-empty", None),
    "no module": ("wire a;\n", "netlist-syntax", "1:1"),
    "prose": ("This is no netlist.\n", "netlist-truncated", "1:1"),
    "no endmodule": ("module m;\n  wire a;\n", "netlist-truncated", "1:1"),
    "no endmodule before the next": ("module m;\nmodule n;\nendmodule\n",
                                     "netlist-truncated", "1:1"),
    "cut in a statement": ("module m;\n  INV u (.A(a),\n    .Y(", "netlist-truncated", "2:3"),
    "cut in a name": ("module m;\n  INV u (.A(a)); INV", "netlist-truncated", "2:18"),
    "cut in a comment": ("module m;\n  wire a; /* endmodule\n", "netlist-truncated", "2:11"),
    "cut in an attribute": ("module m;\n  (* keep\nendmodule\n", "netlist-truncated", "2:3"),
    "cut in a string": ('module m;\n  X #(.P("a)) u ();\nendmodule\n',
                        "netlist-truncated", "2:3"),
    "cut in a header": ("module m (a, b", "netlist-truncated", "1:1"),
    "endmodule too much": ("module m;\nendmodule\nendmodule\n", "netlist-syntax", "3:1"),
    "UDP": (("primitive p (q, d);\n output q; input d;\n table 0 : 1; 1 : 0; endtable\n"
            "endprimitive\nmodule m;\nendmodule\n"), "netlist-behavioural", "1:1"),
    "module twice": ("module m;\nendmodule\nmodule m;\nendmodule\n", "module-duplicate", "3:1"),
    "itself": ("module m;\n  m u ();\nendmodule\n", "module-cycle", "2:3"),
    "itself through another": ("module m;\n  n u ();\nendmodule\nmodule n;\n  m v ();\nendmodule\n",
                               "module-cycle", "2:3"),
    "two tops": ("module m;\nendmodule\nmodule n;\nendmodule\n", "top-unknown", None),
    "no direction": ("module m (a);\n  wire a;\nendmodule\n", "name-undeclared", "1:11"),
    "listed twice": ("module m (a, a);\n  input a;\nendmodule\n", "name-duplicate", "1:14"),
    "two directions": ("module m (input output a);\nendmodule\n", "netlist-syntax", None),
    "header with junk": ("module m (a; b);\nendmodule\n", "netlist-syntax", "1:12"),
    "a part as a port": ("module m (.p(a[0]));\n  input [1:0] a;\nendmodule\n",
                         "netlist-unsupported", "1:11"),
    "include": ('`include "cells.v"\nmodule m;\nendmodule\n', "netlist-unsupported", "1:1"),
    "unknown directive": ("`timscale 1ns/1ps\nmodule m;\nendmodule\n",
                          "directive-unknown", "1:1"),
    "endif missing": ("`ifdef A\nmodule m;\nendmodule\n", "netlist-truncated", "1:1"),
    "endif too much": ("module m;\nendmodule\n`endif\n", "netlist-syntax", "3:1"),
    "else too much": ("`ifdef A\n`else\n`else\n`endif\nmodule m;\nendmodule\n",
                      "netlist-syntax", "3:1"),
    "macro with arguments": ("`define F(x) x\nmodule m;\nendmodule\n",
                             "netlist-unsupported", "1:1"),
    "macro with two meanings": ("`define F 1\n`define F 2\nmodule m;\nendmodule\n",
                                "netlist-unsupported", "2:1"),
    "macro of text": ("`define F wire a;\nmodule m;\nendmodule\n", "netlist-unsupported", "1:1"),
    "no default": ("`default_nettype none\nmodule m (input wire a);\n  INV u (.A(b));\nendmodule\n",
                   "name-undeclared", "3:13"),
    "other keywords": ('`begin_keywords "1800-2012"\nmodule m;\nendmodule\n`end_keywords\n',
                       "netlist-unsupported", "1:1"),
    "pulled pins": ("`unconnected_drive pull1\nmodule m;\nendmodule\n",
                    "netlist-unsupported", "1:1"),
}  # fmt: skip


@pytest.mark.parametrize("what", WHOLE)
def test_mistake_in_a_text_has_its_place(what: str) -> None:
    text, slug, place = WHOLE[what]

    first = problems(text)[0]

    assert first.slug == slug
    assert first.hint
    if place:
        assert first.span is not None
        assert first.span.place == f"in.v:{place}"


SUB = "module sub (a, y);\n  input [1:0] a;\n  output y;\nendmodule\n"
#: Connections to a module of the netlist.
TO_A_MODULE = {
    "too narrow": ("sub u (.a(n));\n", "width-mismatch"),
    "too wide": ("sub u (.a({n, n, n}));\n", "width-mismatch"),
    "too wide by position": ("sub u (2'b00, {n, n});\n", "width-mismatch"),
    "no such port": ("sub u (.b(n));\n", "port-unknown"),
    "too many": ("sub u (2'b00, n, n);\n", "port-unknown"),
}


@pytest.mark.parametrize("what", TO_A_MODULE)
def test_connection_that_does_not_fit_the_module_is_refused(what: str) -> None:
    text, slug = TO_A_MODULE[what]

    [item] = problems(f"module top;\n{text}endmodule\n{SUB}")

    assert item.slug == slug
    assert item.span is not None
    assert item.span.place == "in.v:2:1"


def test_named_top_that_does_not_exist_has_a_suggestion() -> None:
    [item] = problems("module core_top;\nendmodule\n", top="core_tpo")

    assert item.slug == "top-unknown"
    assert item.hint == "did you mean `core_top`?"


def test_several_tops_are_all_named_with_their_places() -> None:
    [item] = problems("module m;\nendmodule\nmodule n;\nendmodule\n")

    assert [span.place for span, _ in item.also] == ["in.v:1:1", "in.v:3:1"]


def test_a_named_top_settles_which_one() -> None:
    assert read("module m;\nendmodule\nmodule n;\nendmodule\n", top="n").top == "n"


def test_misspelt_vector_has_a_suggestion() -> None:
    [item] = problems("module m;\n  wire [3:0] counter;\n  INV u (.A(conuter[1]));\nendmodule\n")

    assert item.hint == "did you mean `counter`?"


def test_all_mistakes_are_reported_at_once() -> None:
    found = problems(
        "module m;\n  INV a (.A(x[1]));\n  always @* y = 1;\n  wire n;\n  wire n;\n"
        "  initial begin a = 1; end\n  defparam a.b = 1;\nendmodule\n"
    )

    assert {item.slug for item in found} == {
        "name-undeclared",
        "netlist-behavioural",
        "name-duplicate",
        "netlist-unsupported",
    }
    assert sum(item.slug == "netlist-behavioural" for item in found) == 2


def test_one_kind_of_mistake_is_capped_and_counted() -> None:
    text = "".join(f"  INV u{i} (.A(x{i}[1]));\n" for i in range(70))

    found = problems(f"module m;\n{text}endmodule\n")

    assert len(found) == 51
    assert "20 more" in found[-1].message


def test_the_first_file_of_a_module_is_named_when_it_comes_twice() -> None:
    sources = [SourceText(name, "module m;\nendmodule\n") for name in ("one.v", "two.v")]

    with pytest.raises(DesignError) as caught:
        read_netlist(sources)

    [item] = caught.value.diagnostics
    assert item.span is not None
    assert item.span.place == "two.v:1:1"
    assert item.also[0][0].place == "one.v:1:1"


def test_nothing_at_all_is_refused() -> None:
    with pytest.raises(DesignError):
        read_netlist([])


#: Statements broken off or turned round; none of them may be read, or end in anything else.
MANGLED = """
nor #(1], 2) g (a, a, a) ;|nor #(1, 2 g (a, a, a) ;|nor #(1, 2) 3 g (a, a, a) ;|nor # g ;|nor ;
nor (strong0 ;|nor #(1 g ;|and # ;|wire ;|wire [ ;|wire # ;|wire (small) ;|wire wire n ;
wire inout io ;|wire [1:0 n ;|wire n[ ;|assign ;|assign # ;|assign (strong0 a ;|assign y ;
X # u () ;|X #u ;|X ;|X u ;|X u ) ;|X u ( ;|X u (.A) ;|X u (.A( ) ;|X u (.A({a a})) ;
X u (.A(x(,.B(q),.C(z ), .Y(n1)) ;|X #(.(1)) u () ;|X #) u () ;|X #(.P(1')) u () ;|parameter ;
parameter A ;|3 ;|. ;|( ;|X u (.A({})) ;|X u (.A({2{}})) ;|X u (.A({a,})) ;|X u (.A(y[])) ;
X u (.A(y[1:])) ;
X u (.A(1'b)) ;|X u (.A(y[a])) ;|(* = 1 *) X u () ;|(* a (* b *) X u () ;
"""


@pytest.mark.parametrize("statement", [item for item in re.split(r"[|\n]", MANGLED) if item])
def test_mangled_statement_is_refused_at_a_place(statement: str) -> None:
    for item in problems(f"{BODY}{statement}\nendmodule\n"):
        assert item.span is not None
        assert item.span.place.startswith("in.v:")


@pytest.mark.parametrize(
    "header",
    """module ;|module|module 3 ();|module m (a;|module m (,);|module m (a,);|module m (,a);
    |module m #(parameter A=1;|module m #;|module m #(3) ();|module m (input);
    |module m (input a b);|module m (input [3:0);|module m (input input a);|module m (a b);
    |module m (wire a);|module m (wire input a);|module m (input a = 1);""".replace(
        "\n    ", ""
    ).split("|"),
)
def test_mangled_header_is_refused(header: str) -> None:
    assert problems(f"{header}\nendmodule\n")
