"""Scan netlists written by hand, with their chain descriptions, and what is exported of them."""

from functools import cache
from pathlib import Path

from exports.made import Made
from technologies import technology

from insertdft.chainfile import description_from_json
from insertdft.design.link import link
from insertdft.exports.frames import make_program
from insertdft.exports.inputs import ExportInput
from insertdft.exports.patterns import random_patterns
from insertdft.exports.timing import make_timing
from insertdft.source import read_netlist
from insertdft.text import SourceText

FOLDER = Path(__file__).parent.parent.parent / "testdata" / "exports"
CASES = tuple(sorted(path.name for path in FOLDER.iterdir() if path.is_dir()))


@cache
def by_hand(case: str, count: int = 6) -> Made:
    """Return a case of ``testdata/exports`` with simulated patterns."""
    text = (FOLDER / case / "scan.v").read_text(encoding="latin-1")
    chains = (FOLDER / case / "chains.json").read_text(encoding="latin-1")
    description = description_from_json(chains, case)
    netlist = read_netlist([SourceText("scan.v", text)], description.design)
    design = link(netlist, technology("demo").library())[0]
    program = make_program(description, design.ports)
    patterns = random_patterns(design, description, program, count)
    given = ExportInput(description, design.ports, make_timing(description), patterns)
    return Made(text, design, description, given)
