module top (c, a, b, en, d, i, q);
  input c, a, b, en, d, i; output q;
  wire m, g;
  L1 x (.D(d), .C(c), .I(i), .A(a), .Q(m));
  BUF gate (.A(b), .Y(g));
  LAT y (.D(m), .G(g), .Q(q));
endmodule
