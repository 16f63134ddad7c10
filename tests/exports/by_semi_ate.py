"""Read a STIL file with Semi-ATE-STIL, expand it to vectors, print them. Has its own environment.

The text goes in as it is. The reader checks syntax and widths, and expands macros, procedures and
shifts; what comes out is one row of waveform characters a tester cycle, and the events behind each
character.
"""

import contextlib
import io
import json
import re
import sys
import tempfile
from pathlib import Path

from Semi_ATE.STIL.parsers.STILDumpCompiler import STILDumpCompiler

VECTOR = re.compile(r"\s*\d+\|\s*\S+\|\s*\S+\|\s*(\S+?)\|(.*)")


def main(name: str) -> None:
    """Print signals, vectors, procedures called and events as JSON."""
    with tempfile.TemporaryDirectory() as folder, contextlib.redirect_stdout(io.StringIO()):
        work = STILDumpCompiler(
            name, folder, expanding_procs=True, is_scan_mem_available=False, enable_trace=False
        )
        work.compile()
        if work.err_line != -1:
            sys.exit(f"line {work.err_line}: {work.err_msg}")
        [block] = Path(folder).glob("*.pattern_block")
        lines = block.read_text().splitlines()
        timing = (Path(folder) / "timing.txt").read_text().splitlines()
    [order] = [line for line in lines if "SIGNALS_ORDER|" in line]
    vectors = [(at[1], at[2]) for line in lines if (at := VECTOR.match(line))]
    data = {
        "signals": re.findall(r'"([^"]*)"', order),
        "vectors": [characters for characters, _ in vectors],
        "calls": [at[1] for _, rest in vectors if (at := re.search(r'CALL="([^"]*)"', rest))],
        "events": dict(_events(timing)),
    }
    print(json.dumps(data))


def _events(lines: list[str]) -> list[tuple[str, list[tuple[int, str]]]]:
    """Return (time in fs, event) of each ``signal|character``."""
    found = []
    for line in lines:
        row = re.match(r'\w+ \| "[^"]*" \| "([^"]*)" \| (\S) \| (.*)', line)
        if row:
            events = re.findall(r"(\w+):(\d+)fs", row[3])
            found.append((f"{row[1]}|{row[2]}", [(int(time), event) for event, time in events]))
    return found


if __name__ == "__main__":
    main(sys.argv[1])
