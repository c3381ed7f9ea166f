// expect: mark refused blocking-source: is written with =
// expect: cnt refused blocking-source
module lap_counter (clk, rst, lap, mark, cnt);
    input            clk, rst, lap;
    output reg [7:0] mark, cnt;
    always @(posedge clk)
        if (rst) cnt = 8'd0;
        else cnt = cnt + 8'd1;
    always @(posedge clk)
        if (lap && cnt == 8'd6) mark <= 8'd1;
endmodule
