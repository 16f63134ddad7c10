"""One Verilog module as pyverilog reads it. No table files are written and nothing is printed."""

import re
import warnings
from functools import cache
from typing import Any, Final, Protocol

from ply.yacc import NullLogger, yacc

from insertdft.library.verilog_text import Unit

with warnings.catch_warnings():
    # Compiling pyverilog's files for the first time warns of its regular expressions.
    warnings.simplefilter("ignore")
    from pyverilog.vparser.lexer import VerilogLexer
    from pyverilog.vparser.parser import ParseError, VerilogParser

_STRENGTH: Final = re.compile(
    r"\(\s*(?:supply|strong|pull|weak|highz)[01]\s*(?:,\s*(?:supply|strong|pull|weak|highz)[01]\s*)?\)"
)
#: An empty place in a list of connections by position, which pyverilog does not take.
_EMPTY_PLACE: Final = re.compile(r"(?<=[,(])(\s*),|,(\s*)(?=\))")
_SEVERAL: Final = re.compile(r"\bassign\b([^;]*);")


class Node(Protocol):
    """A node of pyverilog's tree."""

    def __getattr__(self, name: str) -> Any:
        """Whatever the node holds."""


class UnsupportedError(Exception):
    """A model cannot be derived; the text says why, to follow "because"."""


def parse_module(unit: Unit) -> Node:
    """Return pyverilog's tree of one module.

    Raises:
        UnsupportedError: The text is outside pyverilog's grammar.
    """
    grammar = _grammar()
    grammar.lexer.reset_lineno()
    try:
        tree: Node = grammar.parser.parse(_within_grammar(unit.text), lexer=grammar.lexer)
    except ParseError as fault:
        where = re.search(r"line:(\d+)", str(fault))
        line = unit.source.position(unit.start)[0] + (int(where[1]) - 1 if where else 0)
        raise UnsupportedError(f"the reader of models stops in line {line}") from None
    found: Node = tree.description.definitions[0]
    return found


def _within_grammar(text: str) -> str:
    """Return the text with what the grammar lacks written another way, line for line."""
    text = _STRENGTH.sub(" ", text)
    text = _SEVERAL.sub(_one_each, text)
    return _EMPTY_PLACE.sub(_filled, _EMPTY_PLACE.sub(_filled, text))


def _filled(match: re.Match[str]) -> str:
    return f"{match[1]}1'bz," if match[1] is not None else f",{match[2]}1'bz"


def _one_each(match: re.Match[str]) -> str:
    """Write ``assign a = b, c = d;`` as two assigns."""
    parts: list[str] = []
    depth, start = 0, 0
    body = match[1]
    for at, letter in enumerate(body):
        depth += letter in "({["
        depth -= letter in ")}]"
        if letter == "," and depth == 0:
            parts.append(body[start:at])
            start = at + 1
    parts.append(body[start:])
    return "".join(f"assign {part};" for part in parts)


class _Grammar(VerilogParser):  # type: ignore[misc]
    """pyverilog's parser with its tables kept in memory."""

    def __init__(self) -> None:
        self.lexer = VerilogLexer(error_func=self._lexer_error_func)
        self.lexer.build()
        self.tokens = self.lexer.tokens
        self.parser = yacc(
            module=self,
            method="LALR",
            debug=False,
            write_tables=False,
            # PLY looks for tables under this name before it builds them; nothing has it.
            tabmodule="insertdft_builds_its_tables_in_memory",
            errorlog=NullLogger(),
        )


@cache
def _grammar() -> _Grammar:
    return _Grammar()
