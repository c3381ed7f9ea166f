// expect: swan_q gated
// A wake register of the falling edge of the same clock is stable while the cell is closed.
module swan_lake (
    input  logic       clk,
    input  logic       glide,
    input  logic [7:0] wing,
    output logic [7:0] swan_q
);
    logic glide_q;
    always_ff @(negedge clk) glide_q <= glide;
    always_ff @(posedge clk) if (glide_q) swan_q <= wing;
endmodule
