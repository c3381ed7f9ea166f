// expect: gong gated
// The wake condition reads the bank's own asynchronous reset as data: it is stable whenever the clock runs.
module temple_gong (
    input  logic       clk, rst_n,
    input  logic       strike,
    input  logic [7:0] tone,
    output logic [7:0] gong,
    input  wire        test_en
);
    wire ready = strike & rst_n;
    // stillclock: gong sleeps unless it is written
    wire wake_gong = ready;
    wire gclk_gong;
    stillclock_icg u_icg_gong (.clk(clk), .wake(wake_gong), .test(test_en), .gclk(gclk_gong));
    always_ff @(posedge gclk_gong or negedge rst_n)
        if (!rst_n) gong <= '0;
        else if (ready) gong <= tone;
endmodule
