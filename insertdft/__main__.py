"""``python -m insertdft``."""

from insertdft.cli.main import run

run()
