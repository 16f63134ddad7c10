module top (y);
  output [40:0] y;
  DEEP u1 (.A(1'b0), .B(1'b1), .C(1'h0), .D(1'h1), .E(1'd1), .F(1'o0), .G(1'bx), .H(1'bz), .I(1'b?));
  DEEP u2 (.A(4'b10xz), .B(8'hA5), .C(12'o17_34), .D(36'hxxxxxxxxx), .E(32'd0), .F(7'd100));
  DEEP u3 (.A(8'bx), .B(8'hz1), .C(4 'b 1_0), .D(8'hF), .E(3'hF), .F(2'sb11), .G(16'SHbeef));
  DEEP u4 (.A(0), .B(1), .C('b1), .D(5), .E('h0));
  assign y[3:0] = 0;
  assign y[7:4] = 4'd9;
  assign y[40:8] = 33'h1_0000_0001;
endmodule
