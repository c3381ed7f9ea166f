// expect: tally gated
// Concatenation, replication, reduction, part select, shift, comparison of signed values.
module abacus_row (
    input  logic              clk,
    input  logic        [7:0] bead, wire_pos,
    input  logic signed [5:0] lean,
    output logic        [8:0] tally,
    input  wire               test_en
);
    // stillclock: tally sleeps unless it is written
    wire wake_tally = {bead[3:0], wire_pos[1:0]} == {3{2'b10}} || &bead[7:4] && ^wire_pos
        || (lean < -6'sd3 && (wire_pos >> bead[1:0]) != 8'd1);
    wire gclk_tally;
    stillclock_icg u_icg_tally (.clk(clk), .wake(wake_tally), .test(test_en), .gclk(gclk_tally));
    always_ff @(posedge gclk_tally)
        if ({bead[3:0], wire_pos[1:0]} == {3{2'b10}} || &bead[7:4] && ^wire_pos)
            tally <= {1'b0, bead};
        else if (lean < -6'sd3 && (wire_pos >> bead[1:0]) != 8'd1)
            tally <= {wire_pos, 1'b1};
endmodule
