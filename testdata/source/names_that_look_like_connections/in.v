module top (a, y);
  input a;
  output y;
  INV u1 (.A(\x(,.B(q),.C(z ), .Y(n1));
  INV u2 (.A(\x(y) ), .Y(n2));
  INV u3 (.\A(b) (n1), .Y(\z(,.Q(q ));
  INV u4 (.A(n1), .Y(y));
endmodule
