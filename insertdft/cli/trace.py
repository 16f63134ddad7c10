"""``insertdft trace``: walk the chains of any scan netlist."""

import json
from pathlib import Path

import click

from insertdft import api
from insertdft.chainfile import description_from_json, description_to_json
from insertdft.cli.options import design_options, hold_option, json_option, macros
from insertdft.cli.outputs import write_all
from insertdft.cli.progress import Progress
from insertdft.cli.screens import trace_data, trace_screen
from insertdft.cli.show import show
from insertdft.diagnostics import Diagnostic


@click.command("trace")
@design_options
@click.option(
    "--chains",
    "scan_chains",
    type=click.Path(path_type=Path),
    metavar="FILE",
    help="Chain description to compare with. Without it the chains are looked for.",
)
@hold_option
@click.option(
    "--out",
    type=click.Path(path_type=Path),
    metavar="FOLDER",
    help="Write the chains found to chains.json there.",
)
@json_option
def command(
    netlist: tuple[Path, ...],
    lib: tuple[Path, ...],
    top: str | None,
    define: tuple[str, ...],
    scan_chains: Path | None,
    hold: dict[str, int],
    out: Path | None,
    as_json: bool,
) -> int:
    """Walk every scan chain from scan-out to scan-in and compare it with a description.

    Any scan netlist will do, whoever made it. Without --chains the chains are found from the scan
    cells; where cells are composed of a mux and a flip-flop, say with --hold which port shifts.

    \b
    Examples:
      insertdft trace build/top_scan.v --lib cells.lib --chains build/chains.json
      insertdft trace other.v --lib cells.lib --out found/
    """
    progress = Progress(quiet=as_json)
    progress("reading")
    design, warnings = api.read_design(netlist, lib, top, defines=macros(define))
    progress("walking the chains")
    problems: tuple[Diagnostic, ...] = ()
    if scan_chains is None:
        description = api.discover(design, hold)
        chains = description.chains
    else:
        description = description_from_json(
            scan_chains.read_text(encoding="latin-1"), str(scan_chains)
        )
        traced = api.trace(design, description)
        chains, problems = traced.chains, traced.problems
    progress.done()
    show((*warnings, *problems))
    if out is not None and scan_chains is None:
        write_all(out, {"chains.json": description_to_json(description)}, [*netlist, *lib])
    data = trace_data(chains, problems)
    text = trace_screen(data, compared=scan_chains is not None)
    click.echo(json.dumps(data, indent=1) if as_json else text, nl=as_json)
    return 1 if problems else 0
