"""Run Icarus Verilog, the event-driven simulator that the tests measure against."""

import shutil
import subprocess
from collections.abc import Sequence
from pathlib import Path

import pytest


def run_icarus(
    folder: Path, files: Sequence[Path], top: str, flags: Sequence[str] = (), *, seconds: int = 300
) -> list[str]:
    """Compile ``files`` in order, simulate ``top`` and return what it printed, line by line."""
    compiler, machine = shutil.which("iverilog"), shutil.which("vvp")
    if compiler is None or machine is None:
        pytest.fail("Icarus Verilog is missing; the README's second line installs it")
    program = folder / "program.vvp"
    names = [str(file) for file in files]
    compile_line = [compiler, "-g2005", *flags, "-s", top, "-o", str(program), *names]
    made = subprocess.run(compile_line, cwd=folder, capture_output=True, text=True, check=False)
    if made.returncode:
        pytest.fail(f"iverilog refused the files:\n{made.stdout}{made.stderr}")
    ran = subprocess.run(
        [machine, "-n", str(program)],
        cwd=folder,
        capture_output=True,
        text=True,
        check=False,
        timeout=seconds,
    )
    if ran.returncode:
        pytest.fail(f"vvp failed:\n{ran.stdout[-2000:]}{ran.stderr}")
    return ran.stdout.splitlines()
