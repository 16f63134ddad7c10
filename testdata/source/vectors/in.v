module top (a, y);
  input [7:0] a;
  output [0:7] y;
  wire [31:2] high;
  wire [0:0] one;
  wire [3:-4] below;
  wire [2:5] rising;
  DEEP u (.A(a), .B(a[7:4]), .C(a[3]), .D(y[2:5]), .E(high[31:2]), .F(one), .G(one[0]),
          .H(below[0:-2]), .I(rising[3:5]), .J(below), .K(rising));
endmodule
