// expect: lens gated
// expect: tilt gated
module telescope (
    input  logic       clk, rst_n,
    input  logic       focus, nudge,
    input  logic [6:0] dial,
    output logic [6:0] lens, tilt,
    input  wire        test_en
);
    // stillclock: lens sleeps unless it is written
    wire wake_lens = focus;
    wire gclk_lens;
    stillclock_icg u_icg_lens (.clk(clk), .wake(wake_lens), .test(test_en), .gclk(gclk_lens));
    (* purpose = "focus" *)
    always_ff @(posedge gclk_lens or negedge rst_n) begin : focussing
        if (!rst_n) begin : clear
            lens <= '0;
        end : clear
        else if (focus) begin : move
            lens <= dial;
        end : move
    end : focussing

    // stillclock: tilt sleeps unless it is written
    wire wake_tilt = nudge;
    wire gclk_tilt;
    stillclock_icg u_icg_tilt (.clk(clk), .wake(wake_tilt), .test(test_en), .gclk(gclk_tilt));
    (* purpose = "tilt", cost = 3 *) always_ff @(posedge gclk_tilt) begin : tilting
        (* likely *) if (nudge) tilt <= dial;
    end
endmodule
