// expect: saw refused timing-control
`timescale 1ns/1ps
module saw_mill (clk, log_in, saw);
    input            clk;
    input      [7:0] log_in;
    output reg [7:0] saw;
    always @(posedge clk)
        if (log_in[0]) #3 saw <= log_in;
endmodule
