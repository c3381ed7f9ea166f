// expect: mix[7:0] refused two-writers
// expect: mix[15:4] refused two-writers
module mixed_field (clk, low, high, data, mix);
    input             clk, low, high;
    input      [11:0] data;
    output reg [15:0] mix;
    always @(posedge clk) if (low) mix[7:0] <= data[7:0];
    always @(posedge clk) if (high) mix[15:4] <= data;
endmodule
