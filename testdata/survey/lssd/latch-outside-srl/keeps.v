module top (c, b, d, q);
  input c, b, d; output q;
  wire m;
  LAT x (.D(d), .G(c), .Q(m));
  LAT y (.D(m), .G(b), .Q(q));
endmodule
