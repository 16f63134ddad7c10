"""Rule 3, how clocks open latches, and what rule 6 says of shift clocks; see ``lssd_rules``."""

from collections.abc import Mapping, Sequence

from insertdft.netlist import FIRST_NET
from insertdft.survey.cone import gates_between, walk
from insertdft.survey.lssd_model import Clocked, Group
from insertdft.survey.lssd_words import Witness, cells_named, route, spans_on


def clock_control(rules: Clocked) -> list[Witness]:
    """Return the breaks of rule 3."""
    found: list[Witness] = []
    for group in rules.groups:
        when = group.opening
        both = when.anded()
        if when.at_rest:
            found.append(_not_off(rules, group))
        elif when.never_opens():
            found.append(_never_on(rules, group, both))
        if both is not None:
            found.append(_anded(rules, group, both))
    return found


def _control(rules: Clocked, group: Group, slug: str, leaf: int, words: str, hint: str) -> Witness:
    """Return a break of rule 3, with the path from ``leaf`` to the enable."""
    design = rules.design
    gates = _path(rules, group.nets, leaf)
    names = cells_named(design, group.latches())
    many = f" and {len(names) - 1} more latches" if len(names) > 1 else ""
    return Witness(
        slug,
        f"latch `{names[0]}`{many} {words}{route(design, gates)}",
        hint,
        design.span(group.first()),
        names,
        spans_on(design, gates),
    )


def _not_off(rules: Clocked, group: Group) -> Witness:
    when = group.opening
    leaf = next(iter((*when.clocks, *when.gating)), -1)
    ports = [f"`{rules.port(net)}`" for net in when.clocks]
    words = "is open while every clock port rests"
    if not ports:
        words = "is opened by no clock port and can be open while every clock port rests"
    elif when.at_rest != when.ones:
        words = f"can be open while {' and '.join(ports)} rests"
    return _control(
        rules,
        group,
        "lssd-clock-not-off",
        leaf,
        words,
        "let its clock port alone hold it closed, or correct the value at rest of that port",
    )


def _never_on(rules: Clocked, group: Group, both: tuple[int, int] | None) -> Witness:
    when = group.opening
    words = "cannot be opened by any clock port"
    if both is not None:
        names = " and ".join(f"`{rules.port(net)}`" for net in both)
        words = f"opens only while {names} are on together"
    return _control(
        rules,
        group,
        "lssd-clock-cannot-turn-on",
        next(iter((*when.clocks, *when.gating)), -1),
        words,
        "give it a clock port that opens it, with gating values that latches or ports can hold",
    )


def _anded(rules: Clocked, group: Group, both: tuple[int, int]) -> Witness:
    names = [rules.port(net) for net in both]
    return _control(
        rules,
        group,
        "lssd-clocks-anded",
        both[1],
        f"is clocked by `{names[0]}` gated by another clock, `{names[1]}`",
        "gate a clock with latches or ports only, or let the two clocks open it in turn (OR)",
    )


def blocked_shift_clocks(
    rules: Clocked, group: Group, ports: Sequence[str], wanted: Sequence[set[int]]
) -> list[Witness]:
    """Return the shift clocks that do not open latches of ``group`` by themselves (rule 6).

    Args:
        rules: The design in its scan state.
        group: Latches to ask.
        ports: Ports of A and B.
        wanted: Flat ids of all L1 and of all L2.
    """
    nets = {rules.port(net): net for net in rules.clocks}
    mine = set(group.latches())
    found: list[Witness] = []
    for port, those in zip(ports, wanted, strict=True):
        behind = sorted(mine & those)
        net = nets.get(port, -1)
        # In a cell that holds L1 and L2, each is asked only for the clock that it has.
        both = set(behind) <= wanted[0] & wanted[1] and net not in group.opening.clocks
        if behind and not both and not _is_direct(group, net):
            found.append(_blocked(rules, group, port, net, behind))
    return found


def _is_direct(group: Group, net: int) -> bool:
    when = group.opening
    return net in when.clocks and when.word(net) == when.ones and not when.at_rest


def _blocked(rules: Clocked, group: Group, port: str, net: int, behind: Sequence[int]) -> Witness:
    design, when = rules.design, group.opening
    words = "logic on the way decides too"
    if net not in when.clocks:
        words = "its clock pin does not depend on that port"
    gates = _path(rules, group.nets, next(iter(when.gating), net))
    many = f" and {len(behind) - 1} more" if len(behind) > 1 else ""
    return Witness(
        "lssd-shift-clock-blocked",
        f"shift clock `{port}` does not turn latch `{design.name(behind[0])}`{many} on and off by"
        f" itself: {words}{route(design, gates)}",
        "hold the ports that keep the gating open in the scan state, or bring the shift clock in"
        " behind the gating",
        design.span(behind[0]),
        cells_named(design, behind),
        spans_on(design, gates),
    )


def _path(rules: Clocked, pins: Mapping[str, int], leaf: int) -> list[int]:
    """Return the gates from a net to the first enable pin that it reaches."""
    if leaf < FIRST_NET:
        return []
    reach = walk(rules.graph, [leaf])
    ends = (net for net in pins.values() if net >= 0 and reach.reached[net])
    return next((gates_between(rules.design, reach.path(net)) for net in ends), [])
