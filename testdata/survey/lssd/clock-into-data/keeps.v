module top (c1, c2, d, q, o);
  input c1, c2, d; output q, o;
  wire n, m;
  NAND2 g1 (.A(c2), .B(d), .Y(o));
  INV g2 (.A(d), .Y(m));
  LAT y (.D(m), .G(c1), .Q(q));
endmodule
