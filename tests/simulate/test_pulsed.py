"""One capture with gated clocks followed, against the cycle machine."""

import numpy as np
import pytest
from circuits import design_of
from outside import outside

from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.library import read_library
from insertdft.simulate.bits import Evaluator
from insertdft.simulate.circuit import States
from insertdft.simulate.lower import make_circuit
from insertdft.simulate.state import Machine
from insertdft.simulate.words import ONES, random_words
from insertdft.source import read_netlist, read_sources

GATED = """module top (c, t, a, b, d, q0, q1, q2, q3, q4);
  input c, t, a, b, d; output q0, q1, q2, q3, q4; wire n, m, k, l, x, y, z, cb;
  and u1 (n, a, q0); or u2 (m, n, q1); nand u3 (x, d, q2); xor u4 (y, q3, d);
  xor u6 (z, d, a); buf u5 (cb, c); GATE g1 (.E(m), .CK(cb), .GCK(k)); and g2 (l, cb, b);
  DFF f0 (.D(x), .CK(c), .Q(q0)); DFF f1 (.D(y), .CK(k), .Q(q1));
  DFFE f2 (.D(n), .E(a), .CK(l), .Q(q2)); DFFR f3 (.D(x), .R(t), .CK(k), .Q(q3));
  DFFN f4 (.D(z), .CK(l), .Q(q4));
endmodule"""


def following_both_ways(design: Design, clock: str, held: dict[str, int]) -> tuple[int, int, int]:
    """Return how many states both agree on, how many not, and how many kept their value."""
    machine = Machine(design, words=2, unknown=False)
    circuit = make_circuit(design, pulsed={clock: 0})
    chance = np.random.default_rng(3)
    ports = [name for name in circuit.inputs if name != clock and name not in held]
    words = dict(zip(ports, random_words(chance, (len(ports), 2)), strict=True))
    words |= {name: np.full(2, ONES if v else 0, np.uint64) for name, v in held.items()}
    states = random_words(chance, (len(circuit.states.slot), 2))
    # The machine also holds the latches of clock gates; they follow by themselves.
    place = {key: row for row, key in enumerate(keys(machine.circuit.states))}
    rows = [place[key] for key in keys(circuit.states)]
    every = np.zeros((len(place), 2), np.uint64)
    every[rows] = states
    machine.force({**words, clock: 0})
    machine.load(every)
    machine.force({clock: 1})
    machine.force({clock: 0})
    after = machine.states()[0][rows]

    evaluator = Evaluator(circuit, 1)
    values = evaluator.blank(2)
    evaluator.put(values, circuit.states.slot, states)
    for name, word in words.items():
        evaluator.put(values, [circuit.inputs[name]], word[None])
    evaluator.run(values)
    mine = values[0, circuit.states.following]
    same = (mine == after).all(axis=1)
    return int(same.sum()), int((~same).sum()), int((after == states).all(axis=1).sum())


def keys(states: States) -> list[tuple[int, int]]:
    return list(zip(states.instance.tolist(), states.storage.tolist(), strict=True))


# A cell on the other edge takes what stands there before the pulse: in the netlist above its data
# does not depend on cells that the first edge changes.
def test_gated_cells_take_data_only_where_their_clock_pulses() -> None:
    same, other, _ = following_both_ways(design_of(GATED), "c", {"t": 1})

    assert (same, other) == (5, 0)


def test_a_design_whose_clocks_all_arrive_differs() -> None:
    # The same netlist with the gates taken as open is another machine: the check can fail.
    design = design_of(GATED)
    pulsed, open_gates = make_circuit(design, pulsed={"c": 0}), make_circuit(design)

    assert pulsed.nodes > open_gates.nodes
    assert len(pulsed.states.slot) == len(open_gates.states.slot) - 1  # the latch of g1


@pytest.mark.parametrize(
    ("name", "library"),
    [
        ("icg_regs.sky130hd", ("sky130hd", "sky130hd_tt.lib.gz")),
        ("icg_regs_te.ihp", ("ihp-sg13g2", "sg13g2_stdcell_typ_1p20V_25C.lib")),
        ("serv.ihp", ("ihp-sg13g2", "sg13g2_stdcell_typ_1p20V_25C.lib")),
    ],
)
def test_real_netlists_capture_as_the_machine_does(name: str, library: tuple[str, str]) -> None:
    kit = read_library(read_sources([outside("libs", *library)]))
    netlist = read_netlist(read_sources([outside("netlists", f"{name}.v.gz")]))
    design = link(netlist, kit)[0]
    held = {"rst_n": 1} if "icg" in name else {}

    same, other, _ = following_both_ways(design, "clk", held)

    assert other == 0
    assert same > 500


def test_clocks_and_pulses_exclude_each_other() -> None:
    with pytest.raises(ValueError, match="exclude"):
        make_circuit(design_of(GATED), clocks=True, pulsed={"c": 0})
