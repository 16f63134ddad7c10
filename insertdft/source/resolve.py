"""When a module ends: every expression number becomes a net, or a row of nets."""

from collections.abc import Mapping
from typing import Final, NamedTuple

import numpy as np

from insertdft.diagnostics import Diagnostic, Severity
from insertdft.netlist import OPEN, Ids
from insertdft.source.complaints import Complaints
from insertdft.source.draft import Draft
from insertdft.source.expressions import Bits, ExpressionError, Scope, bits_of
from insertdft.text import Span

#: In place of a net: the expression is more than one bit, or its width is open.
WIDE: Final = -3


class Resolved(NamedTuple):
    """Meaning of the expression numbers of one module.

    Attributes:
        net: Shape (numbers,), the net, OPEN, or WIDE.
        wide: Bits of the numbers that are WIDE.
    """

    net: Ids
    wide: dict[int, Bits]

    def bits(self, number: int) -> Bits:
        """Return the bits of one expression; none if it is empty."""
        net = int(self.net[number])
        if net == WIDE:
            return self.wide[number]
        return Bits(()) if net == OPEN else Bits((net,))


def resolve(draft: Draft, complaints: Complaints) -> Resolved:
    """Look at every expression that is no declared bit; undeclared names become nets here."""
    net_of = draft.nets.net_by_number()
    odd = draft.nets.unresolved(net_of)
    wide: dict[int, Bits] = {}
    scope = _scope(draft, draft.prepared.net_type(draft.start))
    # A name that is only ever read by an assign is no implicit net (IEEE 1364-2005, 4.5).
    strict = scope._replace(net_type="none")
    read_only = _only_read(draft, odd)
    for number, text in sorted(odd.items(), key=lambda item: item[0] in read_only):
        net_of[number] = OPEN
        if not text.strip():
            continue
        try:
            bits = bits_of(text, strict if number in read_only else scope)
        except ExpressionError as cause:
            complaints.error(cause.slug, cause.message, _place(draft, number, text), cause.hint)
            continue
        if bits.is_sized and len(bits.nets) == 1:
            net_of[number] = bits.nets[0]
        else:
            net_of[number] = WIDE
            wide[number] = bits
    return Resolved(net_of, wide)


def _scope(draft: Draft, net_type: str) -> Scope:
    return Scope(draft.nets, net_type, frozenset(draft.parameter_names), draft.name)


def _only_read(draft: Draft, odd: Mapping[int, str]) -> set[int]:
    if not draft.assigns or not odd:
        return set()
    read = {assign.right for assign in draft.assigns}.intersection(odd)
    driven = {assign.left for assign in draft.assigns}
    connected = np.zeros(len(draft.nets.number), bool)
    connected[draft.numbers] = True
    return {number for number in read if number not in driven and not connected[number]}


def _place(draft: Draft, number: int, text: str) -> Span:
    """Return where the expression is used first: costs a search, so for messages only."""
    rows = np.flatnonzero(draft.numbers == number)
    if len(rows):
        instance = int(np.searchsorted(draft.row_start, rows[0], side="right")) - 1
        start, end = int(draft.starts[instance]), int(draft.ends[instance])
    else:
        start = next(item.start for item in draft.assigns if number in (item.left, item.right))
        end = draft.prepared.code.find(";", start)
    found = draft.prepared.code.find(text.strip(), start, end)
    source = draft.prepared.source
    if found < 0:
        return Span(source, start, end)
    return Span(source, found, found + len(text.strip()))


def check_names(draft: Draft, complaints: Complaints) -> None:
    """Complain about two instances of one name; warn of an instance called like a net."""
    nets = draft.nets
    met: dict[str, int] = {}
    if len(set(draft.names)) < len(draft.names):
        for instance, name in enumerate(draft.names):
            if name and met.setdefault(name, instance) != instance:
                complaints.error(
                    "name-duplicate",
                    f"two instances of module `{draft.name}` are called `{name}`",
                    _instance_span(draft, instance),
                    "rename one of them",
                )
    both = list(filter(nets.number.__contains__, draft.names))
    if both:
        both = [name for name in both if name and nets.is_declared(name)]
        if both:
            complaints.add(_called_alike(draft, both))


def _instance_span(draft: Draft, instance: int) -> Span:
    start, end = int(draft.starts[instance]), int(draft.ends[instance])
    return Span(draft.prepared.source, start, end)


def _called_alike(draft: Draft, both: list[str]) -> Diagnostic:
    return Diagnostic(
        "name-duplicate",
        Severity.WARNING,
        f"instances of module `{draft.name}` have the names of nets",
        _instance_span(draft, draft.names.index(both[0])),
        hint="both keep their names; other tools may refuse the text",
        names=tuple(both),
    )
