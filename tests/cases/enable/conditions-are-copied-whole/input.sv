// expect: tally gated
// Concatenation, replication, reduction, part select, shift, comparison of signed values.
module abacus_row (
    input  logic              clk,
    input  logic        [7:0] bead, wire_pos,
    input  logic signed [5:0] lean,
    output logic        [8:0] tally
);
    always_ff @(posedge clk)
        if ({bead[3:0], wire_pos[1:0]} == {3{2'b10}} || &bead[7:4] && ^wire_pos)
            tally <= {1'b0, bead};
        else if (lean < -6'sd3 && (wire_pos >> bead[1:0]) != 8'd1)
            tally <= {wire_pos, 1'b1};
endmodule
