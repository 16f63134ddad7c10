"""``insertdft waves``: draw the clock sequences of a chain description."""

import json
import re
from pathlib import Path

import click

from insertdft.chainfile import description_from_json
from insertdft.cli.options import json_option
from insertdft.cli.outputs import write_all
from insertdft.diagnostics import nearest
from insertdft.exports.waves import Picture, pictures, to_data, to_svg, to_text
from insertdft.source import read_sources


@click.command("waves")
@click.argument("chains", type=click.Path(path_type=Path))
@click.option(
    "--sequence",
    "wanted",
    multiple=True,
    metavar="NAME",
    help="Draw this sequence alone; repeat it for several.",
)
@click.option(
    "--svg",
    type=click.Path(path_type=Path),
    metavar="FOLDER",
    help="Also write each picture there as waves_NAME.svg.",
)
@json_option
def command(chains: Path, wanted: tuple[str, ...], svg: Path | None, as_json: bool) -> None:
    r"""Draw how the clocks of CHAINS (a chains.json) shift, capture and launch.

    \b
    Examples:
      insertdft waves build/chains.json
      insertdft waves build/chains.json --sequence capture --svg pictures/
    """
    [source] = read_sources([chains])
    drawn = _chosen(pictures(description_from_json(source.text, source.name)), wanted)
    if svg is not None:
        files = {f"waves_{_file_part(picture.name)}.svg": to_svg(picture) for picture in drawn}
        write_all(svg, files, [chains])
    if as_json:
        click.echo(json.dumps([to_data(picture) for picture in drawn], indent=1))
    else:
        click.echo("\n".join(map(to_text, drawn)), nl=False)


def _file_part(name: str) -> str:
    return re.sub(r"\W", "_", name, flags=re.ASCII)


def _chosen(drawn: tuple[Picture, ...], wanted: tuple[str, ...]) -> tuple[Picture, ...]:
    known = [picture.name for picture in drawn]
    for name in wanted:
        if name not in known:
            hint = nearest(name, known) or f"there are {', '.join(known)}"
            raise click.BadParameter(
                f"no sequence is called {name!r}; {hint}", param_hint="--sequence"
            )
    return tuple(picture for picture in drawn if not wanted or picture.name in wanted)
