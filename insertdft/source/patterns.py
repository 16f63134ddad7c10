"""The pattern that cuts text into statements, and those that look into the less frequent ones."""

import re
from typing import Final

from insertdft.source.tokens import ATTRIBUTE, COMMENT, GAP, NAME, REAL, SIZED, STRING


def _without_groups(pattern: str) -> str:
    return re.sub(r"\(\?P<\w+>", "(?:", pattern)


#: Whether the body is what it should be is checked when it is taken apart, in ``bodies.py``.
_NAMED: Final = r"\.(?:[^;\"/\\*`\#]++|\\\S++)*+"
_TERMS: Final = r"(?:[\w$\[\]:',\s]++|\\\S++)*+"
_VALUE: Final = rf"(?:{SIZED}|{REAL}|\d[\d_]*+|{STRING}|[A-Za-z_][\w$]*+)"
_OVERRIDE: Final = rf"(?:\.\s*+{NAME}\s*+\(\s*+{_VALUE}\s*+\)|{_VALUE})\s*+"
_PARAMETERS: Final = rf"\(\s*+(?:{_OVERRIDE}(?:,\s*+{_OVERRIDE})*+)?+\)"
_ODD_INSTANCE: Final = rf"""
    (?P<cell>{NAME})(?:\s*+(?P<parameters>\#\s*+{_PARAMETERS}))?+(?:\s*+(?P<instance>{NAME}))?+
    \s*+\(\s*+(?:(?P<named>{_NAMED});|(?P<terms>{_TERMS})\)\s*+;)"""
_NAMES: Final = rf"{NAME}\s*+(?:,\s*+{NAME}\s*+)*+"
_DECLARATION: Final = rf"""
    (?P<kind>input|output|inout|wire)\b\s*+
    (?:\[\s*+(?P<msb>-?\d++)\s*+:\s*+(?P<lsb>-?\d++)\s*+\]\s*+)?+(?P<names>{_NAMES});"""
_SIDE: Final = r"(?:[\w$\[\]:',{}\s]++|\\\S++)*+"
_ASSIGN: Final = rf"assign\b(?P<left>{_SIDE})=(?P<right>{_SIDE});"
#: Any text up to a semicolon that stands in no string, comment, attribute or escaped name.
_ANY: Final = (
    rf'(?:[^;"/\\(]++|{STRING}|{COMMENT}|{ATTRIBUTE}|\\\S++|/(?![/*])|\((?!\*)|\(\*(?=\s*+\)))*+;'
)

#: One statement with the text before it. Groups are few, as every match pays for all of them:
#: cell, instance and body of an instance connected by name; declarations of scalar wires in a row;
#: any other instance that is plain; any other declaration that is plain; an assign; the end.
STATEMENT: Final = re.compile(
    rf"""{GAP}(?:
    (?!(?:macro)?module\b)({NAME})\s++({NAME})\s*+\(\s*+({_NAMED});
    |((?:wire\s++{_NAMES};\s*+){{1,4096}}+)
    |(?!(?:module|macromodule|function|task|primitive)\b)({_without_groups(_ODD_INSTANCE)})
    |({_without_groups(_DECLARATION)})
    |({_without_groups(_ASSIGN)})
    |(endmodule)\b
    |({_ANY})
    )""",
    re.ASCII | re.VERBOSE,
)
#: Numbers of the groups; ``lastindex`` of a match is the last group of its way.
CELL, NAMED, WIRES, ODD, DECLARED, ASSIGNED, END, ANY = 1, 3, 4, 5, 6, 7, 8, 9

ODD_INSTANCE: Final = re.compile(_ODD_INSTANCE, re.ASCII | re.VERBOSE)
DECLARATION: Final = re.compile(_DECLARATION, re.ASCII | re.VERBOSE)
ASSIGN: Final = re.compile(_ASSIGN, re.ASCII)
REST: Final = re.compile(GAP)
