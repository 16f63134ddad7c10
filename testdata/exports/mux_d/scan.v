// By hand: mux-D chains over two clocks and both edges, with a bank, inverters and a lock-up latch,
// and with names that every format has to carry.
module core (ck, rn, se, a, b, si, so, y);
  input ck, rn, se, a, b, si;
  output so, y;
  wire d0, d1, q0, turned;
  xor2_w1 g0 (.A(a), .B(so), .Y(d0));
  nand2_w1 g1 (.A(q0), .B(b), .Y(d1));
  scan_flop_w1 \r[0] (.D(d0), .SI(si), .SE(se), .CK(ck), .Q(q0), .QN());
  inv_w1 \not (.A(q0), .Y(turned));
  scan_flop_r_w1 \r"1/x (.D(d1), .SI(turned), .SE(se), .CK(ck), .RN(rn), .Q(so), .QN());
  or2_w1 g2 (.A(q0), .B(so), .Y(y));
endmodule

module \gauge"top (clk, probe, rst_n, \se! , level, \a"b[3] , \s/in[0] , si, \y%z;{} , q, \so$\x , \t"out );
  input clk, probe, rst_n, \se! , \a"b[3] , \s/in[0] , si;
  input [2:0] level;
  output [1:0] q;
  output \y%z;{} , \so$\x , \t"out ;
  wire from_core, n0, n0_n, p0, held, e0, e1, e2;
  wire [3:0] \w\in ;
  core \u"0 (.ck(clk), .rn(rst_n), .se(\se! ), .a(\a"b[3] ), .b(level[0]), .si(\s/in[0] ), .so(from_core),
    .y(\y%z;{} ));
  scan_bank4_w1 bank (.D({level, n0}), .SI(from_core), .SE(\se! ), .CK(clk), .RN(rst_n), .Q(\w\in ));
  inv_w1 last (.A(\w\in [3]), .Y(\so$\x ));

  xor2_w1 g0 (.A(\w\in [1]), .B(level[1]), .Y(e0));
  nand2_w1 g1 (.A(n0), .B(\w\in [2]), .Y(e1));
  xor2_w1 g2 (.A(p0), .B(n0), .Y(e2));
  scan_flop_n_w1 \n[0] (.D(e0), .SI(si), .SE(\se! ), .CKN(probe), .Q(n0), .QN(n0_n));
  scan_flop_w1 \p{0} (.D(e1), .SI(n0_n), .SE(\se! ), .CK(probe), .Q(p0), .QN());
  latch_low_w1 lock (.D(p0), .GN(probe), .Q(held), .QN());
  scan_flop_w1 c0 (.D(e2), .SI(held), .SE(\se! ), .CK(clk), .Q(\t"out ), .QN());
  buf_w1 g3 (.A(\w\in [0]), .Y(q[0]));
  and2_w1 g4 (.A(p0), .B(level[2]), .Y(q[1]));
endmodule
