// expect: seen gated
// Only the value crosses: the bank still sees what the original saw, at every edge at which it is awake.
module cliff_watch (
    input  logic       clk_a, clk_b,
    input  logic       look,
    input  logic [7:0] sea,
    output logic [7:0] seen
);
    logic [7:0] sea_q;
    always_ff @(posedge clk_a) sea_q <= sea;
    always_ff @(posedge clk_b) if (look) seen <= sea_q;
endmodule
