module inner (clk, d, q,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, d; output q; wire m;
  SDFF a (.D(d), .CK(clk), .Q(m), .SI(scan_in_1), .SE(scan_enable));
  SDFF b (.D(m), .CK(clk), .Q(q), .SI(m), .SE(scan_enable));
  BUF scan_out_1_buf (.A(q), .Y(scan_out_1));
endmodule
module middle (clk, d, q,
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
  input clk, d; output q; wire m, n;
  SDFF first (.D(d), .CK(clk), .Q(m), .SI(scan_in_1), .SE(scan_enable));
  inner i (.clk(clk), .d(m), .q(n), .scan_in_1(scan_in_2), .scan_out_1(scan_out_2), .scan_enable(scan_enable));
  SDFF last (.D(n), .CK(clk), .Q(q), .SI(m), .SE(scan_enable));
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
  input clk, a; output y; wire m;
  SDFF r (.D(a), .CK(clk), .Q(m), .SI(scan_in_1), .SE(scan_enable));
  middle u (.clk(clk), .d(m), .q(y), .scan_in_1(m), .scan_out_1(scan_out_1), .scan_in_2(scan_in_2), .scan_out_2(scan_out_2), .scan_enable(scan_enable));
endmodule
