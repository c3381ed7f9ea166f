// expect: film gated
// The wake register has an asynchronous reset, the bank has none: the bank loses no edge by it.
module camera_trap (
    input  logic       clk, rst_n,
    input  logic       motion,
    input  logic [7:0] frame,
    output logic [7:0] film,
    input  wire        test_en
);
    logic seen;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) seen <= 1'b0;
        else seen <= motion;
    // stillclock: film sleeps unless it is written
    wire wake_film = seen;
    wire gclk_film;
    stillclock_icg u_icg_film (.clk(clk), .wake(wake_film), .test(test_en), .gclk(gclk_film));
    always_ff @(posedge gclk_film)
        if (seen) film <= frame;
endmodule
