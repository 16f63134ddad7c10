"""The entry point: finds the command, turns problems into messages and exit codes.

Exit codes: 0 done, and what was checked holds; 1 the input has errors, or a check failed; 2 wrong
usage; 3 a defect of insertdft itself.
"""

import gc
import importlib
import os
import sys
import tempfile
import traceback
from pathlib import Path
from typing import Final

import click

from insertdft import __version__
from insertdft.diagnostics import DesignError, render

#: Every command: the module that holds it, and its line in the help. Modules are loaded when the
#: command is called, so that --help does not wait for numpy and scipy.
COMMANDS: Final[dict[str, str]] = {
    "convert": "Turn a netlist into one that can be tested by scan.",
    "survey": "Show the storage, clocks and resets of a netlist, and what keeps cells out.",
    "trace": "Walk the scan chains of any netlist and compare them with a description.",
    "export": "Write chains for pattern tools, layout, timing and simulation.",
    "waves": "Draw the clock sequences of a chain description.",
    "demo": "Run the main job on a chip and a library that come with the tool.",
}

DONE: Final = 0
FAILED: Final = 1
USAGE: Final = 2
DEFECT: Final = 3


class _Commands(click.Group):
    """Loads a command's module when it is needed."""

    def list_commands(self, ctx: click.Context) -> list[str]:
        del ctx
        return list(COMMANDS)

    def get_command(self, ctx: click.Context, cmd_name: str) -> click.Command | None:
        del ctx
        if cmd_name not in COMMANDS:
            return None
        module = importlib.import_module(f"insertdft.cli.{cmd_name}")
        command: click.Command = module.command
        return command

    def format_commands(self, ctx: click.Context, formatter: click.HelpFormatter) -> None:
        del ctx
        with formatter.section("Commands"):
            formatter.write_dl(list(COMMANDS.items()))


@click.command(cls=_Commands, context_settings={"help_option_names": ["-h", "--help"]})
@click.version_option(__version__, prog_name="insertdft")
def main() -> None:
    """Scan insertion for gate-level netlists.

    Start with `insertdft demo`, or with

      insertdft convert top.v --lib cells.lib --style mux-d --chains 8 --out build/
    """


def run(words: list[str] | None = None) -> None:
    """Run the command line and leave with an exit code; no traceback ever reaches the user.

    Args:
        words: Arguments; those of the process by default.
    """
    # One command makes millions of small values and no garbage in cycles worth a search.
    gc.disable()
    try:
        code = main.main(words, standalone_mode=False, prog_name="insertdft")
        sys.exit(code if isinstance(code, int) else DONE)
    except click.exceptions.Exit as leave:
        sys.exit(leave.exit_code)
    except click.ClickException as problem:
        problem.show()
        sys.exit(USAGE)
    except click.Abort:
        click.echo("stopped", err=True)
        sys.exit(FAILED)
    except DesignError as problem:
        click.echo("".join(map(render, problem.diagnostics)), err=True, nl=False)
        sys.exit(FAILED)
    except BrokenPipeError:
        # Whoever read our output went away; writing more would only fail again.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        sys.exit(DONE)
    except (MemoryError, OSError) as problem:
        click.echo(f"error, machine: {problem}", err=True)
        sys.exit(FAILED)
    except Exception:  # noqa: BLE001 -- the one place where a defect of ours becomes a message
        click.echo(_defect(), err=True)
        sys.exit(DEFECT)


def _defect() -> str:
    handle, name = tempfile.mkstemp(prefix="insertdft-", suffix=".txt")
    with os.fdopen(handle, "w", encoding="utf-8") as file:
        file.write(f"insertdft {__version__}\n{' '.join(sys.argv)}\n\n{traceback.format_exc()}")
    return (
        "insertdft has a defect and stopped; nothing was written.\n"
        f"  to mend: report it with the file {Path(name)}"
    )
