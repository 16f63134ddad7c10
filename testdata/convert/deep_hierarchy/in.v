module inner (clk, d, q);
  input clk, d; output q; wire m;
  DFF a (.D(d), .CK(clk), .Q(m));
  DFF b (.D(m), .CK(clk), .Q(q));
endmodule
module middle (clk, d, q);
  input clk, d; output q; wire m, n;
  DFF first (.D(d), .CK(clk), .Q(m));
  inner i (.clk(clk), .d(m), .q(n));
  DFF last (.D(n), .CK(clk), .Q(q));
endmodule
module top (clk, a, y);
  input clk, a; output y; wire m;
  DFF r (.D(a), .CK(clk), .Q(m));
  middle u (.clk(clk), .d(m), .q(y));
endmodule
