"""A circuit half-way: what every step of the lowering reads and adds to."""

from dataclasses import dataclass, field
from typing import Final, NamedTuple

import numpy as np

from insertdft.design.flat import Design
from insertdft.library.cell import Cell, Storage
from insertdft.library.expression import Const, Expression, variables
from insertdft.library.state_table import table_storages
from insertdft.simulate.draft import Draft, Signal, Slots
from insertdft.simulate.words import Flags

#: Variable of an expression that stands for an unknown value.
UNKNOWN: Final = "$unknown"
NEVER: Final = Const(False)


class Pulse(NamedTuple):
    """What a pulse of the clock ports does to the clock network.

    Attributes:
        moving: Nets between a clock port and clock pins; each has a second slot, for its value
            during the pulse.
        plain: Moving nets that pulse whatever the rest of the design does.
        during: Shape (nets,), slot of each net's value during the pulse; its own if it does not
            move.
    """

    moving: Flags
    plain: Flags
    during: Slots


@dataclass(slots=True, eq=False)
class Lowering:
    """What is known half-way.

    Attributes:
        design: The design.
        draft: Nodes so far.
        clocks: Whether clock, set and reset functions are wanted.
        pulse: What a clock pulse does, if gated clocks are to be followed.
        open: Instances whose latches are always open.
        is_bus: Nets with more than one plain driver.
        unmodelled: Instances with outputs that nothing describes.
        states: Columns of ``States``, part by part.
        drivers: Net, data slots and enable slots of bus drivers.
        pulls: Value of nets that a pull cell drives.
        outer: Slot of the value that a port gives to a bus net.
    """

    design: Design
    draft: Draft
    clocks: bool
    is_bus: Flags
    pulse: Pulse | None = None
    open: Flags = field(init=False)
    unmodelled: list[Slots] = field(default_factory=list)
    states: list[dict[str, Slots]] = field(default_factory=list)
    drivers: list[tuple[Slots, Slots, Slots]] = field(default_factory=list)
    pulls: dict[int, int] = field(default_factory=dict)
    outer: dict[int, int] = field(default_factory=dict)

    def __post_init__(self) -> None:
        """No latch is open."""
        self.open = np.zeros(len(self.design.cell), np.bool_)

    def add(
        self,
        expression: Expression,
        signals: dict[str, Signal],
        outputs: Slots,
        instances: Slots,
        rows: Slots,
        chosen: Slots,
    ) -> None:
        """Add nodes for the ``chosen`` ones of a cell's instances; ``outputs`` has just those."""
        picked = {
            name: Signal(signals[name].slots[chosen], signals[name].rows[chosen])
            for name in variables(expression)
        }
        self.draft.add(expression, picked, outputs, instances[chosen], rows[chosen])


def storages(cell: Cell) -> tuple[Storage, ...]:
    """Return the storage elements of a cell, those of its state table if it has one."""
    if cell.storage or cell.state_table is None:
        return cell.storage
    return table_storages(cell.state_table)
