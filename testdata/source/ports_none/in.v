module top;
  wire a, b;
  empty e ();
  INV u (.A(a), .Y(b));
endmodule

module empty ();
endmodule
