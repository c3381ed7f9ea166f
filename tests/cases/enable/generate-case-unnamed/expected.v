// expect: tone gated
module chime_box #(parameter KIND = 2) (
    input  wire       clk, strike,
    input  wire [4:0] note,
    output reg  [4:0] tone,
    input  wire       test_en
);
    generate
        case (KIND)
            1: begin
                always @(posedge clk) tone <= note;
            end
            2: begin
                // stillclock: tone sleeps unless it is written
                wire wake_tone = strike;
                wire gclk_tone;
                stillclock_icg u_icg_tone (.clk(clk), .wake(wake_tone), .test(test_en), .gclk(gclk_tone));
                always @(posedge gclk_tone) if (strike) tone <= note;
            end
            default: begin
                always @(posedge clk) tone <= 5'd0;
            end
        endcase
    endgenerate
endmodule
