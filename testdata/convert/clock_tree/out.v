module top (clk, rst, d, q,
  scan_enable,
  scan_in_1,
  scan_out_1,
  scan_in_2,
  scan_out_2);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input scan_in_2;
  output scan_out_2;
  input clk, rst, d; output [2:0] q;
  wire c1, c2, cn, rn, hi;
  BUF t1 (.A(clk), .Y(c1)); INV t2 (.A(c1), .Y(cn)); INV t3 (.A(cn), .Y(c2));
  INV ri (.A(rst), .Y(rn));
  TIE1 t (.Y(hi));
  SDFFR r0 (.D(d), .CK(c2), .RN(rn), .Q(q[0]), .SI(scan_in_1), .SE(scan_enable));
  SDFFR r1 (.D(q[0]), .CK(cn), .RN(hi), .Q(q[1]), .SI(scan_in_2), .SE(scan_enable));
  SDFF  r2 (.D(q[1]), .CK(c1), .Q(q[2]), .SI(q[0]), .SE(scan_enable));
  BUF scan_out_1_buf (.A(q[2]), .Y(scan_out_1));
  BUF scan_out_2_buf (.A(q[1]), .Y(scan_out_2));
endmodule
