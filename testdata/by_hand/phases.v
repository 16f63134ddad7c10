// A single-latch design: latch, logic, latch, logic, on two phases.
module phases (phase_1, phase_2, a, b, y);
  input phase_1, phase_2, a, b;
  output y;
  wire p0, p1, q0, q1, d0, d1, e0, e1;
  xor2_w1 g0 (.A(q0), .B(a), .Y(d0));
  nand2_w1 g1 (.A(q1), .B(q0), .Y(d1));
  latch_w1 one0 (.D(d0), .G(phase_1), .Q(p0), .QN());
  latch_w1 one1 (.D(d1), .G(phase_1), .Q(p1), .QN());
  xor2_w1 g2 (.A(p0), .B(p1), .Y(e0));
  nand2_w1 g3 (.A(p1), .B(b), .Y(e1));
  latch_w1 two0 (.D(e0), .G(phase_2), .Q(q0), .QN());
  latch_w1 two1 (.D(e1), .G(phase_2), .Q(q1), .QN());
  xor2_w1 g4 (.A(q1), .B(p0), .Y(y));
endmodule
