module top (clk, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, a; output [3:0] y;
  SDFF #(.INIT(1'b0)) r0 (.D(a), .CK(clk), .Q(y[0]), .SI(scan_in_1), .SE(scan_enable)),
      r1 (.D(y[0]), .CK(clk), .Q(y[1]), .SI(y[0]), .SE(scan_enable)), r2 (.D(y[1]), .CK(clk), .Q(y[2]), .SI(y[1]), .SE(scan_enable));
  SDFF r3 (.D(y[2]), .CK(clk), .Q(y[3]), .SI(y[2]), .SE(scan_enable));
  BUF scan_out_1_buf (.A(y[3]), .Y(scan_out_1));
endmodule
