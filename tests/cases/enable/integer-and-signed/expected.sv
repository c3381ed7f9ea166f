// expect: tally gated
// expect: drift gated
module drift_meter (
    input  logic              clk, rst_n,
    input  logic              step,
    input  logic signed [5:0] delta,
    output logic signed [5:0] drift,
    output logic [7:0]        low,
    input  wire               test_en
);
    int tally;
    assign low = tally[7:0];
    // stillclock: tally sleeps unless it is written
    wire wake_tally = step;
    wire gclk_tally;
    stillclock_icg u_icg_tally (.clk(clk), .wake(wake_tally), .test(test_en), .gclk(gclk_tally));
    always_ff @(posedge gclk_tally or negedge rst_n)
        if (!rst_n) tally <= 0;
        else if (step) tally <= tally + delta;
    // stillclock: drift sleeps unless it is written
    wire wake_drift = delta < 0;
    wire gclk_drift;
    stillclock_icg u_icg_drift (.clk(clk), .wake(wake_drift), .test(test_en), .gclk(gclk_drift));
    always_ff @(posedge gclk_drift or negedge rst_n)
        if (!rst_n) drift <= -6'sd1;
        else if (delta < 0) drift <= delta >>> 1;
endmodule
