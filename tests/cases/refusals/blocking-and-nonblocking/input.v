// expect: pump refused blocking-source
module bilge_pump (clk, rst, suck, water, pump);
    input            clk, rst, suck;
    input      [7:0] water;
    output reg [7:0] pump;
    always @(posedge clk)
        if (rst) pump = 8'd0;
        else if (suck) pump <= water;
endmodule
