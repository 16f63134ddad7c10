"""Instances that the scanner's pattern does not answer, one statement at a time."""

from collections.abc import Iterator
from typing import Final

from insertdft.netlist import PRIMITIVES
from insertdft.source.by_grammar import ByGrammar
from insertdft.source.draft import Draft, Row, by_position
from insertdft.source.grammar import Node
from insertdft.source.odd_statements import WRITE_OUT
from insertdft.source.spelling import EMPTY
from insertdft.source.tokens import Token, split_commas, tokens

_X: Final = Token("name", "x", 0, 0)
_X_WITHOUT_CONNECTIONS: Final = (_X, *tokens("();", 0, 3, {}))


def read_instances(by: ByGrammar, before: int, start: int, end: int) -> list[Row]:
    """Return the instances of one statement."""
    words = by.words(start, end)
    is_gate = words[0].text in PRIMITIVES
    parameters = None
    at = 1
    if is_gate:
        at = by.skip_strength_and_delay(words, at)
    elif len(words) > 2 and words[1].text == "#":
        if words[2].text == "(":
            at = by.closing(words, 2) + 1
            by.parse([_X, *words[1:at], *_X_WITHOUT_CONNECTIONS])
        else:
            at = 3
            by.check_delay([words[2]], words[2])
        parameters = by.code[words[1].start : words[at - 1].end]
    # A gate may do without a name, also in a row with others that have one; the grammar wants
    # all or none.
    parts = split_commas(words[at:-1]) if is_gate else [words[at:-1]]
    rows: list[Row] = []
    for instance in _instances(by, words, parts):
        if instance.array is not None:
            by.refuse(instance.lineno, f"`{instance.name}` is an array of instances", WRITE_OUT)
        name = instance.name
        if not name and not is_gate:
            by.no_verilog(words[at].start)
        rows.append(Row(words[0].text, name, _body(by, instance), parameters, before, start, end))
    return rows


def _instances(by: ByGrammar, words: list[Token], parts: list[list[Token]]) -> Iterator[Node]:
    for part in parts:
        tree = by.parse([words[0], *_fill_empty(part), words[-1]])
        if type(tree).__name__ != "InstanceList":
            by.no_verilog(words[0].start)
        yield from tree.instances


def _body(by: ByGrammar, instance: Node) -> str:
    ports = instance.portlist
    texts = [by.spell(port.argname) or "" if port.argname else "" for port in ports]
    if not ports or ports[0].portname is None:
        return by_position(["" if text == EMPTY else text for text in texts])
    pins = [f".{port.portname} ({text})" for port, text in zip(ports, texts, strict=True)]
    return ",".join(pins) + ")"


def drop_delays(by: ByGrammar, draft: Draft) -> None:
    """Take out what looks like parameters of a gate: it is its delay."""
    if not draft.parameters:
        return
    cells = tuple(draft.tables.cells)
    for instance, text in tuple(draft.parameters.items()):
        if cells[draft.cells[instance]] in PRIMITIVES:
            del draft.parameters[instance]
            start = by.code.find(text, int(draft.starts[instance]))
            words = by.words(start, start + len(text))
            if by.skip_strength_and_delay(words, 0) < len(words):
                by.no_verilog(words[-1].start)


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
