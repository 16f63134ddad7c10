// Invented cell library of the insertdft demo. Written by tools/make_demo.py; change the tables
// there. Without TIDE_DELAY every output follows at once; with -DTIDE_DELAY='#0.1' it lags.
`ifndef TIDE_DELAY
`define TIDE_DELAY
`endif

module inv_w1 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = ~A;
endmodule

module inv_w2 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = ~A;
endmodule

module inv_w4 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = ~A;
endmodule

module buf_w1 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = A;
endmodule

module buf_w2 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = A;
endmodule

module buf_w4 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = A;
endmodule

module clock_buf_w4 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = A;
endmodule

module clock_buf_w8 (A, Y);
  input A;
  output Y;
  assign `TIDE_DELAY Y = A;
endmodule

module nand2_w1 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = ~(A & B);
endmodule

module nor2_w1 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = ~(A | B);
endmodule

module nand2_w2 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = ~(A & B);
endmodule

module nor2_w2 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = ~(A | B);
endmodule

module and2_w1 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = A & B;
endmodule

module or2_w1 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = A | B;
endmodule

module nand3_w1 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = ~(A & B & C);
endmodule

module nor3_w1 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = ~(A | B | C);
endmodule

module nand3_w2 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = ~(A & B & C);
endmodule

module nor3_w2 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = ~(A | B | C);
endmodule

module and3_w1 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = A & B & C;
endmodule

module or3_w1 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = A | B | C;
endmodule

module nand4_w1 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = ~(A & B & C & D);
endmodule

module nor4_w1 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = ~(A | B | C | D);
endmodule

module nand4_w2 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = ~(A & B & C & D);
endmodule

module nor4_w2 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = ~(A | B | C | D);
endmodule

module and4_w1 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = A & B & C & D;
endmodule

module or4_w1 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = A | B | C | D;
endmodule

module xor2_w1 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = A ^ B;
endmodule

module xnor2_w1 (A, B, Y);
  input A;
  input B;
  output Y;
  assign `TIDE_DELAY Y = ~(A ^ B);
endmodule

module and_nor21_w1 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = ~((A & B) | C);
endmodule

module and_nor22_w1 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = ~((A & B) | (C & D));
endmodule

module or_nand21_w1 (A, B, C, Y);
  input A;
  input B;
  input C;
  output Y;
  assign `TIDE_DELAY Y = ~((A | B) & C);
endmodule

module or_nand22_w1 (A, B, C, D, Y);
  input A;
  input B;
  input C;
  input D;
  output Y;
  assign `TIDE_DELAY Y = ~((A | B) & (C | D));
endmodule

module mux2_w1 (A, B, S, Y);
  input A;
  input B;
  input S;
  output Y;
  assign `TIDE_DELAY Y = (A & ~S) | (B & S);
endmodule

module mux2_w2 (A, B, S, Y);
  input A;
  input B;
  input S;
  output Y;
  assign `TIDE_DELAY Y = (A & ~S) | (B & S);
endmodule

module tie_high (Y);
  output Y;
  assign `TIDE_DELAY Y = 1'b1;
endmodule

module tie_low (Y);
  output Y;
  assign `TIDE_DELAY Y = 1'b0;
endmodule

module bus_drive_w1 (A, E, Y);
  input A;
  input E;
  output Y;
  assign `TIDE_DELAY Y = E ? A : 1'bz;
endmodule

module bus_drive_w2 (A, E, Y);
  input A;
  input E;
  output Y;
  assign `TIDE_DELAY Y = E ? A : 1'bz;
endmodule

module flop_w1 (D, CK, Q, QN);
  input D;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_w2 (D, CK, Q, QN);
  input D;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_r_w1 (D, CK, RN, Q, QN);
  input D;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_r_w2 (D, CK, RN, Q, QN);
  input D;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_s_w1 (D, CK, SN, Q, QN);
  input D;
  input CK;
  input SN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge SN)
    if (!SN) state <= 1'b1;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_rs_w1 (D, CK, RN, SN, Q, QN);
  input D;
  input CK;
  input RN;
  input SN;
  output Q;
  output QN;
  reg state;
  wire preset = RN & ~SN;  // so that SN acts when RN goes away first
  always @(posedge CK or negedge RN or posedge preset)
    if (!RN) state <= 1'b0;
    else if (preset) state <= 1'b1;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_n_w1 (D, CKN, Q, QN);
  input D;
  input CKN;
  output Q;
  output QN;
  reg state;
  always @(negedge CKN)
    state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_nr_w1 (D, CKN, RN, Q, QN);
  input D;
  input CKN;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(negedge CKN or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_e_w1 (D, E, CK, Q, QN);
  input D;
  input E;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    if (E) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_er_w1 (D, E, CK, RN, Q, QN);
  input D;
  input E;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else if (E) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module flop_inverse_w1 (D, CK, QN);
  input D;
  input CK;
  output QN;
  reg state;
  always @(posedge CK)
    state <= D;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_w1 (D, SI, SE, CK, Q, QN);
  input D;
  input SI;
  input SE;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_w2 (D, SI, SE, CK, Q, QN);
  input D;
  input SI;
  input SE;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_r_w1 (D, SI, SE, CK, RN, Q, QN);
  input D;
  input SI;
  input SE;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_r_w2 (D, SI, SE, CK, RN, Q, QN);
  input D;
  input SI;
  input SE;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_s_w1 (D, SI, SE, CK, SN, Q, QN);
  input D;
  input SI;
  input SE;
  input CK;
  input SN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge SN)
    if (!SN) state <= 1'b1;
    else if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_rs_w1 (D, SI, SE, CK, RN, SN, Q, QN);
  input D;
  input SI;
  input SE;
  input CK;
  input RN;
  input SN;
  output Q;
  output QN;
  reg state;
  wire preset = RN & ~SN;  // so that SN acts when RN goes away first
  always @(posedge CK or negedge RN or posedge preset)
    if (!RN) state <= 1'b0;
    else if (preset) state <= 1'b1;
    else if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_n_w1 (D, SI, SE, CKN, Q, QN);
  input D;
  input SI;
  input SE;
  input CKN;
  output Q;
  output QN;
  reg state;
  always @(negedge CKN)
    if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_nr_w1 (D, SI, SE, CKN, RN, Q, QN);
  input D;
  input SI;
  input SE;
  input CKN;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(negedge CKN or negedge RN)
    if (!RN) state <= 1'b0;
    else if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_e_w1 (D, E, SI, SE, CK, Q, QN);
  input D;
  input E;
  input SI;
  input SE;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    if (SE) state <= SI;
    else if (E) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_er_w1 (D, E, SI, SE, CK, RN, Q, QN);
  input D;
  input E;
  input SI;
  input SE;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else if (SE) state <= SI;
    else if (E) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module scan_flop_inverse_w1 (D, SI, SE, CK, QN);
  input D;
  input SI;
  input SE;
  input CK;
  output QN;
  reg state;
  always @(posedge CK)
    if (SE) state <= SI;
    else state <= D;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_w1 (D, SI, SCK, CK, Q, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    state <= D;
  always @(posedge SCK)
    state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_w2 (D, SI, SCK, CK, Q, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    state <= D;
  always @(posedge SCK)
    state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_r_w1 (D, SI, SCK, CK, RN, Q, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= D;
  always @(posedge SCK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_r_w2 (D, SI, SCK, CK, RN, Q, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= D;
  always @(posedge SCK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_s_w1 (D, SI, SCK, CK, SN, Q, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  input SN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge SN)
    if (!SN) state <= 1'b1;
    else state <= D;
  always @(posedge SCK or negedge SN)
    if (!SN) state <= 1'b1;
    else state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_rs_w1 (D, SI, SCK, CK, RN, SN, Q, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  input RN;
  input SN;
  output Q;
  output QN;
  reg state;
  wire preset = RN & ~SN;  // so that SN acts when RN goes away first
  always @(posedge CK or negedge RN or posedge preset)
    if (!RN) state <= 1'b0;
    else if (preset) state <= 1'b1;
    else state <= D;
  always @(posedge SCK or negedge RN or posedge preset)
    if (!RN) state <= 1'b0;
    else if (preset) state <= 1'b1;
    else state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_n_w1 (D, SI, SCK, CKN, Q, QN);
  input D;
  input SI;
  input SCK;
  input CKN;
  output Q;
  output QN;
  reg state;
  always @(negedge CKN)
    state <= D;
  always @(posedge SCK)
    state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_nr_w1 (D, SI, SCK, CKN, RN, Q, QN);
  input D;
  input SI;
  input SCK;
  input CKN;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(negedge CKN or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= D;
  always @(posedge SCK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_e_w1 (D, E, SI, SCK, CK, Q, QN);
  input D;
  input E;
  input SI;
  input SCK;
  input CK;
  output Q;
  output QN;
  reg state;
  always @(posedge CK)
    if (E) state <= D;
  always @(posedge SCK)
    state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_er_w1 (D, E, SI, SCK, CK, RN, Q, QN);
  input D;
  input E;
  input SI;
  input SCK;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 1'b0;
    else if (E) state <= D;
  always @(posedge SCK or negedge RN)
    if (!RN) state <= 1'b0;
    else state <= SI;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module two_clock_flop_inverse_w1 (D, SI, SCK, CK, QN);
  input D;
  input SI;
  input SCK;
  input CK;
  output QN;
  reg state;
  always @(posedge CK)
    state <= D;
  always @(posedge SCK)
    state <= SI;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_w1 (D, I, A, B, CK, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B) state <= D;
  always @(A or I)
    if (A) first <= I;
  always @(B or first)
    if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_w2 (D, I, A, B, CK, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B) state <= D;
  always @(A or I)
    if (A) first <= I;
  always @(B or first)
    if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_r_w1 (D, I, A, B, CK, RN, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B & RN) state <= D;
  always @(A or I or RN)
    if (!RN) first <= 1'b0;
    else if (A) first <= I;
  always @(B or first or RN)
    if (!RN) state <= 1'b0;
    else if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_r_w2 (D, I, A, B, CK, RN, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B & RN) state <= D;
  always @(A or I or RN)
    if (!RN) first <= 1'b0;
    else if (A) first <= I;
  always @(B or first or RN)
    if (!RN) state <= 1'b0;
    else if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_s_w1 (D, I, A, B, CK, SN, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  input SN;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B & SN) state <= D;
  always @(A or I or SN)
    if (!SN) first <= 1'b1;
    else if (A) first <= I;
  always @(B or first or SN)
    if (!SN) state <= 1'b1;
    else if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_rs_w1 (D, I, A, B, CK, RN, SN, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  input RN;
  input SN;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B & RN & SN) state <= D;
  always @(A or I or RN or SN)
    if (!RN) first <= 1'b0;
    else if (!SN) first <= 1'b1;
    else if (A) first <= I;
  always @(B or first or RN or SN)
    if (!RN) state <= 1'b0;
    else if (!SN) state <= 1'b1;
    else if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_n_w1 (D, I, A, B, CKN, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CKN;
  output Q;
  output QN;
  reg state, first;
  always @(negedge CKN) if (~B) state <= D;
  always @(A or I)
    if (A) first <= I;
  always @(B or first)
    if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_nr_w1 (D, I, A, B, CKN, RN, Q, QN);
  input D;
  input I;
  input A;
  input B;
  input CKN;
  input RN;
  output Q;
  output QN;
  reg state, first;
  always @(negedge CKN) if (~B & RN) state <= D;
  always @(A or I or RN)
    if (!RN) first <= 1'b0;
    else if (A) first <= I;
  always @(B or first or RN)
    if (!RN) state <= 1'b0;
    else if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_e_w1 (D, E, I, A, B, CK, Q, QN);
  input D;
  input E;
  input I;
  input A;
  input B;
  input CK;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B) state <= E ? D : state;
  always @(A or I)
    if (A) first <= I;
  always @(B or first)
    if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_er_w1 (D, E, I, A, B, CK, RN, Q, QN);
  input D;
  input E;
  input I;
  input A;
  input B;
  input CK;
  input RN;
  output Q;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B & RN) state <= E ? D : state;
  always @(A or I or RN)
    if (!RN) first <= 1'b0;
    else if (A) first <= I;
  always @(B or first or RN)
    if (!RN) state <= 1'b0;
    else if (B) state <= first;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_edge_inverse_w1 (D, I, A, B, CK, QN);
  input D;
  input I;
  input A;
  input B;
  input CK;
  output QN;
  reg state, first;
  always @(posedge CK) if (~B) state <= D;
  always @(A or I)
    if (A) first <= I;
  always @(B or first)
    if (B) state <= first;
  assign `TIDE_DELAY QN = ~state;
endmodule

module latch_w1 (D, G, Q, QN);
  input D;
  input G;
  output Q;
  output QN;
  reg state;
  always @(G or D)
    if (G) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module latch_low_w1 (D, GN, Q, QN);
  input D;
  input GN;
  output Q;
  output QN;
  reg state;
  always @(GN or D)
    if (!GN) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module latch_r_w1 (D, G, RN, Q, QN);
  input D;
  input G;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(G or D or RN)
    if (!RN) state <= 1'b0;
    else if (G) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module latch_low_r_w1 (D, GN, RN, Q, QN);
  input D;
  input GN;
  input RN;
  output Q;
  output QN;
  reg state;
  always @(GN or D or RN)
    if (!RN) state <= 1'b0;
    else if (!GN) state <= D;
  assign `TIDE_DELAY Q = state;
  assign `TIDE_DELAY QN = ~state;
endmodule

module srl_first_w1 (D, C, I, A, L1, L1N);
  input D;
  input C;
  input I;
  input A;
  output L1;
  output L1N;
  reg first;
  always @(C or D or A or I)
    if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  assign `TIDE_DELAY L1 = first;
  assign `TIDE_DELAY L1N = ~first;
endmodule

module srl_single_w1 (D, C, I, A, B, L1, L1N, L2);
  input D;
  input C;
  input I;
  input A;
  input B;
  output L1;
  output L1N;
  output L2;
  reg first, second;
  always @(C or D or A or I)
    if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  always @(B or first)
    if (B) second <= first;
  assign `TIDE_DELAY L1 = first;
  assign `TIDE_DELAY L1N = ~first;
  assign `TIDE_DELAY L2 = second;
endmodule

module srl_double_w1 (D, C, I, A, B, L2, L2N);
  input D;
  input C;
  input I;
  input A;
  input B;
  output L2;
  output L2N;
  reg first, second;
  always @(C or D or A or I)
    if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  always @(B or first)
    if (B) second <= first;
  assign `TIDE_DELAY L2 = second;
  assign `TIDE_DELAY L2N = ~second;
endmodule

module srl_first_r_w1 (D, C, I, A, RN, L1, L1N);
  input D;
  input C;
  input I;
  input A;
  input RN;
  output L1;
  output L1N;
  reg first;
  always @(C or D or A or I or RN)
    if (!RN) first <= 1'b0;
    else if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  assign `TIDE_DELAY L1 = first;
  assign `TIDE_DELAY L1N = ~first;
endmodule

module srl_single_r_w1 (D, C, I, A, B, RN, L1, L1N, L2);
  input D;
  input C;
  input I;
  input A;
  input B;
  input RN;
  output L1;
  output L1N;
  output L2;
  reg first, second;
  always @(C or D or A or I or RN)
    if (!RN) first <= 1'b0;
    else if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  always @(B or first or RN)
    if (!RN) second <= 1'b0;
    else if (B) second <= first;
  assign `TIDE_DELAY L1 = first;
  assign `TIDE_DELAY L1N = ~first;
  assign `TIDE_DELAY L2 = second;
endmodule

module srl_double_r_w1 (D, C, I, A, B, RN, L2, L2N);
  input D;
  input C;
  input I;
  input A;
  input B;
  input RN;
  output L2;
  output L2N;
  reg first, second;
  always @(C or D or A or I or RN)
    if (!RN) first <= 1'b0;
    else if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  always @(B or first or RN)
    if (!RN) second <= 1'b0;
    else if (B) second <= first;
  assign `TIDE_DELAY L2 = second;
  assign `TIDE_DELAY L2N = ~second;
endmodule

module srl_star_w1 (D, C, I, A, B, D2, C2, L1, L2);
  input D;
  input C;
  input I;
  input A;
  input B;
  input D2;
  input C2;
  output L1;
  output L2;
  reg first, second;
  always @(C or D or A or I)
    if (C & A) first <= 1'bx;  // never both
    else if (C) first <= D;
    else if (A) first <= I;
  always @(B or first or C2 or D2)
    if (B & C2) second <= 1'bx;  // never both
    else if (B) second <= first;
    else if (C2) second <= D2;
  assign `TIDE_DELAY L1 = first;
  assign `TIDE_DELAY L2 = second;
endmodule

module clock_gate_w4 (CK, E, GCK);
  input CK;
  input E;
  output GCK;
  reg state;
  always @(CK or E)
    if (!CK) state <= E;
  assign `TIDE_DELAY GCK = CK & state;
endmodule

module clock_gate_test_w4 (CK, E, T, GCK);
  input CK;
  input E;
  input T;
  output GCK;
  reg state;
  always @(CK or E or T)
    if (!CK) state <= E | T;
  assign `TIDE_DELAY GCK = CK & state;
endmodule

module flop_bank4_w1 (D, CK, RN, Q);
  input [3:0] D;
  input CK;
  input RN;
  output [3:0] Q;
  reg [3:0] state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 4'b0000;
    else state <= D;
  assign `TIDE_DELAY Q = state;
endmodule

module scan_bank4_w1 (D, SI, SE, CK, RN, Q);
  input [3:0] D;
  input SI;
  input SE;
  input CK;
  input RN;
  output [3:0] Q;
  reg [3:0] state;
  always @(posedge CK or negedge RN)
    if (!RN) state <= 4'b0000;
    else if (SE) state <= {state[2:0], SI};
    else state <= D;
  assign `TIDE_DELAY Q = state;
endmodule
