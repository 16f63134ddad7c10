"""What the user asks of a plan."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final

#: Names of new ports unless the user says otherwise: plain words of the trade.
DEFAULT_PORTS: Final[Mapping[str, str]] = {
    "scan_in": "scan_in",
    "scan_out": "scan_out",
    "scan_enable": "scan_enable",
    "scan_clk": "scan_clk",
    "clk_a": "clk_a",
    "clk_b": "clk_b",
    "clk_c": "clk_c",
}


@dataclass(frozen=True, slots=True)
class Wishes:
    """Options of a conversion that shape its plan.

    Attributes:
        style: ``mux-d``, ``clocked-scan`` or ``lssd``.
        chains: Number of chains, or None to go by ``max_length``.
        max_length: Longest chain allowed, in shift cycles; None for no limit.
        include: Patterns of hierarchical names; if given, only matching cells are converted.
        exclude: Patterns of hierarchical names that are left alone.
        ports: Names for new ports by what they carry; see ``DEFAULT_PORTS``.
        connect: ``buffer`` or ``assign``: what drives a scan-out port.
        styles: (pattern, style) pairs for cells that get another style; the last match holds.
        latches: ``lssd`` to give latches LSSD whatever the style of the flip-flops, else
            ``as-style``.
        star: Whether two system latches of different phases may share one position (L1/L2*).
        flip_flops: What a flip-flop becomes in LSSD: ``edge``, a cell that keeps its clock edge,
            or ``two-phase``, a double latch whose C is the old clock and whose B is a new port.
    """

    style: str = "mux-d"
    chains: int | None = None
    max_length: int | None = None
    include: tuple[str, ...] = ()
    exclude: tuple[str, ...] = ()
    ports: Mapping[str, str] = field(default_factory=dict)
    connect: str = "buffer"
    styles: tuple[tuple[str, str], ...] = ()
    latches: str = "as-style"
    star: bool = False
    flip_flops: str = "edge"
