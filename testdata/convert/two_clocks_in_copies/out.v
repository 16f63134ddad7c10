module leaf (c1, c2, d, q,
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
  input c1, c2, d; output [1:0] q;
  SDFFR r0 (.D(d), .CK(c1), .RN(1'b1), .Q(q[0]), .SI(scan_in_1), .SE(scan_enable));
  SDFFR r1 (.D(d), .CK(c2), .RN(1'b1), .Q(q[1]), .SI(scan_in_2), .SE(scan_enable));
  BUF scan_out_1_buf (.A(q[0]), .Y(scan_out_1));
  BUF scan_out_2_buf (.A(q[1]), .Y(scan_out_2));
endmodule
module top (clka, clkb, a, y,
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
  wire scan_link_2;
  wire scan_link_3;
  wire scan_link_4;
  input clka, clkb, a; output [5:0] y;
  leaf both (.c1(clka), .c2(clkb), .d(a), .q(y[1:0]), .scan_in_1(scan_in_1), .scan_out_1(scan_link_1), .scan_in_2(scan_in_2), .scan_out_2(scan_link_4), .scan_enable(scan_enable));
  leaf same (.c1(clka), .c2(clka), .d(a), .q(y[3:2]), .scan_in_1(scan_link_1), .scan_out_1(scan_link_2), .scan_in_2(scan_link_2), .scan_out_2(scan_link_3), .scan_enable(scan_enable));
  leaf other (.c1(clkb), .c2(clka), .d(a), .q({y[4], y[5]}), .scan_in_2(scan_link_3), .scan_out_2(scan_out_1), .scan_in_1(scan_link_4), .scan_out_1(scan_out_2), .scan_enable(scan_enable));
endmodule
