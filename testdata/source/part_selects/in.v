module top (a, y);
  input [15:0] a;
  output [0:15] y;
  DEEP u (.A(a[4 +: 4]), .B(a[11 -: 3]), .C(y[4 +: 4]), .D(y[11 -: 3]), .E(a[8-1:0]),
          .F(a[2*2]), .G(a[1+2 +: 2]));
endmodule
