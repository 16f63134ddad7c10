// By hand: the flip-flops of edges.v as cells that keep their clock edge and shift under A and B.
module edges (clk, rst_n, a, b, y, clk_a, clk_b, scan_in, scan_out);
  input clk, rst_n, a, b;
  input clk_a, clk_b, scan_in;
  output y, scan_out;
  wire q0, q1, q2, d0, d1, d2;
  xor2_w1 g0 (.A(q2), .B(a), .Y(d0));
  nand2_w1 g1 (.A(q0), .B(b), .Y(d1));
  xor2_w1 g2 (.A(q1), .B(q0), .Y(d2));
  srl_edge_r_w1 r0 (.D(d0), .I(scan_in), .A(clk_a), .B(clk_b), .CK(clk), .RN(rst_n), .Q(q0), .QN());
  srl_edge_w1 r1 (.D(d1), .I(q0), .A(clk_a), .B(clk_b), .CK(clk), .Q(q1), .QN());
  srl_edge_e_w1 r2 (.D(d2), .E(a), .I(q1), .A(clk_a), .B(clk_b), .CK(clk), .Q(q2), .QN());
  xor2_w1 g3 (.A(q2), .B(q1), .Y(y));
  buf_w1 show (.A(q2), .Y(scan_out));
endmodule
