// expect: chest gated
// Two asynchronous resets of different polarity that load the same value.
module tea_chest (clk, rst_n, sea_rst, stow, leaves, chest, test_en);
    input wire test_en;
    input            clk, rst_n, sea_rst, stow;
    input      [5:0] leaves;
    output reg [5:0] chest;
    // stillclock: chest sleeps unless it is written
    wire wake_chest = stow;
    wire gclk_chest;
    stillclock_icg u_icg_chest (.clk(clk), .wake(wake_chest), .test(test_en), .gclk(gclk_chest));
    always @(posedge gclk_chest or negedge rst_n or posedge sea_rst)
        if (!rst_n) chest <= 6'd21;
        else if (sea_rst) chest <= 6'd21;
        else if (stow) chest <= leaves;
endmodule
