"""Declarations and assigns that the scanner's pattern does not answer."""

from typing import Final, NamedTuple

from insertdft.netlist.names import KEYWORDS, canonical
from insertdft.source.by_grammar import ByGrammar
from insertdft.source.complaints import word_at
from insertdft.source.declarations import DIRECTIONS, NET_KINDS, Declared, declare
from insertdft.source.draft import Draft
from insertdft.source.grammar import Node
from insertdft.source.spelling import NotStructuralError, integer
from insertdft.source.tokens import Token, split_commas

#: What to do about constructs that stand for many.
WRITE_OUT: Final = "have synthesis write it out bit by bit, with plain numbers"


def read_assigns(by: ByGrammar, draft: Draft, words: list[Token]) -> None:
    """Read an assign statement, which may hold several assignments."""
    at = by.skip_strength_and_delay(words, 1)
    for part in split_commas(words[at:-1]):
        tree = by.parse([words[0], *part, words[-1]])
        _assign(by, draft, tree, words[0].start)


def _assign(by: ByGrammar, draft: Draft, tree: Node, start: int) -> None:
    left, right = by.spell(tree.left), by.spell(tree.right)
    if left is not None and right is not None:
        draft.assign(left, right, start)


def read_declaration(by: ByGrammar, draft: Draft, words: list[Token]) -> None:
    """Read a declaration of nets or ports, with assignments in it or without."""
    prefix, rest = split_prefix(by, words)
    for part in split_commas(rest[:-1]):
        read_declared(by, draft, prefix, part)


class Prefix(NamedTuple):
    """What a declaration says before its names.

    Attributes:
        words: As the grammar knows it: every kind of net is a wire.
        kind: The kind of net, None if it says none.
    """

    words: list[Token]
    kind: str | None


def split_prefix(by: ByGrammar, words: list[Token]) -> tuple[Prefix, list[Token]]:
    """Return what comes before the names of a declaration, and the rest."""
    prefix: list[Token] = []
    kind: str | None = None
    at = 0
    while at < len(words):
        word = words[at]
        is_kind_place = at == 0 or (at == 1 and words[0].text in DIRECTIONS)
        if (word.text in NET_KINDS or word.text == "reg") and is_kind_place:
            kind = _kind(by, word)
            prefix.append(word._replace(text="wire"))
        elif word.text == "signed" or (word.text in DIRECTIONS and at == 0):
            prefix.append(word)
        elif word.text in ("[", "#", "("):
            behind = _behind_range_or_delay(by, words, at)
            prefix += words[at:behind] if word.text == "[" else []
            at = behind - 1
        elif word.text not in ("vectored", "scalared"):
            break
        at += 1
    if at >= len(words) or words[at].text in KEYWORDS:
        by.no_verilog(words[min(at, len(words) - 1)].start)
    return Prefix(prefix, kind), words[at:]


def _behind_range_or_delay(by: ByGrammar, words: list[Token], at: int) -> int:
    if words[at].text == "[":
        return by.closing(words, at) + 1
    behind = by.skip_strength_and_delay(words, at)
    if behind == at:
        by.no_verilog(words[at].start)
    return behind


def _kind(by: ByGrammar, word: Token) -> str:
    if word.text != "reg":
        return word.text
    by.complaints.error(
        "netlist-behavioural",
        "a variable is declared (`reg`), not a net",
        word_at(by.source, word.start),
        "declare it as a wire",
    )
    return "wire"


def read_declared(by: ByGrammar, draft: Draft, prefix: Prefix, part: list[Token]) -> None:
    """Enter one name of a declaration, with the assignment that may follow it."""
    if not part:
        by.no_verilog(prefix.words[-1].start)
    tree = by.parse([*prefix.words, *part, Token("operator", ";", part[-1].end, part[-1].end)])
    head = tree.list[0]
    if head.dimensions is not None:
        by.refuse(part[0].start, f"`{head.name}` is an array of nets", WRITE_OUT)
    direction = prefix.words[0].text if prefix.words[0].text in DIRECTIONS else None
    kind = prefix.kind if direction or prefix.kind else "wire"
    declared = Declared(canonical(part[0].text), part[0].start, direction, kind, _limits(by, head))
    declare(draft, declared, by.complaints)
    for node in tree.list:
        if type(node).__name__ == "Assign":
            _assign(by, draft, node, part[0].start)


def _limits(by: ByGrammar, node: Node) -> tuple[int, int] | None:
    if node.width is None:
        return None
    try:
        return integer(node.width.msb), integer(node.width.lsb)
    except NotStructuralError as cause:
        by.refuse(cause.offset, f"the range of `{node.name}` is {cause.what}", WRITE_OUT)
