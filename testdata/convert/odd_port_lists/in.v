module none;
endmodule
module empty ();
endmodule
module commented (
  clk, // the clock
  d,   // data
  q    // last, and nothing behind it
);
  input clk, d; output q;
  DFF r (.D(d), .CK(clk), .Q(q));
endmodule
module escaped (clk, d, \q[0] );
  input clk, d; output \q[0] ;
  DFF r (.D(d), .CK(clk), .Q(\q[0] ));
endmodule
module top (
  input clk, d,
  output [1:0] q
  );
  commented c (clk, d, q[0]);
  escaped e (.clk(clk), .d(d), .\q[0] (q[1]));
  none n ();
  empty m ();
endmodule
