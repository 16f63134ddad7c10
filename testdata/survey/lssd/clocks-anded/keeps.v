module top (c1, c2, d, q);
  input c1, c2, d; output q;
  wire g;
  OR2 a (.A(c1), .B(c2), .Y(g));
  LAT y (.D(d), .G(g), .Q(q));
endmodule
