module top (c1, s, r, q);
  input c1, s, r; output q;
  wire a, b;
  NAND2 g1 (.A(s), .B(b), .Y(a));
  NAND2 g2 (.A(r), .B(a), .Y(b));
  LAT x (.D(a), .G(c1), .Q(q));
endmodule
