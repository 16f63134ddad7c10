"""``insertdft export``: what pattern tools, layout, timing and simulation need."""

from pathlib import Path

import click

from insertdft import api
from insertdft.chainfile import description_from_json
from insertdft.cli.options import design_options, macros
from insertdft.cli.outputs import write_all
from insertdft.cli.progress import Progress
from insertdft.cli.show import show
from insertdft.diagnostics import nearest
from insertdft.exports.formats import FORMATS, WITH_PATTERNS
from insertdft.exports.frames import make_program
from insertdft.exports.inputs import ExportInput
from insertdft.exports.patterns import Pattern, random_patterns
from insertdft.exports.timing import make_timing
from insertdft.source import read_sources


@click.command("export")
@click.argument("chains", type=click.Path(path_type=Path))
@design_options
@click.option("--to", "formats", required=True, metavar="LIST", help=f"Of {', '.join(FORMATS)}.")
@click.option("--out", required=True, type=click.Path(path_type=Path), metavar="FOLDER")
@click.option("--period", default=100.0, metavar="NS", help="Tester cycle, 100 ns unless given.")
@click.option(
    "--patterns",
    "count",
    default=4,
    type=click.IntRange(0),
    metavar="N",
    help="Random patterns of each capture sequence, for stil and bench; 0 for the chain test only.",
)
@click.option("--seed", default=1, type=click.IntRange(0), metavar="N", help="Of the patterns.")
@click.option("--date", metavar="TEXT", help="Date for the STIL header; none unless given.")
def command(
    chains: Path,
    netlist: tuple[Path, ...],
    lib: tuple[Path, ...],
    top: str | None,
    define: tuple[str, ...],
    formats: str,
    out: Path,
    period: float,
    count: int,
    seed: int,
    date: str | None,
) -> int:
    r"""Write CHAINS (a chains.json) in other formats; NETLIST is the scan netlist it describes.

    \b
    Example:
      insertdft export build/chains.json build/top_scan.v --lib cells.lib \
        --to stil,bench,def,sdc --out build/
    """
    wanted = _wanted(formats)
    progress = Progress(quiet=False)
    progress("reading")
    [source] = read_sources([chains])
    description = description_from_json(source.text, source.name)
    design, warnings = api.read_design(netlist, lib, top, defines=macros(define))
    timing = make_timing(description, round(period * 1000))
    patterns: tuple[Pattern, ...] = ()
    if count and any(name in WITH_PATTERNS for name in wanted):
        progress("simulating patterns")
        program = make_program(description, design.ports)
        patterns = random_patterns(design, description, program, count, seed)
    progress("writing")
    given = ExportInput(description, design.ports, timing, patterns, _one_line(date))
    files = {file: text for name in wanted for file, text in FORMATS[name](given).items()}
    paths = write_all(out, files, [chains, *netlist, *lib])
    progress.done()
    show(warnings)
    click.echo("\n".join([*_known(patterns), *(f"  written  {path}" for path in paths)]))
    return 0


def _wanted(formats: str) -> list[str]:
    names = list(dict.fromkeys(name.strip() for name in formats.split(",") if name.strip()))
    for name in names:
        if name not in FORMATS:
            hint = nearest(name, FORMATS) or f"there are {', '.join(FORMATS)}"
            raise click.BadParameter(f"no format is called {name!r}; {hint}", param_hint="--to")
    if not names:
        raise click.BadParameter("no format is named", param_hint="--to")
    return names


def _one_line(date: str | None) -> str | None:
    if date is not None and (not date.isprintable() or '"' in date):
        raise click.BadParameter("a date is one line without quotes", param_hint="--date")
    return date


def _known(patterns: tuple[Pattern, ...]) -> list[str]:
    """Say how many expected values the simulator knows; the others are not compared."""
    if not patterns:
        return []
    letters = "".join("".join((*at.measured, *at.unload)) for at in patterns)
    known = len(letters) - letters.count("X")
    line = f"  expected {known} of {len(letters)} values known ({len(patterns)} patterns)"
    if known * 2 < len(letters):
        line += "\n           the others come from cells that are not simulated or have no scan"
    return [line]
