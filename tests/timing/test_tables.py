"""Table look-up against scipy's interpolator and by hand."""

from pathlib import Path

import numpy as np
import pytest
from outside import outside
from scipy.interpolate import RegularGridInterpolator

from insertdft.library import Library, Table, read_library
from insertdft.source import read_sources
from insertdft.timing.tables import Stacker

SLEW, LOAD = "input_net_transition", "total_output_net_capacitance"


def all_tables(library: Library) -> list[Table]:
    return [
        table
        for cell in library.cells.values()
        for pin in cell.pins.values()
        for arc in pin.arcs
        for name, table in arc.tables.items()
        if name.startswith(("cell_", "rise_tr", "fall_tr"))
    ]


def agree(library: Library) -> int:
    """Compare every table inside and outside its range; return how many there were."""
    tables = all_tables(library)
    stacker = Stacker(SLEW, LOAD)
    numbers = [stacker.add(table) for table in tables]
    stack = stacker.stack()
    chance = np.random.default_rng(1)
    for table, number in zip(tables, numbers, strict=True):
        if len(table.axes) != 2:
            continue
        slew_at, load_at = table.axes.index(SLEW), table.axes.index(LOAD)
        grid = RegularGridInterpolator(
            [np.array(index) for index in table.indices],
            np.array(table.values).reshape([len(index) for index in table.indices]),
            bounds_error=False,
            fill_value=None,  # extrapolate
        )
        slew = chance.uniform(-0.2, 1.6, 20) * table.indices[slew_at][-1]
        load = chance.uniform(-0.2, 1.6, 20) * table.indices[load_at][-1]
        points = np.zeros((20, 2))
        points[:, slew_at], points[:, load_at] = slew, load
        mine = stack.look_up(np.full(20, number, np.int32), slew, load)
        assert mine == pytest.approx(grid(points), rel=1e-9, abs=1e-12)
    return len(tables)


def test_every_table_of_a_library_of_the_registry_agrees_with_scipy() -> None:
    path = Path("/usr/share/qflow/tech/osu035/osu035_stdcells.lib")

    assert agree(read_library(read_sources([path]))) > 200


def test_every_table_of_a_larger_library_agrees_with_scipy() -> None:
    path = outside("libs", "ihp-sg13g2", "sg13g2_stdcell_typ_1p20V_25C.lib")

    assert agree(read_library(read_sources([path]))) > 900


#: 10 + 2 * slew + 3 * load at the corners, 1 more at the far one.
CORNERS = Table((SLEW, LOAD), ((1.0, 3.0), (2.0, 4.0)), (18.0, 24.0, 22.0, 29.0))


def look_up(table: Table, slew: float, load: float) -> float:
    stacker = Stacker(SLEW, LOAD)
    number = stacker.add(table)
    found = stacker.stack().look_up(
        np.array([number], np.int32), np.array([slew]), np.array([load])
    )
    return float(found[0])


@pytest.mark.parametrize(
    ("slew", "load", "value"),
    [
        (1.0, 2.0, 18.0),
        (3.0, 4.0, 29.0),
        (2.0, 3.0, 23.25),  # the middle is the mean of the corners
        (2.0, 2.0, 20.0),
        (5.0, 2.0, 26.0),  # carried on: 18, 22, 26
        (1.0, 0.0, 12.0),  # carried on: 24, 18, 12
    ],
)
def test_values_worked_out_by_hand(slew: float, load: float, value: float) -> None:
    assert look_up(CORNERS, slew, load) == pytest.approx(value)


def test_axes_may_come_in_either_order() -> None:
    turned = Table((LOAD, SLEW), (CORNERS.indices[1], CORNERS.indices[0]), (18.0, 22.0, 24.0, 29.0))

    for slew, load in ((1.2, 3.9), (0.0, 9.0), (4.0, 2.5)):
        assert look_up(turned, slew, load) == pytest.approx(look_up(CORNERS, slew, load))


@pytest.mark.parametrize(
    ("table", "value"),
    [
        (Table((SLEW,), ((1.0, 3.0),), (5.0, 9.0)), 7.0),
        (Table((LOAD,), ((1.0, 3.0),), (5.0, 9.0)), 13.0),
        (Table((), (), (4.5,)), 4.5),
        (Table(("index_1", "index_2"), CORNERS.indices, CORNERS.values), 29.75),
        (Table((SLEW, LOAD), ((2.0,), (5.0,)), (6.0,)), 6.0),
    ],
)
def test_small_tables(table: Table, value: float) -> None:
    assert look_up(table, 2.0, 5.0) == pytest.approx(value)


def test_no_table_gives_nothing() -> None:
    stacker = Stacker(SLEW, LOAD)

    assert stacker.add(None) == -1
    assert stacker.add(Table((), (), ())) == -1
    found = stacker.stack().look_up(np.array([-1], np.int32), np.ones(1), np.ones(1))
    assert found.tolist() == [0.0]
