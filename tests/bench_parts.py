"""Parts of the benches of ``scan_bench``: a netlist under test, memories, logs."""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from functools import cached_property
from itertools import accumulate
from pathlib import Path

from technologies import Technology
from wrapped import Wrapping, with_wrapped, wrapping_of

from insertdft.description import Chain, Cycle, Description
from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.netlist.names import to_verilog
from insertdft.source import read_netlist
from insertdft.text import SourceText

SETTLE = 40
"""Time units (lags of a storage cell) between two events of a bench."""


@dataclass(frozen=True)
class Setup:
    """How to simulate.

    Attributes:
        rounds: How many states are loaded, captured and unloaded.
        seed: Of all random values.
        held: Inputs that keep a value all the time (clocks that no chain uses, say).
        capture: Name of the sequence between load and unload.
        clocks: Clock port of the converted netlist -> port of the original that pulses with it;
            ports of the same name need no entry.
        skew: Time units by which a clock port is late (less than SETTLE); two are the margin that
            the lags of the storage cells leave.
    """

    rounds: int = 4
    seed: int = 1
    held: Mapping[str, int] = field(default_factory=dict)
    capture: str = "capture"
    clocks: Mapping[str, str] = field(default_factory=dict)
    skew: Mapping[str, int] = field(default_factory=dict)


@dataclass(frozen=True)
class Outcome:
    """What was compared, in bits, and what differed.

    Attributes:
        flushed: Bits of the random stream that came out of a chain.
        loaded: States seen after loading.
        captured: States unloaded after capture.
        others: Next states of storage outside the chains.
        measured: Output values.
        mismatches: Each difference in words.
    """

    flushed: int
    loaded: int
    captured: int
    others: int
    measured: int
    mismatches: tuple[str, ...]


@dataclass(frozen=True)
class Position:
    """One bit of a chain.

    Attributes:
        instance: Hierarchical name.
        bit: Which state bit of it.
        turned: Whether its state is the inverse of what entered the chain.
    """

    instance: str
    bit: int
    turned: int


def positions(chain: Chain) -> list[Position]:
    """Return the bits of a chain from scan-in to scan-out."""
    found, turned = [], 0
    for cell in chain.cells:
        turned ^= cell.inverted
        found += [Position(cell.instance, bit, turned) for bit in range(cell.bits)]
    return found


def leading_scans(cycles: Sequence[Cycle]) -> int:
    """Return how many scan cycles come first."""
    count = 0
    while count < len(cycles) and cycles[count].scan:
        count += 1
    return count


def flush_shifts(description: Description) -> int:
    """Return how many shifts the flush test makes."""
    return 2 * max(chain.length for chain in description.chains) + 8


class Side:
    """One netlist, read and wrapped."""

    def __init__(self, texts: Sequence[str], top: str, technology: Technology) -> None:
        """Read the texts and find the storage."""
        sources = [SourceText(f"part{n}.v", text) for n, text in enumerate(texts)]
        self.top = top
        self.design: Design = link(read_netlist(sources, top), technology.library())[0]
        cells = {cell.name: cell for cell in self.design.cells if cell is not None}
        storage = [cell for cell in cells.values() if cell.is_storage]
        found = {cell.name: wrapping_of(cell) for cell in storage}
        self.wrappings: dict[str, Wrapping] = {n: item for n, item in found.items() if item}
        self.texts = [with_wrapped(text, self.wrappings) for text in texts]

    @cached_property
    def storage(self) -> dict[str, Wrapping]:
        """Wrapped instances by hierarchical name, in netlist order."""
        design = self.design
        return {
            design.name(instance): self.wrappings[design.cell_name(instance)]
            for instance in range(len(design.cell))
            if design.cell_name(instance) in self.wrappings
        }

    @cached_property
    def inputs(self) -> list[str]:
        """Input bits."""
        return [port.name for port in self.design.ports if port.direction == "input"]

    @cached_property
    def outputs(self) -> list[str]:
        """Output bits."""
        return [port.name for port in self.design.ports if port.direction == "output"]

    def instance(self) -> str:
        """Return the instance of the top module, its ports on ``in_<n>`` and ``out_<n>``."""
        ports: dict[str, list[str]] = {}
        for port in self.design.ports:
            ports.setdefault(port.port, []).append(self.signal(port.name))
        joined = ", ".join(
            f".{to_verilog(name)}({{{', '.join(bits)}}})" for name, bits in ports.items()
        )
        return f"{to_verilog(self.top)} dut ({joined});"

    def signal(self, bit: str) -> str:
        """Return the bench's name for a port bit."""
        return self._signals[bit]

    @cached_property
    def _signals(self) -> dict[str, str]:
        return {
            port.name: f"{'in' if port.direction == 'input' else 'out'}_{number}"
            for number, port in enumerate(self.design.ports)
        }


class Log:
    """Lines of a bench by their first letter."""

    def __init__(self, lines: Iterable[str]) -> None:
        self.lines: dict[str, list[str]] = {}
        for line in lines:
            mark, _, value = line.partition(" ")
            if len(mark) == 1:
                self.lines.setdefault(mark, []).append(value.strip())

    def of(self, mark: str) -> list[str]:
        return self.lines.get(mark, [])


def bits_text(bits: Iterable[int]) -> str:
    return "".join(map(str, bits))


def state_words(names: Sequence[str]) -> str:
    return "{" + ", ".join(f"dut.{name} .state" for name in names) + "}"


def by_name(line: str, storage: Mapping[str, Wrapping]) -> dict[str, str]:
    """Cut a line of states into those of the instances."""
    widths = [wrapping.bits for wrapping in storage.values()]
    assert len(line) == sum(widths), "a line of states has another length than the states"
    ends = list(accumulate(widths))
    starts = [0, *ends]
    return {name: line[a:b] for name, a, b in zip(storage, starts, ends, strict=False)}


def memory(folder: Path, name: str, rows: Sequence[str]) -> list[str]:
    """Return a memory filled from a file."""
    if not rows or not rows[0]:
        return [f"integer {name}_at;"]
    (folder / f"{name}.txt").write_text("\n".join(rows) + "\n", encoding="ascii")
    return [
        f"integer {name}_at;",
        f"reg [{len(rows[0]) - 1}:0] {name} [0:{len(rows) - 1}];",
        f'initial begin {name}_at = 0; $readmemb("{name}.txt", {name}); end',
    ]


def load_task(values: Sequence[str], given: bool) -> list[str]:
    """Return the task that makes all marked storage take its next row of states."""
    if not given:
        return ["task load_states; begin end endtask"]
    return [
        "task load_states; begin",
        f"  {{{', '.join(values)}}} = states[states_at]; states_at = states_at + 1;",
        f"  loading = 1; #{SETTLE};",
        f"  load_clock = 1; load_gate = 1; #{SETTLE};",
        f"  load_gate = 0; #{SETTLE};",
        f"  loading = 0; #{SETTLE};",
        f"  load_clock = 0; #{SETTLE};",
        "end endtask",
    ]
