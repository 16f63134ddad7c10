"""Cell libraries for tests: texts of our own, the ones of Debian, and reading them."""

from functools import cache
from pathlib import Path

import pytest

from insertdft.library import Cell, Library, read_library
from insertdft.text import SourceText

OSU = {
    "osu035": Path("/usr/share/qflow/tech/osu035/osu035_stdcells"),
    "osu018": Path("/usr/share/qflow/tech/osu018/osu018_stdcells"),
    "osu050": Path("/usr/share/qflow/tech/osu050/osu05_stdcells"),
}


def source(path: Path) -> SourceText:
    if not path.exists():
        pytest.fail(f"{path} is missing; the README's second line installs it")
    return SourceText(path.name, path.read_text(encoding="latin-1"))


@cache
def osu(name: str) -> Library:
    return read_library([source(OSU[name].with_suffix(".lib"))])


def text(body: str) -> SourceText:
    """A Liberty file of our own around some cells."""
    head = 'library (small) {\n  time_unit : "1ns";\n  capacitive_load_unit (1, pf);\n'
    return SourceText("small.lib", head + body + "\n}\n")


def library(body: str) -> Library:
    return read_library([text(body)])


def cell(body: str, name: str = "X") -> Cell:
    return library(body).cells[name]


def flip_flop(name: str, following: str, inputs: str, **more: str) -> str:
    """Text of a cell with one flip-flop on CK, its next state, extra ff attributes, Q and QN."""
    pins = "".join(f"pin ({pin}) {{ direction : input; }}\n" for pin in [*inputs.split(), "CK"])
    extra = "".join(f' {attribute} : "{value}";' for attribute, value in more.items())
    return f"""cell ({name}) {{ area : 8;
    ff (IQ, IQN) {{ next_state : "{following}"; clocked_on : "CK";{extra} }}
    {pins}
    pin (Q) {{ direction : output; function : "IQ"; }}
    pin (QN) {{ direction : output; function : "IQN"; }} }}
    """
