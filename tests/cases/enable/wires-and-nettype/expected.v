// expect: chord gated
`default_nettype none
module organ_stop (
    input  wire       clk, pull,
    input  wire [6:0] pipe,
    output reg  [6:0] chord,
    input  wire       test_en
);
    wire air;
    assign air = pull & ~pipe[0];
    // stillclock: chord sleeps unless it is written
    wire wake_chord = air;
    wire gclk_chord;
    stillclock_icg u_icg_chord (.clk(clk), .wake(wake_chord), .test(test_en), .gclk(gclk_chord));
    always @(posedge gclk_chord) if (air) chord <= pipe;
endmodule
module organ (clk, pull, pipe, chord, test_en);
    input wire test_en;
    input wire clk, pull;
    input wire [6:0] pipe;
    output wire [6:0] chord;
    organ_stop stop_1 (.test_en(test_en), .clk(clk), .pull(pull), .pipe(pipe), .chord(chord));
endmodule
`default_nettype wire
