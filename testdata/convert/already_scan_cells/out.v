module top (clk, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk, a;
  output [2:0] y;
  wire low;
  TIE0 t (.Y(low));
  SDFF tied (.D(a), .CK(clk), .SI(scan_in_1), .SE(scan_enable), .Q(y[0]));
  SDFF by_cell (.D(y[0]), .CK(clk), .SI(y[0]), .SE(scan_enable), .Q(y[1]));
  SDFF open (.D(y[1]), .CK(clk), .SI(y[1]), .Q(y[2]), .SE(scan_enable));
  BUF scan_out_1_buf (.A(y[2]), .Y(scan_out_1));
endmodule
