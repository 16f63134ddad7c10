"""What modules know of each other: names of cells and pins, and every module's ports."""

from collections.abc import Mapping, Sequence
from typing import NamedTuple

import numpy as np

from insertdft.diagnostics import nearest
from insertdft.netlist import Ids, Port, Vector
from insertdft.netlist.names import canonical
from insertdft.source.complaints import Complaints, word_at
from insertdft.source.draft import Draft, Tables
from insertdft.source.nets import spelling


class Names:
    """Kept names with ids, and the ids of the raw spellings met while reading."""

    def __init__(self, raw: Sequence[str]) -> None:
        """Give every kept spelling one id, in order of first use."""
        self._id: dict[str, int] = {}
        kept = [self.id(canonical(name)) for name in raw]
        self.of_raw: Ids = np.array(kept, np.int32)

    def id(self, name: str) -> int:
        """Return the id of a kept name, a new one if need be."""
        return self._id.setdefault(name, len(self._id))

    def all(self) -> tuple[str, ...]:
        """Return the names by id."""
        return tuple(self._id)


class Linking(NamedTuple):
    """What linking one module needs to know of all.

    Attributes:
        cells: Cell names.
        pins: Pin names.
        raw_pins: Spelling of each raw pin id.
        ports: Ports of every module, by module name.
        complaints: Where problems go.
    """

    cells: Names
    pins: Names
    raw_pins: tuple[str, ...]
    ports: Mapping[str, tuple[Port, ...]]
    complaints: Complaints


def prepare_linking(drafts: Sequence[Draft], tables: Tables, complaints: Complaints) -> Linking:
    """Return the shared names and every module's ports."""
    cells = Names(tuple(tables.cells))
    ports = {draft.name: _ports(draft, complaints) for draft in drafts}
    return Linking(cells, Names(tuple(tables.pins.ids)), tuple(tables.pins.ids), ports, complaints)


def _ports(draft: Draft, complaints: Complaints) -> tuple[Port, ...]:
    nets, source = draft.nets, draft.prepared.source
    ports: list[Port] = []
    for name, offset in draft.port_names:
        declared = nets.ports.get(name)
        if declared is None:
            complaints.error(
                "name-undeclared",
                f"port `{name}` of module `{draft.name}` has no direction",
                word_at(source, offset),
                nearest(name, nets.ports) or f"declare it: `input {name};` or `output {name};`",
            )
            continue
        vector = nets.vectors.get(name)
        bits = _net_range(draft, name, vector)
        ports.append(Port(draft.renamed.get(name, name), declared.direction, bits, vector))
    _check_port_list(draft, complaints)
    return tuple(ports)


def _net_range(draft: Draft, name: str, vector: Vector | None) -> tuple[int, ...]:
    if vector is not None:
        return tuple(range(vector.base, vector.base + vector.width))
    net = draft.nets.net_of(spelling(name))
    if net is None:
        raise RuntimeError(f"port `{name}` has a direction and no net")
    return (net,)


def _check_port_list(draft: Draft, complaints: Complaints) -> None:
    source = draft.prepared.source
    listed: set[str] = set()
    for name, offset in draft.port_names:
        if name in listed:
            complaints.error(
                "name-duplicate",
                f"port `{name}` is twice in the port list of module `{draft.name}`",
                word_at(source, offset),
                "list every port once",
            )
        listed.add(name)
    for name, port in draft.nets.ports.items():
        if name not in listed:
            complaints.error(
                "port-unknown",
                f"`{name}` is declared as {port.direction} and is not in the port list of"
                f" module `{draft.name}`",
                word_at(source, port.offset),
                nearest(name, listed) or "add it to the list, or declare it as a wire",
            )
