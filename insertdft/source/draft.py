"""A module while it is being read: statements in, columns out, a batch at a time.

The bodies of a few thousand instances are joined and taken apart by one ``split``, which gives all
pins and nets as flat lists: no object a pin, no call a pin. Between two pins nothing may be left
over; where something is, the statements are read again one by one by the grammar.
"""

import re
from collections import defaultdict
from collections.abc import Sequence
from itertools import count, islice
from typing import Final, NamedTuple, Protocol

import numpy as np

from insertdft.netlist import Header, Ids, Offsets
from insertdft.netlist.names import KEYWORDS, canonical
from insertdft.source.bodies import NOTHING, PinTable, take_apart
from insertdft.source.nets import Nets, kept
from insertdft.source.patterns import ODD, ODD_INSTANCE, WIRES
from insertdft.source.preprocess import Prepared
from insertdft.source.tokens import NAME

_TERM: Final = re.compile(r"(?:\A|,)((?:[^,\\]++|\\\S++)*+)", re.ASCII)
_WIRE: Final = re.compile(rf"(?:wire\s++)?+({NAME})", re.ASCII)


class Tables:
    """Names that all modules of a netlist share; raw spellings here.

    Attributes:
        cells: Cell name -> id.
        pins: Pin names.
    """

    def __init__(self) -> None:
        """Start empty."""
        self.cells: defaultdict[str, int] = defaultdict(count().__next__)
        self.pins = PinTable()


class Row(NamedTuple):
    """One instance on its way into the columns.

    Attributes:
        cell: As written.
        name: As written, "" for a nameless gate.
        body: ``.A(x),.B(y))``: every connection by name or as ``.#0(x)``, the last ``)`` included.
        parameters: Text of the parameter overrides, from ``#`` on, or None.
        before: See ``Module.instance_before``.
        start: See ``Module.instance_start``.
        end: See ``Module.instance_end``.
    """

    cell: str
    name: str
    body: str
    parameters: str | None
    before: int
    start: int
    end: int


class Assign(NamedTuple):
    """One continuous assignment: numbers of its two sides, offset of its statement."""

    left: int
    right: int
    start: int


class _Columns(NamedTuple):
    """Instances on their way into a draft: the fields of ``Row``, each for all of them."""

    cells: Sequence[str]
    names: Sequence[str]
    bodies: Sequence[str]
    parameters: Sequence[str | None]
    offsets: Offsets  # shape (3, n): before, start, end


def _columns(rows: Sequence[Row]) -> _Columns:
    cells, names, bodies, parameters, *offsets = zip(*rows, strict=True)
    return _Columns(cells, names, bodies, parameters, np.array(offsets, np.int64))


class ReadsOneByOne(Protocol):
    """Reads what does not fit the bulk ways."""

    def read_instances(self, before: int, start: int, end: int) -> list[Row]:
        """Return the instances of one statement."""

    def declare_wire(self, draft: "Draft", name: str, offset: int) -> None:
        """Declare a wire whose kept name was met before."""


class Draft:
    """One module while it is being read.

    Attributes:
        prepared: The text.
        tables: Shared names.
        name: Kept spelling.
        start: Offset of ``module``.
        body_end: Offset of ``endmodule``.
        is_closed: Whether it was read to its end.
        header: Where ports can be added.
        port_names: Internal kept names in port-list order, with their offsets.
        renamed: Internal name -> name of the port, where the header has ``.port(net)``.
        nets: Declared nets and expression numbers.
        parameter_names: Names of the module's own parameters.
        names: Instance names.
        assigns: Continuous assignments, once it is closed.
        parameters: Parameter overrides by instance.
        before: See ``Module.instance_before``; this and the following once it is closed.
        starts: See ``Module.instance_start``.
        ends: See ``Module.instance_end``.
        cells: Shape (n,), ids into ``tables.cells``.
        pins: Shape (rows,), ids of pin names; one row a connection, whatever its width.
        numbers: Shape (rows,), number of the expression of each connection.
        row_start: Shape (n + 1,), rows of instance i are ``row_start[i]:row_start[i + 1]``.
    """

    def __init__(
        self,
        prepared: Prepared,
        tables: Tables,
        by_grammar: "ReadsOneByOne",
    ) -> None:
        """Start empty, knowing who reads what cannot be read in bulk."""
        self.prepared = prepared
        self.tables = tables
        self.name = ""
        self.start = self.body_end = 0
        self.is_closed = False
        self.header: Header | None = None
        self.port_names: list[tuple[str, int]] = []
        self.renamed: dict[str, str] = {}
        self.nets = Nets()
        self.parameter_names: set[str] = set()
        self.names: list[str] = []
        self.assigns: list[Assign] = []
        self.parameters: dict[int, str] = {}
        self.before = self.starts = self.ends = np.zeros(0, np.int64)
        self.cells = self.pins = self.numbers = np.zeros(0, np.int32)
        self.row_start = np.zeros(1, np.int64)
        self._by_grammar = by_grammar
        self._assign_texts: list[tuple[str, str, int]] = []
        self._offsets: list[Offsets] = []
        self._cells: list[Ids] = []
        self._pins: list[Ids] = []
        self._numbers: list[Ids] = []
        self._counts: list[Ids] = []

    def assign(self, left: str, right: str, start: int) -> None:
        """Keep one assignment by the texts of its sides."""
        self._assign_texts.append((left, right, start))

    def close(self, end: int) -> None:
        """Finish reading: ``endmodule`` stands at ``end``."""
        self.body_end = end
        self.is_closed = True
        empty = np.zeros((3, 0), np.int64)
        self.before, self.starts, self.ends = np.concatenate([empty, *self._offsets], axis=1)
        self.cells, self.pins = _joined(self._cells), _joined(self._pins)
        self.numbers = _joined(self._numbers)
        counts = _joined(self._counts)
        self.row_start = np.concatenate(([0], np.cumsum(counts, dtype=np.int64)))
        # Numbered last, so that the names in it are not met before their declarations.
        number = self.nets.number
        self.assigns = [
            Assign(number[_trim(left)], number[_trim(right)], start)
            for left, right, start in self._assign_texts
        ]

    def add_wires(self, matches: Sequence[re.Match[str]]) -> None:
        """Declare the scalar wires of statements that the scanner's pattern has answered."""
        names = _WIRE.findall(" ".join([match[WIRES] for match in matches]))
        met_before = self.nets.declare_fresh(names)
        if not KEYWORDS.isdisjoint(names):
            keywords = [place for place, name in enumerate(names) if name in KEYWORDS]
            met_before = sorted({*met_before, *keywords})
        if not met_before:
            return
        code = self.prepared.code
        spans = (match.span(WIRES) for match in matches)
        found = (name.start(1) for span in spans for name in _WIRE.finditer(code, *span))
        offsets = list(islice(found, met_before[-1] + 1))
        for place in met_before:
            self._by_grammar.declare_wire(self, canonical(names[place]), offsets[place])

    def add_plain(self, matches: Sequence[re.Match[str]]) -> None:
        """Take instances of the plainest form, each of which starts where the last one ended."""
        cells, names, bodies = zip(*[match.group(1, 2, 3) for match in matches], strict=True)
        starts = [match.start(1) for match in matches]
        ends = [match.end() for match in matches]
        offsets = np.empty((3, len(matches)), np.int64)
        offsets[1], offsets[2] = starts, ends
        offsets[0, 0], offsets[0, 1:] = matches[0].start(), offsets[2, :-1]
        columns = _Columns(cells, names, bodies, (), offsets)
        if not self._add(columns):
            self.add_mixed(matches)

    def add_mixed(self, matches: Sequence[re.Match[str]]) -> None:
        """Take instances of any form that the scanner's pattern answers."""
        rows = list(map(_row, matches))
        if self._add(_columns(rows)):
            return
        if len(rows) > 1:
            half = len(rows) // 2
            self.add_mixed(matches[:half])
            self.add_mixed(matches[half:])
        else:
            row = rows[0]
            self.add_rows(self._by_grammar.read_instances(row.before, row.start, row.end))

    def add_rows(self, rows: Sequence[Row]) -> None:
        """Take instances whose bodies are in order.

        Raises:
            RuntimeError: They are not, which is a defect of whoever made them.
        """
        if rows and not self._add(_columns(rows)):
            raise RuntimeError(f"bodies cannot be taken apart: {rows}")

    def _add(self, columns: "_Columns") -> bool:
        """Add instances, all or (if a body cannot be taken apart) none."""
        found = take_apart(columns.bodies, self.tables.pins)
        if found is None:
            return False
        self._pins.append(found.pins)
        self._numbers.append(_ids(self.nets.number, found.expressions))
        self._counts.append(found.counts)
        self._cells.append(_ids(self.tables.cells, columns.cells))
        self._add_names(columns.names, columns.parameters)
        self._offsets.append(columns.offsets)
        return True

    def _add_names(self, names: Sequence[str], parameters: Sequence[str | None]) -> None:
        first = len(self.names)
        self.names.extend(kept(names))
        if parameters:
            overrides = enumerate(parameters, first)
            self.parameters.update((number, text) for number, text in overrides if text)


def _joined(parts: list[Ids]) -> Ids:
    return np.concatenate(parts) if parts else np.zeros(0, np.int32)


def _ids(table: defaultdict[str, int], texts: Sequence[str]) -> Ids:
    return np.fromiter(map(table.__getitem__, texts), np.int32, len(texts))


def _row(match: re.Match[str]) -> Row:
    """Return the instance of a statement, in whichever of the scanner's ways it is written."""
    odd = ODD_INSTANCE.match(match.string, match.start(ODD)) if match[ODD] else None
    if odd is None:
        cell, name, body = match.group(1, 2, 3)
        return Row(cell, name, body, None, match.start(), match.start(1), match.end())
    cell, parameters, instance, named, terms = odd.groups()
    body = named if named is not None else by_position(_terms(terms))
    return Row(cell, instance or "", body, parameters, match.start(), match.start(ODD), match.end())


def by_position(terms: Sequence[str]) -> str:
    """Return the body of an instance that connects ``terms`` by position."""
    if not terms:
        return NOTHING
    return ",".join([f".#{place}({term})" for place, term in enumerate(terms)]) + ")"


def _terms(text: str) -> list[str]:
    if "\\" not in text:
        terms = [term.strip() for term in text.split(",")]
    else:
        terms = [_trim(term) for term in _TERM.findall(text)]
    return terms if any(terms) or len(terms) > 1 else []


def _trim(text: str) -> str:
    """Return an expression without outer blanks, but with the one that closes an escaped name."""
    return text.strip() if "\\" not in text else text.strip() + " "
