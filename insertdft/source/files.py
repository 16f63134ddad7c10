"""Netlist files to text: the one place below ``cli`` that opens an input file of the user."""

import gzip
import zlib
from collections.abc import Iterable
from pathlib import Path
from typing import Final

from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.text import SourceText

_GZIP: Final = b"\x1f\x8b"
#: Bytes that no text file holds, whatever its encoding: NUL and the like.
_BINARY: Final = bytes([*range(8), *range(14, 26), *range(28, 32)])
#: How much of a file is looked at for such bytes.
_LOOK: Final = 1 << 16


def read_sources(paths: Iterable[Path | str]) -> tuple[SourceText, ...]:
    """Return every file as text, unpacked if it is a gzip file (by content, not by name).

    Raises:
        DesignError: A file is missing, unreadable, empty or no text; every such file is reported.
    """
    sources: dict[str, SourceText] = {}
    problems: list[Diagnostic] = []
    for path in paths:
        name = str(path)
        try:
            text = _text(Path(path))
        except (OSError, EOFError, zlib.error) as cause:
            problems.append(_unreadable(name, cause))
            continue
        problem = _problem(name, text, repeated=name in sources)
        if problem:
            problems.append(problem)
        sources[name] = SourceText(name, text)
    if problems:
        raise DesignError(problems)
    return tuple(sources.values())


def _text(path: Path) -> str:
    data = path.read_bytes()
    if data.startswith(_GZIP):
        data = gzip.decompress(data)
    return data.decode("latin-1")


def _problem(name: str, text: str, *, repeated: bool) -> Diagnostic | None:
    if repeated:
        return error(
            "file-unreadable", f"`{name}` is given twice", hint="name every file only once"
        )
    if not text.strip():
        return error("netlist-empty", f"`{name}` is empty", hint="give a file with a netlist")
    head = text[:_LOOK].encode("latin-1")
    if len(head.translate(None, _BINARY)) < len(head):
        return error(
            "not-text",
            f"`{name}` holds bytes that no netlist has",
            hint="give Verilog text, plain or packed with gzip",
        )
    return None


def _unreadable(name: str, cause: Exception) -> Diagnostic:
    if isinstance(cause, FileNotFoundError):
        return error(
            "file-unreadable", f"`{name}` does not exist", hint="check the path and the spelling"
        )
    if isinstance(cause, IsADirectoryError):
        return error(
            "file-unreadable", f"`{name}` is a folder", hint="name the netlist file inside it"
        )
    reason = getattr(cause, "strerror", None) or str(cause)
    return error("file-unreadable", f"`{name}` cannot be read: {reason}", hint="mend the file")
