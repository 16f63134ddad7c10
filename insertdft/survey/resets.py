"""Whether sets and resets can be held off while a chain shifts."""

from collections import defaultdict
from collections.abc import Iterator
from typing import Final

from insertdft.library.expression import Const, Expression, Not, Var, variables
from insertdft.netlist import Ids
from insertdft.simulate.paths import End, Walker
from insertdft.survey.clocks import what
from insertdft.survey.facts import HeldPort
from insertdft.survey.verdict import Verdict

SLUG: Final = "reset-not-controllable"
HINT: Final = "hold the ports that keep it off with --hold PORT=VALUE, or drive it from a port"

#: One asynchronous control of one cell: (net, value that acts), or the value of a constant.
Control = tuple[int, int]


def find_set_resets(walker: Walker, storage: Ids, verdict: Verdict) -> tuple[HeldPort, ...]:
    """Return the ports that keep every set and reset off; report cells for which none does.

    Where two groups of cells want opposite values of one port, the larger one gets its way.
    """
    by_control: defaultdict[Control, list[int]] = defaultdict(list)
    always: list[int] = []
    mixed: list[int] = []
    for cell in storage.tolist():
        for control in _controls(walker, cell):
            if control is None:
                mixed.append(cell)
            elif isinstance(control, bool):
                always += [cell] if control else []
            else:
                by_control[control].append(cell)
    _report_rest(always, mixed, verdict)
    return _hold(walker, by_control, verdict)


def _controls(walker: Walker, cell: int) -> Iterator[Control | bool | None]:
    described = walker.design.cell_of(cell)
    for storage in described.storage if described else ():
        for condition in (storage.clear, storage.preset):
            if condition is not None:
                yield _control(walker, cell, condition)


def _control(walker: Walker, cell: int, condition: Expression) -> Control | bool | None:
    """Return net and acting value, a bool where constant, None where several signals decide."""
    literal = condition if len(variables(condition)) == 1 else walker.literal(cell, condition)
    inner = literal.part if isinstance(literal, Not) else literal
    if isinstance(inner, Const):
        return inner.value
    if not isinstance(inner, Var):
        return None
    acts = 0 if isinstance(literal, Not) else 1
    net = walker.design.pins(cell).get(inner.name, -1)
    if net in walker.values:
        return walker.values[net] == acts
    return (net, acts) if net >= 0 else None


def _report_rest(always: list[int], mixed: list[int], verdict: Verdict) -> None:
    verdict.leave_out(
        SLUG, always, "a set or reset is active all the time", "tie it to its inactive value"
    )
    verdict.leave_out(
        SLUG, mixed, "a set or reset is unconnected or decided by several pins of the cell", HINT
    )


def _hold(
    walker: Walker, by_control: dict[Control, list[int]], verdict: Verdict
) -> tuple[HeldPort, ...]:
    wishes: defaultdict[tuple[str, int], list[int]] = defaultdict(list)
    for (net, acts), cells in by_control.items():
        source = walker.source(net)
        if source.end is End.PORT:
            off = 1 - acts if not source.inverted else acts
            wishes[walker.design.input_ports[source.net], off] += cells
        else:
            verdict.leave_out(
                SLUG,
                cells,
                f"set or reset net `{walker.design.net_name(net)}` does not come from an input"
                f" port: it is decided by {what(walker.design, source)}",
                HINT,
            )
    held: dict[str, int] = {}
    for (port, value), cells in sorted(wishes.items(), key=lambda item: -len(item[1])):
        if held.setdefault(port, value) != value:
            verdict.leave_out(
                SLUG,
                cells,
                f"port `{port}` at {held[port]} keeps the sets and resets of other cells off"
                " but makes these active",
                "give the two groups ports of their own",
            )
    return tuple(HeldPort(port, held[port]) for port in sorted(held))
