module top (c1, c2, d, q);
  input c1, c2, d; output q;
  wire e, n, g1, g2;
  LAT x (.D(d), .G(c2), .Q(e));
  INV i (.A(e), .Y(n));
  AND2 a1 (.A(c1), .B(e), .Y(g1));
  AND2 a2 (.A(g1), .B(n), .Y(g2));
  LAT y (.D(d), .G(g2), .Q(q));
endmodule
