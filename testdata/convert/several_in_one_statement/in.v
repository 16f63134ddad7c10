module top (clk, a, y);
  input clk, a; output [3:0] y;
  DFF #(.INIT(1'b0)) r0 (.D(a), .CK(clk), .Q(y[0])),
      r1 (.D(y[0]), .CK(clk), .Q(y[1])), r2 (.D(y[1]), .CK(clk), .Q(y[2]));
  DFF r3 (.D(y[2]), .CK(clk), .Q(y[3]));
endmodule
