// expect: anvil_q gated
// The existing pin is active when low.
module anvil (clk, testmode_n, strike, iron, anvil_q);
    input            clk, testmode_n, strike;
    input      [5:0] iron;
    output reg [5:0] anvil_q;
    // stillclock: anvil_q sleeps unless it is written
    wire wake_anvil_q = strike;
    wire gclk_anvil_q;
    stillclock_icg u_icg_anvil_q (.clk(clk), .wake(wake_anvil_q), .test(!testmode_n), .gclk(gclk_anvil_q));
    always @(posedge gclk_anvil_q) if (strike) anvil_q <= iron;
endmodule
