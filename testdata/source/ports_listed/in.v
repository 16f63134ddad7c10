// ports named in the list, declared below; vectors in both directions
module top (clk, rst_n, d, q, up, io);
  input clk, rst_n;
  input [3:0] d;
  output [3:0] q;
  output [0:2] up;
  inout io;
  wire [3:0] q;
  wire clk;
  DFF \q_reg[0] (.CK(clk), .D(d[0]), .Q(q[0]));
  DFF \q_reg[1] (.CK(clk), .D(d[1]), .Q(q[1]));
  DFF q_reg_2_ (.CK(clk), .D(d[2]), .Q(q[2]));
  DFF q_reg_3_ (.CK(clk), .D(d[3]), .Q(q[3]));
  BUF b0 (.A(rst_n), .Y(up[0])), b1 (.A(io), .Y(up[1]));
  BUF b2 (.A(up[1]), .Y(up[2]));
endmodule
