"""Walk backwards from a net to what decides it, through everything that only passes it on.

With the constants of a test mode known, a gate whose output depends on one input alone is a wire,
straight or inverted: buffers, inverters, a mux with a known select, a gate held open. That one
rule serves clock trees and shift paths alike.
"""

from collections.abc import Mapping
from dataclasses import dataclass
from enum import Enum

from insertdft.design.flat import Design
from insertdft.library.expression import Const, Expression, Not, Var
from insertdft.netlist import FIRST_NET
from insertdft.simulate.constants import Reducer


class End(Enum):
    """What a walk ended at."""

    PORT = "an input port"
    STORAGE = "a storage cell"
    CONSTANT = "a constant"
    GATE = "a gate that depends on several signals"
    BLACK_BOX = "a black box"
    UNDRIVEN = "nothing"
    SEVERAL = "several drivers"
    LOOP = "itself"


@dataclass(frozen=True, slots=True)
class Source:
    """Where a backward walk ended.

    Attributes:
        end: What stands there.
        net: The net at the end (of a port, or that the cell there drives).
        inverted: Whether the walk inverted its value.
        instance: Driving instance at the end, -1 if none.
        pin: Its output pin.
        passed: Instances walked through, nearest first.
    """

    end: End
    net: int
    inverted: bool
    instance: int = -1
    pin: str = ""
    passed: tuple[int, ...] = ()


class Walker:
    """Backward walks over one design under one set of constants, each step worked out once."""

    def __init__(self, design: Design, values: Mapping[int, int]) -> None:
        """Take the design and the nets whose values are known (``constants.propagate``)."""
        self.design = design
        self.values = values
        self._reducer = Reducer()
        self._found: dict[int, Source] = {}

    def source(self, net: int) -> Source:
        """Return what decides ``net``."""
        if net not in self._found:
            self._found[net] = self._walk(net)
        return self._found[net]

    def literal(self, instance: int, expression: Expression) -> Expression:
        """Return an expression over the pins of ``instance`` with known pins filled in."""
        return self._reducer.reduce(expression, self.design.pins(instance), self.values)

    def net_and_parity(self, instance: int, expression: Expression) -> tuple[int, bool] | None:
        """Return the net that alone decides an expression of ``instance``, and whether inverted.

        None if several pins decide, or none.
        """
        pins = self.design.pins(instance)
        return net_and_parity(pins, self._reducer.reduce(expression, pins, self.values))

    def _walk(self, net: int) -> Source:
        inverted = False
        passed: list[int] = []
        seen: set[int] = set()
        while True:
            end, instance, pin = self._look(net)
            if end is None and net in seen:
                end = End.LOOP
            step = self._step(instance, pin) if end is None else None
            if step is None:
                return Source(end or End.GATE, net, inverted, instance, pin, tuple(passed))
            seen.add(net)
            passed.append(instance)
            net, turned = step
            inverted ^= turned

    def _look(self, net: int) -> tuple[End | None, int, str]:
        """Return what ends a walk at ``net`` (None if it goes on), and the driver there."""
        if net in self.values or 0 <= net < FIRST_NET:
            return End.CONSTANT, -1, ""
        design = self.design
        if net in design.input_ports:
            return End.PORT, -1, ""
        drivers = design.drivers.of(net)
        if len(drivers) != 1:
            return (End.SEVERAL if drivers else End.UNDRIVEN), -1, ""
        instance = int(design.pin_instance[drivers[0]])
        pin = design.pin_names[int(design.pin_name[drivers[0]])]
        cell = design.cell_of(instance)
        if cell is None:
            return End.BLACK_BOX, instance, pin
        return (End.STORAGE if cell.is_storage else None), instance, pin

    def _step(self, instance: int, pin: str) -> tuple[int, bool] | None:
        cell = self.design.cell_of(instance)
        function = cell.pins[pin].function if cell else None
        return None if function is None else self.net_and_parity(instance, function)


def pin_and_parity(design: Design, instance: int, literal: Expression) -> tuple[int, bool] | None:
    """Return net and inversion of a literal over the pins of ``instance``, None if it is none."""
    return net_and_parity(design.pins(instance), literal)


def net_and_parity(pins: Mapping[str, int], literal: Expression) -> tuple[int, bool] | None:
    """Return net and inversion of a literal over pins whose nets are given, None if it is none."""
    inverted = isinstance(literal, Not)
    inner = literal.part if isinstance(literal, Not) else literal
    if not isinstance(inner, Var) or isinstance(literal, Const):
        return None
    net = pins.get(inner.name, -1)
    return None if net < 0 else (net, inverted)
