/* before ; module fake (x); endmodule */
// another ; endmodule
module /* name */ top /* list */ ( a /* first */ , // comma
    y ) /* ; */ ;
  input a; // input b;
  output /* wide? */ y;
  wire /* none */ n1 , // one
       n2;
  INV /* cell */ u1 /* instance */ ( /* open */ .A /* pin */ ( /* net */ a /* done */ ) , // next )
      .Y(n1) // last
  ) /* ; */ ;
  INV u2 (.A(n1), /* .B(n2), */ .Y(n2));
  /**/ INV u3 (.A(n2), .Y(y)); /***/
  assign /* left */ n3 /* = */ = /* right */ n1 /* ; */ ;
endmodule // top
// the end