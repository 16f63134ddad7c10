module top (a, y);
  parameter WIDTH = 4;
  localparam [3:0] DEPTH = 4'd8, OTHER = "text (with) ; signs";
  input [3:0] a;
  output y;
  RAM #(4, 8) m1 (.A(a), .Q(n1));
  RAM #(.INIT(64'h0123456789abcdef), .NAME("mem (* no *) // no ; )")) m2 (.A(a), .Q(n2));
  RAM #( .W(2*(3+1)), .V({2{1'b0}}), .R(1.5e-3) ) m3 (.A(a), .Q(n3));
  RAM #3 m4 (.A(a), .Q(n4));
  RAM #() m5 (.A(a), .Q(n5));
  sub #(.P(1)) s (.a(a[0]), .y(y));
endmodule

module sub #(parameter P = 0, parameter Q = 1) (input a, output y);
  BUF b (.A(a), .Y(y));
endmodule
