module top (a, b, y);
  input a, b;
  output y;
  NAND2 u1 (.A(a), .B(b), .Y(n1)), u2 (.A(n1), .B(a), .Y(n2)),
        \u3[0] (.A(n1), .B(b), .Y(n3));
  RAM #(.W(4), .INIT(8'hff)) m1 (.A(a), .Q(n4)), m2 (.A(b), .Q(n5));
  sub s1 (a, n6), s2 (.y(n7), .a(b));
  NAND2 u4 (.A(n2), .B(n3), .Y(y));
endmodule

module sub (a, y);
  input a;
  output y;
  INV i (.A(a), .Y(y));
endmodule
