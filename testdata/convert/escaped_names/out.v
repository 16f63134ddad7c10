module top (clk, \a[0] , y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk;
  input \a[0] ;
  output [1:0] y;
  wire \u.q[3] , \k"x ;
  SDFF \r/1.x (.D(\a[0] ), .CK(clk), .Q(\u.q[3] ), .SI(scan_in_1), .SE(scan_enable));
  SDFF \r[2] (.D(\u.q[3] ),.CK(clk),.Q(\k"x ), .SI(\u.q[3] ), .SE(scan_enable));
  BUF b0(.A(\k"x ), .Y(y[0])), b1(.A(\u.q[3] ), .Y(y[1]));
  BUF scan_out_1_buf (.A(\k"x ), .Y(scan_out_1));
endmodule
