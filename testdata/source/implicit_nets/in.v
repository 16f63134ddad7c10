`default_nettype tri
module top (a, y);
  input a;
  output y;
  INV u1 (.A(a), .Y(n1));
  INV u2 (.A(n1), .Y(\n[2] ));
  DEEP u3 (.A({n1, n3}), .B(n4));
  assign n5 = n4;
  assign y = n5;
endmodule
