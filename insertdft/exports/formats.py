"""Every format by its name."""

from collections.abc import Callable, Mapping
from typing import Final

from insertdft.exports.bench import to_bench
from insertdft.exports.ctl import to_ctl
from insertdft.exports.def_ import to_def
from insertdft.exports.inputs import ExportInput
from insertdft.exports.sdc import to_sdc
from insertdft.exports.stil import to_stil
from insertdft.exports.tables import to_csv, to_json

#: What writes a format: it gives the text of each file.
Writer = Callable[[ExportInput], Mapping[str, str]]


def _sdc(given: ExportInput) -> Mapping[str, str]:
    return {f"{mode}.sdc": text for mode, text in to_sdc(given).items()}


FORMATS: Final[dict[str, Writer]] = {
    "stil": lambda given: {"scan.stil": to_stil(given)},
    "bench": lambda given: {"scan_bench.v": to_bench(given)},
    "def": lambda given: {"chains.def": to_def(given)},
    "sdc": _sdc,
    "csv": lambda given: {"chains.csv": to_csv(given)},
    "json": lambda given: {"chains_out.json": to_json(given)},
    "ctl": lambda given: {"block.ctl": to_ctl(given)},
}
#: Formats that hold patterns, whose expected values take a simulation.
WITH_PATTERNS: Final = ("stil", "bench")
