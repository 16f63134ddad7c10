module top (a, y);
  input a;
  output y;
  wire [1:0] n; // two
  INV u1 (.A(a),
    .Y(n[0]));
  INV u2 (.A(n[0]), .Y(y)), u3 (.A(\x[1] ), .Y(n[1]));
`ifdef X
  junk
`endif
endmodule
