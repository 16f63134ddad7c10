"""Small circuits for tests: gate lists, read from .bench text or made at random.

``Gates`` is also a reference simulator of a few lines that shares nothing with the product.
"""

import random
import re
from collections.abc import Mapping
from dataclasses import dataclass

from outside import outside

from insertdft.design.flat import Design
from insertdft.design.link import link
from insertdft.library import Library, read_library
from insertdft.netlist.names import plain_to_name, to_verilog
from insertdft.source import read_netlist
from insertdft.text import SourceText

LIBERTY = """library (tiny) {
  time_unit : "1ns"; capacitive_load_unit (1, pf);
  cell (DFF) { area : 6;
    ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; }
    pin (D) { direction : input; } pin (CK) { direction : input; clock : true; }
    pin (Q) { direction : output; function : "IQ"; } }
  cell (DFFR) { area : 7;
    ff (IQ, IQN) { next_state : "D"; clocked_on : "CK"; clear : "R'"; }
    pin (D) { direction : input; } pin (CK) { direction : input; clock : true; }
    pin (R) { direction : input; }
    pin (Q) { direction : output; function : "IQ"; }
    pin (QN) { direction : output; function : "IQN"; } }
  cell (DFFN) { area : 6;
    ff (IQ, IQN) { next_state : "D"; clocked_on : "CK'"; }
    pin (D) { direction : input; } pin (CK) { direction : input; clock : true; }
    pin (Q) { direction : output; function : "IQ"; } }
  cell (DFFE) { area : 8;
    ff (IQ, IQN) { next_state : "(E D) | (E' IQ)"; clocked_on : "CK"; }
    pin (D) { direction : input; } pin (E) { direction : input; }
    pin (CK) { direction : input; clock : true; }
    pin (Q) { direction : output; function : "IQ"; } }
  cell (LATCH) { area : 4;
    latch (IQ, IQN) { data_in : "D"; enable : "G"; }
    pin (D) { direction : input; } pin (G) { direction : input; }
    pin (Q) { direction : output; function : "IQ"; } }
  cell (GATE) { area : 5; clock_gating_integrated_cell : latch_posedge;
    latch (IQ, IQN) { data_in : "E"; enable : "CK'"; }
    pin (E) { direction : input; clock_gate_enable_pin : true; }
    pin (CK) { direction : input; clock_gate_clock_pin : true; }
    pin (GCK) { direction : output; clock_gate_out_pin : true; function : "IQ CK"; } }
  cell (FA) { area : 9;
    pin (A) { direction : input; } pin (B) { direction : input; } pin (C) { direction : input; }
    pin (S) { direction : output; function : "A ^ B ^ C"; }
    pin (CO) { direction : output; function : "(A B) | (A C) | (B C)"; } }
  cell (AOI21) { area : 3;
    pin (A) { direction : input; } pin (B) { direction : input; } pin (C) { direction : input; }
    pin (Y) { direction : output; function : "((A B) | C)'"; } }
  cell (MUX) { area : 4;
    pin (A) { direction : input; } pin (B) { direction : input; } pin (S) { direction : input; }
    pin (Y) { direction : output; function : "(A S') | (B S)"; } }
  cell (TBUF) { area : 3;
    pin (A) { direction : input; } pin (E) { direction : input; }
    pin (Y) { direction : output; function : "A"; three_state : "E'"; } }
}
"""


def tiny_library() -> Library:
    """Return the library above."""
    return read_library([SourceText("tiny.lib", LIBERTY)])


def design_of(verilog: str, library: Library | None = None) -> Design:
    """Return the flat design of Verilog text."""
    netlist = read_netlist([SourceText("in.v", verilog)])
    return link(netlist, library or tiny_library())[0]


@dataclass(frozen=True)
class Gates:
    """A circuit as a list.

    Attributes:
        inputs: Names.
        outputs: Names, of inputs, gates or flip-flops.
        flops: Flip-flop output -> data.
        gates: Gate output -> (kind, inputs), in any order.
    """

    inputs: tuple[str, ...]
    outputs: tuple[str, ...]
    flops: Mapping[str, str]
    gates: Mapping[str, tuple[str, tuple[str, ...]]]

    def verilog(self) -> str:
        """Return the circuit as a module ``top`` with output ports ``po_<n>``."""
        ports = ["clk", *map(_name, self.inputs)]
        outs = [f"po_{number}" for number in range(len(self.outputs))]
        lines = [f"module top ({', '.join([*ports, *outs])});"]
        lines += [f"  input {name};" for name in ports] + [f"  output {name};" for name in outs]
        lines += [f"  wire {_name(name)};" for name in (*self.gates, *self.flops)]
        for number, (name, (kind, inputs)) in enumerate(self.gates.items()):
            terms = ", ".join(map(_name, (name, *inputs)))
            lines.append(f"  {kind} g{number} ({terms});")
        for number, (name, data) in enumerate(self.flops.items()):
            lines.append(f"  DFF f{number} (.D({_name(data)}), .CK(clk), .Q({_name(name)}));")
        lines += [
            f"  assign {port} = {_name(name)};"
            for port, name in zip(outs, self.outputs, strict=True)
        ]
        return "\n".join([*lines, "endmodule", ""])

    def simulate(
        self,
        sources: Mapping[str, int],
        ones: int,
        stems: Mapping[str, int] | None = None,
        branches: Mapping[tuple[str, int], int] | None = None,
    ) -> dict[str, int]:
        """Return the value of every name, patterns as bits of ints.

        Args:
            sources: Values of inputs and flip-flops.
            ones: All patterns 1.
            stems: Names stuck at a value (all of their readers see it).
            branches: (gate, place of its input) stuck at a value.
        """
        stems, branches = stems or {}, branches or {}
        values = {name: stems.get(name, value) for name, value in sources.items()}
        for name in self.order():
            kind, inputs = self.gates[name]
            seen = [branches.get((name, i), values[one]) for i, one in enumerate(inputs)]
            values[name] = stems.get(name, _gate(kind, seen, ones))
        return values

    def order(self) -> list[str]:
        """Return the gates so that inputs come first."""
        done = {*self.inputs, *self.flops}
        order: list[str] = []
        waiting = list(self.gates)
        while waiting:
            ready = [name for name in waiting if done.issuperset(self.gates[name][1])]
            if not ready:
                raise ValueError(f"loop or undriven name among {waiting}")
            order += ready
            done.update(ready)
            waiting = [name for name in waiting if name not in done]
        return order


def read_bench(text: str) -> Gates:
    """Read .bench text (ISCAS'89 form)."""
    inputs: list[str] = []
    outputs: list[str] = []
    flops: dict[str, str] = {}
    gates: dict[str, tuple[str, tuple[str, ...]]] = {}
    for raw in text.splitlines():
        line = raw.partition("#")[0].strip()
        if found := re.fullmatch(r"(INPUT|OUTPUT)\s*\((.+)\)", line, re.IGNORECASE):
            (inputs if found[1].upper() == "INPUT" else outputs).append(found[2].strip())
        elif found := re.fullmatch(r"(.+?)\s*=\s*(\w+)\s*\((.+)\)", line):
            terms = tuple(term.strip() for term in found[3].split(","))
            kind = {"BUFF": "buf"}.get(found[2].upper(), found[2].lower())
            if kind == "dff":
                flops[found[1]] = terms[0]
            else:
                gates[found[1]] = (kind, terms)
    return Gates(tuple(inputs), tuple(outputs), flops, gates)


def bench_text(name: str) -> str:
    """Return the .bench text of a public benchmark circuit, from the folder of outside data."""
    text = outside("bench", f"{name}.bench").read_text(encoding="utf-8")
    if name == "s400":
        # A pair of inverters hangs on a net that nothing drives; without it the circuit has the
        # 162 gates of the published one.
        lines = text.splitlines()
        text = "\n".join(line for line in lines if not _is_loose(line, lines))
    return text


def _is_loose(line: str, lines: list[str]) -> bool:
    """Return whether a line is an inverter whose input is driven by none or by such a one."""
    if "= NOT(" not in line:
        return False
    source = line.partition("(")[2].partition(")")[0]
    drivers = [one for one in lines if one.startswith((f"{source} =", f"INPUT({source})"))]
    return not drivers or all(_is_loose(one, lines) for one in drivers)


def random_gates(seed: int, inputs: int, flops: int, gates: int, outputs: int) -> Gates:
    """Return a random circuit without loops; its shape favours recent gates, so it is deep."""
    chance = random.Random(seed)  # noqa: S311
    ins = [f"i{number}" for number in range(inputs)]
    states = [f"q{number}" for number in range(flops)]
    known = [*ins, *states]
    made: dict[str, tuple[str, tuple[str, ...]]] = {}
    for number in range(gates):
        kind = chance.choice(("and", "nand", "or", "nor", "xor", "xnor", "not", "buf"))
        count = 1 if kind in ("not", "buf") else chance.choice((2, 2, 2, 3))
        recent = known[-max(8, len(known) // 4) :]
        terms = tuple(chance.choice(chance.choice((recent, known))) for _ in range(count))
        made[f"n{number}"] = (kind, terms)
        known.append(f"n{number}")
    names = list(made)
    data = {state: chance.choice(names) for state in states}
    used = {term for _, terms in made.values() for term in terms} | set(data.values())
    loose = [name for name in names if name not in used]
    outs = [*loose, *chance.sample(names, outputs)]
    return Gates(tuple(ins), tuple(outs), data, made)


def _name(name: str) -> str:
    return to_verilog(plain_to_name(name))


def _gate(kind: str, values: list[int], ones: int) -> int:
    result = values[0]
    for value in values[1:]:
        match kind:
            case "and" | "nand":
                result &= value
            case "or" | "nor":
                result |= value
            case "xor" | "xnor":
                result ^= value
    return result ^ ones if kind in ("nand", "nor", "xnor", "not") else result
