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
    output logic [7:0]  carry, minus, inverse, shifted, signed_sum,
    input  wire         test_en
);
    // stillclock: carry sleeps unless it is written
    wire wake_carry = |(a + b);
    wire gclk_carry;
    stillclock_icg u_icg_carry (.clk(clk), .wake(wake_carry), .test(test_en), .gclk(gclk_carry));
    always_ff @(posedge gclk_carry) if (a + b) carry <= crate;
    // stillclock: minus sleeps unless it is written
    wire wake_minus = |(a - b);
    wire gclk_minus;
    stillclock_icg u_icg_minus (.clk(clk), .wake(wake_minus), .test(test_en), .gclk(gclk_minus));
    always_ff @(posedge gclk_minus) if (a - b) minus <= crate;
    // stillclock: inverse sleeps unless it is written
    wire wake_inverse = |(~a);
    wire gclk_inverse;
    stillclock_icg u_icg_inverse (.clk(clk), .wake(wake_inverse), .test(test_en), .gclk(gclk_inverse));
    always_ff @(posedge gclk_inverse) if (~a) inverse <= crate;
    // stillclock: shifted sleeps unless it is written
    wire wake_shifted = |(a << b[1:0]);
    wire gclk_shifted;
    stillclock_icg u_icg_shifted (.clk(clk), .wake(wake_shifted), .test(test_en), .gclk(gclk_shifted));
    always_ff @(posedge gclk_shifted) if (a << b[1:0]) shifted <= crate;
    // stillclock: signed_sum sleeps unless it is written
    wire wake_signed_sum = |(s + t);
    wire gclk_signed_sum;
    stillclock_icg u_icg_signed_sum (.clk(clk), .wake(wake_signed_sum), .test(test_en), .gclk(gclk_signed_sum));
    always_ff @(posedge gclk_signed_sum) if (s + t) signed_sum <= crate;
endmodule
