r"""How names are kept: one spelling a name, so that equal names are equal strings.

A simple identifier is kept as it is. An escaped one keeps its backslash and loses its closing
blank (``\u1.reg[3]``); if what follows the backslash is a simple identifier and no keyword, the
two spellings name the same thing (IEEE 1364-2005, 3.7.1) and the backslash is dropped. One bit of
a vector is ``bus[3]``, of an escaped vector ``\mem.rd [3]`` with the blank: a blank can only stand
before a bit select, so no two things share a spelling.

A hierarchical name joins its parts by ``.`` as Verilog does, an escaped part that is not the last
ends with its blank: ``u_core.\g[0].u .q_reg``.
"""

import re
from collections.abc import Iterable
from typing import Final

SIMPLE: Final = re.compile(r"[A-Za-z_][\w$]*\Z", re.ASCII)

KEYWORDS: Final = frozenset(
    """always and assign automatic begin buf bufif0 bufif1 case casex casez cell cmos config
    deassign default defparam design disable edge else end endcase endconfig endfunction
    endgenerate endmodule endprimitive endspecify endtable endtask event for force forever fork
    function generate genvar highz0 highz1 if ifnone incdir include initial inout input instance
    integer join large liblist library localparam macromodule medium module nand negedge nmos nor
    noshowcancelled not notif0 notif1 or output parameter pmos posedge primitive pull0 pull1
    pulldown pullup pulsestyle_onevent pulsestyle_ondetect rcmos real realtime reg release repeat
    rnmos rpmos rtran rtranif0 rtranif1 scalared showcancelled signed small specify specparam
    strong0 strong1 supply0 supply1 table task time tran tranif0 tranif1 tri tri0 tri1 triand
    trior trireg unsigned use uwire vectored wait wand weak0 weak1 while wire wor xnor
    xor""".split()
)


def canonical(raw: str) -> str:
    """Return the kept spelling of one identifier as written, with or without closing blank."""
    if raw[0] != "\\":
        return raw
    bare = raw[1:].strip()
    return bare if SIMPLE.match(bare) and bare not in KEYWORDS else "\\" + bare


def plain_to_name(plain: str) -> str:
    """Return the kept spelling of a name given without Verilog's escapes."""
    return plain if SIMPLE.match(plain) and plain not in KEYWORDS else "\\" + plain


def to_verilog(name: str) -> str:
    """Return ``name`` so that any text may follow it in a netlist."""
    # The escaped scalar `\bus[3]` needs a closing blank; the bit `\bus [3]` has it inside.
    return name + " " if name[0] == "\\" and " " not in name else name


def plain(name: str) -> str:
    r"""Return the name as people read it: without backslash and blank (``\a[1]`` -> ``a[1]``)."""
    return name[1:].replace(" ", "") if name[0] == "\\" else name


def bit(name: str, index: int) -> str:
    """Return the spelling of one bit of the vector ``name``."""
    return f"{name} [{index}]" if name[0] == "\\" else f"{name}[{index}]"


def split_bit(name: str) -> tuple[str, int | None]:
    """Return vector name and index of a bit's spelling, or the name and None for a scalar."""
    if not name.endswith("]") or (name[0] == "\\" and " " not in name):
        return name, None
    head, _, index = name[:-1].rpartition("[")
    return head.rstrip(), int(index)


def join_path(parts: Iterable[str]) -> str:
    """Return the hierarchical name of ``parts``, outermost first."""
    return ".".join(map(_part, parts)).rstrip(" ")


def _part(name: str) -> str:
    return name + " " if name[0] == "\\" else name


PART: Final = re.compile(r"(\\\S+)(?: |\Z)|([^.\\]+)", re.ASCII)


def split_path(path: str) -> tuple[str, ...]:
    """Return the parts of a hierarchical name made by ``join_path``.

    Raises:
        ValueError: The text is not such a name.
    """
    parts: list[str] = []
    at = 0
    while True:
        match = PART.match(path, at)
        if match is None:
            raise ValueError(f"not a hierarchical name: {path!r}")
        parts.append(match[1] or match[2])
        at = match.end()
        if at == len(path):
            return tuple(parts)
        if path[at] != ".":
            raise ValueError(f"not a hierarchical name: {path!r}")
        at += 1
