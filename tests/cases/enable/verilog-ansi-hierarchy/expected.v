// expect: count gated
// expect: latched gated
module dock_counter #(parameter W = 6) (
    input  wire         clk, rst_n, tick,
    output reg  [W-1:0] count,
    input  wire         test_en
);
    // stillclock: count sleeps unless it is written
    wire wake_count = tick;
    wire gclk_count;
    stillclock_icg u_icg_count (.clk(clk), .wake(wake_count), .test(test_en), .gclk(gclk_count));
    always @(posedge gclk_count or negedge rst_n) begin
        if (~rst_n)
            count <= {W{1'b0}};
        else if (tick)
            count <= count + 1'b1;
    end
endmodule
module dock_office (
    input  wire       clk,
    input  wire       rst_n,
    input  wire       tick, take,
    output wire [5:0] count,
    output reg  [5:0] latched,
    input  wire       test_en
);
    dock_counter u_count (clk, rst_n, tick, count, test_en);
    // stillclock: latched sleeps unless it is written
    wire wake_latched = take;
    wire gclk_latched;
    stillclock_icg u_icg_latched (.clk(clk), .wake(wake_latched), .test(test_en), .gclk(gclk_latched));
    always @(posedge gclk_latched)
        if (take) latched <= count;
endmodule
