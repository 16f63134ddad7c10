module top (c1, c2, d, q);
  input c1, c2, d; output q;
  wire e, g;
  LAT x (.D(d), .G(c2), .Q(e));
  AND2 g1 (.A(c1), .B(e), .Y(g));
  LAT y (.D(d), .G(g), .Q(q));
endmodule
