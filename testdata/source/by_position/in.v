module top (a, b, y);
  input a;
  input [1:0] b;
  output [1:0] y;
  sub u1 (a, b, y[0], n1);
  sub u2 (a, {b[0], a}, , n2);
  sub u3 (a, 2'b01, n3, );
  sub u4 ( , b, n4);
  sub u5 ();
  INV u6 (a, y[1]);
  INV u7 (\n,1 , \n(2 );
  DEEP u8 (b, {a, b}, 1'b0, );
endmodule

module sub (p, v, q, r);
  input p;
  input [1:0] v;
  output q, r;
  AND2 g (q, p, v[0]);
  INV h (.A(v[1]), .Y(r));
endmodule
