"""From a plan to splices, one patch a source."""

from collections import defaultdict

from insertdft.chains.assemble import fingerprint
from insertdft.chains.plan import Plan
from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.edit.module import module_splices
from insertdft.library.cell import Library
from insertdft.netlist import Netlist
from insertdft.styles.gates import to_verilog
from insertdft.text import Patch, Splice

__all__ = ["make_patches"]


def make_patches(netlist: Netlist, library: Library, plan: Plan) -> tuple[Patch, ...]:
    """Return the splices of every source of ``netlist``, in source order.

    Raises:
        DesignError: The plan was made for another netlist.
    """
    prints = [(source.name, fingerprint(source.text)) for source in netlist.sources]
    wanted = list(plan.netlist.values())
    changed = [name for (name, seen), asked in zip(prints, wanted, strict=False) if seen != asked]
    if changed or len(prints) != len(wanted):
        raise DesignError([_mismatch(changed or [name for name, _ in prints])])
    by_source: defaultdict[str, list[Splice]] = defaultdict(list)
    for name in plan.modules:
        module = netlist.modules[name]
        by_source[module.source.name] += module_splices(netlist, library, plan, module)
    composed = {at.module.name: at.module for at in plan.conversions if at.module is not None}
    if composed:
        home = netlist.modules[plan.design].source
        text = "".join(f"\n{to_verilog(composed[name])}" for name in sorted(composed))
        end = len(home.text)
        by_source[home.name].append(Splice(end, end, text, "composed scan cells"))
    return tuple(Patch(source, tuple(by_source[source.name])) for source in netlist.sources)


def _mismatch(names: list[str]) -> Diagnostic:
    return error(
        "plan-mismatch",
        f"the plan was made for another text of {', '.join(f'`{name}`' for name in names)}",
        hint="make a new plan from this netlist",
    )
