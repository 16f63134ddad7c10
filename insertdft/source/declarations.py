"""Enter one declared name into a draft, or say why it does not go with what was declared before."""

from typing import Final, NamedTuple

from insertdft.netlist.names import KEYWORDS
from insertdft.source.complaints import Complaints, word_at
from insertdft.source.draft import Draft
from insertdft.source.nets import PortDeclaration, spelling
from insertdft.text import Span

DIRECTIONS: Final = ("input", "output", "inout")
NET_KINDS: Final = frozenset(
    "wire tri tri0 tri1 wand triand wor trior trireg uwire supply0 supply1".split()
)
#: Wider vectors than this are taken for a mistake.
_WIDEST: Final = 1 << 20


class Declared(NamedTuple):
    """One name as one declaration has it.

    Attributes:
        name: Kept spelling.
        offset: Of the name.
        direction: If it is declared as a port.
        kind: If it is declared as a net.
        limits: msb and lsb, None for a scalar.
    """

    name: str
    offset: int
    direction: str | None
    kind: str | None
    limits: tuple[int, int] | None


def declare(draft: Draft, item: Declared, complaints: Complaints) -> None:
    """Enter one name."""
    problem = _problem(draft, item)
    if problem is not None:
        complaints.error(problem[0], problem[1], _span(draft, item), problem[2])
        return
    nets = draft.nets
    is_known = nets.is_declared(item.name)
    was_net = is_known and item.name not in nets.ports
    if not is_known:
        _enter(draft, item)
    elif _limits(draft, item.name) != item.limits:
        complaints.error(
            "width-mismatch",
            f"the two declarations of `{item.name}` have different ranges",
            _span(draft, item),
            "give both the same range",
        )
    _note(draft, item, was_net=was_net)


def _span(draft: Draft, item: Declared) -> Span:
    return word_at(draft.prepared.source, item.offset)


def _problem(draft: Draft, item: Declared) -> tuple[str, str, str] | None:
    """Return slug, message and hint of what forbids the declaration."""
    if item.name in KEYWORDS:
        return "netlist-syntax", f"`{item.name}` is a keyword, not a name", "rename the net"
    if item.limits and abs(item.limits[0] - item.limits[1]) >= _WIDEST:
        return (
            "netlist-unsupported",
            f"`{item.name}` is wider than {_WIDEST} bits",
            "check its range",
        )
    if _is_repeated(draft, item):
        return (
            "name-duplicate",
            f"`{item.name}` is declared twice in module `{draft.name}`",
            "take one of the declarations out, or rename one net",
        )
    return None


def _is_repeated(draft: Draft, item: Declared) -> bool:
    port = draft.nets.ports.get(item.name)
    if item.direction:
        return port is not None
    if port is not None:
        return port.is_net
    return draft.nets.is_declared(item.name)


def _enter(draft: Draft, item: Declared) -> None:
    if item.limits is None:
        draft.nets.declare_scalar(item.name)
    else:
        draft.nets.declare_vector(item.name, *item.limits)


def _limits(draft: Draft, name: str) -> tuple[int, int] | None:
    vector = draft.nets.vectors.get(name)
    return (vector.msb, vector.lsb) if vector else None


def _note(draft: Draft, item: Declared, *, was_net: bool) -> None:
    """Keep direction and kind; a supply net is tied to its constant."""
    nets = draft.nets
    if item.direction:
        is_net = item.kind is not None or was_net
        nets.ports[item.name] = PortDeclaration(item.direction, item.offset, is_net)
    elif item.name in nets.ports:
        nets.ports[item.name].is_net = True
    if item.kind and item.kind != "wire":
        nets.kinds[item.name] = item.kind
    if item.kind in ("supply0", "supply1"):
        limits = item.limits
        width = abs(limits[0] - limits[1]) + 1 if limits else 1
        tie = f"1'b{item.kind[-1]}"
        right = tie if width == 1 else f"{{{width}{{{tie}}}}}"
        draft.assign(spelling(item.name), right, item.offset)
