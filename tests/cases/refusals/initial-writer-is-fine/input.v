// expect: seed_q gated
module seed_drill (clk, sow, seed, seed_q);
    input            clk, sow;
    input      [7:0] seed;
    output reg [7:0] seed_q;
    initial begin
        seed_q = 8'd3;
    end
    always @(posedge clk) if (sow) seed_q <= seed;
endmodule
