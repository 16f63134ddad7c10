"""How a latch or flip-flop becomes a shift-register latch: library cells first, else composed.

Library cells are found by their scan roles, never by name. A flip-flop can become an edge-triggered
cell with shift clocks A and B (its clock stays as it is), or a double-latch cell: then its clock
pin becomes C, and B, which opens L2, has to be driven in mission too.
"""

from collections.abc import Collection, Iterable, Mapping
from dataclasses import dataclass, field, replace
from enum import Enum

from insertdft.library import scan_twins
from insertdft.library.cell import Cell, Library, ScanRole, Storage, StorageKind, Style, Twin
from insertdft.library.expression import Var
from insertdft.library.functions import literal
from insertdft.library.mission import one_state
from insertdft.library.twins import match
from insertdft.styles.conversion import ScanTap, TestNet
from insertdft.styles.srl import ComposedModule, Kind, Shape, compose


class SrlKind(Enum):
    """What a scan cell of the LSSD style holds."""

    FIRST = "L1 alone: a latch with two ports"
    SINGLE = "L1 and L2, system output L1"
    DOUBLE = "L1 and L2, system output L2"
    STAR = "L1 and L2 with a system port each"
    EDGE = "an edge-triggered cell that shifts under A and B"


@dataclass(frozen=True, slots=True)
class ScanLatch:
    """A library cell with an LSSD role."""

    cell: str
    kind: SrlKind
    role: ScanRole
    area: float | None


@dataclass(frozen=True, slots=True)
class Fit:
    """How one plain cell becomes a shift-register latch.

    Attributes:
        cell: Library cell or composed module that takes its place.
        kind: What that holds.
        pins: Pin of the plain cell -> pin of the new one, all of them.
        ties: Pins of the new cell that need a constant.
        scan_in: Pin that shift data enters by.
        scan_in_inverted: Whether the plain cell's state becomes the inverse of what enters.
        taps: Outputs that show the state (of L2, where there is one), best for shifting first.
        test_pins: Pin -> test net.
        area: Area of the new cell.
        module: The composed module, None for a library cell.
        falling: Whether the plain cell is a flip-flop that takes data at the falling edge.
    """

    cell: str
    kind: SrlKind
    pins: Mapping[str, str]
    scan_in: str
    taps: tuple[ScanTap, ...]
    test_pins: Mapping[str, str]
    area: float | None
    ties: Mapping[str, int] = field(default_factory=dict)
    scan_in_inverted: bool = False
    module: ComposedModule | None = None
    falling: bool = False


def find_scan_latches(library: Library) -> tuple[ScanLatch, ...]:
    """Return every usable cell with an LSSD role, by area, then name; unknown areas last."""
    found = [
        ScanLatch(cell.name, kind_of(cell, role), role, cell.area)
        for cell in library.cells.values()
        if not (cell.dont_use or cell.power_management)
        for role in cell.scan
        if role.style is Style.LSSD
    ]
    return tuple(sorted(found, key=lambda at: (at.area is None, at.area or 0.0, at.cell)))


def find_two_port_latches(library: Library) -> tuple[ScanLatch, ...]:
    """Return the cells that are L1 alone."""
    return tuple(at for at in find_scan_latches(library) if at.kind is SrlKind.FIRST)


def find_srls(library: Library) -> tuple[ScanLatch, ...]:
    """Return the cells that hold L1 and L2."""
    return tuple(at for at in find_scan_latches(library) if at.kind is not SrlKind.FIRST)


def kind_of(cell: Cell, role: ScanRole) -> SrlKind:
    """Return what a cell with this LSSD role holds."""
    if role.clock_b is None:
        return SrlKind.FIRST
    named = {role.clock, role.clock_a, role.clock_b}
    if any(pin.is_clock and pin.name not in named for pin in cell.inputs()):
        return SrlKind.STAR
    mission = cell.test_cell.storage if cell.test_cell else ()
    if mission and mission[0].kind is StorageKind.FLIP_FLOP:
        return SrlKind.EDGE if mission[0].clock_also is None else SrlKind.DOUBLE
    if mission:
        return SrlKind.SINGLE
    shown = {pin for pin in (at.name for at in cell.outputs()) if _shows_first(cell, pin)}
    return SrlKind.SINGLE if shown else SrlKind.DOUBLE


def _shows_first(cell: Cell, pin: str) -> bool:
    function = cell.pins[pin].function
    found = literal(one_state(function, cell.storage[0])) if function and cell.storage else None
    return found is not None and found[0] == cell.storage[0].state


def fit(
    library: Library, cell: Cell, kinds: Iterable[SrlKind], taken: Collection[str] = frozenset()
) -> tuple[Fit, ...]:
    """Return how ``cell`` becomes a shift-register latch of one of ``kinds``, best first.

    All library cells that fit come before the composed one. Empty if nothing fits: the function of
    the cell is more than one data pin, or the library lacks both cells and gates.

    Args:
        library: What there is.
        cell: A plain latch (FIRST, SINGLE) or flip-flop (DOUBLE, EDGE).
        kinds: What is wanted, in order of preference.
        taken: Names that a composed module must not have.
    """
    wanted = tuple(kinds)
    found: list[Fit] = []
    for kind in wanted:
        if kind is SrlKind.DOUBLE:
            found += _two_phase(library, cell)
        else:
            found += [
                _library_fit(library, cell, twin, kind)
                for twin in scan_twins(library, cell.name, Style.LSSD)
                if kind_of(library.cells[twin.cell], twin.role) is kind
            ]
    for kind in wanted:
        composed = _composed(library, cell, kind, taken)
        found += [composed] if composed else []
    return tuple(found)


def _library_fit(library: Library, cell: Cell, twin: Twin, kind: SrlKind) -> Fit:
    role, new = twin.role, library.cells[twin.cell]
    test = {role.clock_a: TestNet.CLOCK_A, role.clock_b: TestNet.CLOCK_B}
    taps = [ScanTap(out.pin, out.inverted, out.test_only) for out in role.outputs]
    return Fit(
        cell=twin.cell,
        kind=kind,
        pins=dict(twin.pins),
        scan_in=role.scan_in,
        scan_in_inverted=role.scan_in_inverted,
        taps=tuple(sorted(taps, key=lambda tap: (not tap.test_only, tap.inverted))),
        test_pins={pin: net for pin, net in test.items() if pin is not None},
        area=new.area,
        ties=dict(twin.ties),
        falling=_falls(cell),
    )


def _falls(cell: Cell) -> bool:
    item = cell.storage[0]
    clock = literal(item.clock) if item.clock else None
    return item.kind is StorageKind.FLIP_FLOP and clock is not None and clock[1]


def _two_phase(library: Library, cell: Cell) -> list[Fit]:
    """Return the double-latch cells whose C edge does what the flip-flop's clock edge does."""
    if not cell.storage or cell.storage[0].kind is not StorageKind.FLIP_FLOP:
        return []
    found: list[Fit] = []
    for scan in find_srls(library):
        other = library.cells[scan.cell]
        if scan.kind is not SrlKind.DOUBLE or other.test_cell is None:
            continue
        one_clock = tuple(replace(item, clock_also=None) for item in other.test_cell.storage)
        alone = replace(other, test_cell=replace(other.test_cell, storage=one_clock))
        twin = match(_rising(cell), alone, scan.role)
        if twin is not None:
            found.append(_library_fit(library, cell, twin, SrlKind.DOUBLE))
    return sorted(found, key=lambda at: (len(at.ties), at.area is None, at.area or 0.0, at.cell))


def _rising(cell: Cell) -> Cell:
    """Return a flip-flop as one for the rising edge: what C does is up to the clocks."""
    item = cell.storage[0]
    clock = literal(item.clock) if item.clock else None
    if clock is None or not clock[1]:
        return cell
    turned = replace(item, clock=Var(clock[0]))
    return replace(cell, storage=(turned, *cell.storage[1:]))


_COMPOSED = {
    SrlKind.FIRST: (Kind.TWO_PORT, StorageKind.LATCH),
    SrlKind.SINGLE: (Kind.SINGLE, StorageKind.LATCH),
    SrlKind.DOUBLE: (Kind.DOUBLE, StorageKind.FLIP_FLOP),
}


@dataclass(frozen=True, slots=True)
class _Plain:
    """A plain storage cell, its state read so that it takes its data pin as it is.

    Attributes:
        data: Data pin.
        clock: Clock pin.
        inverted: Whether the library's state variable is the inverse of this state.
        clock_low: Whether the clock acts at 0 or on its falling edge.
        clear: Pin and level that make the state 0, or None.
        preset: Pin and level that make it 1, or None.
        preset_wins: Whether the latter wins.
        outputs: Output pin -> whether it shows the inverse.
    """

    data: str
    clock: str
    inverted: bool
    clock_low: bool
    clear: tuple[str, int] | None
    preset: tuple[str, int] | None
    preset_wins: bool
    outputs: Mapping[str, bool]


def _composed(library: Library, cell: Cell, kind: SrlKind, taken: Collection[str]) -> Fit | None:
    if kind not in _COMPOSED or len(cell.storage) != 1:
        return None
    form, storage = _COMPOSED[kind]
    plain = _plain(cell)
    if plain is None or cell.storage[0].kind is not storage:
        return None
    falling = plain.clock_low and storage is StorageKind.FLIP_FLOP
    shape = Shape(
        kind=form,
        clock_low=plain.clock_low and not falling,
        clear=plain.clear[1] if plain.clear else None,
        preset=plain.preset[1] if plain.preset else None,
        preset_wins=plain.preset_wins,
        true_output=False in plain.outputs.values(),
        inverse_output=True in plain.outputs.values(),
    )
    module = compose(library, shape, taken)
    if module is None:
        return None
    pins = {plain.data: "D", plain.clock: "C"}
    pins |= {plain.clear[0]: "R"} if plain.clear else {}
    pins |= {plain.preset[0]: "S"} if plain.preset else {}
    pins |= {pin: "QN" if turned else "Q" for pin, turned in plain.outputs.items()}
    return Fit(
        cell=module.name,
        kind=kind,
        pins=pins,
        scan_in="I",
        scan_in_inverted=plain.inverted,
        taps=_taps(shape, plain.inverted),
        test_pins={
            "A": TestNet.CLOCK_A,
            **({"B": TestNet.CLOCK_B} if kind is not SrlKind.FIRST else {}),
        },
        area=module.area,
        module=module,
        falling=falling,
    )


def _taps(shape: Shape, inverted: bool) -> tuple[ScanTap, ...]:
    """Return the outputs of a composed module that show what is to be shifted on."""
    if shape.kind is Kind.SINGLE:
        return (ScanTap("L2", inverted, test_only=True),)
    taps = [ScanTap("Q", inverted)] if shape.true_output else []
    taps += [ScanTap("QN", not inverted)] if shape.inverse_output else []
    return tuple(sorted(taps, key=lambda tap: tap.inverted))


def _plain(cell: Cell) -> _Plain | None:
    """Return how a storage cell is read; None if its function is more than single pins."""
    item = cell.storage[0]
    if item.clock_also is not None or item.data is None or item.clock is None:
        return None
    data, clock = literal(item.data), literal(item.clock)
    outputs = _outputs(cell, item)
    if data is None or clock is None or outputs is None:
        return None
    inputs = {pin.name for pin in cell.inputs()}
    if data[0] not in inputs or clock[0] not in inputs:
        return None
    forced = _forced(item, outputs)
    if forced is None:
        return None
    clear, preset, preset_wins = forced
    turned = data[1]
    return _Plain(
        data=data[0],
        clock=clock[0],
        inverted=turned,
        clock_low=clock[1],
        clear=preset if turned else clear,
        preset=clear if turned else preset,
        preset_wins=preset_wins ^ turned if clear and preset else False,
        outputs={pin: shown ^ turned for pin, shown in outputs.items()},
    )


def _outputs(cell: Cell, item: Storage) -> dict[str, bool] | None:
    """Return the outputs and whether they show the inverse; None if one shows anything else."""
    found: dict[str, bool] = {}
    for pin in cell.outputs():
        shown = literal(one_state(pin.function, item)) if pin.function else None
        if shown is None or shown[0] != item.state or pin.three_state is not None:
            return None
        if shown[1] in found.values():
            return None
        found[pin.name] = shown[1]
    return found or None


#: Set and reset: pin and level of each, and whether the set wins.
_Forced = tuple[tuple[str, int] | None, tuple[str, int] | None, bool]


def _forced(item: Storage, outputs: Mapping[str, bool]) -> _Forced | None:
    """Return set and reset; None if one is no single pin, or both at once do what gates cannot."""
    found: list[tuple[str, int] | None] = []
    for condition in (item.clear, item.preset):
        acts = literal(condition) if condition is not None else None
        if condition is not None and acts is None:
            return None
        found.append((acts[0], int(not acts[1])) if acts else None)
    clear, preset = found
    if clear is None or preset is None:
        return clear, preset, False
    state, inverse = (token or "X" for token in item.clear_preset)
    wanted = {state} if False in outputs.values() else set()
    if True in outputs.values():
        wanted.add({"L": "H", "H": "L"}.get(inverse, inverse))
    wanted.discard("X")
    if len(wanted) > 1 or not wanted <= {"L", "H"}:
        return None
    return clear, preset, wanted == {"H"}
