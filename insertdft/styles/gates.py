"""Modules composed of a library's NAND gates and inverters: built, named, written."""

from collections.abc import Collection, Mapping
from dataclasses import dataclass, replace
from typing import Final

from insertdft.library import Gate, find_gates, find_inverters
from insertdft.library.cell import Library
from insertdft.netlist.names import to_verilog as name_to_verilog


@dataclass(frozen=True, slots=True)
class ModulePart:
    """One cell of a composed module; nets are ports or inner wires by name."""

    cell: str
    instance: str
    pins: Mapping[str, str]


@dataclass(frozen=True, slots=True)
class ComposedModule:
    """A module made of library cells, written once and instanced many times.

    Attributes:
        name: Module name.
        ports: (name, direction), inputs first.
        parts: Its cells.
        area: Sum of their areas, None if one states none.
        purpose: What it is, for the comment in front.
    """

    name: str
    ports: tuple[tuple[str, str], ...]
    parts: tuple[ModulePart, ...]
    area: float | None
    purpose: str

    def wires(self) -> tuple[str, ...]:
        """Return the nets that are no ports, in order of first use."""
        ports = {name for name, _ in self.ports}
        nets = dict.fromkeys(net for part in self.parts for net in part.pins.values())
        return tuple(net for net in nets if net not in ports)


#: Widest NAND gate that is looked for; wider ones are made of narrower.
_WIDEST: Final = 4


def gate_builder(library: Library) -> "GateBuilder | None":
    """Return a builder with the smallest gates of ``library``, None if it lacks them.

    A 2-input NAND gate and an inverter are enough.
    """
    inverter = next(iter(find_inverters(library)), None)
    nands = {
        width: gates[0]
        for width in range(2, _WIDEST + 1)
        if (gates := find_gates(library, "nand", width))
    }
    return None if inverter is None or 2 not in nands else GateBuilder(library, inverter, nands)


class GateBuilder:
    """Cells so far, and the gates to take.

    Attributes:
        parts: The cells, each named after the net it drives.
    """

    def __init__(self, library: Library, inverter: Gate, nands: Mapping[int, Gate]) -> None:
        """Start with no cells."""
        self.parts: list[ModulePart] = []
        self._library = library
        self._inverter = inverter
        self._nands = nands

    def module(self, name: str, ports: tuple[tuple[str, str], ...], purpose: str) -> ComposedModule:
        """Return what was built."""
        areas = [self._library.cells[part.cell].area for part in self.parts]
        area = None if None in areas else sum(area for area in areas if area is not None)
        return ComposedModule(name, ports, tuple(self.parts), area, purpose)

    def invert(self, net: str, output: str) -> str:
        """Add an inverter; return ``output``."""
        gate = self._inverter
        self._add(gate, f"inv_{output}", {gate.inputs[0]: net}, output)
        return output

    def nand(self, nets: list[str], output: str) -> str:
        """Add a NAND over all ``nets``; what no gate is wide enough for is ANDed first."""
        inputs = list(nets)
        step = 0
        while len(inputs) not in self._nands:
            widest = max(width for width in self._nands if width < len(inputs))
            most = min(widest, len(inputs) - 1)
            step += 1
            part = self._narrow(inputs[:most], f"{output}_{step}")
            inputs = [part, *inputs[most:]]
        gate = self._nands[len(inputs)]
        self._add(gate, f"nand_{output}", dict(zip(gate.inputs, inputs, strict=True)), output)
        return output

    def _narrow(self, nets: list[str], output: str) -> str:
        return self.invert(self.nand(nets, f"{output}n"), output)

    def _add(self, gate: Gate, instance: str, inputs: Mapping[str, str], output: str) -> None:
        self.parts.append(ModulePart(gate.cell, instance, {**inputs, gate.output: output}))


def free_name(base: str, taken: Collection[str]) -> str:
    """Return ``base``, or ``base`` with the first number that makes it a name not taken."""
    name, number = base, 1
    while name in taken:
        number += 1
        name = f"{base}_{number}"
    return name


def renamed(module: ComposedModule, taken: Collection[str]) -> ComposedModule:
    """Return the module under a name that is not taken."""
    return replace(module, name=free_name(module.name, taken))


def to_verilog(module: ComposedModule) -> str:
    """Return the text of the module, to be written once into the netlist."""
    names = ", ".join(name for name, _ in module.ports)
    lines = [
        f"// Composed from library gates: {module.purpose}.",
        f"module {name_to_verilog(module.name)} ({names});",
    ]
    lines += [f"  {direction} {name};" for name, direction in module.ports]
    lines += [f"  wire {name};" for name in module.wires()]
    for part in module.parts:
        pins = ", ".join(f".{name_to_verilog(pin)}({net})" for pin, net in part.pins.items())
        lines.append(f"  {name_to_verilog(part.cell)} {part.instance} ({pins});")
    return "\n".join([*lines, "endmodule", ""])
