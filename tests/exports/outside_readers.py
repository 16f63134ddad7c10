"""STIL readers of the Python registry, each in an environment of its own, run as programs.

The two cannot share an environment (their parsers replace each other), and neither belongs into
that of the tests. The environments are made once and kept in ``.cache/readers``.
"""

import fcntl
import hashlib
import json
import shutil
import subprocess
import sys
import venv
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import Any, Final

import pytest

ROOT: Final = Path(__file__).parent
CACHE: Final = ROOT.parent.parent / ".cache" / "readers"

#: Packages of each reader.
READERS: Final = {
    "by_kyupy": ("kyupy==0.0.5", "numpy"),
    "by_semi_ate": ("semi-ate-stil==0.3.2", "lark>=1.1"),
}


def read(reader: str, file: Path) -> Any:
    """Return what the program ``<reader>.py`` of this folder prints about ``file`` as JSON."""
    words = [str(_python(reader)), str(ROOT / f"{reader}.py"), str(file)]
    ran = subprocess.run(words, cwd=file.parent, capture_output=True, text=True, check=False)
    if ran.returncode:
        raise ReaderError(f"{reader}: {(ran.stdout + ran.stderr)[-3000:]}")
    return json.loads(ran.stdout.splitlines()[-1])  # kyupy greets first


class ReaderError(Exception):
    """The reader did not accept the file."""


def _python(reader: str) -> Path:
    """Return the interpreter of the reader's environment, made if it is not there yet."""
    asked = "\n".join((sys.version, *READERS[reader]))
    folder = CACHE / f"{reader}_{hashlib.sha256(asked.encode()).hexdigest()[:12]}"
    python, done = folder / "bin" / "python", folder / "complete"
    with _alone(folder):
        if not done.exists():
            shutil.rmtree(folder, ignore_errors=True)
            venv.create(folder, with_pip=True)
            words = [str(python), "-m", "pip", "install", "-q", "--disable-pip-version-check"]
            made = subprocess.run(
                [*words, *READERS[reader]], capture_output=True, text=True, check=False
            )
            if made.returncode:
                pytest.fail(f"pip cannot install {READERS[reader]}:\n{made.stderr[-2000:]}")
            done.touch()
    return python


@contextmanager
def _alone(folder: Path) -> Iterator[None]:
    """Let one process at a time make the same environment."""
    folder.parent.mkdir(parents=True, exist_ok=True)
    with folder.with_suffix(".lock").open("w") as lock:
        fcntl.flock(lock, fcntl.LOCK_EX)
        yield
