"""A module while it is being read: statements in, columns out, a batch at a time.

The bodies of a few thousand instances are joined and taken apart by one ``split``, which gives all
pins and nets as flat lists: no object a pin, no call a pin. Between two pins nothing may be left
over; where something is, the statements are read again one by one by the grammar.
"""

import re
from array import array
from collections import defaultdict
from collections.abc import Sequence
from itertools import count
from typing import Final, NamedTuple, Protocol

import numpy as np

from insertdft.netlist import Header, Ids, Offsets
from insertdft.netlist.names import canonical
from insertdft.source.nets import Nets
from insertdft.source.preprocess import Prepared
from insertdft.source.tokens import NAME

#: Instances read between two rounds of taking bodies apart.
BATCH: Final = 8192

#: A simple expression without parentheses, without blanks around it. The blank that closes an
#: escaped name belongs to it.
_EXPRESSION: Final = r"(?:[^()\\\s]++|\\\S++\s|\s++(?!\)))*+"
_PIN: Final = re.compile(
    rf"\.\s*+({NAME}|\#\d++)\s*+\(\s*+({_EXPRESSION})\s*+\)\s*+(?:,\s*+(?=\.)|(?=\)))|\)\s*+;",
    re.ASCII,
)
_TERM: Final = re.compile(r"(?:\A|,)((?:[^,\\]++|\\\S++)*+)", re.ASCII)
_WIRE: Final = re.compile(NAME, re.ASCII)


class Tables:
    """Names that all modules of a netlist share; raw spellings here.

    Attributes:
        cells: Cell name -> id.
        pins: Pin name -> id; ``#i`` for the i-th connection by position. Id 0 ends an instance.
    """

    def __init__(self) -> None:
        """Start empty."""
        self.cells: defaultdict[str, int] = defaultdict(count().__next__)
        self.pins: defaultdict[str | None, int] = defaultdict(count().__next__)
        self.pins[None]


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
        header: Where ports can be added.
        port_names: Internal kept names in port-list order, with their offsets.
        renamed: Internal name -> name of the port, where the header has ``.port(net)``.
        nets: Declared nets and expression numbers.
        parameter_names: Names of the module's own parameters.
        pending: Statements of instances not yet taken apart.
        wires: Spans of name lists of scalar wires not yet declared.
        names: Instance names.
        assigns: Continuous assignments.
        parameters: Parameter overrides by instance.
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
        self.header: Header | None = None
        self.port_names: list[tuple[str, int]] = []
        self.renamed: dict[str, str] = {}
        self.nets = Nets()
        self.parameter_names: set[str] = set()
        self.pending: list[re.Match[str]] = []
        self.wires: list[tuple[int, int]] = []
        self.names: list[str] = []
        self.assigns: list[Assign] = []
        self.parameters: dict[int, str] = {}
        self._by_grammar = by_grammar
        self._offsets = (array("q"), array("q"), array("q"))
        self._cells: list[Ids] = []
        self._pins: list[Ids] = []
        self._numbers: list[Ids] = []
        self._counts: list[Ids] = []

    def assign(self, left: str, right: str, start: int) -> None:
        """Keep one assignment by the texts of its sides."""
        number = self.nets.number
        self.assigns.append(Assign(number[_trim(left)], number[_trim(right)], start))

    def flush(self) -> None:
        """Declare and take apart everything that waits."""
        self._flush_wires()
        if not self.pending:
            return
        matches, self.pending = self.pending, []
        if not self._add(list(map(_row, matches))):
            for match in matches:
                self._add_one(match)

    def add_rows(self, rows: Sequence[Row]) -> None:
        """Take instances whose bodies are in order.

        Raises:
            RuntimeError: They are not, which is a defect of whoever made them.
        """
        self.flush()
        if rows and not self._add(rows):
            raise RuntimeError(f"bodies cannot be taken apart: {rows}")

    def _add_one(self, match: re.Match[str]) -> None:
        row = _row(match)
        if not self._add([row]):
            self.add_rows(self._by_grammar.read_instances(row.before, row.start, row.end))

    def _flush_wires(self) -> None:
        spans, self.wires = self.wires, []
        for first in range(0, len(spans), BATCH):
            self._add_wires(spans[first : first + BATCH])

    def _add_wires(self, spans: list[tuple[int, int]]) -> None:
        code = self.prepared.code
        names = _WIRE.findall(",".join([code[start:end] for start, end in spans]))
        met_before = self.nets.declare_fresh(names)
        if met_before:
            offsets = [
                name.start() for start, end in spans for name in _WIRE.finditer(code, start, end)
            ]
            for place in met_before:
                self._by_grammar.declare_wire(self, canonical(names[place]), offsets[place])

    def _add(self, rows: Sequence[Row]) -> bool:
        cells, names, bodies, parameters, *offsets = zip(*rows, strict=True)
        parts = _PIN.split(";".join(bodies) + ";")
        pins: list[str | None] = parts[1::3]
        if "".join(parts[::3]) or pins.count(None) != len(rows):
            return False
        ids = np.fromiter(map(self.tables.pins.__getitem__, pins), np.int32, len(pins))
        is_pin = ids > 0
        texts: list[str] = [text for text in parts[2::3] if text is not None]
        numbers = np.fromiter(map(self.nets.number.__getitem__, texts), np.int32, len(texts))
        ends = np.flatnonzero(~is_pin)
        self._counts.append((np.diff(ends, prepend=-1) - 1).astype(np.int32))
        self._pins.append(ids[is_pin])
        self._numbers.append(numbers)
        self._cells.append(
            np.fromiter(map(self.tables.cells.__getitem__, cells), np.int32, len(cells))
        )
        self._add_names(names, parameters)
        for column, values in zip(self._offsets, offsets, strict=True):
            column.extend(values)
        return True

    def _add_names(self, names: Sequence[str], parameters: Sequence[str | None]) -> None:
        first = len(self.names)
        self.names.extend([name if name[:1] != "\\" else canonical(name) for name in names])
        if any(parameters):
            overrides = enumerate(parameters, first)
            self.parameters.update((number, text) for number, text in overrides if text)

    @property
    def before(self) -> Offsets:
        """See ``Module.instance_before``."""
        return np.array(self._offsets[0], np.int64)

    @property
    def starts(self) -> Offsets:
        """See ``Module.instance_start``."""
        return np.array(self._offsets[1], np.int64)

    @property
    def ends(self) -> Offsets:
        """See ``Module.instance_end``."""
        return np.array(self._offsets[2], np.int64)

    @property
    def cells(self) -> Ids:
        """Shape (n,), ids into ``tables.cells``."""
        return _joined(self._cells)

    @property
    def pins(self) -> Ids:
        """Shape (rows,), ids into ``tables.pins``; one row a connection, whatever its width."""
        return _joined(self._pins)

    @property
    def numbers(self) -> Ids:
        """Shape (rows,), number of the expression of each connection."""
        return _joined(self._numbers)

    @property
    def row_start(self) -> Offsets:
        """Shape (n + 1,), rows of instance i are ``row_start[i]:row_start[i + 1]``."""
        counts = _joined(self._counts)
        return np.concatenate(([0], np.cumsum(counts, dtype=np.int64))).astype(np.int64)


def _joined(parts: list[Ids]) -> Ids:
    return np.concatenate(parts) if parts else np.zeros(0, np.int32)


def _row(match: re.Match[str]) -> Row:
    cell, parameters, name, named, terms = match.group(
        "cell", "parameters", "instance", "named", "terms"
    )
    body = named if named is not None else by_position(_terms(terms))
    return Row(cell, name or "", body, parameters, match.start(), match.start("cell"), match.end())


def by_position(terms: Sequence[str]) -> str:
    """Return the body of an instance that connects ``terms`` by position."""
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
