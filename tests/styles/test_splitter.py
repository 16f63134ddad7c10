"""The clock splitter: never both clocks, a flip-flop in mission, free clocks in test."""

import subprocess
from pathlib import Path

import pytest
from kits import OSU, osu

from insertdft.styles.splitter import compose_splitter
from insertdft.styles.srl import Kind, Shape, compose, to_verilog

BENCH = """`timescale 1ns/1ps
module tb;
  reg clk = 0, test = 0, tc = 0, tb = 0, d = 0, ref = 0; wire c, b, q;
  integer checks = 0, bad = 0, k;
  {splitter} split (.CLK(clk), .TEST(test), .TC(tc), .TB(tb), .C(c), .B(b));
  {srl} u (.D(d), .C(c), .I(1'b0), .A(1'b0), .B(b), .Q(q));
  always @(c or b) if (c === 1 && b === 1) bad = bad + 1;
  task check(input wanted, input seen);
    begin checks = checks + 1; if (wanted !== seen) bad = bad + 1; end
  endtask
  initial begin
    #20 clk = 1; #20 clk = 0; #20 clk = 1; #20 clk = 0; #20 ref = q;
    for (k = 0; k < 200; k = k + 1) begin
      d = $random; #20 check(ref, q);
      if ({rising}) ref = d;
      clk = 1; #20 check(ref, q);
      d = $random; #20 check(ref, q);
      if (!{rising}) ref = d;
      clk = 0; #20 check(ref, q);
    end
    test = 1; #20 check(0, c); check(0, b);
    for (k = 0; k < 8; k = k + 1) begin
      clk = k; #20 check(0, c); check(0, b);
      tc = 1; #20 check(1, c); check(0, b); tc = 0;
      #20 tb = 1; #20 check(0, c); check(1, b); tb = 0; #20;
    end
    $display("%0d checks, %0d bad", checks, bad); $finish;
  end
endmodule
"""


@pytest.mark.parametrize("rising", [True, False])
@pytest.mark.parametrize("kit", ["osu035", "osu050"])
def test_a_split_clock_makes_a_flip_flop_of_a_double_latch(
    tmp_path: Path, kit: str, rising: bool
) -> None:
    splitter = compose_splitter(osu(kit), rising=rising)
    srl = compose(osu(kit), Shape(Kind.DOUBLE))
    assert splitter is not None
    assert srl is not None
    bench = BENCH.replace("{splitter}", splitter.name).replace("{srl}", srl.name)
    bench = bench.replace("{rising}", str(int(rising)))
    models = OSU[kit].with_suffix(".v").read_text(encoding="latin-1")
    text = f"{bench}{to_verilog(splitter)}{to_verilog(srl)}{models}"

    assert simulate(tmp_path, text) == "850 checks, 0 bad"


def test_a_split_by_an_inverter_alone_overlaps_and_is_seen(tmp_path: Path) -> None:
    srl = compose(osu("osu035"), Shape(Kind.DOUBLE))
    assert srl is not None
    bench = BENCH.replace("{splitter}", "naive").replace("{srl}", srl.name)
    models = OSU["osu035"].with_suffix(".v").read_text(encoding="latin-1")
    naive = """module naive (CLK, TEST, TC, TB, C, B); input CLK, TEST, TC, TB; output C, B;
      assign B = TEST ? TB : CLK; assign #0.2 C = TEST ? TC : ~CLK; endmodule
"""

    text = f"{bench.replace('{rising}', '1')}{naive}{to_verilog(srl)}{models}"

    assert not simulate(tmp_path, text).endswith(" 0 bad")


def simulate(folder: Path, text: str) -> str:
    (folder / "tb.v").write_text(text, encoding="latin-1")
    subprocess.run(
        ["iverilog", "-g2005", "-gspecify", "-s", "tb", "-o", "tb", "tb.v"],
        cwd=folder,
        check=True,
        capture_output=True,
    )
    ran = subprocess.run(
        ["vvp", "-n", "tb"], cwd=folder, capture_output=True, text=True, check=True
    )
    return ran.stdout.splitlines()[-1]


def test_names_are_free() -> None:
    splitter = compose_splitter(osu("osu035"), {"clock_splitter"})

    assert splitter is not None
    assert splitter.name == "clock_splitter_2"
