module leaf (clk, d, q);
  input clk, d; output q;
  wire m;
  DFF r0 (.D(d), .CK(clk), .Q(m));
  DFF r1 (.D(m), .CK(clk), .Q(q));
endmodule
module top (clk, a, y);
  input clk, a; output [2:0] y;
  leaf u0 (.clk(clk), .d(a), .q(y[0]));
  leaf u1 (.clk(clk), .d(y[0]), .q(y[1]));
  leaf u2 (clk, y[1], y[2]);
endmodule
