"""Write files whole or not at all, and never over an input."""

import os
import tempfile
from collections.abc import Mapping, Sequence
from pathlib import Path

from insertdft.diagnostics import DesignError, Diagnostic, error


def write_all(folder: Path, files: Mapping[str, str], inputs: Sequence[Path]) -> list[Path]:
    """Write every file or none; return their paths in the order given.

    All are written beside their final places first and renamed only when the last is complete.

    Args:
        folder: Where they go; made if it is missing.
        files: Content by file name; latin-1, as netlists keep whatever bytes they came with.
        inputs: Files that must not be overwritten.

    Raises:
        DesignError: A file would replace an input, or cannot be written.
    """
    goals = [folder / name for name in files]
    clashes = [goal for goal in goals if any(_is_same(goal, at) for at in inputs)]
    if clashes:
        raise DesignError([_over_input(goal) for goal in clashes])
    ready: list[tuple[str, Path]] = []
    try:
        folder.mkdir(parents=True, exist_ok=True)
        for goal, text in zip(goals, files.values(), strict=True):
            ready.append((_write_beside(goal, text), goal))
        for temporary, goal in ready:
            Path(temporary).replace(goal)
    except OSError as problem:
        for temporary, _ in ready:
            Path(temporary).unlink(missing_ok=True)
        raise DesignError([_unwritable(folder, problem)]) from problem
    return goals


def _write_beside(goal: Path, text: str) -> str:
    handle, temporary = tempfile.mkstemp(dir=goal.parent, prefix=f".{goal.name}.")
    try:
        with os.fdopen(handle, "wb") as file:
            # In pieces: a netlist's text may be large, and its bytes are needed only once.
            for at in range(0, len(text), 1 << 24):
                file.write(text[at : at + (1 << 24)].encode("latin-1"))
        mask = os.umask(0)
        os.umask(mask)
        Path(temporary).chmod(0o666 & ~mask)
    except OSError:
        Path(temporary).unlink(missing_ok=True)
        raise
    return temporary


def _is_same(goal: Path, other: Path) -> bool:
    try:
        return goal.samefile(other)
    except OSError:
        return goal.resolve() == other.resolve()


def _over_input(goal: Path) -> Diagnostic:
    return error(
        "output-exists-as-input",
        f"`{goal}` is an input and would be overwritten",
        hint="name another folder with --out",
    )


def _unwritable(folder: Path, problem: OSError) -> Diagnostic:
    return error(
        "output-unwritable",
        f"nothing was written to `{folder}`: {problem.strerror or problem}",
        hint="name a folder that can be written, with room in it, with --out",
    )
