// expect: mill refused timing-control
`timescale 1ns/1ps
module wind_mill (clk, gust, sail, mill);
    input            clk, gust;
    input      [7:0] sail;
    output reg [7:0] mill;
    always @(posedge clk) begin
        #2;
        if (gust) mill <= sail;
    end
endmodule
