"""Three-valued constants: which nets are known once some ports are held.

Only what follows is visited, so holding a scan enable costs its fan-out and no more. Storage is
never taken as known: a constant here holds in every state.
"""

from collections.abc import Mapping
from typing import Final

from insertdft.design.flat import Design
from insertdft.library.cell import Cell
from insertdft.library.expression import Const, Expression, as_literal, substitute, variables
from insertdft.netlist import CONST0, CONST1

#: Known pin values of a cell, as (pin, value) pairs in pin order.
Known = tuple[tuple[str, int], ...]


class Reducer:
    """Expressions of cells under known pins, each worked out once a cell and pattern."""

    def __init__(self) -> None:
        """Start with nothing worked out."""
        # By identity: hashing an expression walks it. The entries keep their expressions alive.
        self._seen: dict[tuple[int, Known], Expression] = {}
        self._names: dict[int, tuple[Expression, tuple[str, ...]]] = {}

    def reduce(
        self, expression: Expression, pins: Mapping[str, int], values: Mapping[int, int]
    ) -> Expression:
        """Return ``expression`` with the known pins filled in, as simple as its function is.

        A result that is a constant, one pin or one inverted pin is recognised in any writing of
        the function; other results may mention pins that do not matter.

        Args:
            expression: Over pins of one instance.
            pins: Flat net by pin of the instance.
            values: Known nets.
        """
        kept = self._names.get(id(expression))
        if kept is None:
            kept = self._names[id(expression)] = (expression, variables(expression))
        known = tuple(
            (name, values[net]) for name in kept[1] if (net := pins.get(name, -1)) in values
        )
        key = (id(expression), known)
        if key not in self._seen:
            self._seen[key] = _simplest(expression, known)
        return self._seen[key]


#: Functions of more free inputs than this are not tabulated.
MOST_INPUTS: Final = 12


def _simplest(expression: Expression, known: Known) -> Expression:
    found = substitute(expression, {pin: Const(bool(value)) for pin, value in known})
    names = variables(found)
    if len(names) > MOST_INPUTS:
        return found
    return as_literal(found, names) or found


def propagate(design: Design, held: Mapping[int, int]) -> dict[int, int]:
    """Return every net whose value is known, and that value (0 or 1).

    Args:
        design: The flat design.
        held: Values of nets (ports) that are held from outside.
    """
    values: dict[int, int] = {int(CONST0): 0, int(CONST1): 1, **held}
    reducer = Reducer()
    gates = [_gate_outputs(cell) for cell in design.cells]
    waiting = sorted(values) + _tie_nets(design, gates, values)
    loads = design.loads
    while waiting:
        for row in loads.of(waiting.pop()):
            instance = int(design.pin_instance[row])
            outputs = gates[int(design.cell[instance])]
            if outputs:
                waiting += _settle(design, instance, outputs, values, reducer)
    return values


def _gate_outputs(cell: Cell | None) -> dict[str, Expression]:
    """Return outputs that are functions of input pins alone."""
    if cell is None:
        return {}
    inputs = {pin.name for pin in cell.inputs()}
    return {
        pin.name: pin.function
        for pin in cell.outputs()
        if pin.function is not None and inputs.issuperset(variables(pin.function))
    }


def _tie_nets(
    design: Design, gates: list[dict[str, Expression]], values: dict[int, int]
) -> list[int]:
    """Give the outputs of tie cells their values; return their nets."""
    found: list[int] = []
    for cell_id, outputs in enumerate(gates):
        ties = {pin: value for pin, value in outputs.items() if isinstance(value, Const)}
        if not ties:
            continue
        for instance in (design.cell == cell_id).nonzero()[0].tolist():
            for pin, net in design.pins(instance).items():
                if pin in ties and net >= 0 and net not in values:
                    values[net] = int(ties[pin].value)
                    found.append(net)
    return found


def _settle(
    design: Design,
    instance: int,
    outputs: dict[str, Expression],
    values: dict[int, int],
    reducer: Reducer,
) -> list[int]:
    """Work out one gate's outputs; return the nets that became known."""
    pins = design.pins(instance)
    found: list[int] = []
    for pin, function in outputs.items():
        net = pins.get(pin, -1)
        if net < 0 or net in values:
            continue
        value = reducer.reduce(function, pins, values)
        if isinstance(value, Const):
            values[net] = int(value.value)
            found.append(net)
    return found
