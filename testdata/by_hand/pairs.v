// Master and slave latches on two phases; the last master also feeds logic.
module pairs (phase_1, phase_2, rst_n, a, b, y, z);
  input phase_1, phase_2, rst_n, a, b;
  output y, z;
  wire m0, m1, m2, s0, s1, s2, d0, d1, d2;
  xor2_w1 g0 (.A(s2), .B(a), .Y(d0));
  nand2_w1 g1 (.A(s0), .B(b), .Y(d1));
  xor2_w1 g2 (.A(s1), .B(s0), .Y(d2));
  latch_w1 master0 (.D(d0), .G(phase_1), .Q(m0), .QN());
  latch_w1 slave0 (.D(m0), .G(phase_2), .Q(s0), .QN());
  latch_w1 master1 (.D(d1), .G(phase_1), .Q(m1), .QN());
  latch_w1 slave1 (.D(m1), .G(phase_2), .Q(s1), .QN());
  latch_w1 master2 (.D(d2), .G(phase_1), .Q(m2), .QN());
  latch_w1 slave2 (.D(m2), .G(phase_2), .Q(s2), .QN());
  xor2_w1 g3 (.A(m2), .B(a), .Y(y));
  nor2_w1 g4 (.A(s1), .B(s2), .Y(z));
endmodule
