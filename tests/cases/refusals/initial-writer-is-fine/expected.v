// expect: seed_q gated
module seed_drill (clk, sow, seed, seed_q, test_en);
    input wire test_en;
    input            clk, sow;
    input      [7:0] seed;
    output reg [7:0] seed_q;
    initial begin
        seed_q = 8'd3;
    end
    // stillclock: seed_q sleeps unless it is written
    wire wake_seed_q = sow;
    wire gclk_seed_q;
    stillclock_icg u_icg_seed_q (.clk(clk), .wake(wake_seed_q), .test(test_en), .gclk(gclk_seed_q));
    always @(posedge gclk_seed_q) if (sow) seed_q <= seed;
endmodule
