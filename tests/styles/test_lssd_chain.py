"""Chains of composed shift-register latches driven by the clock sequences, gate by gate."""

import random
import subprocess
from pathlib import Path

import pytest
from kits import OSU, osu

from insertdft.description import Cycle
from insertdft.styles.lssd_sequences import Form, LssdClocks, lssd_sequences
from insertdft.styles.srl import Kind, Shape, compose, to_verilog

#: Data of the three latches over their system outputs s0, s1, s2 and the input x.
LOGIC = {
    Form.DOUBLE: ("~(s2 & x)", "~s0", "s0 ^ s1"),
    # Two phases: the first and the third latch read the second, and it reads them.
    Form.SINGLE: ("~(s1 & x)", "s0 ^ s2", "~s1"),
}
CLOCKS = {
    Form.DOUBLE: LssdClocks(("a",), ("b",), ("c1",)),
    Form.SINGLE: LssdClocks(("a",), ("b",), ("c1", "c2")),
}
PHASE = {Form.DOUBLE: ("c1", "c1", "c1"), Form.SINGLE: ("c1", "c2", "c1")}
SCAN_OUT = {Form.DOUBLE: "Q", Form.SINGLE: "L2"}


class Latches:
    """The same chain as equations; a pulse acts on all its latches at once."""

    def __init__(self, form: Form) -> None:
        self.form = form
        self.first, self.second = [0, 0, 0], [0, 0, 0]
        self.x = self.scan_in = 0

    def data(self) -> list[int]:
        s0, s1, s2 = self.second if self.form is Form.DOUBLE else self.first
        names = {"s0": s0, "s1": s1, "s2": s2, "x": self.x}
        return [eval(text, {}, names) & 1 for text in LOGIC[self.form]]  # noqa: S307

    def pulse(self, port: str) -> None:
        taken = self.data()
        if port == "a":
            self.first = [self.scan_in, *self.second[:2]]
        if port == "b":
            self.second = list(self.first)
        for at, clock in enumerate(PHASE[self.form]):
            if port == clock:
                self.first[at] = taken[at]


def design(form: Form) -> str:
    shape = Shape(Kind.DOUBLE if form is Form.DOUBLE else Kind.SINGLE)
    module = compose(osu("osu035"), shape)
    assert module is not None
    lines = [to_verilog(module), "module chain (a, b, c1, c2, si, x, so, s);"]
    lines += ["  input a, b, c1, c2, si, x; output so; output [2:0] s;"]
    lines += ["  wire [3:0] sh; wire s0 = s[0], s1 = s[1], s2 = s[2];"]
    lines += ["  assign sh[0] = si, so = sh[3];"]
    for at, (data, clock) in enumerate(zip(LOGIC[form], PHASE[form], strict=True)):
        outputs = f".Q(s[{at}])"
        outputs += f", .L2(sh[{at + 1}])" if form is Form.SINGLE else ""
        lines.append(
            f"  {module.name} u{at} (.D({data}), .C({clock}), .I(sh[{at}]), .A(a), .B(b),"
            f" {outputs});"
        )
        lines += [f"  assign sh[{at + 1}] = s[{at}];"] if form is Form.DOUBLE else []
    return "\n".join([*lines, "endmodule", ""])


def drive(cycles: tuple[Cycle, ...], model: Latches, chance: random.Random) -> list[str]:
    """Statements of a test bench for some cycles; the model runs along and says what to expect."""
    lines: list[str] = []
    for cycle in cycles:
        lines += [f"    {port} = {value};" for port, value in cycle.force]
        if cycle.scan:
            model.scan_in = chance.randint(0, 1)
            lines.append(f"    si = {model.scan_in};")
        if cycle.inputs:
            model.x = chance.randint(0, 1)
            lines.append(f"    x = {model.x};")
        lines.append("    #20;")
        if cycle.scan:
            lines.append(expect("so", model.second[2]))
        for phase in cycle.pulses:
            ports = " ".join(f"{port} = 1;" for port in phase)
            rests = " ".join(f"{port} = 0;" for port in phase)
            lines.append(f"    {ports} #20 {rests} #20;")
            for port in phase:
                model.pulse(port)
            state = model.second if model.form is Form.DOUBLE else model.first
            lines += [expect(f"s[{at}]", value) for at, value in enumerate(state)]
    return lines


def expect(net: str, value: int) -> str:
    return (
        f"    checks = checks + 1; if ({net} !== {value}) begin bad = bad + 1;"
        f' $display("%0t {net}", $time); end'
    )


def run(folder: Path, form: Form, sequences: dict[str, tuple[Cycle, ...]], name: str) -> int:
    """Run load, one sequence and unload for random patterns; return the checks that failed."""
    chance, model = random.Random(11), Latches(form)  # noqa: S311
    lines = ["module tb; integer checks = 0, bad = 0; wire so; wire [2:0] s;"]
    lines += [f"  reg {port} = 0;" for port in ("a", "b", "c1", "c2", "si", "x")]
    lines += ["  chain dut (a, b, c1, c2, si, x, so, s);", "  initial begin"]
    # The first load brings every latch from unknown to known; nothing is compared yet.
    first = [drive(sequences["shift"], model, chance) for _ in range(3)]
    lines += [line for part in first for line in part if "checks" not in line]
    for _ in range(25):
        for _ in range(3):
            lines += drive(sequences["shift"], model, chance)
        lines += drive(sequences[name], model, chance)
        lines += drive(sequences.get("unload_start", ()), model, chance)
    lines += ['    $display("%0d checks, %0d bad", checks, bad); $finish; end endmodule']
    models = OSU["osu035"].with_suffix(".v").read_text(encoding="latin-1")
    text = "\n".join(["`timescale 1ns/10ps", design(form), *lines, models])
    (folder / "tb.v").write_text(text, encoding="latin-1")
    subprocess.run(
        ["iverilog", "-g2005", "-gspecify", "-s", "tb", "-o", "tb", "tb.v"],
        cwd=folder,
        check=True,
        capture_output=True,
    )
    done = subprocess.run(
        ["vvp", "-n", "tb"], cwd=folder, capture_output=True, text=True, check=True
    )
    checks, _, bad, _ = done.stdout.splitlines()[-1].split()
    assert int(checks) > 400
    return int(bad)


@pytest.mark.parametrize("name", ["capture", "launch_on_capture", "launch_on_shift"])
@pytest.mark.parametrize("form", [Form.DOUBLE, Form.SINGLE], ids=lambda form: form.value)
def test_a_chain_of_composed_latches_follows_the_sequences(
    tmp_path: Path, form: Form, name: str
) -> None:
    assert run(tmp_path, form, lssd_sequences(form, CLOCKS[form]), name) == 0


def test_the_second_order_of_phases_launches_too(tmp_path: Path) -> None:
    sequences = lssd_sequences(Form.SINGLE, CLOCKS[Form.SINGLE])

    assert run(tmp_path, Form.SINGLE, sequences, "launch_on_capture_2") == 0


def test_overlapping_clocks_race_and_are_seen(tmp_path: Path) -> None:
    sequences = lssd_sequences(Form.DOUBLE, CLOCKS[Form.DOUBLE])
    racing = {**sequences, "capture": (Cycle(inputs=True, pulses=(("c1", "b"),)),)}

    assert run(tmp_path, Form.DOUBLE, racing, "capture") > 0


def test_the_first_b_of_an_unload_carries_the_response_into_l2() -> None:
    sequences = lssd_sequences(Form.SINGLE, CLOCKS[Form.SINGLE])
    model = Latches(Form.SINGLE)
    model.first, model.second = [1, 1, 1], [0, 0, 0]

    for cycle in sequences["unload_start"]:
        for phase in cycle.pulses:
            model.pulse(*phase)

    assert model.second == [1, 1, 1]
