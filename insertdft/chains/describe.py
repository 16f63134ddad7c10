"""From a plan to the chain description that pattern tools and the proof are told."""

from collections.abc import Iterator, Mapping
from dataclasses import replace
from typing import NamedTuple

from insertdft.chains.plan import SEGMENT, ModulePlan, Plan
from insertdft.description import Chain, ChainCell, Description
from insertdft.netlist import Netlist
from insertdft.netlist.names import join_path
from insertdft.styles import Conversion, TestNet


class _Placed(NamedTuple):
    path: tuple[str, ...]
    conversion: Conversion


def describe(plan: Plan, netlist: Netlist) -> Description:
    """Return the description of the netlist that ``plan`` makes of ``netlist``."""
    cell_of = _child_modules(plan, netlist)
    top = plan.modules[plan.design]
    enable = plan.port_names.get(TestNet.SCAN_ENABLE)
    chains = []
    for number, (chain, segment) in enumerate(zip(plan.chains, top.segments, strict=True)):
        cells, inverted_out = _cells(_walk(plan, cell_of, plan.design, number, ()))
        chains.append(
            Chain(
                name=chain.name,
                style=chain.style,
                scan_in=segment.scan_in,
                scan_out=segment.scan_out,
                cells=cells,
                clocks=chain.clocks,
                edge=chain.edge,
                scan_enable=enable if chain.style == "mux-d" else None,
                inverted_out=inverted_out,
            )
        )
    return Description(plan.design, tuple(chains), plan.ports, plan.sequences)


def _child_modules(plan: Plan, netlist: Netlist) -> Mapping[str, Mapping[str, str]]:
    """Return, for each module of the plan, the module of each instance that holds segments."""
    found: dict[str, dict[str, str]] = {}
    for name, module_plan in plan.modules.items():
        module = netlist.modules[name]
        wanted = _inner_instances(module_plan)
        pairs = zip(module.instance_names, module.instance_cell.tolist(), strict=True)
        found[name] = {at: netlist.cell_names[cell] for at, cell in pairs if at in wanted}
    return found


def _inner_instances(module_plan: ModulePlan) -> set[str]:
    return {
        element.instance
        for segment in module_plan.segments
        for element in segment.elements
        if element.kind == SEGMENT
    }


def _walk(
    plan: Plan,
    cell_of: Mapping[str, Mapping[str, str]],
    module: str,
    segment: int,
    path: tuple[str, ...],
) -> Iterator[_Placed]:
    for element in plan.modules[module].segments[segment].elements:
        here = (*path, element.instance)
        if element.kind == SEGMENT:
            inner = cell_of[module][element.instance]
            yield from _walk(plan, cell_of, inner, element.number, here)
        else:
            yield _Placed(here, plan.conversions[element.number])


def _cells(placed: Iterator[_Placed]) -> tuple[tuple[ChainCell, ...], bool]:
    """Return the positions, and whether the last output shows the inverse of its state."""
    cells: list[ChainCell] = []
    turned = False
    for path, conversion in placed:
        tap = conversion.taps[0]
        turned ^= conversion.scan_in_inverted
        if conversion.bits == 0:
            # The second latch of a position: the position leaves by its output.
            slave = join_path(path)
            cells[-1] = replace(cells[-1], slave=slave, scan_out=tap.pin)
            turned ^= tap.inverted
            continue
        cells.append(
            ChainCell(
                instance=join_path(path),
                cell=conversion.after,
                scan_in=conversion.scan_in,
                scan_out=tap.pin,
                inverted=turned,
                bits=conversion.bits,
            )
        )
        turned = tap.inverted
    return tuple(cells), turned
