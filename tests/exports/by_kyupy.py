"""Read a STIL file with kyupy and print what it found. Runs in an environment of its own.

The reader insists on some names and knows part of the language only, so the text is adapted to it:
groups, procedures and captures get the names it looks for, statements beyond its grammar (slave
clocks, further master clocks, comments) are left out, and the points in names, which it takes for
the end of a path, become tildes.
"""

import json
import re
import sys
from pathlib import Path

from kyupy import stil

GROUPS = {"all_inputs": "_pi", "all_outputs": "_po"}
SHIFT = "shift_load_unload"


def adapted(text: str) -> str:
    """Return the text as the reader wants it."""
    text = re.sub(r"^\s*//.*\n", "", text, flags=re.MULTILINE)
    text = re.sub(r"\bScanSlaveClock\b[^;]*;", "", text)
    text = re.sub(r'\b(ScanMasterClock\s+"[^"]*")[^;]*;', r"\1;", text)
    text = re.sub(r'"([^"]*)"', lambda at: f'"{GROUPS.get(at[1], at[1]).replace(".", "~")}"', text)
    return re.sub(r'\bCall "([^"]*)"', lambda at: f'Call "{called(at[1])}"', text)


def called(name: str) -> str:
    """Return the name of a procedure that tells the reader what it is for."""
    return "load_unload" if name == SHIFT else name + "_capture"


def back(value: object) -> object:
    """Return names as they were."""
    if isinstance(value, str):
        return value.replace("~", ".")
    if isinstance(value, dict):
        return {back(key): back(item) for key, item in value.items()}
    return [back(item) for item in value]  # type: ignore[attr-defined]


def main(name: str) -> None:
    """Print chains, groups and patterns as JSON."""
    text = Path(name).read_text(encoding="ascii")
    if "~" in text:
        raise ValueError("a name holds a tilde")
    found = stil.parse(adapted(text))
    patterns = [
        {
            kind: {port: row for port, (row, _) in getattr(pattern, kind).items()}
            for kind in ("load", "capture", "unload")
        }
        for pattern in found.patterns
    ]
    lengths = dict(re.findall(r'ScanChain ("[^"]*") \{\s*ScanLength (\d+)', text))
    data = {
        "chains": back(found.scan_chains),
        "groups": back(found.signal_groups),
        "calls": [call.name for call in found.calls],
        "patterns": back(patterns),
        "lengths": lengths,
    }
    print(json.dumps(data))


if __name__ == "__main__":
    main(sys.argv[1])
