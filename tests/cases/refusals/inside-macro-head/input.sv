// expect: rung refused inside-macro
// The event control alone comes from a macro: the clock cannot be replaced in the text.
`define ON_CLOCK always_ff @(posedge clk)
module rope_ladder (
    input  logic       clk,
    input  logic       climb,
    input  logic [7:0] height,
    output logic [7:0] rung
);
    `ON_CLOCK if (climb) rung <= height;
endmodule
