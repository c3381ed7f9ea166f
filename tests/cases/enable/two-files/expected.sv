// expect: knot gated
`include "sizes.svh"
module rope_knot (
    input  logic                 clk, tie,
    input  logic [`ROPE_W-1:0]   turns,
    output logic [`ROPE_W-1:0]   knot,
    input  wire                  test_en
);
    // stillclock: knot sleeps unless it is written
    wire wake_knot = tie && turns > `LIMIT;
    wire gclk_knot;
    stillclock_icg u_icg_knot (.clk(clk), .wake(wake_knot), .test(test_en), .gclk(gclk_knot));
    always_ff @(posedge gclk_knot) if (tie && turns > `LIMIT) knot <= turns;
endmodule
