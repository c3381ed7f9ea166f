// expect: sum_q gated
// Plain Verilog registers with initial values keep them.
module till (clk, ring, coins, sum_q, test_en);
    input wire test_en;
    input            clk, ring;
    input      [6:0] coins;
    output reg [6:0] sum_q;
    initial sum_q = 7'd5;
    // stillclock: sum_q sleeps unless it is written
    wire wake_sum_q = ring;
    wire gclk_sum_q;
    stillclock_icg u_icg_sum_q (.clk(clk), .wake(wake_sum_q), .test(test_en), .gclk(gclk_sum_q));
    always @(posedge gclk_sum_q) if (ring) sum_q <= sum_q + coins;
endmodule
