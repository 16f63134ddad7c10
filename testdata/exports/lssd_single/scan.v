// By hand: every system latch becomes an L1 with an L2 for scan alone; one L2 is an inverter later.
module phases (phase_1, phase_2, a, b, y, clk_a, clk_b, scan_in, scan_out);
  input phase_1, phase_2, a, b;
  input clk_a, clk_b, scan_in;
  output y, scan_out;
  wire p0, p1, q0, q1, d0, d1, e0, e1, t0, t1, t2, t3;
  xor2_w1 g0 (.A(q0), .B(a), .Y(d0));
  nand2_w1 g1 (.A(q1), .B(q0), .Y(d1));
  srl_single_w1 one0 (.D(d0), .C(phase_1), .I(scan_in), .A(clk_a), .B(clk_b), .L1(p0), .L1N(), .L2(t0));
  srl_single_w1 one1 (.D(d1), .C(phase_1), .I(t0), .A(clk_a), .B(clk_b), .L1(p1), .L1N(), .L2(t1));
  xor2_w1 g2 (.A(p0), .B(p1), .Y(e0));
  nand2_w1 g3 (.A(p1), .B(b), .Y(e1));
  srl_single_w1 two0 (.D(e0), .C(phase_2), .I(t1), .A(clk_a), .B(clk_b), .L1(q0), .L1N(), .L2(t2));
  srl_single_w1 two1 (.D(e1), .C(phase_2), .I(t2), .A(clk_a), .B(clk_b), .L1(q1), .L1N(), .L2(t3));
  xor2_w1 g4 (.A(q1), .B(p0), .Y(y));
  inv_w1 show (.A(t3), .Y(scan_out));
endmodule
