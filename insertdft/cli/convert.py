"""``insertdft convert``: netlist in, scan netlist, plan and chain description out."""

import json
from pathlib import Path

import click

from insertdft import api
from insertdft.chainfile import description_to_json
from insertdft.cli.options import design_options, hold_option, json_option, macros
from insertdft.cli.outputs import write_all
from insertdft.cli.progress import Progress
from insertdft.cli.screens import conversion_data, conversion_screen
from insertdft.cli.show import show
from insertdft.text import apply_splices


@click.command("convert")
@design_options
@click.option(
    "--style",
    type=click.Choice(["mux-d", "clocked-scan", "lssd"]),
    default="mux-d",
    show_default=True,
    help="Scan style.",
)
@click.option("--chains", type=click.IntRange(1), metavar="N", help="Number of chains.")
@click.option(
    "--max-length", type=click.IntRange(1), metavar="N", help="Longest chain, in shift cycles."
)
@click.option("--include", multiple=True, metavar="PATTERN", help="Convert matching cells only.")
@click.option("--exclude", multiple=True, metavar="PATTERN", help="Leave matching cells alone.")
@hold_option
@click.option(
    "--port",
    "port_names",
    multiple=True,
    metavar="KIND=NAME",
    help="Name of a new port: scan_in, scan_out or scan_enable.",
)
@click.option(
    "--connect",
    type=click.Choice(["buffer", "assign"]),
    default="buffer",
    show_default=True,
    help="What leads from a cell to a scan-out port.",
)
@click.option(
    "--latches",
    type=click.Choice(["as-style", "lssd"]),
    default="as-style",
    show_default=True,
    help="Give latches LSSD whatever the style of the flip-flops.",
)
@click.option(
    "--share-l2",
    "star",
    is_flag=True,
    help="LSSD: two system latches of different phases may share one position (L1/L2*).",
)
@click.option(
    "--flip-flops",
    type=click.Choice(["edge", "two-phase"]),
    default="edge",
    show_default=True,
    help="LSSD: keep a flip-flop's clock edge, or make it a double latch under C and B.",
)
@click.option(
    "--plan",
    "plan_file",
    type=click.Path(path_type=Path),
    metavar="FILE",
    help="Carry out this plan instead of making one.",
)
@click.option(
    "--out",
    type=click.Path(path_type=Path),
    default=Path("build"),
    show_default=True,
    metavar="FOLDER",
    help="Where the files go.",
)
@json_option
@click.pass_obj
def command(
    tables: dict[str, dict[str, str]] | None,
    netlist: tuple[Path, ...],
    lib: tuple[Path, ...],
    top: str | None,
    define: tuple[str, ...],
    style: str,
    chains: int | None,
    max_length: int | None,
    include: tuple[str, ...],
    exclude: tuple[str, ...],
    hold: dict[str, int],
    port_names: tuple[str, ...],
    connect: str,
    latches: str,
    star: bool,
    flip_flops: str,
    plan_file: Path | None,
    out: Path,
    as_json: bool,
) -> int:
    """Turn a netlist into one that can be tested by scan.

    Every storage cell that a tester can control becomes a scan cell, the cells are strung into
    balanced chains, and every chain is walked again in the written text. All else in the netlist
    stays byte for byte as it was.

    \b
    Example:
      insertdft convert top.v --lib cells.lib --style mux-d --chains 8 --out build/
    """
    tables = tables or {}
    ports = dict(tables.get("ports", {})) | _pairs(port_names)
    wishes = api.Wishes(
        style=style,
        chains=chains,
        max_length=max_length,
        include=include,
        exclude=exclude,
        ports=ports,
        connect=connect,
        styles=tuple(tables.get("styles", {}).items()),
        latches=latches,
        star=star,
        flip_flops=flip_flops,
    )
    progress = Progress(quiet=as_json)
    progress("reading")
    design, warnings = api.read_design(
        netlist, lib, top, defines=macros(define), twins=tables.get("twins", {})
    )
    plan = _read_plan(plan_file)
    done = api.convert(design, wishes, hold, plan=plan, say=progress)
    progress("writing")
    files = _netlist_names(netlist)
    texts = {
        name: apply_splices(patch.source, patch.splices)
        for name, patch in zip(files, done.patches, strict=True)
    }
    texts["plan.json"] = api.plan_to_json(done.plan)
    texts["chains.json"] = description_to_json(done.description)
    written = [] if done.traced.problems else write_all(out, texts, [*netlist, *lib])
    progress.done()
    show((*warnings, *done.findings, *done.traced.problems))
    data = conversion_data(done, [str(path) for path in written])
    click.echo(json.dumps(data, indent=1) if as_json else conversion_screen(data), nl=as_json)
    return 1 if done.traced.problems else 0


def _read_plan(path: Path | None) -> api.Plan | None:
    if path is None:
        return None
    return api.plan_from_json(path.read_text(encoding="utf-8"), str(path))


def _pairs(items: tuple[str, ...]) -> dict[str, str]:
    found: dict[str, str] = {}
    for item in items:
        kind, equals, name = item.partition("=")
        if not equals:
            raise click.UsageError(f"--port {item!r} is not KIND=NAME")
        found[kind] = name
    return found


def _netlist_names(netlists: tuple[Path, ...]) -> list[str]:
    """Return the output name of each netlist: ``top.v`` and ``top.v.gz`` give ``top_scan.v``."""
    names: list[str] = []
    for path in netlists:
        stem = path.name.removesuffix(".gz").removesuffix(".v").removesuffix(".vg")
        name = f"{stem}_scan.v"
        number = 2
        while name in names:
            name, number = f"{stem}_{number}_scan.v", number + 1
        names.append(name)
    return names
