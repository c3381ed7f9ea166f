// expect: seen gated
// Only the value crosses: the bank still sees what the original saw, at every edge at which it is awake.
module cliff_watch (
    input  logic       clk_a, clk_b,
    input  logic       look,
    input  logic [7:0] sea,
    output logic [7:0] seen,
    input  wire        test_en
);
    logic [7:0] sea_q;
    always_ff @(posedge clk_a) sea_q <= sea;
    // stillclock: seen sleeps unless it is written
    wire wake_seen = look;
    wire gclk_seen;
    stillclock_icg u_icg_seen (.clk(clk_b), .wake(wake_seen), .test(test_en), .gclk(gclk_seen));
    always_ff @(posedge gclk_seen) if (look) seen <= sea_q;
endmodule
