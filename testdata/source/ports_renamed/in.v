module top (.din(d), .dout(q), clk);
  input [1:0] d;
  input clk;
  output q;
  inner u1 (.first(d[0]), .\second[0] (d[1]), .clk(clk), .q(q));
  inner u2 (d[0], d[1], clk, n1);
endmodule

module inner (.first(a), .\second[0] (\b! ), clk, q);
  input a, \b! , clk;
  output q;
  DFF r (.D(a), .CK(clk), .Q(q), .R(\b! ));
endmodule
