r"""Text of a connection to net bits: names, selects, constants, concatenations, repetitions.

Each different text comes here once a module. What is not plain enough for the patterns goes through
pyverilog's grammar, which spells it plainly or says what it computes.
"""

import re
from collections.abc import Iterator
from typing import Final, NamedTuple

from insertdft.diagnostics import nearest
from insertdft.netlist import CONST0, CONST1, CONSTX, CONSTZ, FIRST_NET
from insertdft.netlist.names import KEYWORDS, canonical, split_bit
from insertdft.source.grammar import NotVerilogError, parse
from insertdft.source.nets import Nets, spelling
from insertdft.source.spelling import NotStructuralError, spell
from insertdft.source.tokens import ASSIGN_HEAD, NAME, Token, tokens


class Bits(NamedTuple):
    """Value of an expression.

    Attributes:
        nets: Net ids, least significant bit first.
        is_sized: Whether the width is meant; not so for ``0`` or ``'b1``.
    """

    nets: tuple[int, ...]
    is_sized: bool = True


class ExpressionError(Exception):
    """An expression means nothing here; carries slug, message and hint."""

    def __init__(self, slug: str, message: str, hint: str | None = None) -> None:
        """Keep all three."""
        super().__init__(message)
        self.slug = slug
        self.message = message
        self.hint = hint


class Scope(NamedTuple):
    """Where names are looked up.

    Attributes:
        nets: Of the module; undeclared names are added to it where they may be.
        net_type: What an undeclared name becomes, ``none`` if it may not be.
        parameters: Names that are values, not nets.
        module: Name of the module, for messages.
    """

    nets: Nets
    net_type: str
    parameters: frozenset[str]
    module: str


_PLAIN: Final = re.compile(
    rf"\s*+({NAME})\s*+(?:\[\s*+(-?\s*+\d++)\s*+(?:(:|\+:|-:)\s*+(-?\s*+\d++)\s*+)?+\])?+\s*+\Z",
    re.ASCII,
)
_SIZED: Final = re.compile(
    r"\s*+(?:(\d[\d_]*+)\s*+)?+'\s*+[sS]?+([bBoOdDhH])\s*+([0-9a-fA-FxXzZ?_]++)\s*+\Z", re.ASCII
)
_DECIMAL: Final = re.compile(r"\s*+(\d[\d_]*+)\s*+\Z", re.ASCII)

#: How many names a misspelt one is compared with.
_COMPARED: Final = 5000
#: Width of a constant that says none (IEEE 1364-2005, 3.5.1: at least 32).
_UNSIZED: Final = 32


def bits_of(text: str, scope: Scope) -> Bits:
    """Return the net bits of an expression that is not empty.

    Raises:
        ExpressionError: It is no expression, or not one of this module.
    """
    plain = _PLAIN.match(text)
    if plain:
        return _select(scope, *plain.groups())
    constant = _constant(text)
    if constant:
        return constant
    words = list(tokens(text, 0, len(text), {}))
    concatenation = _Concatenation(words, scope).read()
    if concatenation is not None:
        return concatenation
    return _through_grammar(text, words, scope)


def _through_grammar(text: str, words: list[Token], scope: Scope) -> Bits:
    end = Token("operator", ";", len(text), len(text))
    shown = " ".join(text.split())
    try:
        plain = spell(parse([*ASSIGN_HEAD, *words, end]).right)
    except NotVerilogError:
        raise ExpressionError(
            "netlist-syntax", f"`{shown}` is no expression", "look for a missing comma or bracket"
        ) from None
    except NotStructuralError as cause:
        raise ExpressionError(
            "netlist-behavioural",
            f"`{shown}` computes something: {cause.what}",
            "give the netlist that synthesis writes; logic belongs into cells",
        ) from None
    if plain.split() == shown.split():
        raise ExpressionError(
            "netlist-syntax", f"`{shown}` is no expression", "look for a missing comma or bracket"
        )
    return bits_of(plain, scope)


def _select(scope: Scope, raw: str, first: str | None, how: str | None, second: str | None) -> Bits:
    name = canonical(raw)
    vector = scope.nets.vectors.get(name)
    if first is None:
        if vector is None:
            return Bits((_scalar(scope, name),))
        return Bits(tuple(range(vector.base, vector.base + vector.width)))
    if vector is None:
        raise _no_vector(scope, name)
    start = stop = _integer(first)
    if how == ":":
        stop = _integer(second or "0")
    elif how:
        # `[b +: w]` goes w bits up from b, `[b -: w]` down, whichever way the range is declared.
        last = start + (_integer(second or "0") - 1) * (1 if how == "+:" else -1)
        low, high = min(start, last), max(start, last)
        start, stop = (high, low) if vector.msb >= vector.lsb else (low, high)
    return Bits(_slice(name, start, stop, scope))


def _integer(text: str) -> int:
    return int("".join(text.split()))  # a blank may stand behind the sign


def _slice(name: str, msb: int, lsb: int, scope: Scope) -> tuple[int, ...]:
    vector = scope.nets.vectors[name]
    low, high = sorted((vector.msb, vector.lsb))
    shown = f"{spelling(name)}[{msb}]" if msb == lsb else f"{spelling(name)}[{msb}:{lsb}]"
    if not (low <= msb <= high and low <= lsb <= high):
        raise ExpressionError(
            "name-undeclared",
            f"`{shown}` lies outside of `{spelling(name)}[{vector.msb}:{vector.lsb}]`",
            "correct the index, or the declared range",
        )
    first, last = abs(lsb - vector.lsb), abs(msb - vector.lsb)
    if last < first:
        raise ExpressionError(
            "netlist-syntax",
            f"`{shown}` runs against the declared range [{vector.msb}:{vector.lsb}]",
            "swap the two indices",
        )
    return tuple(range(vector.base + first, vector.base + last + 1))


def _scalar(scope: Scope, name: str) -> int:
    net = scope.nets.net_of(spelling(name))
    if net is not None:
        return net
    if name in scope.parameters:
        raise ExpressionError(
            "netlist-unsupported",
            f"parameter `{name}` is used as a value",
            "have synthesis write the value itself",
        )
    if name in KEYWORDS:
        raise ExpressionError(
            "netlist-syntax", f"`{name}` is a keyword, not a net", "rename the net"
        )
    if scope.net_type == "none":
        raise ExpressionError(
            "name-undeclared",
            f"`{name}` is not declared in module `{scope.module}`",
            _did_you_mean(scope, name) or f"declare it: `wire {name};`",
        )
    if scope.net_type != "wire":
        scope.nets.kinds[name] = scope.net_type
    return scope.nets.declare_scalar(name)


def _no_vector(scope: Scope, name: str) -> ExpressionError:
    if scope.nets.net_of(spelling(name)) is not None:
        return ExpressionError(
            "name-undeclared",
            f"`{name}` has no bits to select, it is declared without a range",
            "declare it with a range, or use it as a whole",
        )
    return ExpressionError(
        "name-undeclared",
        f"a bit of `{name}` is used, but module `{scope.module}` declares no range for it",
        _did_you_mean(scope, name) or f"declare it: `wire [msb:lsb] {name};`",
    )


def _did_you_mean(scope: Scope, name: str) -> str | None:
    bits = scope.nets.names[FIRST_NET:_COMPARED]
    return nearest(name, [*scope.nets.vectors, *(bit for bit in bits if split_bit(bit)[1] is None)])


def _constant(text: str) -> Bits | None:
    decimal = _DECIMAL.match(text)
    if decimal:
        return Bits(_binary(int(decimal[1].replace("_", "")), _UNSIZED), is_sized=False)
    sized = _SIZED.match(text)
    if sized is None:
        return None
    width = int((sized[1] or str(_UNSIZED)).replace("_", ""))
    digits = sized[3].replace("_", "").lower().replace("?", "z")
    return Bits(_digits(text, digits, sized[2].lower(), width), is_sized=sized[1] is not None)


def _digits(text: str, digits: str, base: str, width: int) -> tuple[int, ...]:
    try:
        if base == "d":
            if digits in ("x", "z"):
                return (CONSTX if digits == "x" else CONSTZ,) * width
            return _binary(int(digits), width)
        bits = [bit for digit in reversed(digits) for bit in _digit(digit, base)]
    except ValueError:
        raise ExpressionError(
            "netlist-syntax",
            f"`{text.strip()}` has digits that its base does not have",
            "correct the constant",
        ) from None
    # The leftmost digit goes on to the left if it is x or z (IEEE 1364-2005, 3.5.1).
    filler = bits[-1] if bits[-1] in (CONSTX, CONSTZ) else CONST0
    return tuple((bits + [filler] * width)[:width])


_DIGIT_BITS: Final = {"b": 1, "o": 3, "h": 4}


def _digit(digit: str, base: str) -> tuple[int, ...]:
    width = _DIGIT_BITS[base]
    if digit in "xz":
        return (CONSTX if digit == "x" else CONSTZ,) * width
    return _binary(int(digit, 1 << width), width)


def _binary(value: int, width: int) -> tuple[int, ...]:
    return tuple(CONST1 if value >> place & 1 else CONST0 for place in range(width))


class _Concatenation:
    """Reads ``{a, b[3:0], {2{c}}}`` word by word."""

    def __init__(self, words: list[Token], scope: Scope) -> None:
        self._words = words
        self._scope = scope
        self._at = 0

    def read(self) -> Bits | None:
        """Return the bits, or None if the words are not plain enough."""
        if not self._words or self._words[0].text != "{":
            return None
        nets = self._item()
        return Bits(nets) if nets is not None and self._at == len(self._words) else None

    def _peek(self, ahead: int = 0) -> str:
        at = self._at + ahead
        return self._words[at].text if at < len(self._words) else ""

    def _item(self) -> tuple[int, ...] | None:
        if self._peek() != "{":
            return self._operand()
        if self._peek(2) == "{" and self._peek(1).isdigit():
            return self._repetition()
        parts: list[tuple[int, ...]] = []
        while self._peek() in ("{", ",") and (self._peek() == "," or not parts):
            self._at += 1
            part = self._item()
            if part is None:
                return None
            parts.append(part)
        if self._peek() != "}":
            return None
        self._at += 1
        return tuple(net for part in reversed(parts) for net in part)

    def _repetition(self) -> tuple[int, ...] | None:
        times = int(self._peek(1))
        self._at += 2
        inner = self._item()
        if inner is None or self._peek() != "}":
            return None
        self._at += 1
        return inner * times

    def _operand(self) -> tuple[int, ...] | None:
        text = " ".join(self._operand_words())
        if _PLAIN.match(text) is None and _SIZED.match(text) is None:
            if text.isdigit():
                raise ExpressionError(
                    "netlist-syntax",
                    f"`{text}` stands in a concatenation and says no width",
                    "write it with its width, such as `1'b0`",
                )
            return None
        return bits_of(text, self._scope).nets

    def _operand_words(self) -> Iterator[str]:
        while self._peek() not in ("", "{", "}", ","):
            word = self._peek()
            self._at += 1
            yield word
