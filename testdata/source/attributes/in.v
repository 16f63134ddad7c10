(* top = 1, src = "a.v:1.2-3.4" *)
module top (a, y);
  (* src = "a.v:2.3" *) input a;
  (* keep *) output y;
  (* keep = 1, note = "a ; ) *) inside" *) (* second *)
  wire n1;
  (* dont_touch = "true" *)
  INV u1 (.A(a), .Y(n1));
  (* keep, weight = 3 *) INV u2 (.A(n1), (* pin *) .Y(n2));
  (* \odd.name = "x\"y" *) INV u3 (.A(n2), .Y(y));
  // (* not_one *)
  INV u4 (.A(n2), .Y(n4));
endmodule
