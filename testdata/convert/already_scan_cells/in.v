module top (clk, a, y);
  input clk, a;
  output [2:0] y;
  wire low;
  TIE0 t (.Y(low));
  SDFF tied (.D(a), .CK(clk), .SI(1'b0), .SE(1'b0), .Q(y[0]));
  SDFF by_cell (.D(y[0]), .CK(clk), .SI(low), .SE(low), .Q(y[1]));
  SDFF open (.D(y[1]), .CK(clk), .SI(), .Q(y[2]));
endmodule
