"""Arrivals of random circuits of real cells against a reference that walks pin by pin."""

from functools import cache
from pathlib import Path

import numpy as np
import pytest
from circuits import design_of
from scipy.interpolate import RegularGridInterpolator

from insertdft.design.flat import Design
from insertdft.library import Arc, Library, Table, read_library
from insertdft.source import read_sources
from insertdft.timing.analyse import Assumptions, analyse
from insertdft.timing.paths import path_groups, trace
from insertdft.timing.wiring import wiring_of

WIRE, SLEW, PORT = 0.004, 0.08, 0.05


@cache
def osu() -> Library:
    return read_library(read_sources([Path("/usr/share/qflow/tech/osu035/osu035_stdcells.lib")]))


def random_netlist(seed: int) -> str:
    chance = np.random.default_rng(seed)
    names = ["i0", "i1", *(f"q{i}" for i in range(6))]
    kinds = {"INVX1": "A", "NAND2X1": "AB", "XOR2X1": "AB", "AOI21X1": "ABC", "NOR3X1": "ABC"}
    lines = []
    for number in range(40):
        kind = str(chance.choice(list(kinds)))
        pins = [f".{pin}({chance.choice(names)})" for pin in kinds[kind]]
        lines.append(f"{kind} g{number} ({', '.join(pins)}, .Y(n{number}));")
        names.append(f"n{number}")
    for number in range(6):
        data = chance.choice(names[-25:])
        lines.append(f"DFFPOSX1 f{number} (.D({data}), .CLK(c), .Q(q{number}));")
    body = "\n".join(lines)
    return (
        f"module top (c, i0, i1, y); input c, i0, i1; output y; assign y = n39;\n{body} endmodule"
    )


class PinByPin:
    """Latest arrival and slowest transition at a net, asked for backwards."""

    def __init__(self, design: Design) -> None:
        self.design = design
        self.arrival = cache(self._arrival)
        self.slew = cache(self._slew)

    def load(self, net: int) -> float:
        total = 0.0
        for row in self.design.loads.of(net):
            cell = self.design.cell_of(int(self.design.pin_instance[row]))
            pin = self.design.pin_names[int(self.design.pin_name[row])]
            total += (cell.pins[pin].capacitance or 0.0 if cell else 0.0) + WIRE
        return total + PORT * sum(port.net == net for port in self.design.ports)

    def ways(self, net: int, edge: str) -> list[tuple[int, str, Arc]]:
        """Return (input net, its edge, timing group) of every arc to an edge of a net."""
        found = []
        for row in self.design.drivers.of(net):
            instance = int(self.design.pin_instance[row])
            cell, pins = self.design.cell_of(instance), self.design.pins(instance)
            pin = self.design.pin_names[int(self.design.pin_name[row])]
            for arc in cell.pins[pin].arcs if cell else ():
                other = {"rise": "fall", "fall": "rise"}[edge]
                edges = {"positive_unate": [edge], "negative_unate": [other]}.get(
                    arc.sense or "", [edge, other]
                )
                if arc.kind == "rising_edge":
                    edges = ["rise"]
                found += [(pins[name], one, arc) for name in arc.related for one in edges]
        return found

    def _slew(self, net: int, edge: str) -> float:
        ways = self.ways(net, edge)
        given = [
            value(arc.tables[f"{edge}_transition"], self.slew(source, one), self.load(net))
            for source, one, arc in ways
        ]
        return max(given, default=SLEW)

    def _arrival(self, net: int, edge: str) -> float:
        """Return the latest arrival from a flip-flop; minus infinity if none reaches the net."""
        late = -np.inf
        for source, one, arc in self.ways(net, edge):
            delay = value(arc.tables[f"cell_{edge}"], self.slew(source, one), self.load(net))
            before = 0.0 if arc.kind == "rising_edge" else self.arrival(source, one)
            late = max(late, before + delay)
        return late


@cache
def grid(table: Table) -> RegularGridInterpolator:
    shape = [len(index) for index in table.indices]
    return RegularGridInterpolator(
        [np.array(index) for index in table.indices],
        np.array(table.values).reshape(shape),
        bounds_error=False,
        fill_value=None,
    )


def value(table: Table, slew: float, load: float) -> float:
    by_axis = {"input_net_transition": slew, "total_output_net_capacitance": load}
    return float(grid(table)([by_axis[axis] for axis in table.axes])[0])


@pytest.mark.parametrize("seed", range(4))
def test_every_endpoint_has_the_arrival_that_a_walk_finds(seed: int) -> None:
    design = design_of(random_netlist(seed), osu())
    reference = PinByPin(design)

    found = analyse(
        wiring_of(design), Assumptions(WIRE, port_load=PORT, input_slew=SLEW, clock_slew=SLEW)
    )

    column = found.launches.index(next(one for one in found.launches if one.clock == "c"))
    compared = 0
    for net in sorted(set(found.checks.data.tolist())):
        for number, edge in enumerate(("rise", "fall")):
            mine = found.arrival[2 * net + number, column]
            assert mine == pytest.approx(reference.arrival(net, edge))
            assert found.slew[2 * net + number] == pytest.approx(reference.slew(net, edge))
            compared += 1
    assert compared > 6
    for group in path_groups(found):
        path = trace(found, group.check, found.launches.index(group.launch))
        assert path.steps[-1].arrival == pytest.approx(path.arrival)
        delays = sum(step.delay for step in path.steps)
        assert delays == pytest.approx(path.arrival)
