module top (clk, rst, d, q);
  input clk, rst, d; output [2:0] q;
  wire c1, c2, cn, rn, hi;
  BUF t1 (.A(clk), .Y(c1)); INV t2 (.A(c1), .Y(cn)); INV t3 (.A(cn), .Y(c2));
  INV ri (.A(rst), .Y(rn));
  TIE1 t (.Y(hi));
  DFFR r0 (.D(d), .CK(c2), .RN(rn), .Q(q[0]));
  DFFR r1 (.D(q[0]), .CK(cn), .RN(hi), .Q(q[1]));
  DFF  r2 (.D(q[1]), .CK(c1), .Q(q[2]));
endmodule
