"""Mistakes that scan insertion could make, planted into good converted netlists, all by text.

``mistakes`` looks at every instance that conversion changed or added and spoils one connection at a
time. Each is a real mistake: pins that do the same are not swapped, equal nets are left alone.
"""

import re
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass
from itertools import combinations, pairwise

from insertdft.design.flat import Design
from insertdft.library import Library, find_inverters
from insertdft.library.cell import Cell
from insertdft.library.expression import Expression, Var
from insertdft.library.finders import Gate
from insertdft.library.functions import renamed, same

PIN = re.compile(r"\.(\w+(?:\s*\[\d+\])?|\\\S+ )\s*\(\s*([^()]*?)\s*\)")


@dataclass(frozen=True)
class Mistake:
    """One spoiled netlist.

    Attributes:
        kind: What sort of mistake.
        where: Instance and pin.
        role: Role of the pin (``scan_in``, ``data``, ``clock``, ...), or its name.
        text: The netlist.
    """

    kind: str
    where: str
    role: str
    text: str


@dataclass(frozen=True)
class Statement:
    """An instance in the text.

    Attributes:
        instance: Name.
        cell: Cell name.
        inputs: Input pin -> (start, end, net text).
    """

    instance: str
    cell: str
    inputs: Mapping[str, tuple[int, int, str]]


def mistakes(before: str, after: str, design: Design, ports: Iterable[str]) -> Iterator[Mistake]:
    """Yield spoiled versions of ``after``.

    Args:
        before: Text of the original, whose statements are left alone.
        after: Text of the converted netlist, in one source.
        design: The converted netlist as read.
        ports: Input ports that a clock could be taken from by mistake.
    """
    library = design.library
    statements = _changed(before, after, design)
    inverter = next(iter(find_inverters(library)))
    for statement in statements:
        cell = library.cells.get(statement.cell)
        roles = _roles(cell)
        for pin, (start, end, net) in statement.inputs.items():
            role = roles.get(pin, pin)
            where = f"{statement.instance}.{pin}"
            for value in ("1'b0", "1'b1"):
                if net != value:
                    spoiled = after[:start] + value + after[end:]
                    yield Mistake(f"{role} tied to {value[-1]}", where, role, spoiled)
            yield Mistake(f"{role} inverted", where, role, _inverted(after, start, end, inverter))
            if role in ("clock", "scan_clock", "clock_a", "clock_b"):
                for port in ports:
                    if port != net:
                        spoiled = f"{after[:start]}{port}{after[end:]}"
                        yield Mistake(f"{role} from another port", where, role, spoiled)
        for one, other in combinations(statement.inputs, 2):
            if _may_swap(statement, cell, one, other):
                spots = statement.inputs[one], statement.inputs[other]
                kind = f"{roles.get(one, one)} and {roles.get(other, other)} swapped"
                yield Mistake(kind, statement.instance, roles.get(one, one), _swap(after, *spots))
    yield from _between(after, statements, library)


def _between(after: str, statements: list[Statement], library: Library) -> Iterator[Mistake]:
    """Swap a pin's nets between two instances, or give one the other's."""
    for one, other in pairwise(statements):
        if one.cell != other.cell:
            continue
        roles = _roles(library.cells.get(one.cell))
        for pin in one.inputs.keys() & other.inputs.keys():
            first, second = one.inputs[pin], other.inputs[pin]
            if first[2] == second[2]:
                continue
            role, where = roles.get(pin, pin), f"{one.instance}.{pin} and {other.instance}.{pin}"
            yield Mistake(f"{role} of two cells swapped", where, role, _swap(after, first, second))
            spoiled = after[: second[0]] + first[2] + after[second[1] :]
            yield Mistake(f"{role} of the cell before", where, role, spoiled)


def _changed(before: str, after: str, design: Design) -> list[Statement]:
    """Return the instances whose statement the original does not have."""
    found: list[Statement] = []
    for module in design.netlist.modules.values():
        starts, ends = module.instance_start.tolist(), module.instance_end.tolist()
        cells = [design.netlist.cell_names[at] for at in module.instance_cell.tolist()]
        for name, cell, start, end in zip(module.instance_names, cells, starts, ends, strict=True):
            statement = after[start:end]
            if statement not in before and _is_top_level(design, module.name):
                inputs = _inputs(design, cell, statement, start)
                found.append(Statement(name, cell, inputs))
    return found


def _is_top_level(design: Design, module: str) -> bool:
    """Return whether a module is of the design itself and not one composed of gates."""
    return not module.startswith("srl_")


def _inputs(
    design: Design, cell: str, statement: str, start: int
) -> dict[str, tuple[int, int, str]]:
    """Return the connected input pins of a statement and where their nets stand."""
    found: dict[str, tuple[int, int, str]] = {}
    for match in PIN.finditer(statement):
        pin = re.sub(r"\s", "", match[1])
        if match[2] and _is_input(design, cell, pin):
            found[pin] = (start + match.start(2), start + match.end(2), match[2])
    return found


def _is_input(design: Design, cell: str, pin: str) -> bool:
    if cell in design.netlist.modules:
        ports = design.netlist.modules[cell].ports
        return any(port.name == pin and port.direction == "input" for port in ports)
    known = design.library.cells[cell].pins.get(pin)
    return known is not None and known.direction == "input"


def _roles(cell: Cell | None) -> dict[str, str]:
    """Return the role of each pin of a scan cell, or of a composed module by its pin names."""
    if cell is None:
        names = {"D": "data", "C": "clock", "I": "scan_in", "A": "clock_a", "B": "clock_b"}
        return {**names, "R": "reset", "S": "set"}
    found: dict[str, str] = {}
    for item in cell.storage:
        for expression, role in ((item.clear, "reset"), (item.preset, "set")):
            if expression is not None:
                found.update(dict.fromkeys(_pins(expression), role))
    for scan in cell.scan:
        for role in ("data", "scan_in", "scan_enable", "clock", "scan_clock", "clock_a", "clock_b"):
            pin = getattr(scan, role)
            if pin is not None:
                found[pin] = role
    return found


def _pins(expression: Expression) -> list[str]:
    if isinstance(expression, Var):
        return [expression.name]
    parts = getattr(expression, "parts", None) or (getattr(expression, "part", None),)
    return [name for part in parts if part is not None for name in _pins(part)]


def _may_swap(statement: Statement, cell: Cell | None, one: str, other: str) -> bool:
    """Return whether swapping two pins changes what the instance does."""
    if statement.inputs[one][2] == statement.inputs[other][2]:
        return False
    if cell is None or cell.storage or cell.state_table:
        return True
    names: dict[str, Expression] = {one: Var(other), other: Var(one)}
    return not all(
        same(pin.function, renamed(pin.function, names)) for pin in cell.outputs() if pin.function
    )


def _swap(text: str, one: tuple[int, int, str], other: tuple[int, int, str]) -> str:
    first, second = sorted((one, other))
    return (
        text[: first[0]]
        + _spaced(second[2])
        + text[first[1] : second[0]]
        + _spaced(first[2])
        + text[second[1] :]
    )


def _spaced(net: str) -> str:
    return net + " " if net.startswith("\\") else net


def _inverted(text: str, start: int, end: int, inverter: Gate) -> str:
    """Put an inverter in front of a pin."""
    cell, input_pin, output_pin = inverter.cell, inverter.inputs[0], inverter.output
    # the module that the statement stands in ends at the next endmodule
    close = text.index("endmodule", end)
    net = _spaced(text[start:end])
    added = (
        f"  wire planted_n;\n  {cell} planted (.{input_pin}({net}), .{output_pin}(planted_n));\n"
    )
    return f"{text[:start]}planted_n{text[end:close]}{added}{text[close:]}"
