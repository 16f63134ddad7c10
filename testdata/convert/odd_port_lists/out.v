module none;
endmodule
module empty ();
endmodule
module commented (
  clk, // the clock
  d,   // data
  q    // last, and nothing behind it
,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, d; output q;
  SDFF r (.D(d), .CK(clk), .Q(q), .SI(scan_in_1), .SE(scan_enable));
  BUF scan_out_1_buf (.A(q), .Y(scan_out_1));
endmodule
module escaped (clk, d, \q[0] ,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, d; output \q[0] ;
  SDFF r (.D(d), .CK(clk), .Q(\q[0] ), .SI(scan_in_1), .SE(scan_enable));
  BUF scan_out_1_buf (.A(\q[0] ), .Y(scan_out_1));
endmodule
module top (
  input clk, d,
  output [1:0] q,
  input scan_enable,
  input scan_in_1,
  output scan_out_1
  );
  wire scan_link_1;
  commented c (clk, d, q[0], scan_enable, scan_in_1, scan_link_1);
  escaped e (.clk(clk), .d(d), .\q[0] (q[1]), .scan_in_1(scan_link_1), .scan_out_1(scan_out_1), .scan_enable(scan_enable));
  none n ();
  empty m ();
endmodule
