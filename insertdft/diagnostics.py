"""One type for everything the tool has to say about a user's input."""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from difflib import get_close_matches
from enum import Enum
from typing import Final

from insertdft.text import Span


class Severity(Enum):
    """Whether output may still be written."""

    ERROR = "error"
    WARNING = "warning"
    NOTE = "note"


SLUGS: Final[dict[str, str]] = {
    # reading files
    "file-unreadable": "A file named on the command line cannot be read",
    "not-text": "A file holds bytes that no netlist or library has",
    "options-unreadable": "The options file is not valid TOML or names an unknown option",
    # netlist text
    "netlist-empty": "The netlist text holds no module",
    "netlist-syntax": "The text is not structural Verilog",
    "netlist-behavioural": "The netlist holds behavioural code",
    "netlist-truncated": "The text ends inside a module or a statement",
    "netlist-unsupported": "A construct of the language is understood but not supported",
    "directive-unknown": "A compiler directive is not understood",
    "module-duplicate": "Two modules have the same name",
    "module-cycle": "A module contains itself, directly or through others",
    "top-unknown": "The named top module does not exist, or none can be chosen",
    "name-undeclared": "A name is used that nothing declares",
    "name-duplicate": "Two things of one module have the same name",
    "width-mismatch": "Two sides of a connection have different widths",
    "port-unknown": "A connection names a port that the module does not have",
    # linking netlist and library
    "cell-unknown": "An instance names neither a module nor a library cell",
    "pin-unknown": "A connection names a pin that the cell does not have",
    "pin-order-unknown": "A library cell is connected by position but its pin order is not known",
    "net-two-drivers": "A net has more than one driver",
    # library
    "library-syntax": "The library text is not valid Liberty",
    "library-unsupported": "A construct of the library is understood but not supported",
    "library-empty": "The library holds no cell",
    "library-expression": "A Boolean expression of a cell cannot be read",
    "library-duplicate-cell": "Two library files describe the same cell",
    "cell-model-unsupported": "The behaviour of a cell model cannot be derived",
    "scan-role-wrong": "What a cell declares about its scan pins does not fit its function",
    "cell-map-wrong": "A hand-made cell mapping does not fit the library",
    # survey
    "no-storage": "The design has no storage cell",
    "no-scan-cell": "A storage cell has no scan cell and none can be composed",
    "clock-not-controllable": "The clock of a storage cell does not come from a port in test",
    "reset-not-controllable": "A set or reset of a storage cell cannot be held off from a port",
    "cell-kept": "A storage cell is left alone because the netlist or the user says so",
    "latch-not-scanned": "A latch stays out of every chain in this style",
    "scan-pins-in-use": "A scan cell has its scan pins connected already",
    # latches
    "latch-unclear": "A latch cell holds several latches, or no single net opens it",
    "latch-pair-one-clock": "One clock port opens master and slave of a latch pair in turn",
    "latch-open-together": "A latch takes the state of another while both are open",
    "latch-clock-gated": "The slave of a latch pair is opened by a gated clock",
    "latch-half-pair": "A latch lacks the partner that others of its phase have",
    "latch-alone": "A latch belongs to no pair",
    "latch-several-slaves": "A master latch has several slaves",
    "latch-several-masters": "A latch in a slave's phase takes its data from several masters",
    "latch-master-used": "The output of a master latch also feeds logic",
    # design rules of LSSD
    "lssd-edge-triggered": "A storage cell is no level-sensitive latch",
    "lssd-feedback-loop": "Gates form a loop, which is storage that no latch holds",
    "lssd-same-phase-path": "A latch feeds the data of a latch of the same clock",
    "lssd-gates-own-clock": "A latch gates a clock that is its own",
    "lssd-clock-not-off": "A latch is not closed while all clock ports are at rest",
    "lssd-clock-cannot-turn-on": "No clock port alone can open a latch",
    "lssd-clocks-anded": "A clock is gated by another clock",
    "lssd-clock-into-data": "A clock port reaches the data of a latch",
    "lssd-latch-outside-srl": "A latch belongs to no shift-register latch",
    "lssd-shift-clock-blocked": "A shift clock is not controlled from its port in the scan state",
    # plan
    "nothing-to-convert": "No storage cell can be converted",
    "module-copies-differ": "A cell can be converted in some places of its module but not in all",
    "pattern-unmatched": "A name pattern of the user matches nothing",
    "chains-too-many": "More chains are asked for than there are cells to put into them",
    "chains-too-few": "Fewer chains are asked for than clock and edge groups need",
    "port-taken": "A name for a new port is already taken",
    "plan-unreadable": "A plan file is not valid",
    "plan-mismatch": "A plan does not belong to this netlist or library",
    "latch-pair-apart": "A master latch and its slave stand in different modules",
    "shift-clock-gated": "Logic can keep a shift clock from a latch",
    "negative-edge-in-lssd": "A falling-edge flip-flop has no two-phase form",
    "latch-copy": "A latch copies the state of a position and needs no scan of its own",
    "clocks-overlap": "Two clocks that must never be on together would be",
    # trace
    "chain-broken": "A scan chain cannot be walked from its scan-out to its scan-in",
    "chain-differs": "A scan chain is not what the chain description says",
    "chains-not-found": "No scan chain can be found in the netlist",
    "description-unreadable": "The chain description is not valid",
    # compare
    "timing-no-tables": "The library has no delay tables for the cells of the design",
    # exports
    "export-mismatch": "The chain description does not fit the netlist that is exported",
    "timing-overlap": "The edges of a tester cycle overlap or do not fit into its period",
    "order-unreadable": "A file with an order of chains cannot be read",
    "order-illegal": "An order of chains holds other cells, or moves one where it may not go",
    # writing
    "output-exists-as-input": "An output would overwrite an input",
    "output-unwritable": "An output cannot be written",
}


@dataclass(frozen=True, slots=True)
class Diagnostic:
    """One problem, reported once.

    Attributes:
        slug: Key into ``SLUGS``.
        severity: Whether output may still be written.
        message: The fact, in one sentence that can stand alone. No advice, no full stop.
        span: The smallest text that shows the problem, or None if no text is to blame.
        hint: What to change. The only place for advice.
        also: Further spans that caused it, each with a few words.
        names: Everything concerned (cells, nets), where one cause hits many.
    """

    slug: str
    severity: Severity
    message: str
    span: Span | None = None
    hint: str | None = None
    also: tuple[tuple[Span, str], ...] = ()
    names: tuple[str, ...] = ()

    def __post_init__(self) -> None:
        """Refuse slugs that nobody declared."""
        if self.slug not in SLUGS:
            raise KeyError(f"unregistered diagnostic slug `{self.slug}`")


def error(slug: str, message: str, span: Span | None = None, hint: str | None = None) -> Diagnostic:
    """Return an error without further spans."""
    return Diagnostic(slug, Severity.ERROR, message, span, hint)


class DesignError(Exception):
    """The user's input cannot be worked with; carries every problem found, at least one."""

    def __init__(self, diagnostics: Iterable[Diagnostic]) -> None:
        """Keep the diagnostics; the message shows the first."""
        self.diagnostics = tuple(diagnostics)
        super().__init__(render(self.diagnostics[0]) if self.diagnostics else "no diagnostics")


SHOWN_NAMES: Final = 8
SHOWN_WIDTH: Final = 110


def render(item: Diagnostic) -> str:
    """Return the diagnostic as the terminal shows it: place, fact, excerpt, what to do."""
    lines = [f"{_place(item.span)}{item.severity.value}, {item.slug}", f"  {item.message}"]
    if item.span is not None:
        lines += _excerpt(item.span)
    if item.names:
        more = len(item.names) - SHOWN_NAMES
        tail = f" and {more} more" if more > 0 else ""
        lines.append("  concerns: " + ", ".join(item.names[:SHOWN_NAMES]) + tail)
    lines += [f"  {words}: {span.place}" for span, words in item.also]
    if item.hint:
        lines.append(f"  to mend: {item.hint}")
    return "\n".join(lines) + "\n"


def to_json(item: Diagnostic) -> dict[str, object]:
    """Return the diagnostic as plain data for ``--json``."""
    found: dict[str, object] = {
        "slug": item.slug,
        "severity": item.severity.value,
        "message": item.message,
        "place": item.span.place if item.span else None,
        "hint": item.hint,
    }
    if item.names:
        found["names"] = list(item.names)
    if item.also:
        found["also"] = [{"place": span.place, "words": words} for span, words in item.also]
    return found


def nearest(name: str, known: Iterable[str]) -> str | None:
    """Return "did you mean ..." with the known names closest to ``name``, or None."""
    close = get_close_matches(name, list(known), n=3, cutoff=0.6)
    return f"did you mean {' or '.join(f'`{item}`' for item in close)}?" if close else None


def errors(items: Sequence[Diagnostic]) -> list[Diagnostic]:
    """Return those that forbid output."""
    return [item for item in items if item.severity is Severity.ERROR]


def _place(span: Span | None) -> str:
    return f"{span.place}: " if span else ""


def _excerpt(span: Span) -> list[str]:
    line = span.source.line(span.start)
    column = span.source.position(span.start)[1] - 1
    first = max(0, column - SHOWN_WIDTH // 2)
    shown = line[first : first + SHOWN_WIDTH]
    if not shown.strip() or (not shown.isprintable() and "\t" not in shown):
        return []
    width = max(1, min(span.end - span.start, len(shown) - (column - first)))
    return [
        "      " + shown.replace("\t", " "),
        "      " + " " * (column - first) + "~" * width,
    ]
