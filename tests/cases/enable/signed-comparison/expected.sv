// expect: sail gated
// Comparisons of signed against unsigned operands decide: the copy must not change their signedness.
module sail_trim (
    input  logic              clk,
    input  logic signed [3:0] heel,
    input  logic        [3:0] limit,
    input  logic        [7:0] pull,
    output logic        [7:0] sail,
    input  wire               test_en
);
    // stillclock: sail sleeps unless it is written
    wire wake_sail = heel > limit || heel > -4'sd2;
    wire gclk_sail;
    stillclock_icg u_icg_sail (.clk(clk), .wake(wake_sail), .test(test_en), .gclk(gclk_sail));
    always_ff @(posedge gclk_sail) if (heel > limit || heel > -4'sd2) sail <= pull;
endmodule
