"""``insertdft demo``: the main job on the chip and library that come with the tool."""

from importlib.resources import as_file, files
from pathlib import Path

import click

from insertdft.cli.convert import command as convert
from insertdft.cli.outputs import write_all

CHIP = "demo_chip.v"
LIBRARY = "demo.lib"
MODELS = "demo_cells.v"


@click.command("demo")
@click.option(
    "--out",
    type=click.Path(path_type=Path),
    default=Path("insertdft-demo"),
    show_default=True,
    metavar="FOLDER",
    help="Where the demo's inputs and outputs go.",
)
@click.pass_context
def command(ctx: click.Context, out: Path) -> int:
    """Run the main job on an invented chip in an invented cell library.

    The inputs are put into the folder first, so that the same commands can be tried by hand.
    """
    with as_file(files("insertdft") / "demo") as folder:
        texts = {
            name: (folder / name).read_text(encoding="latin-1") for name in (CHIP, LIBRARY, MODELS)
        }
    write_all(out, texts, [])
    words = ["--chains", "7", "--latches", "lssd", "--out", str(out / "scan")]
    words = [str(out / CHIP), "--lib", str(out / LIBRARY), *words]
    click.echo(f"$ insertdft convert {' '.join(words)}\n")
    code: int = convert.main(words, standalone_mode=False, parent=ctx)
    return code
