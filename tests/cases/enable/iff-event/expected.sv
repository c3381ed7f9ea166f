// expect: trail gated
module trail_log (
    input  logic       clk,
    input  logic       walking,
    input  logic [7:0] step,
    output logic [7:0] trail,
    input  wire        test_en
);
    // stillclock: trail sleeps unless it is written
    wire wake_trail = walking;
    wire gclk_trail;
    stillclock_icg u_icg_trail (.clk(clk), .wake(wake_trail), .test(test_en), .gclk(gclk_trail));
    always_ff @(posedge gclk_trail iff walking)
        trail <= step;
endmodule
