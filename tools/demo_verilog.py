"""The demo library as Verilog-2001 models."""

from typing import Final

from demo_cells import Cell, Port

HEAD: Final = """\
// Invented cell library of the insertdft demo. Written by tools/make_demo.py; change the tables
// there. Without TIDE_DELAY every output follows at once; with -DTIDE_DELAY='#0.1' it lags.
`ifndef TIDE_DELAY
`define TIDE_DELAY
`endif

"""


def verilog(cells: list[Cell]) -> str:
    """Return the whole file."""
    return HEAD + "\n".join(map(_module, cells))


def _module(cell: Cell) -> str:
    names = ", ".join(port.name for port in cell.ports)
    ports = "".join(map(_declaration, cell.ports))
    return f"module {cell.name} ({names});\n{ports}{cell.verilog or _assign(cell)}endmodule\n"


def _declaration(port: Port) -> str:
    width = f" [{port.bits - 1}:0]" if port.bits > 1 else ""
    return f"  {'output' if port.function else 'input'}{width} {port.name};\n"


def _assign(cell: Cell) -> str:
    output = cell.ports[-1]
    value = (output.function or "").replace("!", "~")
    if value in ("0", "1"):
        value = f"1'b{value}"
    if cell.three_state:
        value = f"{cell.three_state.removeprefix('!')} ? {value} : 1'bz"
    return f"  assign `TIDE_DELAY {output.name} = {value};\n"
