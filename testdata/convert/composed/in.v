module top (clk, clkn, a, y);
  input clk, clkn, a;
  output [2:0] y;
  DFFN r0 (.D(a), .CKN(clkn), .Q(y[0]));
  DFFN r1 (.D(1'b1), .CKN(clkn), .Q(y[1]));
  DFFN \r[2] (.D(a), .CKN(clkn), .Q(y[2]));
endmodule
