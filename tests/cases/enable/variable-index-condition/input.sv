// expect: mast gated
// An enable picked by a variable index out of a vector: the original holds where the index is out of range.
module mast_head (
    input  logic       clk,
    input  logic [4:0] sel,
    input  logic [2:0] pick,
    input  logic [7:0] wind,
    output logic [7:0] mast
);
    always_ff @(posedge clk) if (sel[pick]) mast <= wind;
endmodule
