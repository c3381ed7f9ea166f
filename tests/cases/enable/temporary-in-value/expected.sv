// expect: blend gated
// The temporary decides what is written, not whether: the wake condition does not need it.
module paint_mixer (
    input  logic       clk,
    input  logic       pour,
    input  logic [7:0] red, blue,
    output logic [7:0] blend,
    input  wire        test_en
);
    logic [8:0] both;
    // stillclock: blend sleeps unless it is written
    wire wake_blend = pour;
    wire gclk_blend;
    stillclock_icg u_icg_blend (.clk(clk), .wake(wake_blend), .test(test_en), .gclk(gclk_blend));
    always_ff @(posedge gclk_blend) begin
        both = red + blue;
        if (pour) blend <= both[8:1];
    end
endmodule
