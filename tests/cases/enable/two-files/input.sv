// expect: knot gated
`include "sizes.svh"
module rope_knot (
    input  logic                 clk, tie,
    input  logic [`ROPE_W-1:0]   turns,
    output logic [`ROPE_W-1:0]   knot
);
    always_ff @(posedge clk) if (tie && turns > `LIMIT) knot <= turns;
endmodule
