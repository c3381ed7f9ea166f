// expect: desk.note gated
// Every copy compares with another constant; the case label is a genvar as well.
module school_desks (
    input  logic        clk,
    input  logic        hand_out,
    input  logic [1:0]  row,
    input  logic [7:0]  sheet,
    output logic [31:0] notes,
    input  wire         test_en
);
    for (genvar d = 0; d < 4; d++) begin : desk
        logic [7:0] note;
        // stillclock: note sleeps unless it is written; the branches are those of its block
        logic wake_note;
        always_comb begin
            wake_note = 1'b0;
            case (row)
                d[1:0]: if (hand_out) wake_note = 1'b1;
                default: if (hand_out && d == 0) wake_note = 1'b1;
            endcase
        end
        wire gclk_note;
        stillclock_icg u_icg_note (.clk(clk), .wake(wake_note), .test(test_en), .gclk(gclk_note));
        always_ff @(posedge gclk_note)
            case (row)
                d[1:0]: if (hand_out) note <= sheet;
                default: if (hand_out && d == 0) note <= '0;
            endcase
        assign notes[8*d +: 8] = note;
    end
endmodule
