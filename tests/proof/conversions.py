"""Good conversions to prove and to spoil: by hand and by the tool, small ones and real cores."""

from collections.abc import Callable
from dataclasses import dataclass
from functools import cache
from pathlib import Path

from cores import core_netlist
from designs import written
from technologies import technology

from insertdft import api
from insertdft.description import Description
from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.library import Library
from insertdft.source import read_netlist
from insertdft.text import SourceText

TESTDATA = Path(__file__).parent.parent.parent / "testdata"


@dataclass(frozen=True)
class Converted:
    """One pair of netlists.

    Attributes:
        name: For messages.
        before: Text of the original.
        after: Text of the converted netlist.
        description: Its chains.
        library: Cells of both.
        technology: Name of the kit.
    """

    name: str
    before: str
    after: str
    description: Description
    library: Library
    technology: str

    @property
    def designs(self) -> tuple[Design, Design]:
        """Both, read afresh."""
        return read(self.before, self.library), read(self.after, self.library)


def read(text: str, library: Library) -> Design:
    """Return the design of one text."""
    return link(read_netlist([SourceText("netlist.v", text)]), library)[0]


def converted(name: str, kit: str, before: str, **wishes: object) -> Converted:
    """Convert a text by the tool."""
    library = technology(kit).library()
    design = read(before, library)
    done = api.convert(design, api.Wishes(**wishes))  # type: ignore[arg-type]
    return Converted(name, before, written(done), done.description, library, kit)


def _by_hand(name: str, style: str, **wishes: object) -> Callable[[], Converted]:
    def make() -> Converted:
        before = (TESTDATA / "by_hand" / f"{name}.v").read_text()
        return converted(f"{name}, {style}", "demo", before, style=style, chains=1, **wishes)

    return make


def _core(name: str, kit: str, style: str, **wishes: object) -> Callable[[], Converted]:
    def make() -> Converted:
        latches = bool(wishes.get("star")) or wishes.get("latches") == "lssd"
        before = core_netlist(name, technology(kit), latches=latches)
        label = f"{name} on {kit}, {style}"
        return converted(label, kit, before, style=style, chains=3, **wishes)

    return make


#: Small ones on the demo library, every style and form.
SMALL = {
    "edges, mux-D": _by_hand("edges", "mux-d"),
    "edges, clocked scan": _by_hand("edges", "clocked-scan"),
    "edges, LSSD": _by_hand("edges", "lssd"),
    "pairs, LSSD": _by_hand("pairs", "lssd"),
    "phases, LSSD": _by_hand("phases", "lssd"),
}

#: Flip-flops of which one has no two-phase cell and stays on the clock that is C for the others.
RACES = {
    "edges, LSSD two-phase beside a flip-flop": _by_hand("edges", "lssd", flip_flops="two-phase"),
}

#: Real cores that need nothing but what the registries have.
CORES = {
    "serv, mux-D composed": _core("serv", "osu035", "mux-d"),
    "serv, mux-D": _core("serv", "demo", "mux-d"),
    "serv, clocked scan": _core("serv", "demo", "clocked-scan"),
    "serv, LSSD edge": _core("serv", "demo", "lssd"),
    "serv, LSSD two-phase composed": _core("serv", "osu035", "lssd", flip_flops="two-phase"),
    "serv of latches, LSSD composed": _core("serv", "osu035", "lssd", latches="lssd"),
}

ALL = {**SMALL, **RACES, **CORES}


@cache
def conversion(name: str) -> Converted:
    """Return one of ``ALL``, made once a process."""
    return ALL[name]()
