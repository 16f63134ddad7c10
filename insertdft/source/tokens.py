r"""The words of Verilog text: patterns that every file here shares, and a tokeniser for odd text.

Bulk text is never cut into tokens; ``statements.py`` answers it by one pattern. What is left comes
through here, and comments and attributes drop out.

Patterns use possessive quantifiers (``*+``), so none can backtrack: time is linear in the text.
"""

import re
from collections.abc import Iterator, Mapping
from typing import Final, NamedTuple

#: An identifier. An escaped one ends at white space, which is not part of it.
NAME: Final = r"(?:[A-Za-z_][\w$]*+|\\\S++)"
STRING: Final = r'"(?:[^"\\\n]++|\\(?s:.))*+"'
COMMENT: Final = r"(?://[^\n]*+|/\*(?s:.*?)\*/)"
_BLANKS = rf"(?:\s++|{COMMENT})*+"
_SPECIFICATION = rf"{NAME}{_BLANKS}(?:={_BLANKS}(?:{STRING}|[\w'+\-{{}}]++){_BLANKS})?+"
ATTRIBUTE: Final = rf"\(\*{_BLANKS}{_SPECIFICATION}(?:,{_BLANKS}{_SPECIFICATION})*+\*\)"
#: White space, comments and attributes, as much as there is.
GAP: Final = rf"(?:\s++|{COMMENT}|{ATTRIBUTE})*+"

SIZED: Final = r"(?:\d[\d_]*+\s*+)?'\s*+[sS]?[bBoOdDhH]\s*+[0-9a-fA-FxXzZ?_]++"
REAL: Final = r"\d[\d_]*+(?:\.\d[\d_]*+)?[eE][+-]?\d[\d_]*+|\d[\d_]*+\.\d[\d_]*+"
_OPERATOR = (
    r"<<<|>>>|===|!==|\|\||&&|~\||~&|~\^|\^~|<<|>>|==|!=|<=|>=|\*\*|\+:|-:"
    r"|[][(){},;:.#@?=+\-*/%&|^~!<>$]"
)
TOKEN: Final = re.compile(
    rf"(?P<gap>\s++|{COMMENT}|{ATTRIBUTE})|(?P<name>{NAME})|(?P<sized>{SIZED})|(?P<real>{REAL})"
    rf"|(?P<number>\d[\d_]*+)|(?P<string>{STRING})|(?P<macro>`{NAME})|(?P<operator>{_OPERATOR})",
    re.ASCII,
)


class Token(NamedTuple):
    """One word of the text.

    Attributes:
        kind: ``name``, ``sized``, ``real``, ``number``, ``string``, ``operator`` or ``unknown``.
        text: As written; a sized constant without blanks, an escaped name without closing blank.
        start: Offset of its first character; of the macro use for what a macro stands for.
        end: Offset behind it.
    """

    kind: str
    text: str
    start: int
    end: int


def tokens(code: str, start: int, end: int, macros: Mapping[str, str]) -> Iterator[Token]:
    """Yield the tokens between two offsets, macro uses replaced by what they stand for.

    A character that starts no token comes out as one of kind ``unknown``.
    """
    at = start
    while at < end:
        match = TOKEN.match(code, at, end)
        if match is None:
            yield Token("unknown", code[at], at, at + 1)
            at += 1
            continue
        at = match.end()
        kind = match.lastgroup
        if kind == "macro":
            body = macros.get(match[0][1:], "")
            for word in tokens(body, 0, len(body), {}):
                yield word._replace(start=match.start(), end=at)
        elif kind == "sized":
            yield Token("sized", "".join(match[0].split()), match.start(), at)
        elif kind and kind != "gap":
            yield Token(kind, match[0], match.start(), at)


_CLOSES: Final = {")": "(", "]": "[", "}": "{"}


def matching(words: list[Token], opening: int) -> int:
    """Return the index of the bracket that closes the one at index ``opening``, or -1."""
    stack: list[str] = []
    for index in range(opening, len(words)):
        text = words[index].text
        if words[index].kind != "operator":
            continue
        if text in "([{":
            stack.append(text)
        elif text in _CLOSES:
            if not stack or stack.pop() != _CLOSES[text]:
                return -1
            if not stack:
                return index
    return -1


def split_commas(words: list[Token]) -> list[list[Token]]:
    """Return the stretches between the commas that stand in no bracket."""
    return split_at(words, ",")


def split_at(words: list[Token], separator: str) -> list[list[Token]]:
    """Return the stretches between the separators that stand in no bracket."""
    parts: list[list[Token]] = [[]]
    depth = 0
    for word in words:
        if word.kind == "operator":
            depth += (word.text in "([{") - (word.text in ")]}")
        if depth == 0 and word.text == separator and word.kind == "operator":
            parts.append([])
        else:
            parts[-1].append(word)
    return parts


#: What makes a statement out of an expression, so that the grammar can read it.
ASSIGN_HEAD: Final = tuple(tokens("assign x =", 0, 10, {}))
