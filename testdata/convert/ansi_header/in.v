`timescale 1ns/1ps
`default_nettype none
module top #(parameter W = 2) (
  input wire clk,
  input wire [1:0] d,
  output wire [1:0] q
);
  DFF r0 (.D(d[0]), .CK(clk), .Q(q[0]));
  DFF r1 (.D(d[1]), .CK(clk), .Q(q[1]));
endmodule
`default_nettype wire
