"""The scan cell that can take the place of a plain one, found and proved by function."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from itertools import islice, permutations, product
from math import perm
from typing import Final

from insertdft.library.cell import Cell, Library, ScanRole, Style, Twin
from insertdft.library.drive import steps_apart
from insertdft.library.expression import Const, Expression, Not, Var
from insertdft.library.functions import renamed, same, support
from insertdft.library.mission import (
    Mission,
    Output,
    mission_of,
    same_storage,
    states_renamed,
)

#: Pin assignments tried for one pair of cells before only the likely ones are.
MOST_ASSIGNMENTS: Final = 720
#: Extra inputs of a scan cell that may be tied.
MOST_TIES: Final = 4


def scan_twins(library: Library, cell_name: str, style: Style) -> tuple[Twin, ...]:
    """Return the scan cells that can replace ``cell_name``, best first; empty if there is none.

    Same mission function: kind, clock edge, data, set and reset with their priority, every output.
    A cell that is the user's choice by hand comes alone. Else cells the library wants unused are
    left out, and the order is: nothing to tie before ties; same drive before another; then the
    smaller; then by name.

    Raises:
        KeyError: The library has no such cell.
    """
    plain = library.cells[cell_name]
    by_hand = library.twins_by_hand.get(cell_name)
    if by_hand is not None:
        return tuple(_twins(plain, library.cells[by_hand], style))
    found: list[tuple[tuple[int, int, float, int, str], Twin]] = []
    for scan in library.cells.values():
        if scan.dont_use or scan.power_management or scan.name == cell_name:
            continue
        found += [(_rank(plain, scan, twin), twin) for twin in _twins(plain, scan, style)]
    return tuple(twin for _, twin in sorted(found, key=lambda item: item[0]))


def _twins(plain: Cell, scan: Cell, style: Style) -> list[Twin]:
    roles = [role for role in scan.scan if role.style is style]
    found = (match(plain, scan, role) for role in roles)
    return [twin for twin in found if twin is not None]


def _rank(plain: Cell, scan: Cell, twin: Twin) -> tuple[int, int, float, int, str]:
    outputs = [pin.name for pin in plain.outputs() if pin.name in twin.pins]
    steps = max((steps_apart(plain, pin, scan, twin.pins[pin]) for pin in outputs), default=0)
    area = scan.area if scan.area is not None else float("inf")
    return len(twin.ties), steps, area, len(scan.outputs()) - len(outputs), scan.name


def match(plain: Cell, scan: Cell, role: ScanRole) -> Twin | None:
    """Return how ``scan`` replaces ``plain``, or None if its mission function is another."""
    one, two = mission_of(plain), mission_of(scan, role)
    if one is None or two is None or not _may_match(one, two):
        return None
    for inputs in _assignments(one, two):
        for ties in _ties(two, inputs, role):
            outputs = _outputs(one, two, inputs, ties)
            if outputs is not None:
                pins = {pin: inputs.get(pin) or outputs.get(pin) for pin in plain.pins}
                kept = {pin: to for pin, to in pins.items() if to is not None}
                return Twin(scan.name, role, kept, ties)
    return None


def check_twin(plain: Cell, scan: Cell, twin: Twin) -> bool:
    """Return whether ``scan`` with scan at rest is the same function as ``plain``.

    The pins are taken as ``twin`` has them; every function is compared by its whole truth table.
    """
    one, two = mission_of(plain), mission_of(scan, twin.role)
    if one is None or two is None:
        return False
    inputs = {pin: to for pin, to in twin.pins.items() if pin in one.places}
    if set(one.places) != set(inputs) or len(set(twin.pins.values())) != len(twin.pins):
        return False
    free = set(two.places) - set(inputs.values()) - set(twin.ties)
    if free or not all(pin in twin.pins for pin in one.outputs):
        return False
    wanted = {pin: twin.pins[pin] for pin in one.outputs}
    return any(
        all(
            to in two.outputs and _same_output(one, one.outputs[pin], two.outputs[to], how)
            for pin, to in wanted.items()
        )
        for how in _state_maps(one, two, inputs, twin.ties)
    )


def same_function(first: Cell, second: Cell) -> bool:
    """Return whether two cells with the same pin names behave alike.

    What the first leaves open the second may choose. Cells that say nothing are not alike.
    """
    one, two = mission_of(first), mission_of(second)
    if one is None or two is None or not one.outputs or set(one.outputs) != set(two.outputs):
        return False
    if len(one.storage) != len(two.storage):
        return False
    pins = {name: name for name in {**one.places, **two.places}}
    return any(
        all(_same_output(one, out, two.outputs[pin], how) for pin, out in one.outputs.items())
        for how in _state_maps(one, two, pins, {})
    )


def _may_match(one: Mission, two: Mission) -> bool:
    if len(one.storage) != len(two.storage) or len(one.outputs) > len(two.outputs):
        return False
    if any(a.kind is not b.kind for a, b in zip(one.storage, two.storage, strict=True)):
        return False
    spare = len(two.places) - len(one.places)
    return 0 <= spare <= MOST_TIES


def _assignments(one: Mission, two: Mission) -> Iterator[dict[str, str]]:
    """Yield pin assignments of inputs, equal names first, each to a pin used in like places."""
    own, other = list(one.places), list(two.places)
    if perm(len(other), len(own)) > MOST_ASSIGNMENTS:
        chosen: Iterator[tuple[str, ...]] = _likely(one, two)
    else:
        ordered = sorted(other, key=lambda name: own.index(name) if name in own else len(own))
        chosen = permutations(ordered, len(own))
    for names in islice(chosen, MOST_ASSIGNMENTS):
        pairs = dict(zip(own, names, strict=True))
        if all(one.places[pin] <= two.places[to] for pin, to in pairs.items()):
            yield pairs


def _likely(one: Mission, two: Mission) -> Iterator[tuple[str, ...]]:
    """Yield the assignment by equal names, and the one by order among pins of like places."""
    if all(pin in two.places for pin in one.places):
        yield tuple(one.places)
    left = dict(two.places)
    taken: list[str] = []
    for places in one.places.values():
        to = next((name for name, own in left.items() if places <= own), None)
        if to is None:
            return
        taken.append(to)
        del left[to]
    yield tuple(taken)


def _ties(two: Mission, inputs: Mapping[str, str], role: ScanRole) -> Iterator[dict[str, int]]:
    extra = [pin for pin in two.places if pin not in inputs.values()]
    if {role.clock_a, role.clock_b, role.clock_2, role.scan_clock} & set(extra):
        return  # a clock that mission use needs too, such as B of a double latch, is never tied
    for values in product((1, 0), repeat=len(extra)):
        yield dict(zip(extra, values, strict=True))


@dataclass(frozen=True, slots=True)
class _StateMap:
    """One way to read the states of the second cell in those of the first.

    Attributes:
        values: Pins and state variables of the second in terms of the first.
        inverted: Whether each state is the inverse.
    """

    values: Mapping[str, Expression]
    inverted: bool


def _state_maps(
    one: Mission, two: Mission, inputs: Mapping[str, str], ties: Mapping[str, int]
) -> Iterator[_StateMap]:
    """Yield the readings under which all storage elements behave alike."""
    pins: dict[str, Expression] = {to: Var(pin) for pin, to in inputs.items()}
    pins |= {pin: Const(value == 1) for pin, value in ties.items()}
    shown = frozenset(name for item in one.outputs.values() for name in support(item.function))
    for inverted in (False, True):
        values = dict(pins)
        for first, second in zip(one.storage, two.storage, strict=True):
            values |= states_renamed(second, first, inverted=inverted)
        if all(
            same_storage(first, second, values, shown, inverted=inverted)
            for first, second in zip(one.storage, two.storage, strict=True)
        ):
            yield _StateMap(values, inverted)


def _outputs(
    one: Mission, two: Mission, inputs: Mapping[str, str], ties: Mapping[str, int]
) -> dict[str, str] | None:
    """Return the output of the second cell for each of the first, or None."""
    for how in _state_maps(one, two, inputs, ties):
        found: dict[str, str] = {}
        for pin, output in one.outputs.items():
            likely = sorted(two.outputs, key=lambda name: (name != pin, name))
            for name in likely:
                if name in found.values():
                    continue
                if _same_output(one, output, two.outputs[name], how):
                    found[pin] = name
                    break
        if len(found) == len(one.outputs):
            return found
    return None


def _same_output(one: Mission, first: Output, second: Output, how: _StateMap) -> bool:
    shown = renamed(second.function, how.values)
    return same(first.three_state, renamed(second.three_state, how.values)) and same(
        _single(first.function, one), _single(shown, one)
    )


def _single(function: Expression, mission: Mission) -> Expression:
    """Return the function with every inverted state variable written as the inverse."""
    inverses = {item.state_inverted: Not(Var(item.state)) for item in mission.storage}
    return renamed(function, inverses)
