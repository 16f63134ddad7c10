module top (a, y);
  input a;
  output y;
  DFF u1 (.D(a), .CK(), .Q(y), .QN());
  DFF u2 (.D( ), .Q(/* nothing */), .QN(
   ));
  sub u3 (.v(), .y(n1));
  sub u4 ();
  DFF u5 ( );
endmodule

module sub (v, y);
  input [2:0] v;
  output y;
  BUF b (.A(v[0]), .Y(y));
endmodule
