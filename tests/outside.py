"""Test data that lies outside the project: where it is, and what happens when it is not."""

import os
from pathlib import Path

import pytest

VARIABLE = "INSERTDFT_TEST_DATA"


def outside(*parts: str) -> Path:
    """Return a file of the folder that the environment names; skip the test when it names none."""
    folder = os.environ.get(VARIABLE)
    if not folder:
        pytest.skip(f"{VARIABLE} names no folder")
    path = Path(folder, *parts)
    if not path.exists():
        pytest.fail(f"{VARIABLE} is set, but {path} does not exist")
    return path
