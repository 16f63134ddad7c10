"""Declarations and assigns that the scanner's pattern does not answer."""

from typing import Final

from insertdft.netlist.names import canonical
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
    kind = next((word.text for word in words[:2] if word.text in NET_KINDS), None)
    prefix, rest = _prefix(by, words)
    for part in split_commas(rest[:-1]):
        tree = by.parse([*prefix, *part, rest[-1]])
        nodes = list(tree.list)
        assigns = [node for node in nodes if type(node).__name__ == "Assign"]
        declare_nodes(by, draft, [node for node in nodes if node not in assigns], kind or "wire")
        for node in assigns:
            _assign(by, draft, node, words[0].start)


def _prefix(by: ByGrammar, words: list[Token]) -> tuple[list[Token], list[Token]]:
    """Return what comes before the names as the grammar knows it, and the rest."""
    prefix: list[Token] = []
    at = 0
    while at < len(words):
        word = words[at]
        if word.text in NET_KINDS:
            prefix.append(word._replace(text="wire"))
        elif word.text == "signed" or (word.text in DIRECTIONS and at == 0):
            prefix.append(word)
        elif word.text == "[":
            closing = by.closing(words, at)
            prefix += words[at : closing + 1]
            at = closing
        elif word.text in ("#", "("):
            behind = by.skip_strength_and_delay(words, at)
            if behind == at:
                by.no_verilog(word.start)
            at = behind - 1
        elif word.text not in ("vectored", "scalared"):
            break
        at += 1
    if at >= len(words):
        by.no_verilog(words[-1].start)
    return prefix, words[at:]


def declare_nodes(by: ByGrammar, draft: Draft, nodes: list[Node], kind: str) -> None:
    """Enter the declarations of the grammar; all nodes are about one name."""
    direction: str | None = None
    net: str | None = None
    for node in nodes:
        what = type(node).__name__.lower()
        if what in DIRECTIONS:
            direction = what
        elif what == "reg":
            by.complaints.error(
                "netlist-behavioural",
                f"`{node.name}` is a variable, not a net",
                word_at(by.source, node.lineno),
                "declare it as a wire",
            )
        else:
            net = kind
    head = nodes[0]
    if head.dimensions is not None:
        by.refuse(head.lineno, f"`{head.name}` is an array of nets", WRITE_OUT)
    declared = Declared(
        canonical(head.name), _name_offset(by, head), direction, net, _limits(by, head)
    )
    declare(draft, declared, by.complaints)


def _name_offset(by: ByGrammar, node: Node) -> int:
    # The grammar gives some declarations the place of their first word.
    found = by.code.find(node.name, node.lineno)
    return found if found >= 0 else node.lineno


def _limits(by: ByGrammar, node: Node) -> tuple[int, int] | None:
    if node.width is None:
        return None
    try:
        return integer(node.width.msb), integer(node.width.lsb)
    except NotStructuralError as cause:
        by.refuse(cause.offset, f"the range of `{node.name}` is {cause.what}", WRITE_OUT)
