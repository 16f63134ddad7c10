"""Whether sets and resets can be held off while a chain shifts."""

from collections import defaultdict
from collections.abc import Iterable
from typing import Final

from insertdft.library.cell import Cell
from insertdft.library.expression import Const, Expression, Not, Var, as_literal, variables
from insertdft.netlist import Ids
from insertdft.simulate.paths import End, Walker
from insertdft.survey.clocks import what
from insertdft.survey.facts import HeldPort
from insertdft.survey.grouping import by_net
from insertdft.survey.verdict import Verdict

SLUG: Final = "reset-not-controllable"
HINT: Final = "hold the ports that keep it off with --hold PORT=VALUE, or drive it from a port"

#: One asynchronous control: (net, value that acts).
Control = tuple[int, int]


def find_set_resets(walker: Walker, storage: Ids, verdict: Verdict) -> tuple[HeldPort, ...]:
    """Return the ports that keep every set and reset off; report cells for which none does.

    Where two groups of cells want opposite values of one port, the larger one gets its way.
    """
    by_control: defaultdict[Control, list[int]] = defaultdict(list)
    always: list[int] = []
    mixed: list[int] = []
    design = walker.design
    kinds = design.cell[storage]
    for kind in dict.fromkeys(kinds.tolist()):
        cells = storage[kinds == kind]
        for condition in _conditions(design.cells[kind]):
            pin = _single_pin(condition)
            if pin is None:
                _sort_mixed(walker, cells.tolist(), condition, always, mixed)
                continue
            name, acts = pin
            nets = design.nets_at(name)[cells]
            mixed += cells[nets < 0].tolist()
            for net, those in by_net(cells, nets).items():
                if net not in walker.values:
                    by_control[net, acts] += those
                elif walker.values[net] == acts:
                    always += those
    _report_rest(always, mixed, verdict)
    return _hold(walker, by_control, verdict)


def _conditions(cell: Cell | None) -> Iterable[Expression]:
    """Return each condition that sets or resets a part of the cell, once."""
    groups = cell.storage if cell else ()
    found = [at for group in groups for at in (group.clear, group.preset) if at is not None]
    return dict.fromkeys(found)


def _single_pin(condition: Expression) -> tuple[str, int] | None:
    """Return pin and acting value of a condition that one pin decides."""
    literal = as_literal(condition, variables(condition))
    if isinstance(literal, Var):
        return literal.name, 1
    if isinstance(literal, Not) and isinstance(literal.part, Var):
        return literal.part.name, 0
    return None


def _sort_mixed(
    walker: Walker, cells: list[int], condition: Expression, always: list[int], mixed: list[int]
) -> None:
    """Sort cells whose set or reset is decided by several pins: only constants can settle it."""
    for cell in cells:
        literal = walker.literal(cell, condition)
        if not isinstance(literal, Const):
            mixed.append(cell)
        elif literal.value:
            always.append(cell)


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
