"""Cells and their nets as timing sees them, and changes to them that no netlist need hold.

Start from ``wiring_of(design)``; each change gives a new ``Wiring`` and leaves the old one alone.
Instances keep their numbers, so endpoints before and after can be compared.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field, replace
from typing import Final

import numpy as np

from insertdft.design.flat import Design
from insertdft.library import Cell
from insertdft.netlist import OPEN, Ids, Offsets
from insertdft.simulate.levels import members
from insertdft.timing.tables import Floats

#: Labels of ``Insertion.parts``: what drove the pin before, and what drives it afterwards.
MISSION: Final = "$mission"
DATA: Final = "$data"


@dataclass(frozen=True, slots=True, eq=False)
class Wiring:
    """Cells and nets; the first ``len(design.cell)`` instances are those of the design.

    Attributes:
        design: What it started from.
        cells: By cell id; None for black boxes.
        pin_names: By pin-name id.
        cell: Cell id of each instance.
        pin_start: Rows of instance i are ``pin_start[i]:pin_start[i + 1]``.
        pin_name: Pin-name id of each row.
        pin_net: Net of each row, OPEN for none.
        net_count: Number of nets; those beyond the design's are new.
        extra_load: Load added to each net, in the library's capacitive unit.
    """

    design: Design
    cells: tuple[Cell | None, ...] = field(repr=False)
    pin_names: tuple[str, ...] = field(repr=False)
    cell: Ids = field(repr=False)
    pin_start: Offsets = field(repr=False)
    pin_name: Ids = field(repr=False)
    pin_net: Ids = field(repr=False)
    net_count: int
    extra_load: Floats = field(repr=False)

    def instance_name(self, instance: int) -> str:
        """Return the name of an instance; an added one has none of its own."""
        if instance < len(self.design.cell):
            return self.design.name(instance)
        cell = self.cells[int(self.cell[instance])]
        return f"(added {cell.name if cell else ''})"

    def rows(self, instances: Ids | Offsets, pin: str) -> Offsets:
        """Return the row of ``pin`` of each instance, -1 where it is not connected by name."""
        rows = members(self.pin_start, instances)
        counts = self.pin_start[np.asarray(instances) + 1] - self.pin_start[instances]
        owner = np.repeat(np.arange(len(instances)), counts)
        here = self.pin_name[rows] == self._pin_id(pin)
        found = np.full(len(instances), -1, np.int64)
        found[owner[here]] = rows[here]
        return found

    def _pin_id(self, pin: str) -> int:
        return self.pin_names.index(pin) if pin in self.pin_names else -1


@dataclass(frozen=True, slots=True, eq=False)
class Insertion:
    """Cells put in front of one pin of each of some instances.

    Attributes:
        instances: Leaf instances.
        pin: Input pin that gets a new driver.
        parts: (cell, pin -> label). MISSION is the net that drove the pin, DATA the net that
            drives it now; a label in ``silent`` is a test net, which does not move in mission
            use; any other label is a new net between the parts, one for each instance.
        silent: Labels of nets that stand still.
    """

    instances: Ids
    pin: str
    parts: tuple[tuple[Cell, Mapping[str, str]], ...]
    silent: frozenset[str] = frozenset()


def wiring_of(design: Design) -> Wiring:
    """Return the design as it is."""
    return Wiring(
        design=design,
        cells=tuple(design.cells),
        pin_names=tuple(design.pin_names),
        cell=design.cell,
        pin_start=design.pin_start,
        pin_name=design.pin_name,
        pin_net=design.pin_net,
        net_count=design.net_count,
        extra_load=np.zeros(design.net_count),
    )


def replace_cells(
    wiring: Wiring, instances: Sequence[int] | Ids, cell: Cell, pins: Mapping[str, str]
) -> Wiring:
    """Return the wiring with ``instances`` being of another cell.

    Args:
        wiring: Before.
        instances: Instances that change.
        cell: What they become.
        pins: Old pin -> new pin, for pins whose name changes. Pins that only the new cell has stay
            open: they stand still in mission use.
    """
    chosen = np.asarray(instances, np.int64)
    names = list(wiring.pin_names)
    renamed = np.arange(len(names), dtype=np.int32)
    for old, new in pins.items():
        if old in names:
            if new not in names:
                names.append(new)
            renamed[names.index(old)] = names.index(new)
    of_cell, pin_name = wiring.cell.copy(), wiring.pin_name.copy()
    of_cell[chosen] = len(wiring.cells)
    rows = members(wiring.pin_start, chosen)
    pin_name[rows] = renamed[pin_name[rows]]
    return replace(
        wiring,
        cells=(*wiring.cells, cell),
        pin_names=tuple(names),
        cell=of_cell,
        pin_name=pin_name,
    )


def add_loads(wiring: Wiring, nets: Ids, loads: Floats | float) -> Wiring:
    """Return the wiring with more load on some nets (each time a net is named)."""
    extra = wiring.extra_load.copy()
    np.add.at(extra, nets, loads)
    return replace(wiring, extra_load=extra)


def insert(wiring: Wiring, insertion: Insertion) -> Wiring:
    """Return the wiring with the parts in place.

    Raises:
        ValueError: An instance has no such pin, or no part drives DATA.
    """
    chosen = insertion.instances.astype(np.int64)
    count = len(chosen)
    rows = wiring.rows(chosen, insertion.pin)
    if (rows < 0).any():
        raise ValueError(f"not all instances have a connected pin {insertion.pin!r}")
    labels = dict.fromkeys(label for _, pins in insertion.parts for label in pins.values())
    if DATA not in labels:
        raise ValueError("no part drives the pin")
    nets: dict[str, Ids] = {MISSION: wiring.pin_net[rows]}
    fresh = wiring.net_count
    for label in labels:
        if label in insertion.silent:
            nets[label] = np.full(count, OPEN, np.int32)
        elif label not in nets:
            nets[label] = np.arange(fresh, fresh + count, dtype=np.int32)
            fresh += count
    pin_net = wiring.pin_net.copy()
    pin_net[rows] = nets[DATA]
    extra = np.concatenate((wiring.extra_load, np.zeros(fresh - wiring.net_count)))
    changed = replace(wiring, pin_net=pin_net, net_count=fresh, extra_load=extra)
    for cell, pins in insertion.parts:
        changed = _append(changed, cell, count, {pin: nets[label] for pin, label in pins.items()})
    return changed


def _append(wiring: Wiring, cell: Cell, count: int, nets: Mapping[str, Ids]) -> Wiring:
    """Return the wiring with ``count`` more instances of ``cell``."""
    names = [*wiring.pin_names, *(pin for pin in nets if pin not in wiring.pin_names)]
    ids = np.array([names.index(pin) for pin in nets], np.int32)
    ends = wiring.pin_start[-1] + len(nets) * np.arange(1, count + 1)
    return replace(
        wiring,
        cells=(*wiring.cells, cell),
        pin_names=tuple(names),
        cell=np.concatenate((wiring.cell, np.full(count, len(wiring.cells), np.int32))),
        pin_start=np.concatenate((wiring.pin_start, ends)),
        pin_name=np.concatenate((wiring.pin_name, np.tile(ids, count))),
        pin_net=np.concatenate((wiring.pin_net, np.stack(list(nets.values()), axis=1).ravel())),
    )
