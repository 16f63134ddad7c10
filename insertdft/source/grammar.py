"""pyverilog's grammar, fed statement by statement with our own tokens.

Bulk text (plain instances, plain declarations, plain assigns) never comes here. Every other
statement of the skeleton does: ANSI headers, odd declarations, several instances in one statement,
expressions with operators in them. pyverilog's rules decide what it is, and where it stops being
Verilog. Four things differ from using the package as it comes:

* Our tokens carry the offset in the file as their "line number", so every node of the tree has its
  exact place, and attributes, comments, macros and carriage returns are gone beforehand.
* One statement at a time: a mistake stays in its statement, and pyverilog's item list, which costs
  quadratic time, never grows.
* Only the rules of the structural subset are built, with one operator in place of all those that
  compute, which takes a tenth of the time; when first needed, and once.
* No table files are written and nothing is printed.
"""

import warnings
from collections.abc import Iterable, Iterator
from functools import cache
from types import SimpleNamespace
from typing import Any, Final, Protocol

from ply.yacc import NullLogger, yacc

from insertdft.netlist import PRIMITIVES
from insertdft.netlist.names import KEYWORDS
from insertdft.source.tokens import Token

with warnings.catch_warnings():
    # Compiling pyverilog's files for the first time warns of its regular expressions.
    warnings.simplefilter("ignore")
    from pyverilog.vparser.lexer import VerilogLexer
    from pyverilog.vparser.parser import ParseError, VerilogParser

_KEPT: Final = frozenset(
    """modulename paramlist params params_begin param param_end portlist ports portname sigtypes
    sigtype ioports ioport ioport_head width length dimensions decl declnamelist declname
    declassign declassign_element parameterdecl localparamdecl param_substitution_list
    param_substitution assignment lpartselect lpointer lconcat lconcatlist lconcat_one lvalue
    rvalue expression concat concatlist repeat partselect pointer const_expression floatnumber
    intnumber stringliteral delays instance instance_bodylist instance_body
    instance_bodylist_noname instance_body_noname parameterlist param_args_noname param_args
    param_arg_noname param_arg instance_ports instance_ports_list instance_port_list
    instance_ports_arg instance_port_arg functioncall func_args systemcall sysargs
    sysarg identifier scope empty""".split()
)
_WORDS: Final = {
    "+": "PLUS", "-": "MINUS", "*": "TIMES", "?": "COND", "=": "EQUALS", "+:": "PLUSCOLON",
    "-:": "MINUSCOLON", "@": "AT", ",": "COMMA", ";": "SEMICOLON", ":": "COLON", ".": "DOT",
    "(": "LPAREN", ")": "RPAREN", "[": "LBRACKET", "]": "RBRACKET", "{": "LBRACE", "}": "RBRACE",
    "#": "DELAY", "$": "DOLLER",
}  # fmt: skip
#: Any other operator: an expression with one is refused, whichever it is, and one rule is enough.
_OPERATOR: Final = "OR"
_LEFT_OUT: Final = frozenset(
    f"p_expression_{name}"
    for name in """ulnot unot uand unand unor uxor uxnor power div mod sll srl sla sra lessthan
    greaterthan lesseq greatereq eq noteq eql noteql And Xor Xnor land lor""".split()
)
_PRECEDENCE: Final = (
    ("left", "OR"),
    ("left", "PLUS", "MINUS"),
    ("left", "TIMES"),
    ("right", "UMINUS", "UPLUS", "UOR"),
)
_BASES: Final = {"b": "BIN", "o": "OCT", "d": "DEC", "h": "HEX"}


class Node(Protocol):
    """A node of pyverilog's tree; ``lineno`` is an offset into the text."""

    lineno: int

    def __getattr__(self, name: str) -> Any:
        """Whatever else the node holds."""


class NotVerilogError(Exception):
    """The grammar cannot go on; carries the offset of the word it stopped at, None at the end."""

    def __init__(self, offset: int | None) -> None:
        """Keep the offset."""
        super().__init__(offset)
        self.offset = offset


def parse(words: Iterable[Token]) -> Node:
    """Return pyverilog's tree of one module item (a header ends with its ``;``).

    Raises:
        NotVerilogError: The words are no item of the structural subset.
    """
    try:
        tree: Node = _parser().parse(lexer=_Feed(words))
    except ParseError:  # raised by its semantic checks, such as two directions at once
        raise NotVerilogError(None) from None
    return tree


class _Lexeme:
    """A token as the parser wants it."""

    __slots__ = ("lexer", "lexpos", "lineno", "type", "value")

    def __init__(self, kind: str, value: str, offset: int) -> None:
        self.type, self.value, self.lineno, self.lexpos = kind, value, offset, offset


class _Feed:
    """Our tokens under the interface of a PLY lexer."""

    def __init__(self, words: Iterable[Token]) -> None:
        self._lexemes: Iterator[_Lexeme] = map(_lexeme, words)

    def token(self) -> _Lexeme | None:
        return next(self._lexemes, None)


def _lexeme(word: Token) -> _Lexeme:
    return _Lexeme(_kind(word), word.text, word.start)


def _kind(word: Token) -> str:
    if word.kind == "name":
        if word.text not in KEYWORDS or word.text in PRIMITIVES:
            return "ID"
        return _reserved().get(word.text, "KEYWORD")
    if word.kind == "sized":
        head = word.text.partition("'")[2].lower()
        signed = "SIGNED_" if head[0] == "s" else ""
        return f"{signed}INTNUMBER_{_BASES[head.lstrip('s')[0]]}"
    if word.kind == "operator":
        return _WORDS.get(word.text, _OPERATOR)
    return {"number": "INTNUMBER_DEC", "real": "FLOATNUMBER", "string": "STRING_LITERAL"}.get(
        word.kind, "UNKNOWN"
    )


@cache
def _reserved() -> dict[str, str]:
    words: dict[str, str] = VerilogLexer.reserved
    return words


class _Grammar(VerilogParser):  # type: ignore[misc]
    """pyverilog's rules without its way of starting up."""

    def __init__(self) -> None:
        self.lexer = VerilogLexer(error_func=self._lexer_error_func)
        self.tokens = self.lexer.tokens

    def p_statement(self, p: Any) -> None:
        """statement : header
        | decl
        | declassign
        | parameterdecl
        | localparamdecl
        | assignment
        | instance
        """  # noqa: D205, D400, D403, D415 (a grammar rule, not a description)
        p[0] = p[1]

    def p_header(self, p: Any) -> None:
        """header : MODULE modulename paramlist portlist"""  # noqa: D400, D403, D415
        p[0] = SimpleNamespace(name=p[2], paramlist=p[3], ports=p[4].ports, lineno=p.lineno(1))

    def p_error(self, p: Any) -> None:
        raise NotVerilogError(p.lineno if p else None)


@cache
def _parser() -> Any:
    grammar = _Grammar()
    rules = {
        name: rule
        for name in dir(grammar)
        if name.startswith("p_")
        and name not in _LEFT_OUT
        and (rule := getattr(grammar, name)).__doc__
        if rule.__doc__.split()[0] in _KEPT
    }
    return yacc(
        module=SimpleNamespace(
            __file__=__file__,
            __module__=__name__,
            tokens=grammar.tokens,
            precedence=_PRECEDENCE,
            p_error=grammar.p_error,
            p_statement=grammar.p_statement,
            p_header=grammar.p_header,
            **rules,
        ),
        start="statement",
        method="LALR",
        debug=False,
        write_tables=False,
        # PLY looks for tables under this name before it builds them; nothing has it.
        tabmodule="insertdft_builds_its_tables_in_memory",
        errorlog=NullLogger(),
    )
