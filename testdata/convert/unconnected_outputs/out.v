module top (clk, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  wire only_qn_scan_q;
  wire nothing_scan_q;
  input clk, a;
  output y;
  wire n;
  SDFF only_qn (.D(a), .CK(clk), .QN(n), .SI(scan_in_1), .SE(scan_enable), .Q(only_qn_scan_q));
  SDFF nothing (.D(n), .CK(clk), .Q(nothing_scan_q), .SI(only_qn_scan_q), .SE(scan_enable));
  SDFF last (.D(a), .CK(clk), .SI(nothing_scan_q), .SE(scan_enable), .Q(scan_out_1));
  INV i (.A(n), .Y(y));
endmodule
