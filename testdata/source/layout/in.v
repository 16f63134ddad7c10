module top(a,y);input a;output y;wire n1;wire n2;INV u1(.A(a),.Y(n1));INV u2(.A(n1),.Y(n2));INV u3(
.A
(
n2
)
,
.Y
(
y
)
)
;INV	u4	(	.A	(	n2	)	,	.Y	(	n4	)	)	;INV u5 ( .A ( n4 ) , .Y ( n5 ) ) ;endmodule