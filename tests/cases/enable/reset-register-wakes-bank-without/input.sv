// expect: film gated
// The wake register has an asynchronous reset, the bank has none: the bank loses no edge by it.
module camera_trap (
    input  logic       clk, rst_n,
    input  logic       motion,
    input  logic [7:0] frame,
    output logic [7:0] film
);
    logic seen;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) seen <= 1'b0;
        else seen <= motion;
    always_ff @(posedge clk)
        if (seen) film <= frame;
endmodule
