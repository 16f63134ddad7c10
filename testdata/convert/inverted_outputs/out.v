module top (clk, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, a;
  output [2:0] y;
  SDFFI r0 (.D(a), .CK(clk), .QN(y[0]), .SI(scan_in_1), .SE(scan_enable));
  SDFFI r1 (.D(y[0]), .CK(clk), .QN(y[1]), .SI(y[0]), .SE(scan_enable));
  SDFFI r2 (.D(y[1]), .CK(clk), .QN(y[2]), .SI(y[1]), .SE(scan_enable));
  BUF scan_out_1_buf (.A(y[2]), .Y(scan_out_1));
endmodule
