"""Cell kits with all that a simulation needs: Liberty, Verilog models, flags of the simulator."""

import gzip
from collections.abc import Sequence
from dataclasses import dataclass
from functools import cache
from pathlib import Path

import pytest
from outside import outside

import insertdft
from insertdft.library import Library, read_library
from insertdft.source import read_sources

QFLOW = Path("/usr/share/qflow/tech")
DEMO = Path(insertdft.__file__).parent / "demo"


@dataclass(frozen=True)
class Technology:
    """One cell library.

    Attributes:
        name: For test names and messages.
        liberty: Liberty files.
        models: Verilog models, in the order in which the simulator wants them.
        flags: Of the simulator.
        dont_use: Cells that synthesis must leave alone, as Yosys patterns.
    """

    name: str
    liberty: tuple[Path, ...]
    models: tuple[Path, ...]
    flags: tuple[str, ...] = ()
    dont_use: tuple[str, ...] = ()

    def library(self) -> Library:
        """Return the library as insertdft reads it."""
        return _library(self.liberty)

    def model_files(self, folder: Path) -> list[Path]:
        """Return the model files, unpacked into ``folder`` where they are packed."""
        return [_plain(path, folder) for path in self.models]


@cache
def _library(files: Sequence[Path]) -> Library:
    return read_library(read_sources(files))


def _plain(path: Path, folder: Path) -> Path:
    if path.suffix != ".gz":
        return path
    unpacked = folder / path.stem
    unpacked.write_bytes(gzip.decompress(path.read_bytes()))
    return unpacked


def _osu(name: str, stem: str) -> Technology:
    liberty, models = (QFLOW / name / f"{stem}_stdcells{end}" for end in (".lib", ".v"))
    for path in (liberty, models):
        if not path.exists():
            pytest.fail(f"{path} is missing; the README's second line installs it")
    return Technology(name, (liberty,), (models,))


def technology(name: str) -> Technology:
    """Return a kit by name; skips the test if it lies in outside data that is not there."""
    if name == "demo":
        liberty, models = DEMO / "demo.lib", DEMO / "demo_cells.v"
        return Technology("demo", (liberty,), (models,), dont_use=("scan_*",))
    if name == "ihp":
        folder = outside("libs", "ihp-sg13g2")
        models = (folder / "sg13g2_udp.v", folder / "sg13g2_stdcell_icarus.v")
        return Technology("ihp", (folder / "sg13g2_stdcell_typ_1p20V_25C.lib",), models)
    if name == "sky130":
        folder = outside("libs", "sky130hd")
        models = (folder / "sky130_hd_primitives.v.gz", folder / "sky130_hd.v.gz")
        flags = ("-DFUNCTIONAL", "-DUNIT_DELAY=#0")
        lib = (folder / "sky130hd_tt.lib.gz",)
        return Technology("sky130", lib, models, flags, dont_use=("*lpflow*",))
    return _osu(name, {"osu050": "osu05"}.get(name, name))
