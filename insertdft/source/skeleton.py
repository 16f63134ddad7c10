"""Everything of a module but its bulk: headers, odd declarations, odd assigns, odd instances.

Plain declarations are answered by the scanner's pattern and only entered here. The rest is read by
pyverilog's grammar (``grammar.py``). What its grammar has no rule for, though the structural subset
does, is brought into a form that it knows beforehand: kinds of nets that act like wires, delays and
drive strengths (which say nothing about structure), several assigns in one statement, empty places
in a list of connections, ports under another name.
"""

import re
from typing import Final

from insertdft.netlist.names import canonical
from insertdft.source.by_grammar import ByGrammar
from insertdft.source.complaints import Complaints, word_at
from insertdft.source.declarations import DIRECTIONS, NET_KINDS, Declared, declare
from insertdft.source.draft import Draft, Row
from insertdft.source.headers import read_header
from insertdft.source.odd_instances import drop_delays, read_instances
from insertdft.source.odd_statements import read_assigns, read_declaration
from insertdft.source.patterns import DECLARATION, DECLARED
from insertdft.source.preprocess import Macros, Prepared
from insertdft.source.tokens import NAME

_WORD: Final = re.compile(NAME, re.ASCII)


class Skeleton:
    """Reads single statements of one source into drafts."""

    def __init__(self, prepared: Prepared, macros: Macros, complaints: Complaints) -> None:
        """Keep what every statement needs."""
        self._by = ByGrammar(prepared, macros, complaints)
        self._complaints = complaints

    def read_header(self, draft: Draft, start: int, end: int) -> None:
        """Read a module header, from ``module`` to its ``;``."""
        read_header(self._by, draft, start, end)

    def declare_plain(self, draft: Draft, match: re.Match[str]) -> None:
        """Enter a declaration that the scanner's pattern has answered."""
        plain = DECLARATION.match(self._by.code, match.start(DECLARED))
        if plain is None:
            raise RuntimeError("the patterns of a declaration differ")
        kind, msb, lsb = plain.group("kind", "msb", "lsb")
        limits = (int(msb), int(lsb)) if msb is not None else None
        is_port = kind in DIRECTIONS
        for name in _WORD.finditer(self._by.code, *plain.span("names")):
            declared = Declared(
                canonical(name[0]),
                name.start(),
                direction=kind if is_port else None,
                kind=None if is_port else kind,
                limits=limits,
            )
            declare(draft, declared, self._complaints)

    def declare_wire(self, draft: Draft, name: str, offset: int) -> None:
        """Declare a wire whose kept name was met before."""
        declare(draft, Declared(name, offset, None, "wire", None), self._complaints)

    def read(self, draft: Draft, before: int, start: int, end: int) -> None:
        """Read any statement inside a module; complain if it is none."""
        words = self._by.words(start, end)
        first = words[0].text
        if first == "defparam":
            self._complaints.error(
                "netlist-unsupported",
                "`defparam` changes parameters from afar",
                word_at(self._by.source, start),
                "write the parameters at the instance, `#(.NAME(value))`",
            )
        elif first == "assign":
            read_assigns(self._by, draft, words)
        elif first in NET_KINDS or first in DIRECTIONS:
            read_declaration(self._by, draft, words)
        elif first in ("parameter", "localparam"):
            tree = self._by.parse(words)
            draft.parameter_names.update(canonical(item.name) for item in tree.list)
        else:
            draft.add_rows(self.read_instances(before, start, end))

    def read_instances(self, before: int, start: int, end: int) -> list[Row]:
        """Return the instances of one statement."""
        return read_instances(self._by, before, start, end)

    def drop_delays(self, draft: Draft) -> None:
        """Take out what looks like parameters of a gate: it is its delay."""
        drop_delays(self._by, draft)
