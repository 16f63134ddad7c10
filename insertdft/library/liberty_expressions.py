"""Expressions of Liberty attributes, read with their place, opened for one bit of a bus or bank."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final

from insertdft.diagnostics import Diagnostic, Severity, error
from insertdft.library.expression import (
    Expression,
    ExpressionError,
    Var,
    parse_expression,
    substitute,
    variables,
)
from insertdft.library.liberty_syntax import Group

_HINT: Final = "correct the expression in a copy of the library, and give that"


@dataclass(slots=True)
class Reader:
    """Reads expressions of one library file and collects what is wrong with them.

    Attributes:
        diagnostics: Problems found so far.
    """

    diagnostics: list[Diagnostic] = field(default_factory=list)
    _seen: dict[str, Expression | None] = field(default_factory=dict)

    def read(self, group: Group, attribute: str) -> Expression | None:
        """Return the expression of an attribute; None if it is missing or cannot be read."""
        text = group.text(attribute)
        if text is None or not text.strip():
            return None
        if text not in self._seen:
            try:
                self._seen[text] = parse_expression(text)
            except ExpressionError as fault:
                span = group.span(attribute)
                message = f"`{attribute}` is no Boolean expression: {fault}"
                self.diagnostics.append(error("library-expression", message, span, _HINT))
                return None
        return self._seen[text]

    def check_names(
        self, expression: Expression, known: Mapping[str, object], group: Group, attribute: str
    ) -> bool:
        """Report names that are neither pins nor state variables; return whether all are known."""
        unknown = [name for name in variables(expression) if name not in known]
        if unknown:
            message = (
                f"`{attribute}` names `{'`, `'.join(unknown)}`, which is no pin and no state "
                "variable of the cell; the output is taken as unknown"
            )
            span = group.span(attribute)
            found = Diagnostic("library-expression", Severity.WARNING, message, span, _HINT)
            self.diagnostics.append(found)
        return not unknown


def for_bit(expression: Expression, bit: int, vectors: Mapping[str, tuple[str, ...]]) -> Expression:
    """Return ``expression`` with each bus and each bank variable replaced by its bit ``bit``."""
    chosen = {
        name: Var(vectors[name][bit])
        for name in variables(expression)
        if name in vectors and bit < len(vectors[name])
    }
    return substitute(expression, chosen) if chosen else expression
