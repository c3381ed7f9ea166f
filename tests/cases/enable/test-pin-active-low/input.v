// expect: anvil_q gated
// The existing pin is active when low.
module anvil (clk, testmode_n, strike, iron, anvil_q);
    input            clk, testmode_n, strike;
    input      [5:0] iron;
    output reg [5:0] anvil_q;
    always @(posedge clk) if (strike) anvil_q <= iron;
endmodule
