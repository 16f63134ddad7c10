`default_nettype none
module top (input wire a, output wire y);
  wire n1;
  INV u1 (.A(a), .Y(n1));
  INV u2 (.A(n1), .Y(y));
  second s (.a(a), .y());
endmodule
`default_nettype wire
module second (a, y);
  input a;
  output y;
  INV u1 (.A(a), .Y(n1));
  INV u2 (.A(n1), .Y(y));
endmodule
