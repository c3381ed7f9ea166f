// expect: sync_q refused keep-attribute
// expect: plain_q gated
module crossing_gate (clk, open, lane, sync_q, plain_q, test_en);
    input wire test_en;
    input            clk, open;
    input      [3:0] lane;
    (* ASYNC_REG = "TRUE" *) output reg [3:0] sync_q;
    output reg [3:0] plain_q;
    always @(posedge clk) if (open) sync_q <= lane;
    // stillclock: plain_q sleeps unless it is written
    wire wake_plain_q = open;
    wire gclk_plain_q;
    stillclock_icg u_icg_plain_q (.clk(clk), .wake(wake_plain_q), .test(test_en), .gclk(gclk_plain_q));
    always @(posedge gclk_plain_q) if (open) plain_q <= lane;
endmodule
