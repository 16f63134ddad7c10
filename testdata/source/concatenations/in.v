module top (a, b, y);
  input [3:0] a;
  input b;
  output [7:0] y;
  wire [1:0] \esc.v ;
  wire \esc.s[2] ;
  DEEP u1 (.A({a, b}), .B({b, a[3:2], {2{b}}}), .C({3{a[1:0]}}), .D({{b}}), .E({ 2 { {a[0], b} } }));
  DEEP u2 (.A({\esc.v , \esc.s[2] }), .B({\esc.v [1], 1'b0, 2'b1x, b}), .C({4'hc,b}));
  DEEP u3 (.A({
      a[0], // the first
      /* the second */ b
    }));
  assign y = {a[0], a[1], a[2], a[3], b, b, 2'b10};
endmodule
