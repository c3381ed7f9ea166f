// expect: desk.note gated
// Every copy compares with another constant; the case label is a genvar as well.
module school_desks (
    input  logic        clk,
    input  logic        hand_out,
    input  logic [1:0]  row,
    input  logic [7:0]  sheet,
    output logic [31:0] notes
);
    for (genvar d = 0; d < 4; d++) begin : desk
        logic [7:0] note;
        always_ff @(posedge clk)
            case (row)
                d[1:0]: if (hand_out) note <= sheet;
                default: if (hand_out && d == 0) note <= '0;
            endcase
        assign notes[8*d +: 8] = note;
    end
endmodule
