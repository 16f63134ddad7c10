module leaf (c1, c2, d, q);
  input c1, c2, d; output [1:0] q;
  DFFR r0 (.D(d), .CK(c1), .RN(1'b1), .Q(q[0]));
  DFFR r1 (.D(d), .CK(c2), .RN(1'b1), .Q(q[1]));
endmodule
module top (clka, clkb, a, y);
  input clka, clkb, a; output [5:0] y;
  leaf both (.c1(clka), .c2(clkb), .d(a), .q(y[1:0]));
  leaf same (.c1(clka), .c2(clka), .d(a), .q(y[3:2]));
  leaf other (.c1(clkb), .c2(clka), .d(a), .q({y[4], y[5]}));
endmodule
