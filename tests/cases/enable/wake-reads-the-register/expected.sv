// expect: remaining gated
// expect: best gated
module egg_timer (
    input  logic       clk, rst_n,
    input  logic       wind, pause,
    input  logic [9:0] minutes,
    output logic [9:0] remaining, best,
    input  wire        test_en
);
    // stillclock: remaining sleeps unless it is written
    wire wake_remaining = wind || (remaining != 0 && !pause);
    wire gclk_remaining;
    stillclock_icg u_icg_remaining (.clk(clk), .wake(wake_remaining), .test(test_en), .gclk(gclk_remaining));
    always_ff @(posedge gclk_remaining or negedge rst_n)
        if (!rst_n) remaining <= '0;
        else if (wind) remaining <= minutes;
        else if (remaining != 0 && !pause) remaining <= remaining - 10'd1;
    // stillclock: best sleeps unless it is written
    wire wake_best = remaining > best;
    wire gclk_best;
    stillclock_icg u_icg_best (.clk(clk), .wake(wake_best), .test(test_en), .gclk(gclk_best));
    always_ff @(posedge gclk_best or negedge rst_n)
        if (!rst_n) best <= '0;
        else if (remaining > best) best <= remaining;
endmodule
