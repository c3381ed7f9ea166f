// expect: basin refused two-writers: is also written at
module harbour_basin (clk, flood, drain, level, basin);
    input            clk, flood, drain;
    input      [7:0] level;
    output reg [7:0] basin;
    always @(posedge clk) if (flood) basin <= level;
    always @(posedge clk) if (drain) basin <= 8'd0;
endmodule
