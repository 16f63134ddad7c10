"""Changes that are only thought of must time like the netlist that has them."""

import numpy as np
import pytest
from circuits import design_of
from timed_cells import NO_WIRE, by_name, timed, timed_library

from insertdft.timing.analyse import Assumptions, Timing, analyse
from insertdft.timing.paths import changes, endpoint_needs, histogram
from insertdft.timing.wiring import (
    DATA,
    MISSION,
    Insertion,
    Wiring,
    add_loads,
    insert,
    replace_cells,
    wiring_of,
)

PLAIN = """module top (c, d, q); input c, d; output q; wire a, n;
  DFF f (.D(n), .CK(c), .Q(a));
  AND i (.A(a), .B(q), .Y(n));
  DFF g (.D(n), .CK(c), .Q(q));
endmodule"""

WIRED = Assumptions(wire_per_sink=0.25)


def start() -> Wiring:
    return wiring_of(design_of(PLAIN, timed_library()))


def instance(wiring: Wiring, name: str) -> int:
    names = [wiring.design.name(i) for i in range(len(wiring.design.cell))]
    return names.index(name)


def needs(timing: Timing) -> dict[str, float]:
    return {name: round(value, 9) for name, value in by_name(timing).items()}


def test_a_replaced_cell_times_like_the_netlist_with_that_cell() -> None:
    wiring, cells = start(), timed_library().cells

    changed = replace_cells(wiring, [instance(wiring, "g")], cells["SDFF"], {})

    real = PLAIN.replace("DFF g (", "SDFF g (.SI(1'b0), .SE(1'b0), ")
    assert needs(analyse(changed, WIRED)) == needs(timed(real, WIRED))
    assert needs(analyse(changed, WIRED)) != needs(analyse(wiring, WIRED))


def test_pins_may_have_other_names_in_the_new_cell() -> None:
    wiring, cells = start(), timed_library().cells

    changed = replace_cells(wiring, [instance(wiring, "i")], cells["MUX"], {"A": "B", "B": "A"})

    real = PLAIN.replace("AND i (.A(a), .B(q)", "MUX i (.B(a), .A(q)")
    assert needs(analyse(changed, WIRED)) == needs(timed(real, WIRED))


def test_a_mux_in_front_of_data_times_like_the_netlist_with_it() -> None:
    wiring, cells = start(), timed_library().cells
    flops = np.array([instance(wiring, "f"), instance(wiring, "g")])
    parts = ((cells["MUX"], {"A": MISSION, "B": "$scan", "S": "scan_enable", "Y": DATA}),)

    changed = insert(wiring, Insertion(flops, "D", parts, frozenset({"$scan", "scan_enable"})))

    real = (
        PLAIN.replace("f (.D(n)", "f (.D(x)")
        .replace("g (.D(n)", "g (.D(y)")
        .replace(
            "endmodule",
            "MUX m (.A(n), .B(1'b0), .S(1'b0), .Y(x)); MUX k (.A(n), .B(1'b0), .S(1'b0), .Y(y));"
            " endmodule",
        )
    )
    before, after = analyse(wiring, WIRED), analyse(changed, WIRED)
    assert needs(after) == needs(timed(real, WIRED))
    worst = changes(before, after)
    assert [change.endpoint for change in worst] == ["f", "g"]
    assert all(change.after > change.before + 4 for change in worst)


def test_parts_with_a_net_between_them() -> None:
    wiring, cells = start(), timed_library().cells
    parts = (
        (cells["INV"], {"A": MISSION, "Y": "inside"}),
        (cells["INV"], {"A": "inside", "Y": DATA}),
    )

    changed = insert(wiring, Insertion(np.array([instance(wiring, "g")]), "D", parts))

    real = PLAIN.replace("g (.D(n)", "g (.D(y)").replace(
        "endmodule", "wire x; INV m (.A(n), .Y(x)); INV k (.A(x), .Y(y)); endmodule"
    )
    assert needs(analyse(changed, WIRED)) == needs(timed(real, WIRED))


def test_added_load_slows_the_net_it_hangs_on() -> None:
    wiring = start()
    net = wiring.design.pins(instance(wiring, "f"))["Q"]

    slower = analyse(add_loads(wiring, np.array([net, net]), 0.75), NO_WIRE)

    before = analyse(wiring, NO_WIRE)
    assert slower.load[net] == pytest.approx(before.load[net] + 1.5)
    assert needs(slower)["g"] > needs(before)["g"]


def test_a_change_leaves_what_it_started_from_alone() -> None:
    wiring, cells = start(), timed_library().cells
    before = needs(analyse(wiring, WIRED))

    replace_cells(wiring, [0, 2], cells["SDFF"], {"Q": "Z"})
    add_loads(wiring, np.array([5]), 9.0)
    insert(wiring, Insertion(np.array([2]), "D", ((cells["BUF"], {"A": MISSION, "Y": DATA}),)))

    assert needs(analyse(wiring, WIRED)) == before


def test_insertions_that_cannot_be_are_refused() -> None:
    wiring, cells = start(), timed_library().cells

    with pytest.raises(ValueError, match="'SI'"):
        insert(wiring, Insertion(np.array([0]), "SI", ((cells["BUF"], {"Y": DATA}),)))
    with pytest.raises(ValueError, match="drives"):
        insert(wiring, Insertion(np.array([0]), "D", ((cells["BUF"], {"A": MISSION}),)))


def test_the_histogram_counts_every_endpoint_once() -> None:
    timing = analyse(start(), WIRED)
    values = endpoint_needs(timing)

    counts = histogram(timing, np.array([0.0, values.min() + 0.001, 100.0]))

    assert counts.sum() == 2
    assert counts[0] == (values <= values.min() + 0.001).sum()
