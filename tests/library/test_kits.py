"""Real libraries: known cells, models against Liberty, and a second reader of Liberty.

The libraries of Debian are always there; IHP and SkyWater only where the environment names them.
"""

import gzip
import json
import subprocess
import sys
from functools import cache
from pathlib import Path

import pytest
from kits import OSU, osu, source
from outside import outside

import insertdft
from insertdft.library import (
    Library,
    StorageKind,
    Style,
    check_twin,
    find_buffers,
    find_clock_gates,
    find_gates,
    find_inverters,
    find_latches,
    find_muxes,
    find_ties,
    read_library,
    read_models,
    same_function,
    scan_twins,
)
from insertdft.library.expression import Not, Var, parse_expression
from insertdft.library.functions import same
from insertdft.text import SourceText

DEMO = Path(insertdft.__file__).parent / "demo"
IHP_LIB = ("libs", "ihp-sg13g2", "sg13g2_stdcell_typ_1p20V_25C.lib")
IHP_MODELS = ("sg13g2_udp.v", "sg13g2_stdcell.v")
SKY = "sky130_fd_sc_hd__"


def unpacked(path: Path) -> SourceText:
    return SourceText(path.name, gzip.decompress(path.read_bytes()).decode("latin-1"))


@cache
def _ihp(path: Path) -> Library:
    return read_library([source(path)])


def ihp() -> Library:
    return _ihp(outside(*IHP_LIB))


@cache
def _sky(path: Path) -> Library:
    return read_library([unpacked(path)])


def sky() -> Library:
    return _sky(outside("libs", "sky130hd", "sky130hd_tt.lib.gz"))


@cache
def _sky_models(folder: Path) -> Library:
    names = ("sky130_hd_primitives.v.gz", "sky130_hd.v.gz")
    return read_models([unpacked(folder / name) for name in names])


def sky_models() -> Library:
    return _sky_models(outside("libs", "sky130hd"))


@pytest.mark.parametrize("name", sorted(OSU))
def test_osu_storage_cells_are_read(name: str) -> None:
    cells = osu(name).cells

    rising, falling, both, latch = (
        cells[item].storage[0] for item in ("DFFPOSX1", "DFFNEGX1", "DFFSR", "LATCH")
    )
    assert (rising.kind, rising.data, rising.clock) == (
        StorageKind.FLIP_FLOP, Var("D"), Var("CLK"),
    )  # fmt: skip
    assert falling.clock == Not(Var("CLK"))
    assert (both.clear, both.preset) == (Not(Var("R")), Not(Var("S")))
    assert both.clear_preset == ("L", None)
    assert (latch.kind, latch.clock) == (StorageKind.LATCH, Var("CLK"))


@pytest.mark.parametrize("name", sorted(OSU))
def test_osu_has_no_scan_cell_but_what_composed_ones_need(name: str) -> None:
    kit = osu(name)

    assert all(cell.scan == () for cell in kit.cells.values())
    assert all(
        scan_twins(kit, cell.name, style) == ()
        for cell in kit.cells.values()
        for style in Style
        if cell.is_storage
    )
    [mux] = find_muxes(kit)
    # The inputs are named against expectation, and the output is inverted.
    assert (mux.cell, mux.select, mux.when0, mux.when1, mux.inverted) == (
        "MUX2X1", "S", "B", "A", True,
    )  # fmt: skip
    assert find_buffers(kit)[0].cell == "BUFX2"
    assert find_inverters(kit)[0].cell == "INVX1"
    assert [gate.cell for gate in find_gates(kit, "nand", 2)] == ["NAND2X1"]
    assert [gate.cell for gate in find_gates(kit, "nand", 3)] == ["NAND3X1"]
    assert [latch.cell for latch in find_latches(kit, 1)] == ["LATCH"]
    assert [find_latches(kit, 0), find_ties(kit, 0), find_clock_gates(kit)] == [(), (), ()]


def test_three_state_is_the_condition_of_high_impedance() -> None:
    pin = osu("osu035").cells["TBUFX1"].pins["Y"]

    assert pin.three_state == Not(Var("EN"))
    assert pin.function == Not(Var("A"))


def test_osu_tables_are_read_when_asked_for() -> None:
    [arc] = [arc for arc in osu("osu035").cells["INVX1"].pins["Y"].arcs if arc.related == ("A",)]

    table = arc.tables["cell_rise"]
    assert table.axes == ("total_output_net_capacitance", "input_net_transition")
    assert len(table.values) == len(table.indices[0]) * len(table.indices[1])
    assert min(table.values) >= 0


def agreement(liberty: Library, models: Library) -> tuple[int, list[str], list[str]]:
    """Return how many cells agree, which do not, and which say too little to compare."""
    silent = [
        name
        for name, cell in liberty.cells.items()
        if not any(pin.function for pin in cell.outputs())
    ]
    alike = [
        name
        for name, cell in liberty.cells.items()
        if name not in silent and same_function(cell, models.cells[name])
    ]
    differ = [name for name in liberty.cells if name not in silent and name not in alike]
    print(f"{len(alike)} agree, {len(differ)} differ, {len(silent)} have no function")
    return len(alike), differ, silent


@pytest.mark.parametrize(("name", "count"), [("osu035", 35), ("osu018", 32), ("osu050", 35)])
def test_osu_models_agree_with_liberty(name: str, count: int) -> None:
    models = read_models([source(OSU[name].with_suffix(".v"))])

    assert agreement(osu(name), models)[:2] == (count, [])
    assert models.diagnostics == ()


def test_disagreement_of_a_model_is_noticed() -> None:
    """The comparison can fail: models with one gate changed no longer agree."""
    text = source(OSU["osu018"].with_suffix(".v"))
    changed = text.text.replace("udp_dff (P0003, D_, CLK, I0_SET, I0_CLEAR", "udp_dff (P0003, "
                                "D_, CLK, I0_CLEAR, I0_SET", 1)  # fmt: skip
    assert changed != text.text

    models = read_models([SourceText("changed.v", changed)])

    assert agreement(osu("osu018"), models)[1] == ["DFFSR"]


def test_ihp_models_agree_with_liberty() -> None:
    models = read_models([source(outside(*IHP_LIB[:2], name)) for name in IHP_MODELS])

    count, differ, silent = agreement(ihp(), models)
    assert (count, differ) == (76, [])
    assert silent[-1] == "sg13g2_sighold"
    assert models.diagnostics == ()


def test_sky130_models_agree_with_liberty() -> None:
    count, differ, _ = agreement(sky(), sky_models())

    assert (count, differ) == (416, [])
    assert sky_models().diagnostics == ()


@pytest.mark.parametrize(
    ("plain", "scan"),
    [
        ("dfrbpq_1", "sdfrbpq_1"), ("dfrbpq_2", "sdfrbpq_2"), ("dfrbp_1", "sdfrbp_1"),
        ("dfrbp_2", "sdfrbp_2"),
    ],
)  # fmt: skip
def test_ihp_twins(plain: str, scan: str) -> None:
    twin = scan_twins(ihp(), f"sg13g2_{plain}", Style.MUX_D)[0]

    assert twin.cell == f"sg13g2_{scan}"
    assert (twin.role.scan_in, twin.role.scan_enable, dict(twin.ties)) == ("SCD", "SCE", {})
    assert all(pin == to for pin, to in twin.pins.items())


def test_only_settable_flip_flop_of_ihp_is_a_scan_cell_that_is_not_to_be_used() -> None:
    settable = [
        cell for cell in ihp().cells.values() if cell.storage and cell.storage[0].preset is not None
    ]

    assert [(cell.name, len(cell.scan), cell.dont_use) for cell in settable] == [
        ("sg13g2_sdfbbp_1", 1, True)
    ]


def test_ihp_latches_have_no_twin() -> None:
    latches = [
        cell.name
        for cell in ihp().cells.values()
        if cell.is_storage and cell.storage[0].kind is StorageKind.LATCH
    ]

    assert latches == [f"sg13g2_{n}" for n in ("dlhq_1", "dlhr_1", "dlhrq_1", "dllr_1", "dllrq_1")]
    assert all(not scan_twins(ihp(), name, style) for name in latches for style in Style)


@pytest.mark.parametrize(
    ("plain", "scan"),
    [
        ("dfxtp_1", "sdfxtp_1"), ("dfxtp_2", "sdfxtp_2"), ("dfxtp_4", "sdfxtp_4"),
        ("dfxbp_1", "sdfxbp_1"), ("dfxbp_2", "sdfxbp_2"), ("dfrtp_1", "sdfrtp_1"),
        ("dfrtp_2", "sdfrtp_2"), ("dfrtp_4", "sdfrtp_4"), ("dfrbp_1", "sdfrbp_1"),
        ("dfstp_1", "sdfstp_1"), ("dfstp_4", "sdfstp_4"), ("dfsbp_2", "sdfsbp_2"),
        ("dfrtn_1", "sdfrtn_1"), ("dfbbp_1", "sdfbbp_1"), ("dfbbn_1", "sdfbbn_1"),
        ("dfbbn_2", "sdfbbn_2"), ("edfxtp_1", "sedfxtp_1"), ("edfxbp_1", "sedfxbp_1"),
    ],
)  # fmt: skip
@pytest.mark.parametrize("kit", [sky, sky_models])
def test_sky130_twins(kit: object, plain: str, scan: str) -> None:
    """From Liberty, and from the models alone, which declare nothing about scan."""
    assert callable(kit)
    library: Library = kit()

    found = scan_twins(library, SKY + plain, Style.MUX_D)

    assert found[0].cell == SKY + scan
    assert not found[0].ties
    cells = library.cells
    assert all(check_twin(cells[SKY + plain], cells[twin.cell], twin) for twin in found)


def test_sky130_roles_are_those_declared() -> None:
    scan = {cell.name.removeprefix(SKY): cell.scan for cell in sky().cells.values() if cell.scan}

    assert len(scan) == 24
    assert all(name.startswith(("sdf", "sedf")) for name in scan)
    assert {(role.scan_in, role.scan_enable) for [role] in scan.values()} == {("SCD", "SCE")}
    assert all((role.data is None) == name.startswith("sedf") for name, [role] in scan.items())
    assert not sky().diagnostics


def test_roles_of_models_alone_are_those_of_liberty() -> None:
    assert {
        cell.name: cell.scan for cell in sky_models().cells.values() if cell.scan
    } == {cell.name: cell.scan for cell in sky().cells.values() if cell.scan}  # fmt: skip


def test_enable_flip_flop_is_no_scan_cell() -> None:
    cell = sky().cells[f"{SKY}edfxtp_1"]

    assert cell.scan == ()
    assert cell.storage[0].data is not None
    assert same(cell.storage[0].data, parse_expression("D DE + IQ DE'"))


def test_sky130_clock_gates_are_no_storage() -> None:
    gates = {gate.cell.removeprefix(SKY): gate for gate in find_clock_gates(sky())}

    assert sorted(gates) == [f"{s}dlclkp_{n}" for s in ("", "s") for n in (1, 2, 4)]
    assert (gates["sdlclkp_1"].test, gates["sdlclkp_1"].kind) == ("SCE", "latch_posedge_precontrol")
    assert not any(sky().cells[SKY + name].is_storage for name in gates)
    models = {gate.cell.removeprefix(SKY): gate for gate in find_clock_gates(sky_models())}
    assert models == gates


def test_power_management_cells_are_never_chosen() -> None:
    chosen = [gate.cell for gate in find_buffers(sky()) + find_inverters(sky())]
    chosen += [gate.cell for gate in find_gates(sky(), "and", 2) + find_gates(sky(), "or", 2)]
    chosen += [latch.cell for level in (0, 1) for latch in find_latches(sky(), level)]

    assert chosen
    assert not [name for name in chosen if "lpflow" in name]


def test_liberty_and_models_together_give_order_and_tables() -> None:
    folder = outside("libs", "sky130hd")
    found = read_library(
        [unpacked(folder / name) for name in ("sky130hd_tt.lib.gz", "sky130_hd.v.gz")]
    )

    cell = found.cells[f"{SKY}sdfrtp_1"]
    assert cell.pin_order == ("Q", "CLK", "D", "SCD", "SCE", "RESET_B")
    assert cell.area == pytest.approx(31.28)
    assert cell.power_pins == ("VGND", "VNB", "VPB", "VPWR")


SECOND_READER = """
import json, sys
from liberty.parser import parse_liberty

def plain(value):
    return getattr(value, "value", value)

def pins(cell):
    return {str(plain(pin.args[0])): {
        "direction": str(plain(pin["direction"])) if "direction" in pin else None,
        "function": next((str(plain(pin[name])) for name in ("function", "state_function")
                          if name in pin), None),
        "capacitance": pin["capacitance"] if "capacitance" in pin else None,
        "arcs": [str(plain(t["related_pin"])).split() for t in pin.get_groups("timing")],
        "rise": [t.get_groups("cell_rise")[0].get_array("values").flatten().tolist()
                 for t in pin.get_groups("timing") if t.get_groups("cell_rise")],
    } for pin in cell.get_groups("pin")}

def storage(cell):
    return [[group.group_name, {str(key): str(plain(group[key])) for key in
             ("next_state", "clocked_on", "data_in", "enable", "clear", "preset") if key in group}]
            for group in cell.groups if group.group_name in ("ff", "latch")]

library = parse_liberty(open(sys.argv[1], encoding="latin-1").read())
print(json.dumps({str(plain(cell.args[0])): {
    "area": cell["area"], "pins": pins(cell), "storage": storage(cell),
} for cell in library.get_groups("cell")}))
"""


@pytest.mark.parametrize("name", ["osu018", "osu035", "ihp"])
def test_second_reader_of_liberty_agrees(name: str) -> None:
    """The PyPI package liberty-parser, run as a process of its own (its licence is the GPL)."""
    path = outside(*IHP_LIB) if name == "ihp" else OSU[name].with_suffix(".lib")
    kit = ihp() if name == "ihp" else osu(name)

    done = subprocess.run(
        [sys.executable, "-c", SECOND_READER, str(path)],
        capture_output=True,
        text=True,
        check=False,
    )

    assert done.returncode == 0, done.stderr
    other = json.loads(done.stdout)
    assert list(other) == list(kit.cells)
    for cell_name, theirs in other.items():
        ours = kit.cells[cell_name]
        assert ours.area == theirs["area"]
        assert list(ours.pins) == list(theirs["pins"])
        for pin_name, pin in theirs["pins"].items():
            own = ours.pins[pin_name]
            assert own.direction == pin["direction"]
            assert (own.function is None) == (pin["function"] is None)
            if own.function is not None:
                assert same(own.function, parse_expression(pin["function"]))
            if pin["capacitance"] is not None:
                assert own.capacitance == pin["capacitance"]
            assert [list(arc.related) for arc in own.arcs] == pin["arcs"]
            rises = [list(arc.tables["cell_rise"].values) for arc in own.arcs
                     if "cell_rise" in arc.tables]  # fmt: skip
            assert rises == pin["rise"]
        written = () if ours.state_table else ours.storage
        for storage, (kind, texts) in zip(written, theirs["storage"], strict=True):
            assert storage.kind is StorageKind("flip-flop" if kind == "ff" else "latch")
            pairs = {
                "next_state": storage.data, "data_in": storage.data, "clocked_on": storage.clock,
                "enable": storage.clock, "clear": storage.clear, "preset": storage.preset,
            }  # fmt: skip
            for attribute, text in texts.items():
                expression = pairs[attribute]
                assert expression is not None
                assert same(expression, parse_expression(text))


@cache
def demo() -> Library:
    return read_library([source(DEMO / "demo.lib")])


def test_demo_library_has_a_twin_of_every_style_for_every_flip_flop() -> None:
    plain = [
        cell.name
        for cell in demo().cells.values()
        if cell.is_storage and not cell.scan and cell.storage[0].kind is StorageKind.FLIP_FLOP
        if len(cell.storage) == 1
    ]

    assert len(plain) == 11
    for name in plain:
        kind, _, drive = name.removeprefix("flop_").rpartition("w")
        stems = {
            Style.MUX_D: "scan_flop", Style.CLOCKED_SCAN: "two_clock_flop", Style.LSSD: "srl_edge",
        }  # fmt: skip
        for style, stem in stems.items():
            found = scan_twins(demo(), name, style)
            assert found[0].cell == f"{stem}_{kind}w{drive}"
            assert not found[0].ties
            cells = demo().cells
            assert all(check_twin(cells[name], cells[twin.cell], twin) for twin in found)
    assert demo().diagnostics == ()


def test_demo_shift_register_latches_are_read() -> None:
    roles = {name: cell.scan[0] for name, cell in demo().cells.items() if name.startswith("srl")}

    assert all(role.style is Style.LSSD for role in roles.values())
    shown = {name: [out.pin for out in role.outputs] for name, role in roles.items()}
    assert shown["srl_first_w1"] == ["L1", "L1N"]
    assert shown["srl_single_w1"] == ["L2"]
    assert shown["srl_double_r_w1"] == ["L2", "L2N"]
    assert shown["srl_star_w1"] == ["L2"]
    star = roles["srl_star_w1"]
    assert (star.data, star.clock, star.data_2, star.clock_2) == ("D", "C", "D2", "C2")
    assert demo().cells["scan_bank4_w1"].scan[0].bits == 4
    latch = scan_twins(demo(), "latch_w1", Style.LSSD)
    assert [twin.cell for twin in latch[:2]] == ["srl_first_w1", "srl_single_w1"]
    assert scan_twins(demo(), "latch_low_w1", Style.LSSD) == ()


def test_demo_models_agree_with_liberty() -> None:
    models = read_models([source(DEMO / "demo_cells.v")])

    unclear = {item.message.split("`")[1] for item in models.diagnostics}
    differ = set(agreement(demo(), models)[1]) - unclear
    # What both clocks of L1 do at once is open, and each description chooses for itself.
    assert sorted(differ) == sorted(name for name in demo().cells if name.startswith("srl_")
                                    and not name.startswith("srl_edge"))  # fmt: skip
    assert all(models.cells[name].scan == demo().cells[name].scan for name in differ)
    assert all(name.startswith(("two_clock", "srl_edge")) or "bank" in name for name in unclear)
