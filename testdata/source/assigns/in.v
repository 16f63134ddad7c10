module top (a, y, z);
  input [3:0] a;
  output [3:0] y;
  output z;
  wire [1:0] v = a[1:0];
  wire n1 = a[3], n2 = n1;
  assign y[0] = a[1], y[1] = 1'b1;
  assign {y[3], y[2]} = a[3:2];
  assign z = (n2);
  assign \esc[0]  = v[1];
  assign #5 n3 = n1;
  assign (strong1, weak0) n4 = n1;
  assign (pull0, pull1) #(1, 2) n5 = n1, {n6, n7} = v;
  wire #2 n8 = n1;
endmodule
