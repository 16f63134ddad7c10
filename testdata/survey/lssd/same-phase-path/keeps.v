module top (c1, c2, d, q);
  input c1, c2, d; output q;
  wire a, n, b;
  LAT x (.D(d), .G(c1), .Q(a));
  NAND2 g1 (.A(a), .B(d), .Y(n));
  INV g2 (.A(n), .Y(b));
  LAT y (.D(b), .G(c2), .Q(q));
endmodule
