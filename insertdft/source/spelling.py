"""pyverilog's trees of expressions back to plain text, constants folded.

Bulk expressions never were trees. So a tree is spelled the way bulk text writes it, and one place
(``expressions.py``) turns text into net bits, whichever way it came.
"""

from typing import Final

from insertdft.source.grammar import Node

#: What stands for an empty place in a list of connections by position.
EMPTY: Final = "$nothing"


class NotStructuralError(Exception):
    """An expression computes something; carries its offset and what it is."""

    def __init__(self, offset: int, what: str) -> None:
        """Keep both."""
        super().__init__(what)
        self.offset = offset
        self.what = what


def spell(node: Node) -> str:
    """Return the text of an expression that only names, selects, joins and repeats.

    Raises:
        NotStructuralError: It does more.
    """
    match type(node).__name__:
        case "Lvalue" | "Rvalue":
            return spell(node.var)
        case "Identifier" if node.scope is None:
            return _name(node)
        case "IntConst":
            return str(node.value)
        case "Pointer" if type(node.var).__name__ == "Identifier":
            return f"{_name(node.var)}[{integer(node.ptr)}]"
        case "Partselect" if type(node.var).__name__ == "Identifier":
            return f"{_name(node.var)}[{_range(node)}]"
        case "Concat" | "LConcat":
            return "{" + ",".join(map(spell, node.list)) + "}"
        case "Repeat":
            return f"{{{integer(node.times)}{spell(node.value)}}}"
    raise NotStructuralError(node.lineno, _WORDS.get(type(node).__name__, "an operator"))


_WORDS: Final = {
    "Identifier": "a name of another module",
    "Pointer": "a select of a select",
    "Partselect": "a select of a select",
    "FunctionCall": "a call of a function",
    "SystemCall": "a call of a system function",
    "StringConst": "a string",
    "FloatConst": "a real number",
    "Cond": "a choice by `?:`",
}


def _name(node: Node) -> str:
    name = str(node.name)
    return name + " " if name[0] == "\\" else name


def _range(node: Node) -> str:
    # pyverilog turns `[3 +: 2]` into `[3 : 3 + 2]` and keeps the first 3 as one and the same node.
    if type(node.lsb).__name__ in ("Plus", "Minus") and node.lsb.left is node.msb:
        sign = "+" if type(node.lsb).__name__ == "Plus" else "-"
        return f"{integer(node.msb)}{sign}:{integer(node.lsb.right)}"
    return f"{integer(node.msb)}:{integer(node.lsb)}"


def integer(node: Node) -> int:
    """Return the value of a constant expression.

    Raises:
        NotStructuralError: It is none.
    """
    match type(node).__name__:
        case "IntConst":
            return _literal(node)
        case "Uminus":
            return -integer(node.right)
        case "Plus":
            return integer(node.left) + integer(node.right)
        case "Minus":
            return integer(node.left) - integer(node.right)
        case "Times":
            return integer(node.left) * integer(node.right)
    raise NotStructuralError(node.lineno, "a range or count that is no plain number")


_RADIX: Final = {"b": 2, "o": 8, "d": 10, "h": 16}


def _literal(node: Node) -> int:
    _, quote, digits = str(node.value).replace("_", "").lower().rpartition("'")
    digits = digits.lstrip("s") if quote else digits
    try:
        return int(digits[1:], _RADIX[digits[0]]) if quote else int(digits)
    except ValueError:
        raise NotStructuralError(node.lineno, "a number with x or z bits") from None
