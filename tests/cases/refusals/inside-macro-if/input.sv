// expect: bushel refused inside-macro
// The `if` begins in a macro and ends outside.
`define OPENING if (wheat &&
module mill_bushel (
    input  logic       clk,
    input  logic       wheat, tied,
    input  logic [7:0] weight,
    output logic [7:0] bushel
);
    always_ff @(posedge clk)
        `OPENING tied) bushel <= weight;
endmodule
