// expect: sum_q gated
// Plain Verilog registers with initial values keep them.
module till (clk, ring, coins, sum_q);
    input            clk, ring;
    input      [6:0] coins;
    output reg [6:0] sum_q;
    initial sum_q = 7'd5;
    always @(posedge clk) if (ring) sum_q <= sum_q + coins;
endmodule
