"""Find the scan chains of a netlist that comes without a chain description.

A scan cell is known by its role in the library; its enable pin leads back to the scan-enable
ports. Where cells are composed of a mux and a flip-flop, the user names the port to hold, and a
flip-flop counts as a scan cell if its data comes through a gate that only passes it on.
"""

from collections import defaultdict
from collections.abc import Mapping
from dataclasses import replace

from insertdft.description import Chain, Description, TestPort
from insertdft.design.flat import OUTPUT, Design
from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.library.cell import ScanRole, Style
from insertdft.netlist import OPEN
from insertdft.proof.steps import Step, step_into
from insertdft.proof.trace import Walk, as_chain, walk_chain
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import End, Source, Walker


def discover(design: Design, held: Mapping[str, int] | None = None) -> Description:
    """Return a description of the chains found in ``design``.

    Args:
        design: A scan netlist.
        held: Values of ports in shift mode, beside the scan enables found.

    Raises:
        DesignError: No chain is found, or a held port does not exist.
    """
    asked = dict(held or {})
    missing = [port for port in asked if port not in design.port_nets]
    if missing:
        raise DesignError([error("port-unknown", f"no port is called `{missing[0]}`")])
    enables = _scan_enables(design, asked)
    shift = {**enables, **asked}
    walker = Walker(
        design, propagate(design, {design.port_nets[port]: on for port, on in shift.items()})
    )
    steps = _scan_steps(walker, composed_too=bool(asked))
    chains = _chains(walker, steps)
    if not chains:
        raise DesignError([_nothing(design, enables)])
    clocks = dict.fromkeys(chain.clocks[0] for chain in chains if chain.clocks)
    ports = (
        *(TestPort(port, "clock", off=0) for port in clocks),
        *(
            TestPort(port, "scan_enable", mission=1 - on, shift=on, capture=1 - on)
            for port, on in enables.items()
        ),
        *(TestPort(port, "test_mode", shift=on, capture=on) for port, on in asked.items()),
        *(TestPort(chain.scan_in, "scan_in") for chain in chains),
        *(TestPort(chain.scan_out, "scan_out") for chain in chains),
    )
    enable = next(iter(enables), None)
    return Description(
        design.netlist.top, tuple(replace(chain, scan_enable=enable) for chain in chains), ports
    )


def _scan_enables(design: Design, held: Mapping[str, int]) -> dict[str, int]:
    """Return the ports that put scan cells into shift mode, and the value that does."""
    walker = Walker(
        design, propagate(design, {design.port_nets[port]: on for port, on in held.items()})
    )
    votes: defaultdict[str, list[int]] = defaultdict(list)
    for instance, role in _role_cells(design):
        net = design.pins(instance).get(role.scan_enable or "", OPEN)
        source = walker.source(net) if net >= 0 else None
        if source is not None and source.end is End.PORT:
            wanted = role.shift_value ^ int(source.inverted)
            votes[design.input_ports[source.net]].append(wanted)
    return {port: int(2 * sum(on) > len(on)) for port, on in sorted(votes.items())}


def _role_cells(design: Design) -> list[tuple[int, ScanRole]]:
    found: list[tuple[int, ScanRole]] = []
    for number, cell in enumerate(design.cells):
        roles = [role for role in cell.scan if role.style is Style.MUX_D] if cell else []
        if roles:
            instances = (design.cell == number).nonzero()[0].tolist()
            found += [(instance, roles[0]) for instance in instances]
    return sorted(found, key=lambda item: item[0])


def _scan_steps(walker: Walker, composed_too: bool) -> dict[int, Step]:
    """Return how each scan cell takes shift data, by instance."""
    found: dict[int, Step] = {}
    design = walker.design
    roles = dict(_role_cells(design))
    for instance in range(len(design.cell)):
        cell = design.cell_of(instance)
        if cell is None or not cell.is_storage:
            continue
        step = _any_step(walker, instance)
        if step is None or step.is_latch:
            continue
        through_gate = bool(walker.source(step.net).passed)
        if instance in roles or (composed_too and through_gate):
            found[instance] = step
    return found


def _any_step(walker: Walker, instance: int) -> Step | None:
    """Return the step through a cell by its first output that shows the state."""
    design = walker.design
    start, end = int(design.pin_start[instance]), int(design.pin_start[instance + 1])
    for row in range(start, end):
        if design.pin_direction[row] == OUTPUT and design.pin_net[row] >= 0:
            pin = design.pin_names[int(design.pin_name[row])]
            source = Source(End.STORAGE, int(design.pin_net[row]), False, instance, pin)
            step = step_into(walker, source)
            if step is not None:
                return step
    return None


def _chains(walker: Walker, steps: Mapping[int, Step]) -> list[Chain]:
    """Return one chain for each scan cell that no other takes its shift data from."""
    feeds: set[int] = set()
    for step in steps.values():
        feeds |= _fed_by(walker, step)
    ends: defaultdict[int, list[str]] = defaultdict(list)
    for port in walker.design.ports:
        if port.direction != "input":
            source = walker.source(port.net)
            if source.end is End.STORAGE and source.instance in steps:
                ends[source.instance].append(port.name)
    chains: list[Chain] = []
    for instance in steps:
        if instance in feeds or not ends[instance]:
            continue
        # By common practice test ports come last, and a scan-out may stand beside a mission port.
        scan_out = ends[instance][-1]
        walk = walk_chain(walker, scan_out)
        if walk.end.end is End.PORT:
            chains.append(_describe(walker, f"chain_{len(chains) + 1}", scan_out, walk))
    return chains


def _fed_by(walker: Walker, step: Step) -> set[int]:
    """Return the storage cell that feeds a step, and the one before it if that is a lock-up."""
    found: set[int] = set()
    source = walker.source(step.net)
    while source.end is End.STORAGE and source.instance not in found:
        found.add(source.instance)
        before = step_into(walker, source)
        if before is None or not before.is_latch:
            break
        source = walker.source(before.net)
    return found


def _describe(walker: Walker, name: str, scan_out: str, walk: Walk) -> Chain:
    clock = _clock(walker, walk.steps[0].instance) if walk.steps else None
    empty = Chain(
        name=name,
        style=Style.MUX_D.value,
        scan_in="",
        scan_out=scan_out,
        cells=(),
        clocks=() if clock is None else (clock[0],),
        edge=None if clock is None else clock[1],
    )
    return as_chain(walker, empty, walk)


def _clock(walker: Walker, instance: int) -> tuple[str, str] | None:
    """Return the port and edge that clock a flip-flop."""
    cell = walker.design.cell_of(instance)
    clock = cell.storage[0].clock if cell and cell.storage else None
    found = clock and walker.net_and_parity(instance, clock)
    if not found:
        return None
    source = walker.source(found[0])
    if source.end is not End.PORT:
        return None
    falls = source.inverted ^ found[1]
    return walker.design.input_ports[source.net], "fall" if falls else "rise"


def _nothing(design: Design, enables: Mapping[str, int]) -> Diagnostic:
    return error(
        "chains-not-found",
        f"no scan chain is found in `{design.netlist.top}`"
        + (f" with {', '.join(f'{port}={on}' for port, on in enables.items())}" if enables else ""),
        hint="name the ports that put it into shift mode with --hold PORT=VALUE, and give a library"
        " that describes its scan cells",
    )
