// expect: share[7:0] gated
// expect: share[15:8] gated
// Two blocks, but no bit twice.
module shared_field (clk, low, high, data, share, test_en);
    input wire test_en;
    input             clk, low, high;
    input      [7:0]  data;
    output reg [15:0] share;
    // stillclock: share sleeps unless it is written
    wire wake_share = low;
    wire gclk_share;
    stillclock_icg u_icg_share (.clk(clk), .wake(wake_share), .test(test_en), .gclk(gclk_share));
    always @(posedge gclk_share) if (low) share[7:0] <= data;
    // stillclock: share sleeps unless it is written
    wire wake_share_2 = high;
    wire gclk_share_2;
    stillclock_icg u_icg_share_2 (.clk(clk), .wake(wake_share_2), .test(test_en), .gclk(gclk_share_2));
    always @(posedge gclk_share_2) if (high) share[15:8] <= data;
endmodule
