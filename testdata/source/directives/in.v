`timescale 1ns / 1ps
`celldefine
`define LOW 1'b0
`define WIDTH 4
`define LAST 3
`undef LAST
`define CELL INV // a cell
`default_nettype wire
module top (a, y);
  input [`WIDTH-1:0] a;
  output y;
`ifdef NOT_DEFINED
  INV broken (.A(a[0], .Y(y;
  `ifdef NESTED
  always
  `else
  initial
  `endif
`elsif WIDTH
  INV u1 (.A(a[0]), .Y(n1));
`else
  also broken
`endif
`ifndef WIDTH
  garbage
`else
  `CELL u2 (.A(n1), .Y(n2));
`endif
  NAND2 u3 (
`ifdef USE_POWER
    .VDD(vdd),
`endif
    .A(n2), .B(`LOW),
    .Y(y)
`ifdef USE_POWER
    , .VSS(vss)
`endif
  );
  // `unknown in a comment
  (* note = "`unknown in a string" *)
  INV u4 (.A(\n`1 ), .Y(n4));
endmodule
`endcelldefine
`resetall
