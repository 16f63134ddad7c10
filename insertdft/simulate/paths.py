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
from insertdft.simulate.constants import Reducer, known_pins


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
        return self._reducer.reduce(expression, known_pins(self.design, instance, self.values))

    def net_and_parity(self, instance: int, expression: Expression) -> tuple[int, bool] | None:
        """Return the net that alone decides an expression of ``instance``, and whether inverted.

        None if several pins decide, or none.
        """
        return pin_and_parity(self.design, instance, self.literal(instance, expression))

    def _walk(self, net: int) -> Source:
        inverted = False
        passed: list[int] = []
        seen: set[int] = set()
        while True:
            end = self._end_at(net)
            if end is not None:
                instance, pin = self._driver(net)
                return Source(end, net, inverted, instance, pin, tuple(passed))
            if net in seen:
                return Source(End.LOOP, net, inverted, passed=tuple(passed))
            seen.add(net)
            instance, pin = self._driver(net)
            step = self._step(instance, pin)
            if step is None:
                return Source(End.GATE, net, inverted, instance, pin, tuple(passed))
            passed.append(instance)
            net, turned = step
            inverted ^= turned

    def _end_at(self, net: int) -> End | None:
        """Return what stands at ``net`` if the walk cannot go on from there."""
        if net in self.values or 0 <= net < FIRST_NET:
            return End.CONSTANT
        if net in self.design.input_ports:
            return End.PORT
        drivers = self.design.drivers.of(net)
        if not drivers:
            return End.UNDRIVEN
        if len(drivers) > 1:
            return End.SEVERAL
        cell = self.design.cell_of(int(self.design.pin_instance[drivers[0]]))
        if cell is None:
            return End.BLACK_BOX
        return End.STORAGE if cell.is_storage else None

    def _driver(self, net: int) -> tuple[int, str]:
        drivers = self.design.drivers.of(net)
        if len(drivers) != 1:
            return -1, ""
        row = drivers[0]
        pin = self.design.pin_names[int(self.design.pin_name[row])]
        return int(self.design.pin_instance[row]), pin

    def _step(self, instance: int, pin: str) -> tuple[int, bool] | None:
        cell = self.design.cell_of(instance)
        function = cell.pins[pin].function if cell else None
        if function is None:
            return None
        return pin_and_parity(self.design, instance, self.literal(instance, function))


def pin_and_parity(design: Design, instance: int, literal: Expression) -> tuple[int, bool] | None:
    """Return net and inversion of a literal over the pins of ``instance``, None if it is none."""
    inverted = isinstance(literal, Not)
    inner = literal.part if isinstance(literal, Not) else literal
    if not isinstance(inner, Var) or isinstance(literal, Const):
        return None
    net = design.pins(instance).get(inner.name)
    return None if net is None or net < 0 else (net, inverted)
