"""Find nets with more than one driver."""

from typing import Final

import numpy as np
import numpy.typing as npt

from insertdft.design.flat import OUTPUT, Design
from insertdft.diagnostics import Diagnostic, Severity
from insertdft.netlist import CONST0, CONST1, FIRST_NET, Module, Offsets

#: Net kinds that are meant to have several drivers.
SHARED_KINDS: Final = frozenset({"tri", "tri0", "tri1", "triand", "trior", "wand", "wor", "trireg"})
MOST_SHOWN: Final = 50


def find_double_drivers(design: Design) -> list[Diagnostic]:
    """Return one error a net that two outputs drive, or an output and a port or a constant.

    Outputs that can go to high impedance may share a net, and so may all on nets declared to be
    shared (``tri``, ``wand``, ...). Bidirectional and black-box pins are not counted.
    """
    rows = np.flatnonzero((design.pin_direction == OUTPUT) & (design.pin_net >= 0))
    rows = rows[~_is_three_state(design, rows)]
    count = np.bincount(design.pin_net[rows], minlength=design.net_count)
    inputs = [port.net for port in design.ports if port.direction == "input"]
    np.add.at(count, np.array(inputs, np.int64), 1)
    count[:FIRST_NET] += 1
    suspects = np.flatnonzero(count > 1)
    suspects = suspects[~np.isin(suspects, _shared_nets(design))]
    used = np.isin(design.pin_net[rows], suspects)
    by_net: dict[int, list[int]] = {}
    for row in rows[used].tolist():
        by_net.setdefault(int(design.pin_net[row]), []).append(row)
    found = [_problem(design, net, pins) for net, pins in by_net.items()]
    return (found + _clashes(design))[:MOST_SHOWN]


def _is_three_state(design: Design, rows: Offsets) -> npt.NDArray[np.bool_]:
    can = np.zeros((len(design.cells), len(design.pin_names)), bool)
    numbers = {name: number for number, name in enumerate(design.pin_names)}
    for cell_id, cell in enumerate(design.cells):
        for pin in cell.pins.values() if cell else ():
            if pin.three_state is not None and pin.name in numbers:
                can[cell_id, numbers[pin.name]] = True
    return can[design.cell[design.pin_instance[rows]], design.pin_name[rows]]


def _shared_nets(design: Design) -> Offsets:
    found: list[int] = []
    for place in design.occurrences:
        module = design.netlist.modules[place.module]
        kinds = {name for name, kind in module.net_kinds.items() if kind in SHARED_KINDS}
        if kinds:
            found += _flat_nets(design, place.net_base, module, kinds)
    return np.array(found, np.int64)


def _flat_nets(design: Design, base: int, module: Module, kinds: set[str]) -> list[int]:
    wanted = set(kinds)
    for name in kinds & module.vectors.keys():
        vector = module.vectors[name]
        wanted.update(module.net_names[vector.base : vector.base + vector.width])
    return [
        int(design.net_of[base + number - FIRST_NET])
        for number, name in enumerate(module.net_names)
        if number >= FIRST_NET and name in wanted
    ]


def _problem(design: Design, net: int, rows: list[int]) -> Diagnostic:
    pins = [
        f"{design.name(int(design.pin_instance[row]))}.{design.pin_names[design.pin_name[row]]}"
        for row in rows
    ]
    other = design.input_ports.get(net)
    if net < FIRST_NET:
        pins.append(f"the constant {design.netlist.top_module.net_name(net)}")
    elif other is not None:
        pins.append(f"the input port {other}")
    first, *rest = [design.span(int(design.pin_instance[row])) for row in rows]
    return Diagnostic(
        "net-two-drivers",
        Severity.ERROR,
        f"net `{design.net_name(net)}` is driven by {' and by '.join(pins[:4])}",
        first,
        hint="leave one driver, or declare the net as wand, wor or tri if it is meant to be shared",
        also=tuple((span, "also driven here") for span in rest[:3]),
    )


def _clashes(design: Design) -> list[Diagnostic]:
    """Return nets that ``assign`` or ports tie to 0 and to 1 at once."""
    found: dict[str, Diagnostic] = {}
    for place in design.occurrences:
        module = design.netlist.modules[place.module]
        for constant, other in ((CONST0, CONST1), (CONST1, CONST0)):
            tied = np.flatnonzero(module.assign_right == constant)
            lefts = module.assign_left[tied]
            local = lefts >= FIRST_NET
            flat = design.net_of[lefts[local] - FIRST_NET + place.net_base]
            for at in np.flatnonzero(flat == other).tolist():
                name = module.net_name(int(lefts[local][at]))
                found.setdefault(name, _clash(name))
    return list(found.values())


def _clash(name: str) -> Diagnostic:
    return Diagnostic(
        "net-two-drivers",
        Severity.ERROR,
        f"net `{name}` is tied to 0 and to 1",
        hint="remove one of the assignments",
    )
