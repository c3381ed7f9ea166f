// expect: sack refused not-copyable
// The condition begins inside a macro that opens its parenthesis: its text cannot stand elsewhere.
`define FULL (flour
module mill_sack (
    input  logic       clk,
    input  logic       flour, tied,
    input  logic [7:0] weight,
    output logic [7:0] sack
);
    always_ff @(posedge clk)
        if `FULL && tied) sack <= weight;
endmodule
