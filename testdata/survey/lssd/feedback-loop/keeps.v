module top (c1, c2, s, r, q);
  input c1, c2, s, r; output q;
  wire a, b, m;
  NAND2 g1 (.A(s), .B(b), .Y(a));
  LAT x (.D(a), .G(c1), .Q(m));
  LAT y (.D(m), .G(c2), .Q(q));
  NAND2 g2 (.A(r), .B(q), .Y(b));
endmodule
