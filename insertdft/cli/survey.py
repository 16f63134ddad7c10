"""``insertdft survey``: the facts about a netlist; nothing is changed."""

import json
from pathlib import Path

import click

from insertdft import api
from insertdft.cli.options import design_options, hold_option, json_option, macros
from insertdft.cli.progress import Progress
from insertdft.cli.screens import survey_data, survey_screen
from insertdft.cli.show import show


@click.command("survey")
@design_options
@hold_option
@json_option
def command(
    netlist: tuple[Path, ...],
    lib: tuple[Path, ...],
    top: str | None,
    define: tuple[str, ...],
    hold: dict[str, int],
    as_json: bool,
) -> int:
    """Show the storage, clocks and resets of a netlist, and what keeps cells out of chains.

    \b
    Example:
      insertdft survey top.v --lib cells.lib
    """
    progress = Progress(quiet=as_json)
    progress("reading")
    design, warnings = api.read_design(netlist, lib, top, defines=macros(define))
    progress("surveying")
    facts = api.survey(design, hold)
    progress.done()
    findings = (*warnings, *facts.findings)
    show(findings)
    data = survey_data(facts, findings)
    click.echo(json.dumps(data, indent=1) if as_json else survey_screen(data), nl=as_json)
    return 0
