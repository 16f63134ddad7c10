"""A design with its clock ports, prepared for asking the rules of level-sensitive scan design."""

from collections.abc import Mapping
from dataclasses import dataclass, field

import numpy as np

from insertdft.design.flat import Design
from insertdft.diagnostics import DesignError, Diagnostic, error, nearest
from insertdft.netlist import Offsets
from insertdft.simulate.constants import propagate
from insertdft.survey.cone import Reach, net_graph, walk
from insertdft.survey.latch_ports import LatchKind, latch_kinds
from insertdft.survey.lssd_clocks import Opening, opening


@dataclass(frozen=True, slots=True, eq=False)
class Group:
    """Latches of one kind with the same enable nets.

    Attributes:
        kind: Their kind.
        chosen: Indices into ``kind.instances``, ascending.
        nets: Net of each enable pin.
        opening: When they are open.
    """

    kind: LatchKind
    chosen: Offsets = field(repr=False)
    nets: Mapping[str, int]
    opening: Opening

    def latches(self) -> list[int]:
        """Return the flat ids."""
        found: list[int] = self.kind.instances[self.chosen].tolist()
        return found

    def first(self) -> int:
        """Return the flat id of the first."""
        return int(self.kind.instances[self.chosen[0]])


class Clocked:
    """One design in one mode.

    Attributes:
        design: The design.
        clocks: Net of each clock port -> its value at rest.
        values: Known nets.
        graph: Which nets feed which.
        kinds: Every kind of latch.
        groups: Latches by kind and enable nets.
    """

    def __init__(
        self, design: Design, clocks: Mapping[str, int], held: Mapping[str, int] | None = None
    ) -> None:
        """Take the design, its clock ports with their values at rest, and ports that are held.

        Raises:
            DesignError: A clock or held port is no input port.
        """
        nets = {name: net for net, name in design.input_ports.items()}
        unknown = [_no_port(port, nets) for port in (*clocks, *(held or {})) if port not in nets]
        if unknown:
            raise DesignError(unknown)
        self.design = design
        self.clocks = {nets[port]: rest for port, rest in clocks.items()}
        self.values = propagate(design, {nets[at]: on for at, on in (held or {}).items()})
        self.graph = net_graph(design, self.values)
        self.kinds = latch_kinds(design)
        self.groups = [group for kind in self.kinds for group in self._groups(kind)]
        self._behind: dict[int, Reach] = {}

    def port(self, clock: int) -> str:
        """Return the port of a clock net."""
        return self.design.input_ports[clock]

    def behind(self, clock: int) -> Reach:
        """Return what a clock port reaches through gates."""
        if clock not in self._behind:
            self._behind[clock] = walk(self.graph, [clock])
        return self._behind[clock]

    def _groups(self, kind: LatchKind) -> list[Group]:
        enable = kind.storage.clock
        if enable is None or not kind.enables:
            return []
        columns = np.stack([kind.nets(self.design, pin) for pin in kind.enables])
        unique, where = np.unique(columns, axis=1, return_inverse=True)
        order = np.argsort(where.ravel(), kind="stable")
        parts = np.split(order, np.cumsum(np.bincount(where.ravel()))[:-1])
        found: list[Group] = []
        for number, chosen in enumerate(parts):
            nets = dict(zip(kind.enables, unique[:, number].tolist(), strict=True))
            when = opening(self.design, self.values, self.clocks, enable, nets)
            found.append(Group(kind, chosen, nets, when))
        return sorted(found, key=Group.first)


def _no_port(port: str, known: Mapping[str, int]) -> Diagnostic:
    return error(
        "port-unknown",
        f"`{port}` is named as a clock or held port but is no input port",
        hint=nearest(port, known) or "name one bit of an input port of the top module",
    )
