// expect: sail gated
// Comparisons of signed against unsigned operands decide: the copy must not change their signedness.
module sail_trim (
    input  logic              clk,
    input  logic signed [3:0] heel,
    input  logic        [3:0] limit,
    input  logic        [7:0] pull,
    output logic        [7:0] sail
);
    always_ff @(posedge clk) if (heel > limit || heel > -4'sd2) sail <= pull;
endmodule
