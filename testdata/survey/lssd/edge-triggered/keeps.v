module top (c1, d, q);
  input c1, d; output q;
  LAT f (.D(d), .G(c1), .Q(q));
endmodule
