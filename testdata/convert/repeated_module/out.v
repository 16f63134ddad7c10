module leaf (clk, d, q,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, d; output q;
  wire m;
  SDFF r0 (.D(d), .CK(clk), .Q(m), .SI(scan_in_1), .SE(scan_enable));
  SDFF r1 (.D(m), .CK(clk), .Q(q), .SI(m), .SE(scan_enable));
  BUF scan_out_1_buf (.A(q), .Y(scan_out_1));
endmodule
module top (clk, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1,
  scan_in_2,
  scan_out_2);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input scan_in_2;
  output scan_out_2;
  wire scan_link_1;
  input clk, a; output [2:0] y;
  leaf u0 (.clk(clk), .d(a), .q(y[0]), .scan_in_1(scan_in_1), .scan_out_1(scan_link_1), .scan_enable(scan_enable));
  leaf u1 (.clk(clk), .d(y[0]), .q(y[1]), .scan_in_1(scan_link_1), .scan_out_1(scan_out_1), .scan_enable(scan_enable));
  leaf u2 (clk, y[1], y[2], scan_enable, scan_in_2, scan_out_2);
endmodule
