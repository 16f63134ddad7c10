"""Options that several commands share, and the options file."""

import tomllib
from collections.abc import Callable, Mapping
from pathlib import Path
from typing import Any, Final, TypeVar

import click

from insertdft.diagnostics import DesignError, error, nearest

F = TypeVar("F", bound=Callable[..., Any])

OPTIONS_FILE: Final = "insertdft.toml"
#: Tables of the options file that are no command.
TABLES: Final = ("twins", "ports", "styles")


def design_options(function: F) -> F:
    """Add the options by which a command finds its netlist and library."""
    for decorate in reversed(
        (
            options_file,
            click.argument("netlist", nargs=-1, required=True, type=click.Path(path_type=Path)),
            click.option(
                "--lib",
                multiple=True,
                required=True,
                type=click.Path(path_type=Path),
                metavar="FILE",
                help="Liberty file, or Verilog cell models. Repeat it for a kit of several files.",
            ),
            click.option("--top", metavar="MODULE", help="Top module, if it is not plain."),
            click.option(
                "--define",
                multiple=True,
                metavar="NAME[=VALUE]",
                help="Macro for `ifdef in the netlist.",
            ),
        )
    ):
        function = decorate(function)
    return function


def hold_option(function: F) -> F:
    """Add the option that promises port values in test."""
    return click.option(
        "--hold",
        multiple=True,
        metavar="PORT=0|1",
        callback=_values,
        help="A port that the tester holds at this value in test.",
    )(function)


def json_option(function: F) -> F:
    """Add ``--json``."""
    return click.option("--json", "as_json", is_flag=True, help="Print the result for machines.")(
        function
    )


def options_file(function: F) -> F:
    """Add the option that names the options file; its values come before the defaults."""
    return click.option(
        "--options",
        type=click.Path(path_type=Path),
        is_eager=True,
        expose_value=False,
        callback=_load,
        metavar="FILE",
        help=f"TOML file with the same options; {OPTIONS_FILE} here if there is one. Flags win.",
    )(function)


def _load(ctx: click.Context, param: click.Parameter, value: Path | None) -> None:
    del param
    path = value or Path(OPTIONS_FILE)
    if value is None and not path.is_file():
        return
    try:
        found = tomllib.loads(path.read_text(encoding="utf-8"))
    except (OSError, UnicodeDecodeError, tomllib.TOMLDecodeError) as problem:
        raise DesignError([_unreadable(path, str(problem), None)]) from problem
    known = {at.name: at for at in ctx.command.params if at.name and at.name != "options"}
    ctx.default_map = {**_defaults(ctx, path, found, known)}
    ctx.obj = {table: _strings(path, table, found.get(table, {})) for table in TABLES}


def _defaults(
    ctx: click.Context, path: Path, found: Mapping[str, Any], known: Mapping[str, click.Parameter]
) -> dict[str, Any]:
    from_commands = found.get(ctx.info_name or "", {})
    merged = {key: at for key, at in found.items() if not isinstance(at, dict)} | from_commands
    defaults: dict[str, Any] = {}
    for key, value in merged.items():
        name = _NAMES.get(key, key.replace("-", "_"))
        if name in known:
            # Paths in the file are relative to the file.
            is_path = isinstance(known[name].type, click.Path)
            defaults[name] = _beside(path, value) if is_path else value
        elif key in from_commands or name not in _EVERY:
            hint = nearest(key, [*known, *_EVERY])
            raise DesignError([_unreadable(path, f"no option is called `{key}`", hint)])
    return defaults


#: Options whose parameter has another name.
_NAMES: Final = {"json": "as_json", "share-l2": "star"}
#: Every option of any command: a file may hold options of several.
_EVERY: Final = (
    "netlist lib top define hold style chains max_length include exclude connect out plan "
    "as_json scan_chains latches star flip_flops"
).split()


def _beside(path: Path, value: Any) -> Any:
    if isinstance(value, list):
        return [str(path.parent / str(at)) for at in value]
    return str(path.parent / str(value))


def _strings(path: Path, table: str, found: Any) -> dict[str, str]:
    if not isinstance(found, dict) or not all(isinstance(at, str) for at in found.values()):
        raise DesignError([_unreadable(path, f"[{table}] must map names to names", None)])
    return dict(found)


def _unreadable(path: Path, what: str, hint: str | None) -> Any:
    return error(
        "options-unreadable",
        f"`{path}` cannot be used as options file: {what}",
        hint=hint or "see docs/command-line.md for its keys",
    )


def _values(ctx: click.Context, param: click.Parameter, value: tuple[str, ...]) -> dict[str, int]:
    del ctx
    found: dict[str, int] = {}
    for item in value:
        port, _, level = item.partition("=")
        if level not in ("0", "1"):
            raise click.BadParameter(f"{item!r} is not PORT=0 or PORT=1", param=param)
        found[port] = int(level)
    return found


def macros(define: tuple[str, ...]) -> dict[str, str]:
    """Return macro names and values from ``NAME[=VALUE]`` texts."""
    return {name: value for name, _, value in (item.partition("=") for item in define)}
