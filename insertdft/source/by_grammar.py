"""One statement and the grammar: what every reader of single statements needs."""

from typing import Final, NoReturn

from insertdft.source.complaints import Complaints, SyntaxStopError, word_at
from insertdft.source.grammar import Node, NotVerilogError, parse
from insertdft.source.preprocess import Macros, Prepared
from insertdft.source.spelling import NotStructuralError, spell
from insertdft.source.tokens import ASSIGN_HEAD, Token, matching, split_at, split_commas, tokens

_STRENGTHS: Final = frozenset(
    """strong0 strong1 pull0 pull1 weak0 weak1 supply0 supply1 highz0 highz1 small medium
    large""".split()
)


class ByGrammar:
    """Words of one source, read by the grammar; whatever is none ends in a complaint.

    Attributes:
        source: The text as it came.
        code: The text without directives.
        complaints: Where problems go.
    """

    def __init__(self, prepared: Prepared, macros: Macros, complaints: Complaints) -> None:
        """Keep what every statement needs."""
        self.source = prepared.source
        self.code = prepared.code
        self.complaints = complaints
        self._macros = macros.bodies

    def words(self, start: int, end: int) -> list[Token]:
        """Return the tokens between two offsets."""
        return list(tokens(self.code, start, end, self._macros))

    def parse(self, words: list[Token]) -> Node:
        """Return the grammar's tree of one statement, or stop.

        Raises:
            SyntaxStopError: It is none.
        """
        try:
            return parse(words)
        except NotVerilogError as cause:
            self.no_verilog(cause.offset if cause.offset is not None else words[-1].start)

    def spell(self, node: Node) -> str | None:
        """Return an expression as bulk text has it, or None after complaining."""
        try:
            return spell(node)
        except NotStructuralError as cause:
            self.complaints.error(
                "netlist-behavioural",
                f"the connection computes something: {cause.what}",
                word_at(self.source, cause.offset),
                "give the netlist that synthesis writes; logic belongs into cells",
            )
            return None

    def no_verilog(self, offset: int) -> NoReturn:
        """Complain about the word at ``offset`` and stop."""
        word = word_at(self.source, offset)
        self.complaints.error(
            "netlist-syntax",
            f"`{word.text}` cannot stand here",
            word,
            "look for a missing comma, bracket or semicolon before it",
        )
        raise SyntaxStopError

    def refuse(self, offset: int, fact: str, hint: str) -> NoReturn:
        """Say that the word at ``offset`` is understood and not supported, and stop."""
        self.complaints.error("netlist-unsupported", fact, word_at(self.source, offset), hint)
        raise SyntaxStopError

    def closing(self, words: list[Token], opening: int) -> int:
        """Return the index of the bracket that closes the one at index ``opening``."""
        closing = matching(words, opening)
        if closing < 0:
            self.no_verilog(words[-1].start)
        return closing

    def skip_strength_and_delay(self, words: list[Token], at: int) -> int:
        """Return the index behind a drive strength and a delay, if they stand at ``at``."""
        if at >= len(words) - 1:
            return at
        if words[at].text == "(" and words[at + 1].text in _STRENGTHS:
            closing = self.closing(words, at)
            inside = split_commas(words[at + 1 : closing])
            if any(len(part) != 1 or part[0].text not in _STRENGTHS for part in inside):
                self.no_verilog(words[at].start)
            at = closing + 1
        if at < len(words) - 1 and words[at].text == "#":
            if words[at + 1].text != "(":
                self.check_delay([words[at + 1]], words[at + 1])
                return at + 2
            closing = self.closing(words, at + 1)
            for part in split_commas(words[at + 2 : closing]):
                self.check_delay(part, words[closing])
            at = closing + 1
        return at

    def check_delay(self, words: list[Token], end: Token) -> None:
        """Complain unless the words are one value, or three with colons between."""
        values = split_at(words, ":")
        if len(values) not in (1, 3):
            self.no_verilog(end.start)
        for value in values:
            self.parse([*ASSIGN_HEAD, *value, Token("operator", ";", end.start, end.end)])
