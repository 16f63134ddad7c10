"""Nets with several drivers, or with one that can let go.

Such a net is the OR of what its active drivers say (contention is not shown); with none active it
is what a pull cell or an inout port says, else unknown.
"""

import numpy as np

from insertdft.design.flat import INOUT, OUTPUT, Design
from insertdft.library.expression import And, Expression, Not, Or, Var
from insertdft.netlist import CONST0, CONST1, CONSTZ, FIRST_NET
from insertdft.simulate.draft import Signal
from insertdft.simulate.lowering import Lowering
from insertdft.simulate.words import Flags


def bus_nets(design: Design) -> Flags:
    """Return which nets have several drivers, one that can let go, or one beside a port."""
    driving = np.isin(design.pin_direction, (OUTPUT, INOUT)) & (design.pin_net >= 0)
    count = np.bincount(design.pin_net[driving], minlength=design.net_count)
    found: Flags = count > 1
    letting_go = [
        (number, pin.name)
        for number, cell in enumerate(design.cells)
        if cell is not None
        for pin in cell.outputs()
        if pin.three_state is not None
    ]
    names = {name: number for number, name in enumerate(design.pin_names)}
    for number, pin in letting_go:
        rows = np.flatnonzero(design.pin_name == names.get(pin, -1))
        nets = design.pin_net[rows[design.cell[design.pin_instance[rows]] == number]]
        found[nets[nets >= 0]] = True
    ports = np.array(sorted(design.input_ports), np.int64)
    found[ports[count[ports] > 0]] = True
    found[:FIRST_NET] = False
    return found


def join_buses(work: Lowering) -> None:
    """Add the node that gives each bus its value."""
    by_net: dict[int, list[tuple[int, int]]] = {}
    for nets, data, active in work.drivers:
        for net, one, on in zip(nets.tolist(), data.tolist(), active.tolist(), strict=True):
            by_net.setdefault(net, []).append((one, on))
    for net in sorted(work.pulls.keys() | by_net.keys()):
        idle = work.pulls.get(net)
        rest = int(CONSTZ) if idle is None else (int(CONST1) if idle else int(CONST0))
        if net in work.design.input_ports:
            rest = int(work.draft.fresh(1)[0])
            work.outer[net] = rest
        _join(work, net, by_net.get(net, []), rest)


def _join(work: Lowering, net: int, pairs: list[tuple[int, int]], rest: int) -> None:
    nothing = np.full(1, -1, np.int64)
    signals = {"rest": Signal(np.array([rest]), nothing)}
    said: list[Expression] = []
    silent: list[Expression] = [Var("rest")]
    for number, (data, active) in enumerate(pairs):
        signals[f"d{number}"] = Signal(np.array([data]), nothing)
        signals[f"e{number}"] = Signal(np.array([active]), nothing)
        said.append(And((Var(f"d{number}"), Var(f"e{number}"))))
        silent.append(Not(Var(f"e{number}")))
    value = Or((*said, And(tuple(silent)))) if said else Var("rest")
    work.draft.add(value, signals, np.array([net]), nothing, nothing)
