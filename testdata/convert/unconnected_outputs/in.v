module top (clk, a, y);
  input clk, a;
  output y;
  wire n;
  DFF only_qn (.D(a), .CK(clk), .QN(n));
  DFF nothing (.D(n), .CK(clk), .Q());
  DFF last (.D(a), .CK(clk));
  INV i (.A(n), .Y(y));
endmodule
