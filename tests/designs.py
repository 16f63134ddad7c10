"""Short ways from text to designs and conversions, on a small library of our own."""

from functools import cache
from pathlib import Path

from insertdft import api
from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.library import read_library
from insertdft.library.cell import Library
from insertdft.source import read_netlist, read_sources
from insertdft.text import SourceText, apply_splices

TESTDATA = Path(__file__).parent.parent / "testdata"
SMALL_LIB = TESTDATA / "libs" / "small.lib"


@cache
def small_library() -> Library:
    """Return the library of testdata/libs/small.lib."""
    return read_library(read_sources([SMALL_LIB]))


def design_of(text: str, library: Library | None = None, top: str | None = None) -> Design:
    """Return the design of one netlist text."""
    netlist = read_netlist([SourceText("in.v", text)], top)
    return link(netlist, library or small_library())[0]


def convert(text: str, library: Library | None = None, **wishes: object) -> api.Conversion:
    """Convert one netlist text; keywords are those of ``api.Wishes``."""
    asked = api.Wishes(**wishes)  # type: ignore[arg-type]
    return api.convert(design_of(text, library), asked)


def written(done: api.Conversion) -> str:
    """Return the converted text of a conversion of one source."""
    [patch] = done.patches
    return apply_splices(patch.source, patch.splices)


def flip_flops(count: int, cell: str = "DFF", clock: str = "clk") -> str:
    """Return a module ``top`` with a row of ``count`` flip-flops, each fed by a gate."""
    lines = [f"module top({clock}, a, y);", f"  input {clock}, a;", "  output y;"]
    lines += [f"  wire q{number}, d{number};" for number in range(count)]
    for number in range(count):
        before = f"q{number - 1}" if number else "a"
        lines.append(f"  NAND2 g{number} (.A({before}), .B(a), .Y(d{number}));")
        lines.append(f"  {cell} r{number} (.D(d{number}), .CK({clock}), .Q(q{number}));")
    lines += [f"  BUF out (.A(q{count - 1}), .Y(y));", "endmodule", ""]
    return "\n".join(lines)
