r"""Bodies of thousands of instances taken apart at once: text to pins and expressions.

The joined bodies are split at every round bracket. Then every other piece is an expression, and
the pieces between (``, .B``) are so few different ones that each is looked at strictly once and
found in a table afterwards: no call and no match object a pin.

Where brackets do not come in plain pairs, or escaped names have some, a pattern takes the bodies
apart instead. What
that cannot do either is left to the grammar. Nothing between two connections is ever skipped.
"""

import re
from collections import defaultdict
from collections.abc import Sequence
from itertools import count
from typing import Final, NamedTuple

import numpy as np

from insertdft.netlist import Ids

#: Body of an instance that has no connections.
NOTHING: Final = ".#())"
_NO_PIN: Final = "#"

_NO_BRACKETS: Final = bytes(byte for byte in range(256) if byte not in b"()")
_BETWEEN: Final = re.compile(r"\s*+([;,])\s*+\.\s*+([A-Za-z_\#][\w$]*+\s*+|\\\S++\s++)\Z", re.ASCII)
#: An escaped name with a bracket in it, which is no bracket.
_BRACKET_IN_NAME: Final = re.compile(r"\\[^\s()]*+[()]")
#: One connection and what must follow it: another one, or the end of the instance. An expression
#: may hold blanks but does not end with one, but for the blank that closes an escaped name.
_CONNECTION: Final = re.compile(
    r"""\.\s*+([A-Za-z_\#][\w$]*+|\\\S++)\s*+
    \(\s*+([^()\\\s]*+(?:(?:\\\S++\s|\s++(?!\)))[^()\\\s]*+)*+)\s*+\)\s*+
    (?:,\s*+(?=\.)|\)\s*+(;))""",
    re.ASCII | re.VERBOSE,
)


class Connections(NamedTuple):
    """What bodies say.

    Attributes:
        pins: Shape (connections,), ids of the pin names.
        expressions: Text of what each is connected to.
        counts: Shape (instances,), number of connections of each.
    """

    pins: Ids
    expressions: Sequence[str]
    counts: Ids


class PinTable:
    """Pin names of a netlist with their ids, and the texts between connections met so far.

    Attributes:
        ids: Pin name as written -> id; ``#i`` for the i-th connection by position, id 0 for none.
    """

    def __init__(self) -> None:
        """Start with the pin that is none."""
        self.ids: defaultdict[str, int] = defaultdict(count().__next__)
        self.ids[_NO_PIN]
        self.between = _Between(self.ids)


class _Between(dict[str, int]):
    """Text between two expressions -> twice the id of its pin, plus 1 if it starts an instance."""

    def __init__(self, ids: defaultdict[str, int]) -> None:
        super().__init__()
        self._ids = ids

    def __missing__(self, text: str) -> int:
        match = _BETWEEN.match(text)
        if match is None:
            raise KeyError(text)
        code = 2 * self._ids[match[2].rstrip()] + (match[1] == ";")
        self[text] = code
        return code


def take_apart(bodies: Sequence[str], table: PinTable) -> Connections | None:
    """Return the connections of all ``bodies``, or None if one of them is not plain enough.

    Args:
        bodies: ``.A(x), .B(y))``: from the first full stop to the last bracket.
        table: Gets the pin names that it does not have.
    """
    joined = ";" + ";".join(bodies) + ";"
    is_plain = joined.count(";") == len(bodies) + 1 == joined.count(");") + 1
    is_plain = is_plain and not _BRACKET_IN_NAME.search(joined)
    found = (_by_brackets(joined, table) if is_plain else None) or _by_pattern(joined, table)
    if found is None or len(found.counts) != len(bodies):
        return None
    return found if found.pins.all() else _without_nothing(found)


def _by_brackets(joined: str, table: PinTable) -> Connections | None:
    inner = joined.replace(");", ";")
    brackets = inner.encode("latin-1").translate(None, _NO_BRACKETS)
    if brackets != b"()" * (len(brackets) // 2):
        return None
    pieces = inner.replace(")", "(").split("(")
    expressions = pieces[1::2]
    between = pieces[:-1:2]
    if pieces[-1].strip() != ";" or len(between) != len(expressions):
        return None
    if "( " in joined:
        expressions = [text.strip() if "\\" not in text else text for text in expressions]
    try:
        codes = np.fromiter(map(table.between.__getitem__, between), np.int32, len(between))
    except KeyError:
        return None
    starts = np.flatnonzero(codes & 1)
    counts = np.diff(starts, append=len(codes)).astype(np.int32)
    return Connections(codes >> 1, expressions, counts)


def _by_pattern(joined: str, table: PinTable) -> Connections | None:
    parts = _CONNECTION.split(joined[1:])
    if "".join(parts[::4]):
        return None
    ends = np.flatnonzero(np.fromiter(map(bool, parts[3::4]), bool, len(parts) // 4))
    pins = np.fromiter(map(table.ids.__getitem__, parts[1::4]), np.int32, len(parts) // 4)
    return Connections(pins, parts[2::4], np.diff(ends, prepend=-1).astype(np.int32))


def _without_nothing(found: Connections) -> Connections:
    """Take out the connections that stand for none."""
    is_pin = found.pins != 0
    owner = np.repeat(np.arange(len(found.counts)), found.counts)
    counts = np.bincount(owner[is_pin], minlength=len(found.counts)).astype(np.int32)
    expressions = [
        text for text, kept in zip(found.expressions, is_pin.tolist(), strict=True) if kept
    ]
    return Connections(found.pins[is_pin], expressions, counts)
