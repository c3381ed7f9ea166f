// expect: carry gated
// expect: minus gated
// expect: inverse gated
// expect: shifted gated
// expect: signed_sum gated
// Conditions wider than one bit keep the width they have in `if`: the comparison with 0 must not widen the operands,
// or the carry of a + b, and the ones above ~a, would count.
module cargo_balance (
    input  logic        clk,
    input  logic [3:0]  a, b,
    input  logic signed [3:0] s, t,
    input  logic [7:0]  crate,
    output logic [7:0]  carry, minus, inverse, shifted, signed_sum
);
    always_ff @(posedge clk) if (a + b) carry <= crate;
    always_ff @(posedge clk) if (a - b) minus <= crate;
    always_ff @(posedge clk) if (~a) inverse <= crate;
    always_ff @(posedge clk) if (a << b[1:0]) shifted <= crate;
    always_ff @(posedge clk) if (s + t) signed_sum <= crate;
endmodule
