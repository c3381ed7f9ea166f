// expect: film gated
// The falling-edge bank wakes on a register of the rising edge of the same clock: half a cycle is enough.
module film_winder (
    input  logic       clk, rst_n,
    input  logic       shutter,
    input  logic [9:0] frame,
    output logic [9:0] film
);
    logic armed;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) armed <= 1'b0;
        else armed <= shutter;
    always_ff @(negedge clk or negedge rst_n)
        if (!rst_n) film <= '0;
        else if (armed) film <= frame;
endmodule
