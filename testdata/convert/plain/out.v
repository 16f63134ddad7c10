// two flip-flops and a gate; this comment and the odd spacing stay
module top (clk, a, y,
  scan_enable,
  scan_in_1,
  scan_out_1);
  input scan_enable;
  input scan_in_1;
  output scan_out_1;
  input clk;   input a; // kept
  output   y;
  wire n1, /* between */ n2;
  NAND2 g1 (.A(a), .B(n2), .Y(n1));
  SDFF r1 (.D(n1), .CK(clk), .Q(n2), .SI(scan_in_1), .SE(scan_enable));
  SDFF r2 (
    .D(n2),
    .CK(clk),
    .Q(y),
    .SI(n2),
    .SE(scan_enable)
  );
  BUF scan_out_1_buf (.A(y), .Y(scan_out_1));
endmodule
