"""The feature files of ``testdata/source`` and how tests read text."""

from pathlib import Path

from insertdft.netlist import Netlist
from insertdft.source import read_netlist, read_sources
from insertdft.text import SourceText

FOLDER = Path(__file__).parents[2] / "testdata" / "source"
CASES = sorted(path.parent.name for path in FOLDER.glob("*/in.v"))


def text_of(case: str) -> SourceText:
    [source] = read_sources([FOLDER / case / "in.v"])
    return source


def read(text: str, name: str = "in.v", **options: object) -> Netlist:
    return read_netlist([SourceText(name, text)], **options)  # type: ignore[arg-type]
