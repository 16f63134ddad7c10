module top (a, b, c, y, z);
  input a, b, c;
  output y, z;
  wire n1, n2;
  and g1 (n1, a, b);
  nand (n2, a, b, c);
  or #1 g3 (n3, a, b);
  nor #(1, 2) g4 (n4, a, b);
  xor (strong0, weak1) g5 (n5, a, b);
  xnor (pull0, pull1) #(1:2:3) g6 (n6, a, b), (n7, b, c), g8 (n8, c, a);
  buf g9 (n9, n10, a);
  not (n11, n9), g12 (n12, n10);
  bufif0 g13 (y, a, b);
  bufif1 g14 (y, a, c);
  notif0 g15 (z, a, b);
  notif1 (z, a, 1'b1);
  pullup p1 (y);
  pulldown (z);
endmodule
