// By hand: the flip-flops of edges.v as whole cells, the clock port replaced by C and B that never overlap.
module edges (clk_c, clk_b, rst_n, a, b, y, clk_a, scan_in, scan_out);
  input clk_c, clk_b, rst_n, a, b;
  input clk_a, scan_in;
  output y, scan_out;
  wire q0, q1, q2, d0, d1, d2, e2;
  xor2_w1 g0 (.A(q2), .B(a), .Y(d0));
  nand2_w1 g1 (.A(q0), .B(b), .Y(d1));
  xor2_w1 g2 (.A(q1), .B(q0), .Y(d2));
  srl_double_r_w1 r0 (.D(d0), .C(clk_c), .I(scan_in), .A(clk_a), .B(clk_b), .RN(rst_n), .L2(q0), .L2N());
  srl_double_w1 r1 (.D(d1), .C(clk_c), .I(q0), .A(clk_a), .B(clk_b), .L2(q1), .L2N());
  mux2_w1 keep (.A(q2), .B(d2), .S(a), .Y(e2));
  srl_double_w1 r2 (.D(e2), .C(clk_c), .I(q1), .A(clk_a), .B(clk_b), .L2(q2), .L2N());
  xor2_w1 g3 (.A(q2), .B(q1), .Y(y));
  buf_w1 show (.A(q2), .Y(scan_out));
endmodule
