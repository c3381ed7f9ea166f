// expect: moor gated
`timescale 1ns/1ps
module mooring (clk, rst, tie, rope, moor);
    input            clk, rst, tie;
    input      [7:0] rope;
    output reg [7:0] moor;
    always @(posedge clk)
        if (rst) moor <= #1 8'd0;
        else if (tie) moor <= #1 rope;
endmodule
