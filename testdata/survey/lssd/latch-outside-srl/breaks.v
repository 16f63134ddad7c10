module top (c, b, d, q);
  input c, b, d; output q;
  wire m, s;
  LAT x (.D(d), .G(c), .Q(m));
  LAT y (.D(m), .G(b), .Q(s));
  LAT lone (.D(s), .G(c), .Q(q));
endmodule
