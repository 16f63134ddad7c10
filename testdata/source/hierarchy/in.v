module leaf (a, y);
  input [1:0] a;
  output y;
  NAND2 g (.A(a[0]), .B(a[1]), .Y(y));
endmodule

module top (clk, d, q);
  input clk;
  input [7:0] d;
  output [3:0] q;
  wire [3:0] m;
  leaf l0 (.a(d[1:0]), .y(m[0]));
  leaf l1 (.a({d[3], d[2]}), .y(m[1]));
  leaf l2 (.y(m[2]), .a(2'b10));
  leaf l3 (.a({2{d[7]}}), .y(m[3]));
  middle x (.ck(clk), .in(m), .out(q));
endmodule

module middle (ck, in, out);
  input ck;
  input [0:3] in;
  output [3:0] out;
  DFF r0 (.CK(ck), .D(in[0]), .Q(out[0]));
  DFF r1 (.CK(ck), .D(in[1]), .Q(out[1]));
  last z (.i(in[2:3]), .o(out[3:2]));
endmodule

module last (i, o);
  input [1:0] i;
  output [1:0] o;
  assign o = i;
endmodule
