"""Everything of a module but its bulk: headers, odd declarations, odd assigns, odd instances.

Plain declarations are answered by the scanner's pattern and only entered here. The rest is read by
pyverilog's grammar (``grammar.py``). What its grammar has no rule for, though the structural subset
does, is brought into a form that it knows beforehand: kinds of nets that act like wires, delays and
drive strengths (which say nothing about structure), several assigns in one statement, empty places
in a list of connections, ports under another name.
"""

import re
from collections.abc import Iterator
from typing import Final, NoReturn

from insertdft.netlist import PRIMITIVES, Header
from insertdft.netlist.names import canonical
from insertdft.source.complaints import Complaints, SyntaxStopError, word_at
from insertdft.source.declarations import NET_KINDS, Declared, declare
from insertdft.source.draft import Draft, Row, by_position
from insertdft.source.grammar import Node, NotVerilogError, parse
from insertdft.source.patterns import DECLARATION, DECLARED
from insertdft.source.preprocess import Macros, Prepared
from insertdft.source.spelling import EMPTY, NotStructuralError, integer, spell
from insertdft.source.tokens import NAME, Token, matching, split_commas, tokens
from insertdft.text import Span

_HEADER: Final = re.compile(
    rf"(?:macro)?module\s++({NAME})\s*+(?:(\()\s*+((?:{NAME}\s*+(?:,\s*+{NAME}\s*+)*+)?+)(\))\s*+)?+;",
    re.ASCII,
)
_WORD: Final = re.compile(NAME, re.ASCII)
_DIRECTIONS: Final = ("input", "output", "inout")
_STRENGTHS: Final = frozenset(
    """strong0 strong1 pull0 pull1 weak0 weak1 supply0 supply1 highz0 highz1 small medium
    large""".split()
)


class Skeleton:
    """Reads single statements of one source into drafts."""

    def __init__(self, prepared: Prepared, macros: Macros, complaints: Complaints) -> None:
        """Keep what every statement needs."""
        self._source = prepared.source
        self._code = prepared.code
        self._macros = macros.bodies
        self._complaints = complaints

    # -- headers

    def read_header(self, draft: Draft, start: int, end: int) -> None:
        """Read a module header, from ``module`` to its ``;``."""
        draft.start = start
        plain = _HEADER.fullmatch(self._code, start, end)
        if plain is None:
            self._read_odd_header(draft, start, end)
        else:
            self._read_plain_header(draft, plain)

    def _read_plain_header(self, draft: Draft, match: re.Match[str]) -> None:
        draft.name = canonical(match[1])
        for name in _WORD.finditer(self._code, *match.span(3)) if match[2] else ():
            draft.port_names.append((canonical(name[0]), name.start()))
        draft.header = Header(
            ansi=False,
            list_end=match.start(4) if match[2] else None,
            list_empty=not match[3],
            end=match.end(),
            name_end=match.end(1),
        )

    def _read_odd_header(self, draft: Draft, start: int, end: int) -> None:
        words = self._words(start, end)
        name = words[1] if len(words) > 1 and words[1].kind == "name" else None
        draft.name = canonical(name.text) if name else ""
        words[0] = words[0]._replace(text="module")
        opening = self._port_list(words)
        closing = matching(words, opening) if opening else -1
        if opening and closing > 0:
            words[opening + 1 : closing] = self._unrename(draft, words[opening + 1 : closing])
            closing = matching(words, opening)
        tree = self._parse(words)
        is_ansi = any(type(port).__name__ == "Ioport" for port in tree.ports)
        draft.header = Header(
            ansi=is_ansi,
            list_end=words[closing].start if opening else None,
            list_empty=not tree.ports,
            end=end,
            name_end=words[1].end,
        )
        for parameter in tree.paramlist.params:
            draft.parameter_names.update(canonical(item.name) for item in parameter.list)
        for port in tree.ports:
            self._read_port(draft, port)

    def _port_list(self, words: list[Token]) -> int:
        """Return the index of the ``(`` of the port list, 0 if there is none."""
        at = 2
        if len(words) > 3 and words[2].text == "#":
            at = matching(words, 3) + 1
        return at if at < len(words) and words[at].text == "(" else 0

    def _unrename(self, draft: Draft, words: list[Token]) -> list[Token]:
        """Replace ports like ``.p(net)`` by ``net``; the grammar has no rule for them."""
        changed: list[Token] = []
        for part in split_commas(words):
            if changed:
                changed.append(Token("operator", ",", part[0].start if part else 0, 0))
            if part and part[0].text == ".":
                part = self._renamed(draft, part)  # noqa: PLW2901
            changed += part
        return changed

    def _renamed(self, draft: Draft, part: list[Token]) -> list[Token]:
        if len(part) != 5 or part[3].kind != "name":
            self._refuse(part[0], "a port that is not one whole net", "name the net in the list")
        draft.renamed[canonical(part[3].text)] = canonical(part[1].text)
        return [part[3]]

    def _read_port(self, draft: Draft, port: Node) -> None:
        if type(port).__name__ != "Ioport":
            draft.port_names.append((canonical(port.name), port.lineno))
            return
        first, second = port.first, port.second
        draft.port_names.append((canonical(first.name), first.lineno))
        kinds = [first] if second is None else [first, second]
        self._declare(draft, kinds, "wire")

    # -- statements

    def declare_plain(self, draft: Draft, match: re.Match[str]) -> None:
        """Enter a declaration that the scanner's pattern has answered."""
        plain = DECLARATION.match(self._code, match.start(DECLARED))
        if plain is None:
            raise RuntimeError("the patterns of a declaration differ")
        kind, msb, lsb = plain.group("kind", "msb", "lsb")
        limits = (int(msb), int(lsb)) if msb is not None else None
        is_port = kind in _DIRECTIONS
        for name in _WORD.finditer(self._code, *plain.span("names")):
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
        words = self._words(start, end)
        first = words[0].text
        if first == "defparam":
            self._complaints.error(
                "netlist-unsupported",
                "`defparam` changes parameters from afar",
                word_at(self._source, start),
                "write the parameters at the instance, `#(.NAME(value))`",
            )
        elif first == "assign":
            self._read_assigns(draft, words)
        elif first in NET_KINDS or first in _DIRECTIONS:
            self._read_declaration(draft, words)
        elif first in ("parameter", "localparam"):
            tree = self._parse(words)
            draft.parameter_names.update(canonical(item.name) for item in tree.list)
        else:
            draft.add_rows(self.read_instances(before, start, end))

    def _read_assigns(self, draft: Draft, words: list[Token]) -> None:
        at = self._skip_strength_and_delay(words, 1)
        for part in split_commas(words[at:-1]):
            tree = self._parse([words[0], *part, words[-1]])
            self._assign(draft, tree, words[0].start)

    def _assign(self, draft: Draft, tree: Node, start: int) -> None:
        left, right = self._spell(tree.left), self._spell(tree.right)
        if left is not None and right is not None:
            draft.assign(left, right, start)

    def _read_declaration(self, draft: Draft, words: list[Token]) -> None:
        kind = next((word.text for word in words[:2] if word.text in NET_KINDS), None)
        prefix, rest = self._prefix(words)
        for part in split_commas(rest[:-1]):
            tree = self._parse([*prefix, *part, rest[-1]])
            nodes = list(tree.list)
            assigns = [node for node in nodes if type(node).__name__ == "Assign"]
            self._declare(draft, [node for node in nodes if node not in assigns], kind or "wire")
            for node in assigns:
                self._assign(draft, node, words[0].start)

    def _prefix(self, words: list[Token]) -> tuple[list[Token], list[Token]]:
        """Return what comes before the names as the grammar knows it, and the rest."""
        prefix: list[Token] = []
        at = 0
        while at < len(words):
            word = words[at]
            if word.text in NET_KINDS:
                prefix.append(word._replace(text="wire"))
            elif word.text in _DIRECTIONS or word.text == "signed":
                prefix.append(word)
            elif word.text == "[":
                closing = matching(words, at)
                prefix += words[at : closing + 1]
                at = closing if closing > 0 else len(words)
            elif word.text in ("#", "("):
                at = self._skip_strength_and_delay(words, at) - 1
            elif word.text not in ("vectored", "scalared"):
                break
            at += 1
        return prefix, words[at:]

    def _skip_strength_and_delay(self, words: list[Token], at: int) -> int:
        """Return the index behind a drive strength and a delay, if they stand at ``at``."""
        if words[at].text == "(" and words[at + 1].text in _STRENGTHS:
            at = matching(words, at) + 1
        if words[at].text == "#":
            at = matching(words, at + 1) + 1 if words[at + 1].text == "(" else at + 2
        return at

    def _declare(self, draft: Draft, nodes: list[Node], kind: str) -> None:
        """Enter the declarations of the grammar; all nodes are about one name."""
        direction: str | None = None
        net: str | None = None
        for node in nodes:
            what = type(node).__name__.lower()
            if what in _DIRECTIONS:
                direction = what
            elif what == "reg":
                self._complaints.error(
                    "netlist-behavioural",
                    f"`{node.name}` is a variable, not a net",
                    word_at(self._source, node.lineno),
                    "declare it as a wire",
                )
            else:
                net = kind
        head = nodes[0]
        if head.dimensions is not None:
            self._refuse_at(head.lineno, f"`{head.name}` is an array of nets")
        declared = Declared(
            canonical(head.name), self._name_offset(head), direction, net, self._limits(head)
        )
        declare(draft, declared, self._complaints)

    def _name_offset(self, node: Node) -> int:
        # The grammar gives some declarations the place of their first word.
        found = self._code.find(node.name, node.lineno)
        return found if found >= 0 else node.lineno

    def _limits(self, node: Node) -> tuple[int, int] | None:
        if node.width is None:
            return None
        try:
            return integer(node.width.msb), integer(node.width.lsb)
        except NotStructuralError as cause:
            self._refuse_at(cause.offset, f"the range of `{node.name}` is {cause.what}")

    # -- instances

    def read_instances(self, before: int, start: int, end: int) -> list[Row]:
        """Return the instances of one statement."""
        words = self._words(start, end)
        is_gate = words[0].text in PRIMITIVES
        parameters = None
        at = 1
        if is_gate:
            at = self._skip_strength_and_delay(words, at)
        elif len(words) > 2 and words[1].text == "#":
            at = matching(words, 2) + 1 if words[2].text == "(" else 3
            parameters = self._code[words[1].start : words[at - 1].end]
        # A gate may do without a name, also in a row with others that have one; the grammar wants
        # all or none.
        parts = split_commas(words[at:-1]) if is_gate else [words[at:-1]]
        rows: list[Row] = []
        for instance in self._instances(words, parts):
            if instance.array is not None:
                self._refuse_at(instance.lineno, f"`{instance.name}` is an array of instances")
            name = instance.name
            if not name and not is_gate:
                self._no_verilog(words[at].start)
            rows.append(
                Row(words[0].text, name, self._body(instance), parameters, before, start, end)
            )
        return rows

    def _instances(self, words: list[Token], parts: list[list[Token]]) -> Iterator[Node]:
        for part in parts:
            tree = self._parse([words[0], *_fill_empty(part), words[-1]])
            if type(tree).__name__ != "InstanceList":
                self._no_verilog(words[0].start)
            yield from tree.instances

    def _body(self, instance: Node) -> str:
        ports = instance.portlist
        texts = [self._spell(port.argname) or "" if port.argname else "" for port in ports]
        if ports and ports[0].portname is None:
            return by_position(["" if text == EMPTY else text for text in texts])
        pins = [f".{port.portname} ({text})" for port, text in zip(ports, texts, strict=True)]
        return ",".join(pins) + ")"

    # -- what all of them need

    def _words(self, start: int, end: int) -> list[Token]:
        return list(tokens(self._code, start, end, self._macros))

    def _parse(self, words: list[Token]) -> Node:
        try:
            return parse(words)
        except NotVerilogError as cause:
            self._no_verilog(cause.offset if cause.offset is not None else words[-1].start)

    def _spell(self, node: Node) -> str | None:
        try:
            return spell(node)
        except NotStructuralError as cause:
            self._complaints.error(
                "netlist-behavioural",
                f"the connection computes something: {cause.what}",
                word_at(self._source, cause.offset),
                "give the netlist that synthesis writes; logic belongs into cells",
            )
            return None

    def _no_verilog(self, offset: int) -> NoReturn:
        word = word_at(self._source, offset)
        self._complaints.error(
            "netlist-syntax",
            f"`{word.text}` cannot stand here",
            word,
            "look for a missing comma, bracket or semicolon before it",
        )
        raise SyntaxStopError

    def _refuse(self, word: Token, what: str, hint: str) -> NoReturn:
        self._complaints.error(
            "netlist-unsupported", f"this is {what}", Span(self._source, word.start, word.end), hint
        )
        raise SyntaxStopError

    def _refuse_at(self, offset: int, fact: str) -> NoReturn:
        self._complaints.error(
            "netlist-unsupported",
            fact,
            word_at(self._source, offset),
            "have synthesis write it out bit by bit, with plain numbers",
        )
        raise SyntaxStopError


def _fill_empty(words: list[Token]) -> list[Token]:
    """Put a name into every empty place of a list by position; the grammar has no rule for them."""
    filled: list[Token] = []
    depth = 0
    for at, word in enumerate(words):
        is_end = word.text in (",", ")") and word.kind == "operator"
        before = words[at - 1].text if at else ""
        if depth == 1 and is_end and (before == "," or (before == "(" and word.text == ",")):
            filled.append(Token("name", EMPTY, word.start, word.start))
        if word.kind == "operator":
            depth += (word.text in "([{") - (word.text in ")]}")
        filled.append(word)
    return filled
