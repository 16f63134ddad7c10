"""Netlists of any size in the shapes that synthesis writes, and a library for their cells.

    python tests/benchmarks/netlist_generator.py 100000 big.v [--layout lines] [--profile full]
        [--seed 1] [--flat] [--depth 40]
    python tests/benchmarks/netlist_generator.py --cells cells

Layouts: ``lines`` has one connection a line, source attributes and ``_123_`` names; ``dense`` wraps
lines at 80 columns and declares many wires at once. Profiles: ``full`` has escaped names, comments,
concatenations, constants, empty connections, aliases, parameters; ``clean`` only what every reader
understands; ``gates`` is one flat module of gate primitives connected by position.
"""

import argparse
import random
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import Final

#: Cell -> inputs, outputs, weight.
GATES: Final[dict[str, tuple[str, str, int]]] = {
    "INV_X1": ("A", "ZN", 12),
    "BUF_X1": ("A", "Z", 5),
    "NAND2_X1": ("A1 A2", "ZN", 18),
    "NOR2_X1": ("A1 A2", "ZN", 12),
    "AND2_X1": ("A1 A2", "ZN", 9),
    "OR2_X1": ("A1 A2", "ZN", 7),
    "NAND3_X1": ("A1 A2 A3", "ZN", 8),
    "XOR2_X1": ("A B", "Z", 6),
    "AOI21_X1": ("A B1 B2", "ZN", 9),
    "OAI21_X1": ("A B1 B2", "ZN", 9),
    "MUX2_X1": ("A B S", "Z", 7),
    "FA_X1": ("A B CI", "CO S", 3),
}
FUNCTIONS: Final = {
    "INV_X1": "!A",
    "BUF_X1": "A",
    "NAND2_X1": "!(A1&A2)",
    "NOR2_X1": "!(A1|A2)",
    "AND2_X1": "(A1&A2)",
    "OR2_X1": "(A1|A2)",
    "NAND3_X1": "!(A1&A2&A3)",
    "XOR2_X1": "(A^B)",
    "AOI21_X1": "!(A|(B1&B2))",
    "OAI21_X1": "!(A&(B1|B2))",
    "MUX2_X1": "((!S&A)|(S&B))",
    "CO": "((A&B)|(CI&(A|B)))",
    "S": "(A^B^CI)",
}
PRIMITIVES: Final = ("nand", "nor", "and", "or", "xor", "not")
WIDTH: Final = 32
#: Share of flip-flops, and of those that have a reset.
STORAGE_SHARE: Final = 0.15
RESET_SHARE: Final = 0.6
#: How far back a gate usually looks for its inputs.
NEAR: Final = 200


@dataclass(frozen=True)
class Wishes:
    """What to generate.

    Attributes:
        cells: Number of instances, the top's own not counted.
        layout: ``lines`` or ``dense``.
        profile: ``full``, ``clean`` or ``gates``.
        seed: Of every random choice.
        modules: Number of blocks; one gives a flat netlist in one block.
        depth: Most gates in a row between flip-flops, 0 for no limit.
    """

    cells: int
    layout: str = "lines"
    profile: str = "full"
    seed: int = 1
    modules: int = 1
    depth: int = 0

    @property
    def is_full(self) -> bool:
        return self.profile == "full"

    @property
    def in_lines(self) -> bool:
        return self.layout == "lines"


def wishes(cells: int, *, flat: bool = False, **rest: object) -> Wishes:
    """Return wishes with as many modules as netlists of that size tend to have."""
    count = 1 if flat else min(16, max(2, cells // 2000))
    return Wishes(cells, modules=count, **rest)  # type: ignore[arg-type]


def generate(wanted: Wishes) -> Iterator[str]:
    """Yield the text of a netlist piece by piece."""
    if wanted.profile == "gates":
        yield from _gates(wanted)
        return
    chance = random.Random(wanted.seed)  # noqa: S311 (no secrets here)
    if wanted.is_full:
        yield "/* Generated netlist: nobody's design */\n\n"
    share, rest = divmod(wanted.cells, wanted.modules)
    for number in range(wanted.modules):
        yield from _Block(wanted, chance, number, share + (rest if number == 0 else 0)).text()
    yield from _top(wanted)


class _Block:
    """One module: flip-flops in vectors of 16, gates that read what stands before them."""

    def __init__(self, wanted: Wishes, chance: random.Random, number: int, cells: int) -> None:
        self._wanted = wanted
        self._chance = chance
        self._name = f"blk_{number}"
        self._storage = max(1, int(cells * STORAGE_SHARE))
        self._gates = cells - self._storage
        self._lines = 0
        self._vectors = [self._vector(at) for at in range((self._storage + 15) // 16)]
        self._states = [f"{self._vectors[at // 16]}[{at % 16}]" for at in range(self._storage)]
        self._wires = [self._wire(at) for at in range(self._gates + self._gates // 20 + 2)]
        self._pool = [f"din[{at}]" for at in range(WIDTH)] + self._states
        self._first = len(self._pool)
        self._level = dict.fromkeys(self._pool, 0)
        self._used = 0

    def text(self) -> Iterator[str]:
        yield from self._header()
        yield from self._declarations()
        kinds = ["storage"] * self._storage + ["gate"] * self._gates
        self._chance.shuffle(kinds)
        weights = [weight for _, _, weight in GATES.values()]
        cells = iter(self._chance.choices(list(GATES), weights, k=self._gates))
        states = iter(range(self._storage))
        for number, kind in enumerate(kinds):
            if kind == "gate":
                yield self._gate(next(cells), number)
            else:
                yield self._flip_flop(next(states))
        yield from self._end()

    def _vector(self, at: int) -> str:
        if self._wanted.is_full and at % 4 == 1:
            return f"\\u_core.stage[{at}].acc "
        return f"acc_{at}"

    def _wire(self, at: int) -> str:
        if self._wanted.is_full and at % 9 == 4:
            return f"\\u_core.alu.s{at // 16}[{at % 16}] "
        return f"_{at:05d}_" if self._wanted.in_lines else f"n{at + 1}"

    def _source(self) -> str:
        if not (self._wanted.is_full and self._wanted.in_lines):
            return ""
        self._lines += 1
        line = self._lines % 9000
        return f'  (* src = "rtl/core.v:{line + 1}.3-{line + 4}.6" *)\n'

    def _header(self) -> Iterator[str]:
        if self._wanted.is_full and self._wanted.in_lines:
            yield f'(* hdlname = "{self._name}" *)\n(* src = "rtl/blk.v:1.1-99.10" *)\n'
        yield f"module {self._name}(clk, rst_n, din, dout);\n"
        ports = (("input", "clk"), ("input", "rst_n"), ("input", "din"), ("output", "dout"))
        for direction, name in ports:
            shape = f"[{WIDTH - 1}:0] " if name in ("din", "dout") else ""
            yield f"{self._source()}  {direction} {shape}{name};\n"
            if self._wanted.in_lines:
                yield f"  wire {shape}{name};\n"

    def _declarations(self) -> Iterator[str]:
        if self._wanted.in_lines:
            for wire in self._wires:
                yield f"  wire {wire};\n"
            for vector in self._vectors:
                yield f"{self._source()}  wire [15:0] {vector};\n"
            return
        for vector in self._vectors:
            yield f"  wire   [15:0] {vector};\n"
        for first in range(0, len(self._wires), 40):
            words = [f"{wire}," for wire in self._wires[first : first + 40]]
            words[-1] = words[-1][:-1] + ";"
            yield _wrapped(words, "  wire   ")

    def _input(self) -> str:
        pool, chance = self._pool, self._chance.random
        if self._wanted.is_full and chance() < 0.004:
            return ("1'h0", "1'h1")[chance() < 0.5] if self._wanted.in_lines else "1'b0"
        if chance() < 0.75 and len(pool) > NEAR:
            net = pool[len(pool) - 1 - int(chance() * NEAR)]
        else:
            net = pool[int(chance() * len(pool))]
        if self._wanted.depth and self._level[net] >= self._wanted.depth:
            return pool[int(chance() * self._first)]
        return net

    def _gate(self, cell: str, number: int) -> str:
        inputs, outputs, _ = GATES[cell]
        pins = [(pin, self._input()) for pin in inputs.split()]
        level = 1 + max(self._level.get(net, 0) for _, net in pins)
        for pin in outputs.split():
            if self._wanted.is_full and pin == "CO" and self._chance.random() < 0.2:
                pins.append((pin, ""))
                continue
            net = self._wires[self._used]
            self._used += 1
            pins.append((pin, net))
            self._pool.append(net)
            self._level[net] = level
        return self._instance(cell, self._gate_name(number), pins)

    def _gate_name(self, number: int) -> str:
        if self._wanted.is_full and number % 11 == 3:
            if self._wanted.in_lines:
                return f"\\u_core.alu.add_{number}[{number % 8}] "
            return f"\\u_core/alu/U{number} "
        return f"_{number + len(self._wires):05d}_" if self._wanted.in_lines else f"U{number + 1}"

    def _flip_flop(self, number: int) -> str:
        has_reset = self._chance.random() < RESET_SHARE
        back = int(self._chance.random() * min(len(self._pool), 2000))
        pins = [("D", self._pool[len(self._pool) - 1 - back])]
        pins += [("RN", "rst_n")] if has_reset else []
        pins += [("CK", "clk"), ("Q", self._states[number])]
        vector = self._vectors[number // 16]
        name = f"{vector}_reg_{number % 16}_"
        if self._wanted.is_full:
            pins.append(("QN", ""))
            name = f"\\{vector.strip().lstrip(chr(92))}_reg[{number % 16}] "
        return self._instance("DFFR_X1" if has_reset else "DFF_X1", name, pins)

    def _instance(self, cell: str, name: str, pins: Sequence[tuple[str, str]]) -> str:
        texts = [f".{pin}({net})" for pin, net in pins]
        if self._wanted.in_lines:
            source = self._source() if self._chance.random() < 0.6 else ""
            joined = ",\n".join(f"    {text}" for text in texts)
            return f"{source}  {cell} {name} (\n{joined}\n  );\n"
        comment = "  // another region\n" if self._chance.random() < 0.002 else ""
        words = [f"{text}," for text in texts[:-1]] + [texts[-1], ");"]
        return comment + _wrapped(words, f"  {cell} {name} ( ")

    def _end(self) -> Iterator[str]:
        outputs = self._pool[-WIDTH:]
        if self._wanted.is_full:
            yield f"  assign dout = {{ {', '.join(outputs)} }};\n"
            rest = self._wires[self._used :]
            for number, wire in enumerate(rest[: max(1, len(rest) // 2)]):
                value = "1'b0" if number % 5 == 0 else self._pool[-1 - number % NEAR]
                yield f"  assign {wire} = {value};\n"
        else:
            for number, net in enumerate(outputs):
                yield f"  assign dout[{number}] = {net};\n"
        yield "endmodule\n\n"


def _wrapped(words: Sequence[str], first: str) -> str:
    lines = [first]
    for word in words:
        if len(lines[-1]) + len(word) + 1 > 80:
            lines.append("        ")
        lines[-1] += word + " "
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _top(wanted: Wishes) -> Iterator[str]:
    yield "module top(clk, rst_n, din, dout);\n  input clk;\n  input rst_n;\n"
    yield f"  input [{WIDTH - 1}:0] din;\n  output [{WIDTH - 1}:0] dout;\n"
    for number in range(wanted.modules):
        yield f"  wire [{WIDTH - 1}:0] s{number};\n"
    if wanted.is_full:
        yield "  wire [3:0] \\mem.rd ;\n"
    for number in range(wanted.modules):
        before = "din" if number == 0 else f"s{number - 1}"
        if wanted.is_full and number % 2:
            before = f"{{ {before}[15:0], {before}[31:17], 1'b0 }}"
        name = f"\\g[{number}].u_blk " if wanted.is_full else f"u_blk_{number}"
        pins = f".clk(clk),\n    .din({before}),\n    .dout(s{number}),\n    .rst_n(rst_n)"
        yield f"  blk_{number} {name} (\n    {pins}\n  );\n"
    last = f"s{wanted.modules - 1}"
    if wanted.is_full:
        yield "  RAM16X4 #(\n    .INIT(64'h0123456789abcdef),\n"
        yield '    .NAME("mem (* not an attr *) // nor comment")\n  ) \\mem.ram  (\n'
        yield "    .ADDR(s0[3:0]),\n    .CLK(clk),\n    .DO(\\mem.rd )\n  );\n"
        yield f"  assign dout = {{ {last}[31:4], \\mem.rd  }};\n"
    else:
        yield f"  assign dout = {last};\n"
    yield "endmodule\n"


def _gates(wanted: Wishes) -> Iterator[str]:
    chance = random.Random(wanted.seed)  # noqa: S311 (no secrets here)
    inputs, outputs = ([f"{kind}{at}" for at in range(64)] for kind in "io")
    wires = [f"n{at}" for at in range(max(0, wanted.cells - len(outputs)))]
    yield f"module top({', '.join(inputs + outputs)});\n"
    yield f"  input {', '.join(inputs)};\n  output {', '.join(outputs)};\n"
    for first in range(0, len(wires), 20):
        yield f"  wire {', '.join(wires[first : first + 20])};\n"
    pool = list(inputs)
    for number, net in enumerate([*wires, *outputs]):
        kind = PRIMITIVES[number % len(PRIMITIVES)]
        near = pool[-1 - int(chance.random() * min(NEAR, len(pool)))]
        terms = [net, near] if kind == "not" else [net, near, chance.choice(pool)]
        yield f"  {kind} g{number} ({', '.join(terms)});\n"
        pool.append(net)
    yield "endmodule\n"


def liberty() -> Iterator[str]:
    """Yield a Liberty library of the cells."""
    yield 'library (generated) {\n  time_unit : "1ns";\n  capacitive_load_unit (1, pf);\n'
    for cell, (inputs, outputs, _) in GATES.items():
        yield f"  cell ({cell}) {{\n    area : {1 + len(inputs.split())};\n"
        for pin in inputs.split():
            yield f"    pin ({pin}) {{ direction : input; }}\n"
        for pin in outputs.split():
            function = FUNCTIONS.get(cell) or FUNCTIONS[pin]
            yield f'    pin ({pin}) {{ direction : output; function : "{function}"; }}\n'
        yield "  }\n"
    for name, is_scan, has_reset in (
        ("DFF_X1", False, False),
        ("DFFR_X1", False, True),
        ("SDFF_X1", True, False),
        ("SDFFR_X1", True, True),
    ):
        yield from _storage(name, is_scan=is_scan, has_reset=has_reset)
    yield "}\n"


def _storage(name: str, *, is_scan: bool, has_reset: bool) -> Iterator[str]:
    following = "(SE & SI) | (!SE & D)" if is_scan else "D"
    clear = ' clear : "!RN";' if has_reset else ""
    yield f"  cell ({name}) {{\n    area : {8 if is_scan else 6};\n"
    yield f'    ff (IQ, IQN) {{ clocked_on : "CK"; next_state : "{following}";{clear} }}\n'
    pins = ["D", *(["SI", "SE"] if is_scan else []), *(["RN"] if has_reset else [])]
    for pin in pins:
        yield f"    pin ({pin}) {{ direction : input; }}\n"
    yield "    pin (CK) { direction : input; clock : true; }\n"
    yield '    pin (Q) { direction : output; function : "IQ"; }\n'
    yield '    pin (QN) { direction : output; function : "IQN"; }\n  }\n'


def models() -> Iterator[str]:
    """Yield Verilog stubs of the cells, for readers that want every cell described."""
    cells = {cell: (inputs, outputs) for cell, (inputs, outputs, _) in GATES.items()}
    cells |= {"DFF_X1": ("D CK", "Q QN"), "DFFR_X1": ("D RN CK", "Q QN")}
    for cell, (inputs, outputs) in cells.items():
        ports = [f"input {pin}" for pin in inputs.split()]
        ports += [f"output {pin}" for pin in outputs.split()]
        yield f"(* blackbox *)\nmodule {cell} ({', '.join(ports)});\nendmodule\n"
    yield "(* blackbox *)\nmodule RAM16X4 (input [3:0] ADDR, input CLK, output [3:0] DO);\n"
    yield '  parameter INIT = 64\'h0;\n  parameter NAME = "x";\nendmodule\n'


def main() -> None:
    parser = argparse.ArgumentParser(description=__doc__.partition("\n")[0])
    parser.add_argument("cells", nargs="?", type=int)
    parser.add_argument("out", nargs="?", type=Path)
    parser.add_argument("--layout", choices=("lines", "dense"), default="lines")
    parser.add_argument("--profile", choices=("full", "clean", "gates"), default="full")
    parser.add_argument("--seed", type=int, default=1)
    parser.add_argument("--flat", action="store_true", help="all cells in one block")
    parser.add_argument("--depth", type=int, default=0, help="most gates in a row")
    parser.add_argument("--cells", dest="base", type=Path, help="write BASE.lib and BASE.v instead")
    chosen = parser.parse_args()
    if chosen.base:
        chosen.base.with_suffix(".lib").write_text("".join(liberty()))
        chosen.base.with_suffix(".v").write_text("".join(models()))
        return
    wanted = wishes(
        chosen.cells,
        flat=chosen.flat,
        layout=chosen.layout,
        profile=chosen.profile,
        seed=chosen.seed,
        depth=chosen.depth,
    )
    with chosen.out.open("w") as file:
        file.writelines(generate(wanted))


if __name__ == "__main__":
    main()
