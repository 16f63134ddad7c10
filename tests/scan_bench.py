"""Simulate a conversion in Icarus Verilog, with the library's own cell models.

Two benches run in the same simulator. The converted netlist is shifted, loaded, clocked through its
capture sequence and unloaded, all as its chain description says. Then the original netlist is set
to the states that the converted one held just before capture, sees the same inputs and the same
clock pulses, and shows its next states and outputs. Python compares what both printed.
"""

import random
from collections.abc import Sequence
from pathlib import Path

from bench_compare import Comparison, compare, flipped
from bench_parts import (
    SETTLE,
    Log,
    Outcome,
    Setup,
    Side,
    bits_text,
    by_name,
    flush_shifts,
    leading_scans,
    load_task,
    memory,
    state_words,
)
from icarus import run_icarus
from technologies import Technology
from wrapped import wrapper_text

from insertdft.description import Cycle, Description
from insertdft.library.functions import literal

PLAIN = Setup()


def simulate(
    original: Sequence[str],
    converted: Sequence[str],
    technology: Technology,
    description: Description,
    folder: Path,
    setup: Setup = PLAIN,
) -> Outcome:
    """Run both netlists and compare them.

    Args:
        original: Verilog texts before the conversion.
        converted: Verilog texts after it.
        technology: The library of both.
        description: What the conversion says about its chains.
        folder: Empty folder for files.
        setup: How.
    """
    run = _Run(
        Side(original, description.design, technology),
        Side(converted, description.design, technology),
        technology,
        description,
        folder,
        setup,
    )
    after = run.converted_log()
    before = run.original_log(after)
    comparison = Comparison(
        run.before,
        run.after,
        description,
        setup,
        run.others,
        tuple(run.stream),
        tuple(run.wanted_states),
    )
    return compare(comparison, before, after)


class _Run:
    """One comparison: stimuli, benches, logs."""

    def __init__(
        self,
        before: Side,
        after: Side,
        technology: Technology,
        description: Description,
        folder: Path,
        setup: Setup,
    ) -> None:
        self.before, self.after = before, after
        self.technology, self.description = technology, description
        self.folder, self.setup = folder, setup
        self.chance = random.Random(setup.seed)  # noqa: S311
        self.longest = max(chain.length for chain in description.chains)
        chained = {cell.instance for chain in description.chains for cell in chain.cells}
        chained |= {
            cell.slave for chain in description.chains for cell in chain.cells if cell.slave
        }
        self.others = [
            name
            for name, wrapping in after.storage.items()
            if name not in chained and wrapping.loads is not None and name in before.storage
        ]
        parts = {port.port for port in description.ports} | set(setup.held)
        parts |= {chain.scan_in for chain in description.chains}
        parts |= set(setup.clocks.values())
        self.free = [name for name in before.inputs if name not in parts and name in after.inputs]
        self.stream: list[list[int]] = []  # scan bits of every shift, by chain
        self.other_states: list[str] = []  # of every round
        self.wanted_states: list[str] = []  # of the original, of every round
        self.input_values: list[str] = []  # of every cycle that takes inputs

    def _bits(self, count: int) -> list[int]:
        return [self.chance.getrandbits(1) for _ in range(count)]

    def _make_stimuli(self, flush: int) -> None:
        setup, sequences = self.setup, self.description.sequences
        capture = sequences[setup.capture]
        scans = self.longest + sum(cycle.scan for cycle in capture)
        unloads = self.longest + sum(cycle.scan for cycle in sequences.get("unload_start", ()))
        shifts = flush + setup.rounds * (scans + unloads)
        self.stream = [self._bits(len(self.description.chains)) for _ in range(shifts)]
        bits = sum(self.after.storage[name].bits for name in self.others)
        self.other_states = [bits_text(self._bits(bits)) for _ in range(setup.rounds + 1)]
        count = setup.rounds * sum(cycle.inputs for cycle in capture)
        self.input_values = [bits_text(self._bits(len(self.free))) for _ in range(count)]

    def converted_log(self) -> Log:
        """Shift, load, capture and unload the converted netlist."""
        flush = flush_shifts(self.description)
        self._make_stimuli(flush)
        side, sequences = self.after, self.description.sequences
        readable = list(side.storage)
        body = [
            *_calls(sequences.get("setup", ()), "setup"),
            "load_states;",
            f"repeat ({flush}) begin {self._shift('F')} end",
            f"repeat ({self.setup.rounds}) begin",
            f"  repeat ({self.longest}) begin {self._shift('L')} end",
            *self._last_of_load(),
            "  load_states;",
            f'  $display("X %b", {state_words(readable)});',
            *self._capture_calls(),
            f'  $display("Y %b", {state_words(self.others)});' if self.others else "",
            *_calls(sequences.get("unload_start", ()), "unload_start"),
            f"  repeat ({self.longest}) begin {self._shift('U')} end",
            "end",
        ]
        values = [f"dut.{name} .value" for name in self.others]
        mine = [f"dut.{name} .mine" for name in self.others]
        return self._run(side, body, values, mine, self.other_states, "converted")

    def original_log(self, after: Log) -> Log:
        """Set the original to the same states, capture, and print its next states."""
        side = self.before
        names = list(side.storage)
        bad = [name for name in names if side.storage[name].loads is None]
        assert not bad, f"cannot set {bad[:3]} of the original"
        states = [self._states_before(line) for line in after.of("X")]
        self.wanted_states = states
        body = [
            *_calls(self.description.sequences.get("setup", ()), "setup"),
            f"repeat ({self.setup.rounds}) begin",
            *self._last_of_load(),
            "  load_states;",
            f'  $display("X %b", {state_words(names)});',
            *self._capture_calls(),
            f'  $display("Y %b", {state_words(names)});',
            "end",
        ]
        values = [f"dut.{name} .value" for name in names]
        mine = [f"dut.{name} .mine" for name in names]
        return self._run(side, body, values, mine, states, "original")

    def _shift(self, mark: str) -> str:
        cycles = self.description.sequences["shift"]
        return " ".join(f'shift_{n}("{mark}");' for n in range(len(cycles)))

    def _last_of_load(self) -> list[str]:
        """Return the scan cycles that a capture sequence begins with: they belong to the load."""
        count = leading_scans(self.description.sequences[self.setup.capture])
        return [f'  {self.setup.capture}_{n}("L");' for n in range(count)]

    def _capture_calls(self) -> list[str]:
        cycles = self.description.sequences[self.setup.capture]
        return [
            f'  {self.setup.capture}_{n}("C");' for n in range(leading_scans(cycles), len(cycles))
        ]

    def _run(
        self,
        side: Side,
        body: Sequence[str],
        values: Sequence[str],
        mine: Sequence[str],
        states: Sequence[str],
        label: str,
    ) -> Log:
        folder = self.folder / label
        folder.mkdir(parents=True)
        used = {"setup", "shift", "unload_start", self.setup.capture}
        tasks = [
            self._task(side, f"{name}_{number}", cycle)
            for name, cycles in self.description.sequences.items()
            if name in used
            for number, cycle in enumerate(cycles)
        ]
        text = "\n".join(
            [
                "`timescale 1ns/1ps",
                "module bench;",
                "reg loading, load_clock, load_gate;",
                *[f"reg {side.signal(name)};" for name in side.inputs],
                *[f"wire {side.signal(name)};" for name in side.outputs],
                side.instance(),
                *memory(folder, "stream", [bits_text(bits) for bits in self.stream]),
                *memory(folder, "inputs", self.input_values),
                *memory(folder, "states", states),
                *load_task(values, bool(states and states[0])),
                *tasks,
                "initial begin",
                "  loading = 0; load_clock = 0; load_gate = 0;",
                *[f"  {side.signal(name)} = {self._rest(name)};" for name in side.inputs],
                *[f"  {name} = 1;" for name in mine],
                f"  #{SETTLE};",
                *body,
                "  $finish(0);",
                "end",
                "endmodule",
                "",
            ]
        )
        files = [folder / "bench.v", folder / "wrappings.v"]
        files[0].write_text(text, encoding="latin-1")
        wrappings = map(wrapper_text, side.wrappings.values())
        files[1].write_text("`timescale 1ns/1ps\n" + "\n".join(wrappings), encoding="latin-1")
        for number, netlist in enumerate(side.texts):
            files.append(folder / f"netlist{number}.v")
            files[-1].write_text(netlist, encoding="latin-1")
        models = self.technology.model_files(folder)
        return Log(run_icarus(folder, [*files, *models], "bench", self.technology.flags))

    def _rest(self, name: str) -> int:
        if name in self.setup.held:
            return self.setup.held[name]
        turned = {mine: theirs for theirs, mine in self.setup.clocks.items()}
        for port in self.description.ports:
            if port.port in (name, turned.get(name)) and port.off is not None:
                return port.off
        return 0

    def _toggled(self, side: Side, port: str) -> str:
        """Return the statement that turns a clock port over, late by its skew."""
        skew, signal = self.setup.skew.get(port, 0), side.signal(port)
        return f"{signal} <= #{skew} ~{signal};" if skew else f"{signal} = ~{signal};"

    def _task(self, side: Side, name: str, cycle: Cycle) -> str:
        """Return one tester cycle as a task; ports that the netlist lacks are left out."""
        known = set(side.inputs)
        lines = [f"{side.signal(port)} = {value};" for port, value in cycle.force if port in known]
        chains = self.description.chains
        if cycle.scan and chains[0].scan_in in known:
            ins = ", ".join(side.signal(chain.scan_in) for chain in chains)
            lines.append(f"{{{ins}}} = stream[stream_at]; stream_at = stream_at + 1;")
        if cycle.inputs and self.free:
            ins = ", ".join(side.signal(port) for port in self.free)
            lines.append(f"{{{ins}}} = inputs[inputs_at]; inputs_at = inputs_at + 1;")
        lines.append(f"#{SETTLE};")
        if cycle.scan and chains[0].scan_out in side.outputs:
            outs = ", ".join(side.signal(chain.scan_out) for chain in chains)
            lines.append(f'$display("%s %b", mark, {{{outs}}});')
        if cycle.measure:
            outs = ", ".join(side.signal(name) for name in self.before.outputs)
            lines.append(f'$display("O %b", {{{outs}}});')
        loading = cycle.scan and side is self.before  # its states are set, not shifted
        for phase in () if loading else cycle.pulses:
            named = self.setup.clocks if side is self.before else {}
            ports = [port for port in (named.get(port, port) for port in phase) if port in known]
            lines += 2 * [*(self._toggled(side, port) for port in ports), f"#{SETTLE};"]
        inner = "\n  ".join(lines)
        return f"task {name}; input [7:0] mark; begin\n  {inner}\nend endtask"

    def _states_before(self, line: str) -> str:
        """Return the states to set in the original, from those the converted one held."""
        held = by_name(line, self.after.storage)
        parts = []
        for name, wrapping in self.before.storage.items():
            source = name if name in held else self._master_of(name)
            value = held[source]
            if source == name and flipped(self.before, self.after, name):
                value = "".join({"0": "1", "1": "0"}.get(bit, bit) for bit in value)
            assert len(value) == wrapping.bits, f"`{name}` has {wrapping.bits} bits, not {value}"
            parts.append(value)
        return "".join(parts)

    def _master_of(self, name: str) -> str:
        """Return the storage whose output a vanished slave latch takes directly."""
        design = self.before.design
        numbers = {design.name(i): i for i in range(len(design.cell))}
        data = literal(self.before.storage[name].cell.storage[0].data)
        assert data is not None, f"`{name}` vanished and is no plain latch"
        pin = data[0]
        [row] = design.drivers.of(design.net_at(numbers[name], pin))
        return design.name(int(design.pin_instance[row]))


def _calls(cycles: Sequence[Cycle], name: str) -> list[str]:
    return [f'{name}_{number}("S");' for number in range(len(cycles))]
