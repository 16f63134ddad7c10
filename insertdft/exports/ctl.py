"""A block's view for a core test language (IEEE 1450.6), not independently checked.

No open reader of that standard was found; the words are from memory. ``read_ctl`` reads back what
``to_ctl`` writes and no more.
"""

import re
from typing import Final

from insertdft.description import Description
from insertdft.exports.inputs import ExportInput
from insertdft.exports.patterns import parity
from insertdft.exports.render import render
from insertdft.exports.stil import quoted, scan_clocks, unquoted

_TYPES: Final = {
    "scan_in": "ScanDataIn",
    "scan_out": "ScanDataOut",
    "scan_enable": "ScanEnable",
    "test_mode": "TestMode",
    "clock": "MasterClock",
    "scan_clock": "ScanMasterClock",
    "clock_a": "ScanMasterClock",
    "clock_b": "ScanSlaveClock",
    "clock_c": "MasterClock",
    "set_reset": "Asynchronous",
}
_CHAIN: Final = re.compile(
    r'ScanChain ("[^"]*") \{ ScanLength (\d+); ScanIn ("[^"]*"); ScanOut ("[^"]*");'
    r" ScanInversion ([01]);"
)
_PORT: Final = re.compile(r'^\s*("[^"]*") \{ DataType (\w+)', re.M)


def to_ctl(given: ExportInput) -> str:
    """Return the block view."""
    description = given.description
    return render(
        "block.ctl.jinja",
        design=quoted(description.design),
        signals=[f"{quoted(port.name)} {_direction(port.direction)};" for port in given.ports],
        chains=[
            {
                "name": quoted(chain.name),
                "length": chain.length,
                "scan_in": quoted(chain.scan_in),
                "scan_out": quoted(chain.scan_out),
                "inversion": parity(chain),
                "masters": " ".join(map(quoted, scan_clocks(chain)[0])),
                "slaves": " ".join(map(quoted, scan_clocks(chain)[1])),
            }
            for chain in description.chains
        ],
        roles=_roles(description),
    )


def _direction(word: str) -> str:
    return {"input": "In", "output": "Out"}.get(word, "InOut")


def _roles(description: Description) -> list[str]:
    held = {
        port: value
        for name in ("shift", "setup")
        for cycle in description.sequences.get(name, ())
        for port, value in cycle.force
    }
    found = []
    for at in description.ports:
        state = held.get(at.port) if at.role in ("scan_enable", "test_mode") else None
        if at.role == "set_reset" and at.port in held:
            state = 1 - held[at.port]
        more = f" {{ ActiveState Force{'Up' if state else 'Down'}; }}" if state is not None else ";"
        found.append(f"{quoted(at.port)} {{ DataType {_TYPES[at.role]}{more} }}")
    return found


def read_ctl(text: str) -> tuple[dict[str, tuple[int, str, str, int]], dict[str, str]]:
    """Return length, scan-in, scan-out and inversion of each chain, and the type of each port."""
    chains = {
        unquoted(name): (int(length), unquoted(start), unquoted(end), int(inversion))
        for name, length, start, end, inversion in _CHAIN.findall(text)
    }
    return chains, {unquoted(name): kind for name, kind in _PORT.findall(text)}
