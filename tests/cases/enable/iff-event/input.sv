// expect: trail gated
module trail_log (
    input  logic       clk,
    input  logic       walking,
    input  logic [7:0] step,
    output logic [7:0] trail
);
    always_ff @(posedge clk iff walking)
        trail <= step;
endmodule
