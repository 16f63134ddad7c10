"""Compose what a library lacks from what it has, cheapest first."""

from collections.abc import Iterator

from insertdft.library import find_gates, find_inverters, find_muxes
from insertdft.library.cell import Library
from insertdft.styles.conversion import DATA, MISSION, SCAN, Part, TestNet

ENABLE = TestNet.SCAN_ENABLE


def compose_mux(library: Library) -> tuple[Part, ...] | None:
    """Return cells that send SCAN to DATA while scan enable is 1 and MISSION while it is 0.

    A mux cell, an inverting mux and an inverter, or three NAND gates and an inverter (the mux in
    its two-level form): the one with the smallest area; cells without a stated area come last.
    """
    found = [*_by_mux(library), *_by_nand(library)]
    return min(found, key=lambda parts: _cost(library, parts)) if found else None


def area_of(library: Library, parts: tuple[Part, ...]) -> float | None:
    """Return the area that ``parts`` add to each instance, None if one states none."""
    areas = [library.cells[part.cell].area for part in parts]
    return None if None in areas else sum(area for area in areas if area is not None)


def _cost(library: Library, parts: tuple[Part, ...]) -> tuple[float, int]:
    area = area_of(library, parts)
    return (float("inf") if area is None else area, len(parts))


def _by_mux(library: Library) -> Iterator[tuple[Part, ...]]:
    inverter = next(iter(find_inverters(library)), None)
    for mux in find_muxes(library):
        ins = {mux.select: ENABLE, mux.when0: MISSION, mux.when1: SCAN}
        if not mux.inverted:
            yield (Part("mux", mux.cell, {**ins, mux.output: DATA}),)
        elif inverter is not None:
            yield (
                Part("mux", mux.cell, {**ins, mux.output: "turned"}),
                Part("inv", inverter.cell, {inverter.inputs[0]: "turned", inverter.output: DATA}),
            )


def _by_nand(library: Library) -> Iterator[tuple[Part, ...]]:
    inverter = next(iter(find_inverters(library)), None)
    nand = next(iter(find_gates(library, "nand", 2)), None)
    if inverter is None or nand is None:
        return
    first, second = nand.inputs
    name, output = nand.cell, nand.output
    yield (
        Part("inv", inverter.cell, {inverter.inputs[0]: ENABLE, inverter.output: "mission_on"}),
        Part("nand_d", name, {first: MISSION, second: "mission_on", output: "from_mission"}),
        Part("nand_s", name, {first: SCAN, second: ENABLE, output: "from_scan"}),
        Part("nand_y", name, {first: "from_mission", second: "from_scan", output: DATA}),
    )
