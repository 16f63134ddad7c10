"""The plan as a file that can be kept, read, edited and given back."""

import re
from typing import Final

import msgspec

from insertdft.chains.plan import Plan
from insertdft.diagnostics import DesignError, Diagnostic, error

FORMAT: Final = "insertdft-plan"
VERSION: Final = 1

#: An element of a segment, one line each so that plans can be compared and edited by hand.
ELEMENT: Final = re.compile(r'\[\s+("(?:[^"\\]|\\.)*"),\s+(\d+),\s+("[a-z-]+")\s+\]')


class _Head(msgspec.Struct):
    format: str
    version: int


class _File(msgspec.Struct, frozen=True):
    format: str
    version: int
    plan: Plan


def plan_to_json(plan: Plan) -> str:
    """Return the plan as JSON text, the same for equal plans."""
    packed = msgspec.json.encode(_File(FORMAT, VERSION, plan))
    text = msgspec.json.format(packed, indent=1).decode()
    return ELEMENT.sub(r"[\1, \2, \3]", text) + "\n"


def plan_from_json(text: str, name: str) -> Plan:
    """Return the plan that ``plan_to_json`` wrote.

    Args:
        text: The file's content.
        name: The file's name, for messages.

    Raises:
        DesignError: The text is no plan.
    """
    try:
        head = msgspec.json.decode(text, type=_Head)
        if (head.format, head.version) != (FORMAT, VERSION):
            raise DesignError([_wrong(name, f"it is not `{FORMAT}` version {VERSION}")])
        return msgspec.json.decode(text, type=_File).plan
    except msgspec.DecodeError as problem:
        raise DesignError([_wrong(name, str(problem))]) from problem


def _wrong(name: str, what: str) -> Diagnostic:
    return error(
        "plan-unreadable",
        f"`{name}` is no plan: {what}",
        hint="make a new one with `insertdft convert`, or undo the last edit",
    )
