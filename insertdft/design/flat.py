"""A design as one flat graph: every level of hierarchy opened, every alias merged.

Nets are single bits. A flat net is a whole electrical node: module ports, ``assign`` aliases and
supply nets are merged into it, so two pins are connected when they have the same net id. Ids 0..3
are the constants 0, 1, x, z.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from functools import cached_property
from typing import Final, NamedTuple

import numpy as np

from insertdft.library.cell import Cell, Library
from insertdft.netlist import OPEN, Ids, Module, Netlist, Offsets
from insertdft.netlist.names import join_path
from insertdft.text import Span

#: Directions as ``Design.pin_direction`` has them.
INPUT: Final = 0
OUTPUT: Final = 1
INOUT: Final = 2
UNKNOWN: Final = 3


class Occurrence(NamedTuple):
    """One place of the hierarchy: a module as it stands in one place of the design.

    Attributes:
        module: Name of the module.
        parent: Id of the occurrence around it, -1 for the top.
        instance: Instance id within the parent's module, -1 for the top.
        net_base: Flat id (before merging) of the module's net FIRST_NET.
        first: Flat id of the module's first leaf instance.
    """

    module: str
    parent: int
    instance: int
    net_base: int
    first: int


class TopPort(NamedTuple):
    """One bit of a top port.

    Attributes:
        name: Spelling of the bit (``din[3]``).
        port: Spelling of the whole port.
        direction: ``input``, ``output`` or ``inout``.
        net: Flat net.
    """

    name: str
    port: str
    direction: str
    net: int


@dataclass(frozen=True, eq=False)
class Design:
    """Netlist and library linked, flat.

    ``n`` leaf instances (library cells, primitives, black boxes), ``m`` pins, ``w`` flat nets.

    Attributes:
        netlist: What it was made from.
        library: What it was made from.
        occurrences: Id 0 is the top; parents come before their children.
        cell_names: Those of the netlist, then one more entry for each gate primitive with another
            number of pins (``nand`` of 3 and of 4 pins are two cells of one name).
        cells: The cell of each entry of ``cell_names``; None for a module or a black box.
        pin_names: Those of the netlist, then those that only linking brought in.
        cell: Shape (n,), ids into ``cell_names``.
        occurrence: Shape (n,), occurrence that holds the instance.
        local: Shape (n,), instance id within that occurrence's module.
        pin_start: Shape (n + 1,), rows of instance i are ``pin_start[i]:pin_start[i + 1]``.
        pin_name: Shape (m,), ids into ``pin_names``.
        pin_net: Shape (m,), flat nets, OPEN where unconnected.
        pin_direction: Shape (m,), INPUT, OUTPUT, INOUT or UNKNOWN (black box).
        net_count: ``w``; net ids run from 0 to ``w - 1`` (some ids are unused after merging).
        net_of: Shape (all local nets,), flat net of a local net before merging.
        ports: Bits of the top ports.
    """

    netlist: Netlist
    library: Library
    occurrences: Sequence[Occurrence] = field(repr=False)
    cell_names: Sequence[str] = field(repr=False)
    cells: Sequence[Cell | None] = field(repr=False)
    pin_names: Sequence[str] = field(repr=False)
    cell: Ids = field(repr=False)
    occurrence: Ids = field(repr=False)
    local: Ids = field(repr=False)
    pin_start: Offsets = field(repr=False)
    pin_name: Ids = field(repr=False)
    pin_net: Ids = field(repr=False)
    pin_direction: Ids = field(repr=False)
    net_count: int
    net_of: Ids = field(repr=False)
    ports: tuple[TopPort, ...] = field(repr=False)

    def module_of(self, instance: int) -> Module:
        """Return the module whose text holds the leaf ``instance``."""
        occurrence = self.occurrences[int(self.occurrence[instance])]
        return self.netlist.modules[occurrence.module]

    def cell_name(self, instance: int) -> str:
        """Return the name of the cell that ``instance`` is of."""
        return self.cell_names[int(self.cell[instance])]

    def cell_of(self, instance: int) -> Cell | None:
        """Return the library cell of ``instance``, None for a black box."""
        return self.cells[int(self.cell[instance])]

    def name(self, instance: int) -> str:
        """Return the hierarchical name of a leaf instance."""
        module = self.module_of(instance)
        path = self.path(int(self.occurrence[instance]))
        return join_path((*path, module.instance_names[int(self.local[instance])]))

    def path(self, occurrence: int) -> tuple[str, ...]:
        """Return the instance names from the top down to ``occurrence`` (empty for the top)."""
        if occurrence not in self._paths:
            self._paths[occurrence] = self._path(occurrence)
        return self._paths[occurrence]

    @cached_property
    def _paths(self) -> dict[int, tuple[str, ...]]:
        return {}

    def _path(self, occurrence: int) -> tuple[str, ...]:
        parts: list[str] = []
        while (place := self.occurrences[occurrence]).parent >= 0:
            parent = self.occurrences[place.parent]
            parts.append(self.netlist.modules[parent.module].instance_names[place.instance])
            occurrence = place.parent
        return tuple(reversed(parts))

    def span(self, instance: int) -> Span:
        """Return the place in the text of a leaf instance."""
        return self.module_of(instance).span(int(self.local[instance]))

    def pins(self, instance: int) -> dict[str, int]:
        """Return flat net by pin name of one leaf instance."""
        rows = slice(int(self.pin_start[instance]), int(self.pin_start[instance + 1]))
        names = self.pin_names
        return {
            names[pin]: net
            for pin, net in zip(
                self.pin_name[rows].tolist(), self.pin_net[rows].tolist(), strict=True
            )
        }

    def net_at(self, instance: int, pin: str) -> int:
        """Return the flat net at one pin, OPEN if it is unconnected or not there."""
        number = self._pin_numbers.get(pin, -1)
        first, end = int(self.pin_start[instance]), int(self.pin_start[instance + 1])
        names: list[int] = self.pin_name[first:end].tolist()
        return int(self.pin_net[first + names.index(number)]) if number in names else OPEN

    def nets_at(self, pin: str) -> Ids:
        """Return the net that every instance has at ``pin``, shape (n,), OPEN where it has none.

        Worked out once a pin name; keep what is asked for to pins of storage cells and the like.
        """
        if pin not in self._nets_at:
            nets = np.full(len(self.cell), OPEN, np.int32)
            rows = np.flatnonzero(self.pin_name == self._pin_numbers.get(pin, -1))
            nets[self.pin_instance[rows]] = self.pin_net[rows]
            self._nets_at[pin] = nets
        return self._nets_at[pin]

    @cached_property
    def _pin_numbers(self) -> Mapping[str, int]:
        return {name: number for number, name in enumerate(self.pin_names)}

    @cached_property
    def _nets_at(self) -> dict[str, Ids]:
        return {}

    @cached_property
    def pin_instance(self) -> Ids:
        """Shape (m,), the leaf instance of each pin row."""
        counts = np.diff(self.pin_start)
        return np.repeat(np.arange(len(self.cell), dtype=np.int32), counts)

    @cached_property
    def drivers(self) -> "PinsOfNets":
        """Output and inout pins of each net; black-box pins where nothing else drives it."""
        certain = (self.pin_direction == OUTPUT) & (self.pin_net >= 0)
        is_driven = np.zeros(self.net_count, bool)
        is_driven[self.pin_net[certain]] = True
        is_driven[np.array(list(self.input_ports), np.int64)] = True
        maybe = (self.pin_direction == UNKNOWN) & (self.pin_net >= 0)
        maybe[maybe] = ~is_driven[self.pin_net[maybe]]
        chosen = certain | maybe | (self.pin_direction == INOUT)
        return pins_of_nets(self, np.flatnonzero(chosen & (self.pin_net >= 0)))

    @cached_property
    def loads(self) -> "PinsOfNets":
        """Input (and inout, unknown) pins of each net."""
        chosen = (self.pin_direction != OUTPUT) & (self.pin_net >= 0)
        return pins_of_nets(self, np.flatnonzero(chosen))

    @cached_property
    def port_nets(self) -> Mapping[str, int]:
        """Flat net of each top port bit, by its spelling."""
        return {port.name: port.net for port in self.ports}

    @cached_property
    def input_ports(self) -> Mapping[int, str]:
        """Spelling of the input or inout port bit that drives a net."""
        return {port.net: port.name for port in self.ports if port.direction != "output"}

    def drop_indices(self) -> None:
        """Give back the memory of everything that is worked out when first asked for.

        It is worked out again when it is asked for again.
        """
        for name in ("pin_instance", "drivers", "loads", "_nets_at", "_paths"):
            self.__dict__.pop(name, None)

    def net_name(self, net: int) -> str:
        """Return the hierarchical name of a flat net: the outermost of its aliases.

        Costs a search over all local nets; for messages, not for loops.
        """
        return net_name(self, net)


@dataclass(frozen=True, eq=False)
class PinsOfNets:
    """Pin rows by net: those of net ``w`` are ``rows[start[w]:start[w + 1]]``.

    Attributes:
        start: Shape (net_count + 1,).
        rows: Shape (pins with that direction and a net,), indices into ``Design.pin_*``.
    """

    start: Offsets
    rows: Offsets

    def of(self, net: int) -> list[int]:
        """Return the pin rows of one net (of none for OPEN)."""
        if net < 0:
            return []
        found: list[int] = self.rows[int(self.start[net]) : int(self.start[net + 1])].tolist()
        return found


def pins_of_nets(design: Design, chosen: Offsets) -> PinsOfNets:
    """Return the chosen pin rows by net, those of a net in ascending order."""
    nets = design.pin_net[chosen]
    order = np.argsort(nets, kind="stable")
    counts = np.bincount(nets, minlength=design.net_count)
    start = np.concatenate(([0], np.cumsum(counts))).astype(np.int64)
    return PinsOfNets(start, chosen[order].astype(np.int64))


def net_name(design: Design, net: int) -> str:
    """Return the hierarchical name of a flat net, from the outermost occurrence that has it."""
    from_id = np.flatnonzero(design.net_of == net)
    if len(from_id) == 0 or net < 4:
        return design.netlist.top_module.net_name(net) if 0 <= net < 4 else "(unconnected)"
    local = int(from_id[0])
    bases = [place.net_base for place in design.occurrences]
    occurrence = max(i for i, base in enumerate(bases) if base <= local)
    module = design.netlist.modules[design.occurrences[occurrence].module]
    name = module.net_name(local - bases[occurrence] + 4)
    return join_path((*design.path(occurrence), name))
