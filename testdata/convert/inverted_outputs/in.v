module top (clk, a, y);
  input clk, a;
  output [2:0] y;
  DFFI r0 (.D(a), .CK(clk), .QN(y[0]));
  DFFI r1 (.D(y[0]), .CK(clk), .QN(y[1]));
  DFFI r2 (.D(y[1]), .CK(clk), .QN(y[2]));
endmodule
