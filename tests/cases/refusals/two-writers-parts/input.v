// expect: share[7:0] gated
// expect: share[15:8] gated
// Two blocks, but no bit twice.
module shared_field (clk, low, high, data, share);
    input             clk, low, high;
    input      [7:0]  data;
    output reg [15:0] share;
    always @(posedge clk) if (low) share[7:0] <= data;
    always @(posedge clk) if (high) share[15:8] <= data;
endmodule
