"""Put the plan together: names of ports, test nets of modules, areas."""

from collections.abc import Iterable, Mapping, Sequence
from hashlib import sha256
from itertools import product
from typing import Final

import numpy as np

from insertdft.chains.arrange import Arrangement
from insertdft.chains.choose import Chosen, Group
from insertdft.chains.names import PortNamer
from insertdft.chains.plan import (
    CELL,
    SEGMENT,
    ChainPlan,
    Element,
    LeftAlone,
    ModulePlan,
    Plan,
    Segment,
)
from insertdft.chains.wishes import Wishes
from insertdft.description import Cycle, TestPort
from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, error
from insertdft.library import find_buffers
from insertdft.netlist import OPEN, Instance, Module
from insertdft.styles import Conversion, TestNet, in_port_order, kind_of
from insertdft.styles.lssd import EDGE_CLOCK_B
from insertdft.styles.overlaps import find_overlaps
from insertdft.styles.sequences import Clocking, make_sequences
from insertdft.survey import Survey


def assemble(
    survey: Survey,
    wishes: Wishes,
    chosen: Chosen,
    arrangement: Arrangement,
    segments: dict[str, list[tuple[Element, ...]]],
) -> Plan:
    """Return the plan of an arrangement laid into modules."""
    design = survey.design
    touched = [design.netlist.modules[name] for name in design.netlist.modules if name in segments]
    namer = PortNamer(touched, wishes.ports)
    needs = _test_nets(design, chosen.conversions, segments)
    port_names = _name_test_nets(namer, in_port_order(set().union(*needs.values())))
    most = max(map(len, segments.values()))
    ins, outs = namer.numbered("scan_in", most), namer.numbered("scan_out", most)
    modules = {
        module.name: ModulePlan(
            tuple(
                Segment(
                    ins[number],
                    outs[number],
                    elements,
                    _is_connected(design, module, chosen.conversions, elements[-1]),
                )
                for number, elements in enumerate(segments[module.name])
            ),
            in_port_order(needs[module.name]),
        )
        for module in touched
    }
    shifts = [_shift_clocks(chosen, number, port_names) for number in range(len(chosen.groups))]
    chains = tuple(
        _chain(f"chain_{number + 1}", chosen.groups[group], shifts[group])
        for number, (group, _) in enumerate(arrangement.chains)
    )
    connector = _connector(design, wishes)
    sequences = make_sequences(_clocking(survey, chosen, shifts, port_names))
    _check_overlaps(survey, chosen, port_names, sequences)
    added, without = _added_area(survey, chosen, modules, connector)
    return Plan(
        design=design.netlist.top,
        style=wishes.style,
        netlist={source.name: fingerprint(source.text) for source in design.netlist.sources},
        conversions=tuple(chosen.conversions),
        modules=modules,
        chains=chains,
        port_names=port_names,
        connector=connector,
        ports=_ports(survey, wishes, chosen, modules[design.netlist.top], port_names),
        sequences=sequences,
        left_alone=_left_alone(survey, chosen),
        lower_bound=arrangement.lower_bound,
        area_before=survey.area,
        area_after=survey.area + added,
        without_area=tuple(sorted({*survey.without_area, *without})),
        shared_l2=chosen.lssd.saved,
    )


def fingerprint(text: str) -> str:
    """Return the sha256 of a source as it came from the file (latin-1)."""
    return sha256(text.encode("latin-1")).hexdigest()


def _name_test_nets(namer: PortNamer, nets: tuple[str, ...]) -> dict[str, str]:
    """Return the port of each test net; of several of one kind each gets a number."""
    found: dict[str, str] = {}
    for kind in dict.fromkeys(map(kind_of, nets)):
        mine = [net for net in nets if kind_of(net) == kind]
        names = [namer.one(kind)] if len(mine) == 1 else namer.numbered(kind, len(mine))
        found |= dict(zip(mine, names, strict=True))
    return found


def _shift_clocks(chosen: Chosen, group: int, port_names: Mapping[str, str]) -> tuple[str, ...]:
    """Return the ports that shift the chains of a group, in the order they pulse."""
    style, domain = chosen.groups[group]
    if style == "mux-d" and domain is not None:
        return (domain.port,)
    heads = chosen.cells.leaves[chosen.cells.group[chosen.cells.leaves] == group].tolist()
    behind = [leaf for head in heads for leaf in chosen.cells.followers.get(head, ())]
    used = {
        net
        for number in set(chosen.conversion[[*heads, *behind]].tolist())
        for net in chosen.conversions[number].test_nets()
    }
    ports = tuple(port_names[net] for net in in_port_order(used))
    return (*ports, *chosen.lssd.shift_b) if style == "lssd" else ports


def _chain(name: str, group: Group, clocks: tuple[str, ...]) -> ChainPlan:
    edges = {"mux-d": group.domain.edge if group.domain else None, "clocked-scan": "rise"}
    return ChainPlan(name, group.style, clocks, edges.get(group.style))


def _clocking(
    survey: Survey,
    chosen: Chosen,
    shifts: Sequence[tuple[str, ...]],
    port_names: Mapping[str, str],
) -> Clocking:
    """Return which clocks pulse when: all chains shift in the same cycles."""
    by_phase = [
        [ports[place] for ports in shifts if place < len(ports)]
        for place in range(max(map(len, shifts)))
    ]
    enable = port_names.get(TestNet.SCAN_ENABLE)
    opens_l2 = _opens_l2(chosen, port_names)
    phases = [tuple(dict.fromkeys(ports)) for ports in by_phase[: 1 if opens_l2 else None]]
    whole = port_names.get(EDGE_CLOCK_B)
    settle = tuple(port for port in opens_l2 if port != whole)
    return Clocking(
        held={item.port: item.value for item in (*survey.held, *survey.set_resets)},
        enable=() if enable is None else (enable,),
        shift=(*phases, opens_l2) if opens_l2 else tuple(phases),
        capture=tuple((clock,) for clock in _system_clocks(survey, chosen)),
        settle=(settle,) if settle else (),
    )


def _check_overlaps(
    survey: Survey,
    chosen: Chosen,
    port_names: Mapping[str, str],
    sequences: Mapping[str, tuple[Cycle, ...]],
) -> None:
    """Refuse sequences in which two LSSD clocks could be on together: A, B and C never may.

    The phases that are made never do; a port that is C for some latches and B for others does.
    """
    if not chosen.lssd.conversion:
        return
    rests = _system_clocks(survey, chosen) | chosen.lssd.shift_b
    a_ports = [port for net, port in port_names.items() if kind_of(net) == TestNet.CLOCK_A]
    b_ports = _opens_l2(chosen, port_names)
    c_ports = list(chosen.lssd.capture)
    pairs = [*product(a_ports, b_ports), *product(a_ports, c_ports), *product(b_ports, c_ports)]
    both = sorted({first for first, second in pairs if first == second})
    found = [f"`{port}` opens both latches of a position" for port in both]
    apart = [pair for pair in pairs if pair[0] != pair[1]]
    found += [
        f"`{at.first}` and `{at.second}` in {at.sequence}: {at.why}"
        for at in find_overlaps(sequences, apart, rests)
    ]
    if found:
        raise DesignError(
            [
                error(
                    "clocks-overlap",
                    f"clocks that must never be on together are: {found[0]}",
                    hint="give masters and slaves clock ports of their own",
                )
            ]
        )


def _opens_l2(chosen: Chosen, port_names: Mapping[str, str]) -> tuple[str, ...]:
    """Return the ports that open the second latches of LSSD positions, if there are any."""
    new = [port for net, port in port_names.items() if kind_of(net) == TestNet.CLOCK_B]
    return (*new, *chosen.lssd.shift_b)


def _system_clocks(survey: Survey, chosen: Chosen) -> dict[str, int]:
    """Return the clock ports that capture with their values at rest, in the order they pulse."""
    edges: dict[str, set[str]] = {}
    for at in chosen.groups:
        if at.domain is not None:
            edges.setdefault(at.domain.port, set()).add(at.domain.edge)
    # A clock whose cells all take data at its falling edge rests at 1, as such a cell wants it.
    ports = {port: int(found == {"fall"}) for port, found in edges.items()}
    ports |= chosen.lssd.capture
    domain = dict(zip(survey.storage.tolist(), survey.domain.tolist(), strict=True))
    for leaf in chosen.lssd.conversion:
        at = domain[leaf]
        if chosen.conversion[leaf] >= 0 and at >= 0:
            edge = survey.domains[at].edge
            if edge in ("rise", "fall"):
                ports.setdefault(survey.domains[at].port, 0)
    return ports


def _test_nets(
    design: Design,
    conversions: Sequence[Conversion],
    segments: dict[str, list[tuple[Element, ...]]],
) -> dict[str, set[str]]:
    """Return the test nets of each module, those of its inner modules included."""
    found: dict[str, set[str]] = {}

    def need(module: str) -> set[str]:
        if module not in found:
            nets: set[str] = set()
            for conversion in {at.number for at in flat(module) if at.kind == CELL}:
                nets |= set(conversions[conversion].test_nets())
            for inner in inner_modules(module):
                nets |= need(inner)
            found[module] = nets
        return found[module]

    def flat(module: str) -> Iterable[Element]:
        return (element for elements in segments[module] for element in elements)

    def inner_modules(module: str) -> list[str]:
        names = {at.instance for at in flat(module) if at.kind == SEGMENT}
        home = design.netlist.modules[module]
        cells = design.netlist.cell_names
        pairs = zip(home.instance_names, home.instance_cell.tolist(), strict=True)
        return [cells[cell] for name, cell in pairs if name in names]

    for module in segments:
        need(module)
    return found


def _connector(design: Design, wishes: Wishes) -> tuple[str, str, str] | None:
    if wishes.connect == "assign":
        return None
    buffer = next(iter(find_buffers(design.library)), None)
    return None if buffer is None else (buffer.cell, buffer.inputs[0], buffer.output)


def _is_connected(
    design: Design, module: Module, conversions: Sequence[Conversion], last: Element
) -> bool:
    """Return whether the output that leaves a segment drives a net already."""
    if last.kind == SEGMENT:
        return False
    conversion = conversions[last.number]
    tap = conversion.taps[0].pin
    old = {new: old for old, new in conversion.pins.items()}.get(tap, tap)
    instance = Instance(design.netlist, module, module.instance_names.index(last.instance))
    return instance.pins.get(old, OPEN) != OPEN


def _added_area(
    survey: Survey,
    chosen: Chosen,
    modules: Mapping[str, ModulePlan],
    connector: tuple[str, str, str] | None,
) -> tuple[float, list[str]]:
    """Return area added over all places of the design, and cells added that state none."""
    design = survey.design
    added, without = 0.0, []
    counts = np.bincount(
        chosen.conversion[chosen.conversion >= 0], minlength=len(chosen.conversions)
    )
    for conversion, count in zip(chosen.conversions, counts.tolist(), strict=True):
        if conversion.area is None:
            without += [conversion.after, *(part.cell for part in conversion.parts)]
        else:
            added += conversion.area * count
    if connector is not None:
        area = design.library.cells[connector[0]].area
        added += (area or 0.0) * sum(
            segment.connected
            for place in design.occurrences
            if place.module in modules
            for segment in modules[place.module].segments
        )
        without += [] if area is not None else [connector[0]]
    return added, without


#: Test nets that are ports of a fixed value in each mode: (role, mission, shift, capture).
_LEVELS: Final = {
    TestNet.SCAN_ENABLE: ("scan_enable", 0, 1, 0),
    TestNet.TEST_MODE: ("test_mode", 0, 1, 1),
}
#: Test nets that are clocks: role. All rest at 0, in mission mode too.
_CLOCKS: Final = {
    TestNet.SCAN_CLOCK: "scan_clock",
    TestNet.CLOCK_A: "clock_a",
    TestNet.CLOCK_B: "clock_b",
    TestNet.CLOCK_C: "clock_c",
}


def _ports(
    survey: Survey,
    wishes: Wishes,
    chosen: Chosen,
    top: ModulePlan,
    port_names: Mapping[str, str],
) -> tuple[TestPort, ...]:
    resets = {item.port: item.value for item in survey.set_resets}
    modes = {item.port: item.value for item in survey.held}
    clocks = _system_clocks(survey, chosen) | chosen.lssd.shift_b
    two_phase = wishes.flip_flops == "two-phase"
    return (
        *(TestPort(clock, "clock", off=off) for clock, off in clocks.items()),
        *(TestPort(at, "set_reset", shift=on, capture=on) for at, on in resets.items()),
        *(TestPort(at, "test_mode", shift=on, capture=on) for at, on in modes.items()),
        *(_test_net_port(net, port, two_phase) for net, port in port_names.items()),
        *(TestPort(segment.scan_in, "scan_in", added=True, mission=0) for segment in top.segments),
        *(TestPort(segment.scan_out, "scan_out", added=True) for segment in top.segments),
    )


def _test_net_port(net: str, port: str, two_phase: bool) -> TestPort:
    kind = kind_of(net)
    if kind in _CLOCKS:
        # In the two-phase form the user's own clocking drives B in mission mode.
        mission = None if two_phase and kind == TestNet.CLOCK_B else 0
        return TestPort(port, _CLOCKS[kind], added=True, mission=mission, off=0)
    role, mission, shift, capture = _LEVELS[kind]
    return TestPort(port, role, added=True, mission=mission, shift=shift, capture=capture)


def _left_alone(survey: Survey, chosen: Chosen) -> tuple[LeftAlone, ...]:
    design = survey.design
    return tuple(
        LeftAlone(design.name(leaf), design.cell_name(leaf), chosen.reasons[leaf])
        for leaf in survey.storage.tolist()
        if chosen.conversion[leaf] < 0
    )
