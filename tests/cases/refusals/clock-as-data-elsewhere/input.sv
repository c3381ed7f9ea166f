// expect: nest gated
// The clock is data for somebody else; the bank's condition has nothing to do with it.
module bird_nest (
    input  logic       clk,
    input  logic       lay,
    input  logic [7:0] egg,
    output logic [7:0] nest,
    output logic       shown
);
    assign shown = clk & egg[0];
    always_ff @(posedge clk) if (lay) nest <= egg;
endmodule
