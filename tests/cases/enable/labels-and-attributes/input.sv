// expect: lens gated
// expect: tilt gated
module telescope (
    input  logic       clk, rst_n,
    input  logic       focus, nudge,
    input  logic [6:0] dial,
    output logic [6:0] lens, tilt
);
    (* purpose = "focus" *)
    always_ff @(posedge clk or negedge rst_n) begin : focussing
        if (!rst_n) begin : clear
            lens <= '0;
        end : clear
        else if (focus) begin : move
            lens <= dial;
        end : move
    end : focussing

    (* purpose = "tilt", cost = 3 *) always_ff @(posedge clk) begin : tilting
        (* likely *) if (nudge) tilt <= dial;
    end
endmodule
