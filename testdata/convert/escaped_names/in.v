module top (clk, \a[0] , y);
  input clk;
  input \a[0] ;
  output [1:0] y;
  wire \u.q[3] , \k"x ;
  DFF \r/1.x (.D(\a[0] ), .CK(clk), .Q(\u.q[3] ));
  DFF \r[2] (.D(\u.q[3] ),.CK(clk),.Q(\k"x ));
  BUF b0(.A(\k"x ), .Y(y[0])), b1(.A(\u.q[3] ), .Y(y[1]));
endmodule
