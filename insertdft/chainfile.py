"""The chain description as a file: ``chains.json``.

The JSON Schema in ``insertdft/schemas/chains.schema.json`` is made from the same types as the
reader, so the two cannot differ.
"""

from collections.abc import Mapping
from typing import Any, Final

import msgspec

from insertdft.description import Chain, Cycle, Description, TestPort
from insertdft.diagnostics import DesignError, Diagnostic, error

FORMAT: Final = "insertdft-chains"
VERSION: Final = 1


class _Head(msgspec.Struct):
    format: str
    version: int


class ChainFile(msgspec.Struct, frozen=True):
    """A chain description: which cells stand in which chain, and how a tester shifts them."""

    format: str
    version: int
    design: str
    chains: tuple[Chain, ...]
    ports: tuple[TestPort, ...] = ()
    sequences: Mapping[str, tuple[Cycle, ...]] = {}


def description_to_json(description: Description) -> str:
    """Return the file's text, the same for equal descriptions.

    Characters beyond ASCII appear as they do in the netlist: one a byte.
    """
    packed = msgspec.json.encode(
        ChainFile(
            FORMAT,
            VERSION,
            description.design,
            description.chains,
            description.ports,
            description.sequences,
        )
    )
    return msgspec.json.format(packed, indent=1).decode() + "\n"


def description_from_json(text: str, name: str) -> Description:
    """Return the description that a file's text holds.

    Args:
        text: The content.
        name: The file's name, for messages.

    Raises:
        DesignError: The text is no chain description; the message says at which place.
    """
    try:
        head = msgspec.json.decode(text, type=_Head)
        if (head.format, head.version) != (FORMAT, VERSION):
            raise DesignError([_wrong(name, f"it is not `{FORMAT}` version {VERSION}")])
        found = msgspec.json.decode(text, type=ChainFile)
    except msgspec.DecodeError as problem:
        raise DesignError([_wrong(name, str(problem))]) from problem
    return Description(found.design, found.chains, found.ports, found.sequences)


def schema() -> dict[str, Any]:
    """Return the JSON Schema (draft 2020-12) of the file."""
    made = msgspec.json.schema(ChainFile)
    made["$schema"] = "https://json-schema.org/draft/2020-12/schema"
    made["title"] = f"{FORMAT} version {VERSION}"
    return made


def _wrong(name: str, what: str) -> Diagnostic:
    return error(
        "description-unreadable",
        f"`{name}` is no chain description: {what}",
        hint="docs/formats.md and the schema that comes with the tool say what it holds",
    )
