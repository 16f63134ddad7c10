// two flip-flops and a gate; this comment and the odd spacing stay
module top (clk, a, y);
  input clk;   input a; // kept
  output   y;
  wire n1, /* between */ n2;
  NAND2 g1 (.A(a), .B(n2), .Y(n1));
  DFF r1 (.D(n1), .CK(clk), .Q(n2));
  DFF r2 (
    .D(n2),
    .CK(clk),
    .Q(y)
  );
endmodule
