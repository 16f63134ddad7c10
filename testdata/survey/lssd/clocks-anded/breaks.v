module top (c1, c2, d, q);
  input c1, c2, d; output q;
  wire n, g;
  INV i (.A(c2), .Y(n));
  AND2 a (.A(c1), .B(n), .Y(g));
  LAT y (.D(d), .G(g), .Q(q));
endmodule
