module top (
    input wire clk,
    input [7:0] d, e,
    output wire [7:0] q,
    output s,
    inout [1:0] pad
);
  wire n1;
  XOR2 x0 (.A(d[0]), .B(e[7]), .Y(n1));
  DFF r (.CK(clk), .D(n1), .Q(q[0]));
  INV i (.A(pad[1]), .Y(s));
endmodule
