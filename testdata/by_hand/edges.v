// Three flip-flops of three kinds on one clock.
module edges (clk, rst_n, a, b, y);
  input clk, rst_n, a, b;
  output y;
  wire q0, q1, q2, d0, d1, d2;
  xor2_w1 g0 (.A(q2), .B(a), .Y(d0));
  nand2_w1 g1 (.A(q0), .B(b), .Y(d1));
  xor2_w1 g2 (.A(q1), .B(q0), .Y(d2));
  flop_r_w1 r0 (.D(d0), .CK(clk), .RN(rst_n), .Q(q0), .QN());
  flop_w1 r1 (.D(d1), .CK(clk), .Q(q1), .QN());
  flop_e_w1 r2 (.D(d2), .E(a), .CK(clk), .Q(q2), .QN());
  xor2_w1 g3 (.A(q2), .B(q1), .Y(y));
endmodule
