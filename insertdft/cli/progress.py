"""One line on a terminal that says what is being done; nothing in a pipe."""

import sys
import time
from typing import Final

WIDTH: Final = 60


class Progress:
    """Shows the current step and the seconds since the start, on a terminal alone."""

    def __init__(self, quiet: bool = False) -> None:
        """Start counting."""
        self._shown = sys.stderr.isatty() and not quiet
        self._start = time.monotonic()

    def __call__(self, step: str) -> None:
        """Show ``step``."""
        if self._shown:
            seconds = time.monotonic() - self._start
            sys.stderr.write(f"\r{step + ' ...':<{WIDTH - 8}}{seconds:6.1f} s")
            sys.stderr.flush()

    def done(self) -> None:
        """Take the line away."""
        if self._shown:
            sys.stderr.write("\r" + " " * WIDTH + "\r")
            sys.stderr.flush()
