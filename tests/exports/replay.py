"""Vectors that an outside reader expanded, played on a netlist in Icarus Verilog."""

from collections.abc import Sequence
from itertools import groupby
from pathlib import Path
from typing import Any, Final

from icarus import run_icarus
from technologies import Technology

from insertdft.design.flat import TopPort
from insertdft.exports.stil import unquoted
from insertdft.netlist.names import to_verilog

FORCED: Final = {"D": "1'b0", "U": "1'b1", "Z": "1'bz", "N": "1'bx"}
COMPARED: Final = {"L": "1'b0", "H": "1'b1"}


def replay(
    folder: Path,
    expanded: Any,
    period_ns: int,
    ports: Sequence[TopPort],
    netlist: tuple[str, str],
    technology: Technology,
) -> tuple[int, int]:
    """Return how many values were compared, and how many of them differed.

    Args:
        folder: For files.
        expanded: What ``by_semi_ate`` printed.
        period_ns: Length of a tester cycle.
        ports: Bits of the top ports, in port order.
        netlist: Name of the top module, and the text.
        technology: Models of the cells.
    """
    top, text = netlist
    (folder / "replay.v").write_text(_bench(expanded, period_ns, ports, top), encoding="latin-1")
    (folder / "netlist.v").write_text(text, encoding="latin-1")
    models = technology.model_files(folder)
    # Models come first: the preprocessor of Icarus takes a quote in a name for a string.
    files = [*models, folder / "replay.v", folder / "netlist.v"]
    last = run_icarus(folder, files, "replay", technology.flags)[-1].split()
    return int(last[0]), int(last[1])


def _bench(expanded: Any, period_ns: int, ports: Sequence[TopPort], top: str) -> str:
    names = [unquoted(f'"{name}"') for name in expanded["signals"]]
    direction = {port.name: port.direction for port in ports}
    at = {name: number for number, name in enumerate(names)}
    lines = ["`timescale 1ps/1ps", "module replay;", "integer compared, bad;"]
    lines += [f"{'reg' if direction[name] == 'input' else 'wire'} s{at[name]};" for name in names]
    wires = []
    for _, bits in groupby(ports, lambda bit: bit.port):
        # The rightmost bit of a port comes first, in a concatenation the leftmost.
        wires.append("{" + ", ".join([f"s{at[bit.name]}" for bit in bits][::-1]) + "}")
    lines.append(f"{to_verilog(top)} dut ({', '.join(wires)});")
    lines += [
        "task check; input expected, got; begin compared = compared + 1;",
        "if (expected !== got) bad = bad + 1; end endtask",
        "initial begin compared = 0; bad = 0;",
    ]
    now = 0
    for time, statement in _statements(expanded, period_ns * 1000, names, direction):
        lines += [f"#{time - now};"] if time > now else []
        lines.append(statement)
        now = time
    return "\n".join([*lines, '$display("%0d %0d", compared, bad); $finish; end endmodule', ""])


def _statements(
    expanded: Any, period: int, names: Sequence[str], direction: dict[str, str]
) -> list[tuple[int, str]]:
    found: list[tuple[int, str]] = []
    for cycle, characters in enumerate(expanded["vectors"]):
        for number, (written, letter) in enumerate(
            zip(expanded["signals"], characters, strict=True)
        ):
            for time, event in expanded["events"].get(f"{written}|{letter}", []):
                when = cycle * period + time // 1000
                if direction[names[number]] == "input":
                    found.append((when, f"s{number} = {FORCED[event]};"))
                elif event in COMPARED:
                    found.append((when, f"check({COMPARED[event]}, s{number});"))
    return sorted(found, key=lambda item: item[0])
