"""Show diagnostics on the terminal's error stream, shortened where one slug recurs."""

from collections import Counter
from collections.abc import Sequence
from typing import Final

import click

from insertdft.diagnostics import Diagnostic, Severity, render

#: Diagnostics of one slug that are shown in full.
MOST: Final = 5


def show(items: Sequence[Diagnostic]) -> None:
    """Print warnings and errors in full, notes as they are; count what is not shown."""
    shown: Counter[str] = Counter()
    for item in items:
        shown[item.slug] += 1
        if shown[item.slug] <= MOST or item.severity is Severity.ERROR:
            click.echo(render(item), err=True, nl=False)
    for slug, count in shown.items():
        if count > MOST:
            click.echo(f"{count - MOST} more of {slug}; --json lists all", err=True)
