module top (a, y, z);
  wire [1:0] a;
  wire n;
  INV u1 (.A(a[0]), .Y(n));
  INV u2 (.A(late), .Y(y));
  INV u3 (.A(bus[2]), .Y(z));
  input [1:0] a;
  output y;
  output z;
  wire late;
  wire [3:0] bus;
endmodule
