// By hand: the first pair as one whole cell, the others as a two-port L1 before the old slave.
module pairs (phase_1, phase_2, rst_n, a, b, y, z, clk_a, scan_in, scan_out);
  input phase_1, phase_2, rst_n, a, b;
  input clk_a, scan_in;
  output scan_out;
  output y, z;
  wire m1, m2, s0, s1, s2, d0, d1, d2;
  xor2_w1 g0 (.A(s2), .B(a), .Y(d0));
  nand2_w1 g1 (.A(s0), .B(b), .Y(d1));
  xor2_w1 g2 (.A(s1), .B(s0), .Y(d2));
  srl_double_w1 master0 (.D(d0), .C(phase_1), .I(scan_in), .A(clk_a), .B(phase_2), .L2(s0), .L2N());
  srl_first_w1 master1 (.D(d1), .C(phase_1), .I(s0), .A(clk_a), .L1(m1), .L1N());
  latch_w1 slave1 (.D(m1), .G(phase_2), .Q(s1), .QN());
  srl_first_w1 master2 (.D(d2), .C(phase_1), .I(s1), .A(clk_a), .L1(m2), .L1N());
  latch_w1 slave2 (.D(m2), .G(phase_2), .Q(s2), .QN());
  xor2_w1 g3 (.A(m2), .B(a), .Y(y));
  nor2_w1 g4 (.A(s1), .B(s2), .Y(z));
  buf_w1 show (.A(s2), .Y(scan_out));
endmodule
