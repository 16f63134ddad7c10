`timescale 1ns/1ps
`default_nettype none
module top #(parameter W = 2) (
  input wire clk,
  input wire [1:0] d,
  output wire [1:0] q,
  input scan_enable,
  input scan_in_1,
  output scan_out_1
);
  SDFF r0 (.D(d[0]), .CK(clk), .Q(q[0]), .SI(scan_in_1), .SE(scan_enable));
  SDFF r1 (.D(d[1]), .CK(clk), .Q(q[1]), .SI(q[0]), .SE(scan_enable));
  assign scan_out_1 = q[1];
endmodule
`default_nettype wire
