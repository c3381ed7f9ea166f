// expect: moor gated
`timescale 1ns/1ps
module mooring (clk, rst, tie, rope, moor, test_en);
    input wire test_en;
    input            clk, rst, tie;
    input      [7:0] rope;
    output reg [7:0] moor;
    // stillclock: moor sleeps unless it is written
    wire wake_moor = rst || tie;
    wire gclk_moor;
    stillclock_icg u_icg_moor (.clk(clk), .wake(wake_moor), .test(test_en), .gclk(gclk_moor));
    always @(posedge gclk_moor)
        if (rst) moor <= #1 8'd0;
        else if (tie) moor <= #1 rope;
endmodule
