"""The product in one screen: what the command line does, for Python.

>>> design, notes = read_design(["top.v"], ["cells.lib"])           # doctest: +SKIP
>>> facts = survey(design)                                          # doctest: +SKIP
>>> plan, left = make_plan(facts, Wishes(style="mux-d", chains=8))  # doctest: +SKIP
>>> written = apply_plan(design, plan)                              # doctest: +SKIP
>>> trace(read_again(written, design), describe(plan, design.netlist)).problems  # doctest: +SKIP
()
"""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path

from insertdft.chains.describe import describe
from insertdft.chains.make import make_plan
from insertdft.chains.plan import Plan
from insertdft.chains.plan_json import plan_from_json, plan_to_json
from insertdft.chains.wishes import Wishes
from insertdft.description import Description
from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.diagnostics import Diagnostic
from insertdft.edit import make_patches
from insertdft.library import read_library
from insertdft.proof.discover import discover
from insertdft.proof.trace import Trace, trace
from insertdft.source import read_netlist, read_sources
from insertdft.survey import Survey, survey
from insertdft.text import Patch, SourceText, apply_splices

__all__ = [
    "Conversion",
    "Description",
    "Design",
    "Plan",
    "Survey",
    "Trace",
    "Wishes",
    "apply_plan",
    "convert",
    "describe",
    "discover",
    "make_plan",
    "plan_from_json",
    "plan_to_json",
    "read_again",
    "read_design",
    "survey",
    "trace",
]


def read_design(
    netlists: Sequence[str | Path],
    libraries: Sequence[str | Path],
    top: str | None = None,
    *,
    defines: Mapping[str, str] | None = None,
    twins: Mapping[str, str] | None = None,
) -> tuple[Design, tuple[Diagnostic, ...]]:
    """Read netlist and library files and link them; return the design and what is worth a warning.

    Args:
        netlists: Structural Verilog files, plain or gzip.
        libraries: Liberty files, or Verilog files with cell models.
        top: Name of the top module; found by itself if only one module is never instanced.
        defines: Macros for the netlist text.
        twins: Plain cell -> scan cell, chosen by hand.

    Raises:
        DesignError: Anything that the files get wrong, with its place.
    """
    library = read_library(read_sources(libraries), twins or {})
    netlist = read_netlist(read_sources(netlists), top, defines or {})
    design, warnings = link(netlist, library)
    return design, (*library.diagnostics, *netlist.diagnostics, *warnings)


def apply_plan(design: Design, plan: Plan) -> tuple[Patch, ...]:
    """Return the splices that carry out ``plan``, one patch a source; nothing is changed.

    Raises:
        DesignError: The plan was made for another netlist.
    """
    return make_patches(design.netlist, design.library, plan)


def read_again(patches: Sequence[Patch], design: Design) -> Design:
    """Return the design that the patched text describes, read afresh.

    Raises:
        DesignError: The text is wrong, which is a defect of ours.
    """
    written = tuple(
        SourceText(f"{patch.source.name} (converted)", apply_splices(patch.source, patch.splices))
        for patch in patches
    )
    netlist = read_netlist(written, design.netlist.top)
    return link(netlist, design.library)[0]


@dataclass(frozen=True, slots=True, eq=False)
class Conversion:
    """A whole conversion, not yet written anywhere.

    Attributes:
        survey: Facts about the input.
        plan: What was decided.
        patches: The splices, one patch a source.
        description: The chains as they are described.
        traced: The chains as they are in the new text.
        findings: Everything worth a warning, survey first.
    """

    survey: Survey
    plan: Plan
    patches: tuple[Patch, ...]
    description: Description
    traced: Trace
    findings: tuple[Diagnostic, ...]


def convert(
    design: Design,
    wishes: Wishes,
    held: Mapping[str, int] | None = None,
    *,
    plan: Plan | None = None,
    say: Callable[[str], None] = lambda _: None,
) -> Conversion:
    """Survey, plan, apply and trace; nothing is written.

    Args:
        design: What to convert.
        wishes: How.
        held: Values of ports that the tester will hold in test.
        plan: A plan to carry out instead of making one.
        say: Told what is being done, for long work.

    Raises:
        DesignError: See ``survey``, ``make_plan`` and ``apply_plan``.
    """
    say("surveying")
    facts = survey(design, held, wishes.exclude)
    say("planning chains")
    left: tuple[Diagnostic, ...] = ()
    if plan is None:
        plan, left = make_plan(facts, wishes)
    say("editing")
    patches = apply_plan(design, plan)
    description = describe(plan, design.netlist)
    say("tracing the chains in the new text")
    design.drop_indices()
    traced = trace(read_again(patches, design), description)
    out = {at.instance for at in plan.left_alone}
    # A finding about cells that were converted all the same (a gated system clock is no matter to
    # an LSSD chain) is none of this conversion.
    findings = [at for at in facts.findings if not at.names or out.intersection(at.names)]
    return Conversion(facts, plan, patches, description, traced, (*findings, *left))
