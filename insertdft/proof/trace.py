"""Walk every chain of a netlist from its scan-out to its scan-in, and compare.

Only the written netlist, the library and the chain description are looked at. The walk goes
through whatever passes the data on in shift mode: buffers, inverters, composed muxes, lock-ups.
"""

from collections.abc import Sequence
from dataclasses import dataclass, replace
from itertools import zip_longest
from typing import NamedTuple

from insertdft.description import Chain, ChainCell, Description, LockUp
from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, Diagnostic, Severity, error, nearest
from insertdft.proof.steps import Step, step_into
from insertdft.simulate.constants import propagate
from insertdft.simulate.paths import End, Source, Walker


@dataclass(frozen=True, slots=True)
class Trace:
    """What walking the chains showed.

    Attributes:
        chains: Every chain as it is in the netlist, as far as it could be walked.
        problems: One a chain that is broken or differs; empty if all is as described.
    """

    chains: tuple[Chain, ...]
    problems: tuple[Diagnostic, ...]


def trace(design: Design, description: Description) -> Trace:
    """Walk the chains of ``description`` in ``design``.

    Raises:
        DesignError: The description names ports that the design does not have.
    """
    _check_ports(design, description)
    held = {
        design.port_nets[port.port]: port.shift
        for port in description.ports
        if port.shift is not None
    }
    lenses: dict[tuple[str, ...], _Lens] = {}
    found: list[Chain] = []
    problems: list[Diagnostic] = []
    for chain in description.chains:
        clocks = chain.clocks if chain.style == "lssd" else ()
        if clocks not in lenses:
            lenses[clocks] = _lens(design, description, held, clocks)
        walker = lenses[clocks].walker
        walked = walk_chain(walker, chain.scan_out)
        found.append(as_chain(walker, chain, walked, lenses[clocks].first))
        problem = _compare(walker, chain, found[-1], walked)
        problems += [problem] if problem else []
    return Trace(tuple(found), (*problems, *_shared(found)))


class _Lens(NamedTuple):
    """What a chain is looked at through.

    Attributes:
        walker: Walks under the constants of shift mode; for LSSD with A on and all others at rest.
        first: Nets that follow A, the clock of the first latch of each position.
    """

    walker: Walker
    first: frozenset[int]


def _lens(
    design: Design, description: Description, held: dict[int, int], clocks: tuple[str, ...]
) -> _Lens:
    if not clocks:
        return _Lens(Walker(design, propagate(design, held)), frozenset())
    rests = {port.port: port.off for port in description.ports if port.off is not None}
    at_rest = held | {design.port_nets[port]: off for port, off in rests.items()}
    a_net = design.port_nets[clocks[0]]
    on = propagate(design, at_rest | {a_net: 1 - rests.get(clocks[0], 0)})
    off = propagate(design, at_rest)
    first = frozenset(net for net, value in on.items() if off.get(net) != value)
    return _Lens(Walker(design, on), first)


@dataclass(frozen=True, slots=True)
class Walk:
    """One walk from a scan-out port.

    Attributes:
        steps: Storage cells met, nearest to scan-out first.
        inversions: Shape (steps + 1,): inversion on the way to each step's output, last the way
            from the first cell back to where the walk ended.
        end: What it ended at.
        stuck_in: Cell that the walk could not be continued through, -1 if none.
    """

    steps: tuple[Step, ...]
    inversions: tuple[bool, ...]
    end: Source
    stuck_in: int = -1


def walk_chain(walker: Walker, scan_out: str) -> Walk:
    """Return the walk from the port ``scan_out`` back to where no storage cell is met any more."""
    net = walker.design.port_nets[scan_out]
    steps: list[Step] = []
    inversions: list[bool] = []
    seen: set[int] = set()
    while True:
        source = walker.source(net)
        inversions.append(source.inverted)
        if source.end is not End.STORAGE or source.instance in seen:
            return Walk(tuple(steps), tuple(inversions), source)
        seen.add(source.instance)
        step = step_into(walker, source)
        if step is None:
            return Walk(tuple(steps), tuple(inversions), source, source.instance)
        steps.append(step)
        net = step.net


def as_chain(
    walker: Walker, described: Chain, walk: Walk, first: frozenset[int] = frozenset()
) -> Chain:
    """Return a walk in the terms of a chain description, scan-in first.

    Args:
        walker: That made the walk.
        described: Name, ports and clocks of the chain.
        walk: Its steps.
        first: LSSD: nets that follow A, by which first latches are told from second ones.
    """
    design = walker.design
    cells: list[ChainCell] = []
    lock_ups: list[LockUp] = []
    turned = False  # parity from the last position's state to here
    forward = list(zip(reversed(walk.steps), list(reversed(walk.inversions))[:-1], strict=True))
    for step, wire in forward:
        turned ^= wire ^ step.entry_inverted
        is_lssd = described.style == "lssd"
        if is_lssd and cells and first.isdisjoint(step.opened_by):
            name = design.name(step.instance)
            cells[-1] = replace(cells[-1], slave=name, scan_out=step.output)
        elif step.is_latch and not is_lssd:
            name, cell = design.name(step.instance), design.cell_name(step.instance)
            lock_ups.append(LockUp(len(cells) - 1, name, cell, _clock_port(walker, step)))
        else:
            cells.append(_position(design, step, turned))
            turned = False
        turned ^= step.output_inverted
    ended_at = design.input_ports.get(walk.end.net, "") if walk.end.end is End.PORT else ""
    return Chain(
        name=described.name,
        style=described.style,
        scan_in=ended_at,
        scan_out=described.scan_out,
        cells=tuple(cells),
        clocks=described.clocks,
        edge=described.edge,
        scan_enable=described.scan_enable,
        inverted_out=turned ^ walk.inversions[0],
        lock_ups=tuple(lock_ups),
    )


def _position(design: Design, step: Step, inverted: bool) -> ChainCell:
    return ChainCell(
        instance=design.name(step.instance),
        cell=design.cell_name(step.instance),
        scan_in=step.entry,
        scan_out=step.output,
        inverted=inverted,
        bits=step.bits,
    )


def _clock_port(walker: Walker, step: Step) -> str:
    cell = walker.design.cell_of(step.instance)
    clock = cell.storage[0].clock if cell else None
    if clock is None or cell is None:
        return ""
    pins = walker.design.pins(step.instance)
    for pin in cell.inputs():
        source = walker.source(pins.get(pin.name, -1)) if pins.get(pin.name, -1) >= 0 else None
        if pin.is_clock and source is not None and source.end is End.PORT:
            return walker.design.input_ports[source.net]
    return ""


def _compare(walker: Walker, wanted: Chain, found: Chain, walk: Walk) -> Diagnostic | None:
    """Return the first thing by which the walked chain is not the described one."""
    if found.scan_in != wanted.scan_in:
        return _broken(walker, wanted, found, walk)
    if len(found.cells) != len(wanted.cells):
        return _differs(wanted, f"has {len(found.cells)} cells, described with {len(wanted.cells)}")
    return _first_difference(wanted, found)


def _first_difference(wanted: Chain, found: Chain) -> Diagnostic | None:
    pairs = zip_longest(wanted.cells, found.cells)
    for place, (described, seen) in enumerate(pairs, start=1):
        if described is None or seen is None or described.instance != seen.instance:
            names = [cell.instance if cell else "nothing" for cell in (seen, described)]
            return _differs(wanted, f"has `{names[0]}` at position {place}, not `{names[1]}`")
        if described.inverted != seen.inverted:
            words = "inverted" if seen.inverted else "not inverted"
            return _differs(wanted, f"is {words} before `{seen.instance}`, described the other way")
        if described.slave != seen.slave:
            return _differs(
                wanted,
                f"has {_name(seen.slave)} as L2 of `{seen.instance}`, described with"
                f" {_name(described.slave)}",
            )
        if (described.scan_in, described.scan_out) != (seen.scan_in, seen.scan_out):
            return _differs(
                wanted,
                f"passes `{seen.instance}` from {seen.scan_in} to {seen.scan_out}, described from"
                f" {described.scan_in} to {described.scan_out}",
            )
    if wanted.inverted_out != found.inverted_out:
        words = "inverted" if found.inverted_out else "not inverted"
        return _differs(wanted, f"is {words} at its scan-out, described the other way")
    names = [tuple(at.instance for at in chain.lock_ups) for chain in (wanted, found)]
    if names[0] != names[1]:
        return _differs(wanted, f"has lock-ups {names[1]}, described with {names[0]}")
    return None


def _name(instance: str | None) -> str:
    return "nothing" if instance is None else f"`{instance}`"


def _differs(chain: Chain, words: str) -> Diagnostic:
    return error(
        "chain-differs",
        f"chain `{chain.name}` {words}",
        hint="the netlist was changed after the description was written, or one of them is wrong",
    )


def _broken(walker: Walker, wanted: Chain, found: Chain, walk: Walk) -> Diagnostic:
    design = walker.design
    if found.scan_in:
        place = f"ends at port `{found.scan_in}` instead of `{wanted.scan_in}`"
    elif walk.stuck_in >= 0:
        name, cell = design.name(walk.stuck_in), design.cell_name(walk.stuck_in)
        place = f"cannot be walked through `{name}` ({cell}): in shift mode several pins decide it"
    elif walk.end.instance >= 0:
        name, cell = design.name(walk.end.instance), design.cell_name(walk.end.instance)
        place = f"ends at {walk.end.end.value}, `{name}` ({cell})"
    else:
        place = f"ends at {walk.end.end.value} (net `{design.net_name(walk.end.net)}`)"
    at = walk.end.instance
    return Diagnostic(
        "chain-broken",
        Severity.ERROR,
        f"chain `{wanted.name}` {place}, {len(found.cells)} cells from its scan-out"
        f" `{wanted.scan_out}`",
        design.span(at) if at >= 0 else None,
        hint="check the scan connections there, and that the ports held in shift mode are right",
    )


def _shared(chains: Sequence[Chain]) -> list[Diagnostic]:
    """Return an error for each cell that two chains pass."""
    home: dict[str, str] = {}
    found: list[Diagnostic] = []
    for chain in chains:
        for cell in chain.cells:
            other = home.setdefault(cell.instance, chain.name)
            if other != chain.name:
                found.append(_differs(chain, f"passes `{cell.instance}`, as `{other}` does"))
                break
    return found


def _check_ports(design: Design, description: Description) -> None:
    named = [port.port for port in description.ports]
    named += [port for chain in description.chains for port in (chain.scan_in, chain.scan_out)]
    missing = [port for port in dict.fromkeys(named) if port not in design.port_nets]
    if missing:
        raise DesignError([_no_port(design, port) for port in missing])


def _no_port(design: Design, port: str) -> Diagnostic:
    return error(
        "port-unknown",
        f"the chain description names port `{port}`, which `{design.netlist.top}` does not have",
        hint=nearest(port, design.port_nets) or "the description belongs to another netlist",
    )
