"""A small converted design with hard names, in the cells of the demo library, and its export."""

from dataclasses import dataclass
from pathlib import Path

from designs import convert, written
from icarus import run_icarus
from technologies import technology

from insertdft.description import Description
from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.exports.frames import make_program
from insertdft.exports.inputs import ExportInput
from insertdft.exports.patterns import random_patterns
from insertdft.exports.timing import make_timing
from insertdft.source import read_netlist
from insertdft.text import SourceText

STYLES = ("mux-d", "clocked-scan", "lssd")

HARD = r"""
module part (ck, rn, d, q);
  input ck, rn; input [1:0] d; output [1:0] q;
  wire n;
  nand2_w1 g (.A(d[0]), .B(q[1]), .Y(n));
  flop_r_w1 \a"b[3] (.CK(ck), .RN(rn), .D(n), .Q(q[0]));
  flop_r_w1 \x.y/z (.CK(ck), .RN(rn), .D(d[1]), .Q(q[1]));
endmodule
module top (clk, rst_n, a, \odd[1] , y);
  input clk, rst_n; input [2:0] a; input \odd[1] ; output [3:0] y;
  part \u[0].p (.ck(clk), .rn(rst_n), .d(a[1:0]), .q(y[1:0]));
  part u1 (.ck(clk), .rn(rst_n), .d({y[0], \odd[1] }), .q(y[3:2]));
  wire m;
  nand2_w1 g (.A(a[2]), .B(y[3]), .Y(m));
  flop_r_w1 last (.CK(clk), .RN(rst_n), .D(m), .Q());
endmodule
"""


@dataclass(frozen=True)
class Made:
    """What an export is made from, and the netlist."""

    text: str
    design: Design
    description: Description
    given: ExportInput


def made(style: str, *, chains: int = 2, count: int = 4) -> Made:
    """Convert the design and simulate patterns."""
    library = technology("demo").library()
    done = convert(HARD, library, style=style, chains=chains)
    text = written(done)
    design = link(read_netlist([SourceText("scan.v", text)], "top"), library)[0]
    program = make_program(done.description, design.ports)
    patterns = random_patterns(design, done.description, program, count)
    timing = make_timing(done.description)
    given = ExportInput(done.description, design.ports, timing, patterns)
    return Made(text, design, done.description, given)


def run_bench(folder: Path, bench: str, netlist: str) -> list[str]:
    """Run a bench on a netlist in Icarus and return its lines."""
    (folder / "bench.v").write_text(bench, encoding="latin-1")
    (folder / "netlist.v").write_text(netlist, encoding="latin-1")
    models = technology("demo").model_files(folder)
    # Last, because the preprocessor of Icarus takes the quote in an escaped name for a string.
    files = [folder / "bench.v", *models, folder / "netlist.v"]
    return run_icarus(folder, files, "scan_bench")
