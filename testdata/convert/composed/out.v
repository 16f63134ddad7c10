module top (clk, clkn, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  wire r0_scan_d;
  wire r1_scan_d;
  wire \r[2]_scan_d ;
  input clk, clkn, a;
  output [2:0] y;
  DFFN r0 (.D(r0_scan_d), .CKN(clkn), .Q(y[0]));
  MUX2 r0_scan_mux (.S(scan_enable), .D0(a), .D1(scan_in_1), .Y(r0_scan_d));
  DFFN r1 (.D(r1_scan_d), .CKN(clkn), .Q(y[1]));
  MUX2 r1_scan_mux (.S(scan_enable), .D0(1'b1), .D1(y[0]), .Y(r1_scan_d));
  DFFN \r[2] (.D(\r[2]_scan_d ), .CKN(clkn), .Q(y[2]));
  MUX2 \r[2]_scan_mux  (.S(scan_enable), .D0(a), .D1(y[1]), .Y(\r[2]_scan_d ));
  BUF scan_out_1_buf (.A(y[2]), .Y(scan_out_1));
endmodule
