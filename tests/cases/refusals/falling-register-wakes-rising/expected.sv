// expect: swan_q gated
// A wake register of the falling edge of the same clock is stable while the cell is closed.
module swan_lake (
    input  logic       clk,
    input  logic       glide,
    input  logic [7:0] wing,
    output logic [7:0] swan_q,
    input  wire        test_en
);
    logic glide_q;
    always_ff @(negedge clk) glide_q <= glide;
    // stillclock: swan_q sleeps unless it is written
    wire wake_swan_q = glide_q;
    wire gclk_swan_q;
    stillclock_icg u_icg_swan_q (.clk(clk), .wake(wake_swan_q), .test(test_en), .gclk(gclk_swan_q));
    always_ff @(posedge gclk_swan_q) if (glide_q) swan_q <= wing;
endmodule
