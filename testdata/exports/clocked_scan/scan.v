// By hand: clocked scan with a scan clock for each system clock, one of them active at its falling edge.
module meter (ck_a, ck_b, rn, x, scan_ck_a, \scan.ck.b , \in[0] , in, y, \out[1] , out);
  input ck_a, ck_b, rn, scan_ck_a, \scan.ck.b , \in[0] , in;
  input [1:0] x;
  output y, \out[1] , out;
  wire a0, a0_n, a1, a2, b0, b1, d0, d1, d2, e0, e1;
  xor2_w1 g0 (.A(a2), .B(x[0]), .Y(d0));
  nand2_w1 g1 (.A(a0), .B(b1), .Y(d1));
  xor2_w1 g2 (.A(a1), .B(a0), .Y(d2));
  xor2_w1 g3 (.A(b1), .B(x[1]), .Y(e0));
  nor2_w1 g4 (.A(b0), .B(a2), .Y(e1));
  two_clock_flop_r_w1 \a[0] (.D(d0), .SI(\in[0] ), .SCK(scan_ck_a), .CK(ck_a), .RN(rn), .Q(a0), .QN(a0_n));
  two_clock_flop_w1 \a[1] (.D(d1), .SI(a0_n), .SCK(scan_ck_a), .CK(ck_a), .Q(a1), .QN());
  two_clock_flop_e_w1 \a[2] (.D(d2), .E(x[0]), .SI(a1), .SCK(scan_ck_a), .CK(ck_a), .Q(a2), .QN());
  two_clock_flop_n_w1 b0_reg (.D(e0), .SI(in), .SCK(\scan.ck.b ), .CKN(ck_b), .Q(b0), .QN());
  two_clock_flop_w2 b1_reg (.D(e1), .SI(b0), .SCK(\scan.ck.b ), .CK(ck_b), .Q(b1), .QN(out));
  buf_w1 g5 (.A(a2), .Y(\out[1] ));
  xor2_w1 g6 (.A(b1), .B(a1), .Y(y));
endmodule
