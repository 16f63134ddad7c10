module top (c1, d, q);
  input c1, d; output q;
  DFF f (.D(d), .CK(c1), .Q(q));
endmodule
