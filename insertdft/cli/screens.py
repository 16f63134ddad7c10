"""What the terminal shows: plain text from plain data."""

from collections import Counter
from collections.abc import Iterable, Mapping, Sequence
from typing import Any, Final

from insertdft.api import Conversion
from insertdft.chains.plan import CELL
from insertdft.description import Chain
from insertdft.diagnostics import Diagnostic, to_json
from insertdft.survey import LEFT_ALONE, Survey

#: Chains shown one by one; of more, the longest and the shortest are.
MOST_CHAINS: Final = 10
#: Characters that a line of the summary may have behind its label.
WIDTH: Final = 80


def conversion_data(done: Conversion, files: Sequence[str]) -> dict[str, Any]:
    """Return the summary of a conversion as data, the one that ``--json`` prints."""
    plan, chains = done.plan, done.description.chains
    lengths = [chain.length for chain in chains]
    return {
        "design": plan.design,
        "style": plan.style,
        "storage_cells": len(done.survey.storage),
        "converted": _converted(done),
        "left_alone": dict(sorted(Counter(at.reason for at in plan.left_alone).items())),
        "chains": [_chain_data(chain) for chain in chains],
        "balance": {
            "longest": max(lengths),
            "shortest": min(lengths),
            "lower_bound": plan.lower_bound,
        },
        "area": {
            "before": round(plan.area_before, 6),
            "after": round(plan.area_after, 6),
            "cells_without_area": list(plan.without_area),
        },
        "new_ports": [port.port for port in plan.ports if port.added],
        "held_in_test": {
            port.port: port.shift
            for port in plan.ports
            if not port.added and port.shift is not None
        },
        "shared_l2": plan.shared_l2,
        "traced": len(done.traced.problems) == 0,
        "problems": [to_json(item) for item in done.traced.problems],
        "findings": [to_json(item) for item in done.findings],
        "files": list(files),
    }


def _converted(done: Conversion) -> list[dict[str, Any]]:
    """Return one entry for each way a kind of cell was converted, most frequent first."""
    counts = Counter(cell.instance for chain in done.description.chains for cell in chain.cells)
    ways = Counter[int]()
    places = Counter(place.module for place in done.survey.design.occurrences)
    for name, module in done.plan.modules.items():
        for segment in module.segments:
            for element in segment.elements:
                if element.kind == CELL and done.plan.conversions[element.number].bits:
                    ways[element.number] += places[name]
    if sum(ways.values()) != len(counts):
        raise RuntimeError("the plan's cells and the described ones differ in number")
    found = []
    for number, count in ways.most_common():
        way = done.plan.conversions[number]
        parts = [part.cell for part in way.parts]
        parts += [f"{len(way.module.parts)} gates"] if way.module else []
        found.append(
            {"cell": way.before, "how": way.how, "to": way.after, "with": parts, "count": count}
        )
    return found


def _chain_data(chain: Chain) -> dict[str, Any]:
    return {
        "name": chain.name,
        "length": chain.length,
        "clock": " ".join(chain.clocks),
        "edge": chain.edge or "-",
        "scan_in": chain.scan_in,
        "scan_out": chain.scan_out,
    }


def conversion_screen(data: Mapping[str, Any]) -> str:
    """Return the summary of a conversion as text that fits one screen."""
    converted = data["storage_cells"] - sum(data["left_alone"].values())
    title = (
        f"{data['design']}: {converted} of {data['storage_cells']} storage cells in"
        f" {len(data['chains'])} {data['style']} chains"
    )
    lines = [title, "", *_chain_table(data["chains"]), ""]
    balance, area = data["balance"], data["area"]
    lengths = (
        f"longest {balance['longest']}, shortest {balance['shortest']},"
        f" lower bound {balance['lower_bound']}"
    )
    rows = [
        ("balance", lengths),
        ("cells", _ways(data["converted"])),
        ("left alone", _reasons(data["left_alone"])),
        ("area", _area(area)),
        *([("L1/L2*", f"saved {data['shared_l2']} L2 latches")] if data["shared_l2"] else []),
        ("new ports", _ranges(data["new_ports"])),
        ("hold in test", ", ".join(f"{at}={on}" for at, on in data["held_in_test"].items()) or "-"),
        ("trace", _traced(data)),
        *(("written" if not at else "", name) for at, name in enumerate(data["files"])),
    ]
    return "\n".join([*lines, *_rows(rows)]) + "\n"


def _rows(rows: Iterable[tuple[str, str]]) -> list[str]:
    return [f"  {label:<13} {text}".rstrip() for label, text in rows]


def _chain_table(chains: Sequence[Mapping[str, Any]]) -> list[str]:
    shown = list(chains)
    more = ""
    if len(chains) > MOST_CHAINS:
        ranked = sorted(chains, key=lambda chain: -chain["length"])
        shown = [*ranked[: MOST_CHAINS - 3], *ranked[-2:]]
        more = f"  ... {len(chains) - len(shown)} chains of lengths between these"
    head = ("chain", "length", "clock", "edge", "scan in", "scan out")
    rows = [
        tuple(str(chain[key.replace(" ", "_") if key != "chain" else "name"]) for key in head)
        for chain in shown
    ]
    widths = [max(len(row[at]) for row in (head, *rows)) for at in range(len(head))]
    lines = [
        "  " + "  ".join(_cell(row[at], widths[at], at == 1) for at in range(len(head)))
        for row in (head, *rows)
    ]
    lines = [line.rstrip() for line in lines]
    if more:
        lines.insert(-2, more)
    return lines


def _cell(text: str, width: int, is_number: bool) -> str:
    return text.rjust(width) if is_number else text.ljust(width)


def _ways(ways: Sequence[Mapping[str, Any]]) -> str:
    """Return how cells were converted, the most frequent ways first, on one line."""
    text = ""
    for number, way in enumerate(ways):
        goal = {"twin": f"to {way['to']}", "module": f"to {way['to']}", "as-is": "as they are"}.get(
            way["how"], f"with {' + '.join(way['with'])}"
        )
        words = f"{'; ' if text else ''}{way['count']} {way['cell']} {goal}"
        if text and len(text) + len(words) > WIDTH:
            rest = sum(other["count"] for other in ways[number:])
            kinds = len(ways) - number
            return f"{text}; {rest} of {kinds} other kind{'s' if kinds > 1 else ''}"
        text += words
    return text


def _reasons(reasons: Mapping[str, int]) -> str:
    total = sum(reasons.values())
    listed = ", ".join(f"{count} {slug}" for slug, count in reasons.items())
    return f"{total}: {listed}" if total else "none"


def _area(area: Mapping[str, Any]) -> str:
    before, after = area["before"], area["after"]
    share = f" ({(after / before - 1) * 100:+.1f} %)" if before else ""
    missing = area["cells_without_area"]
    note = f", not counting {', '.join(missing[:3])}" if missing else ""
    note += f" and {len(missing) - 3} more" if len(missing) > 3 else ""
    return f"{before:.10g} before, {after:.10g} after{share}{note}"


def _traced(data: Mapping[str, Any]) -> str:
    if data["traced"]:
        return "every chain walks from scan-out to scan-in as described"
    return f"{len(data['problems'])} chains are not as described"


def _ranges(names: Sequence[str]) -> str:
    """Return port names with runs shortened: ``scan_in_1 .. scan_in_8``."""
    runs: list[list[str]] = []
    for name in names:
        stem, _, number = name.rpartition("_")
        before, _, last = runs[-1][-1].rpartition("_") if runs else ("", "", "")
        follows = number.isdigit() and last.isdigit() and int(number) == int(last) + 1
        if follows and stem == before:
            runs[-1].append(name)
        else:
            runs.append([name])
    return ", ".join(run[0] if len(run) == 1 else f"{run[0]} .. {run[-1]}" for run in runs)


def survey_data(facts: Survey, findings: Sequence[Diagnostic]) -> dict[str, Any]:
    """Return the facts as data, the one that ``--json`` prints."""
    design = facts.design
    kinds = Counter(design.cell_name(cell) for cell in facts.storage.tolist())
    sizes = Counter(facts.domain.tolist())
    return {
        "design": design.netlist.top,
        "modules": len(design.netlist.modules),
        "instances": len(design.cell),
        "area": round(facts.area, 6),
        "cells_without_area": list(facts.without_area),
        "storage_cells": len(facts.storage),
        "kinds": [
            {"cell": name, "count": count, "scan": _scan_word(facts, name)}
            for name, count in sorted(kinds.items(), key=lambda item: (-item[1], item[0]))
        ],
        "domains": [
            {"clock": domain.port, "edge": domain.edge, "cells": sizes[number]}
            for number, domain in enumerate(facts.domains)
        ],
        "without_domain": sizes[LEFT_ALONE],
        "set_resets": {item.port: item.value for item in facts.set_resets},
        "findings": [to_json(item) for item in findings],
    }


def _scan_word(facts: Survey, name: str) -> str:
    cell = facts.design.library.cells[name]
    return ", ".join(role.style.value for role in cell.scan) or "none of its own"


def survey_screen(data: Mapping[str, Any]) -> str:
    """Return the facts as text."""
    title = (
        f"{data['design']}: {data['storage_cells']} storage cells among {data['instances']}"
        f" instances, {data['modules']} modules"
    )
    lines = [
        title,
        "",
        *_table(("cell", "count", "scan"), data["kinds"]),
        "",
        *_table(("clock", "edge", "cells"), data["domains"]),
    ]
    if data["without_domain"]:
        lines.append(
            f"  {data['without_domain']} cells have no clock that a tester controls or are"
            " kept, see the findings"
        )
    held = ", ".join(f"{port}={value}" for port, value in data["set_resets"].items()) or "-"
    rows = [
        ("area", f"{data['area']:.10g}"),
        ("hold in test", held),
        ("findings", str(len(data["findings"]))),
    ]
    return "\n".join([*lines, "", *_rows(rows)]) + "\n"


def _table(head: Sequence[str], rows: Sequence[Mapping[str, Any]]) -> list[str]:
    cells = [tuple(head), *(tuple(str(row[key]) for key in head) for row in rows)]
    widths = [max(len(row[at]) for row in cells) for at in range(len(head))]
    numeric = [all(row[at].isdigit() for row in cells[1:]) for at in range(len(head))]
    return [
        (
            "  " + "  ".join(_cell(row[at], widths[at], numeric[at]) for at in range(len(head)))
        ).rstrip()
        for row in cells
    ]


def trace_data(chains: Sequence[Chain], problems: Sequence[Diagnostic]) -> dict[str, Any]:
    """Return what a walk of the chains showed, as data."""
    return {
        "chains": [_chain_data(chain) for chain in chains],
        "traced": not problems,
        "problems": [to_json(item) for item in problems],
    }


def trace_screen(data: Mapping[str, Any], compared: bool) -> str:
    """Return what a walk of the chains showed, as text."""
    lines = _chain_table(data["chains"])
    verdict = _traced(data) if compared else f"{len(data['chains'])} chains found"
    return "\n".join([*lines, "", *_rows([("trace", verdict)])]) + "\n"
