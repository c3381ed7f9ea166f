// expect: chord gated
`default_nettype none
module organ_stop (
    input  wire       clk, pull,
    input  wire [6:0] pipe,
    output reg  [6:0] chord
);
    wire air;
    assign air = pull & ~pipe[0];
    always @(posedge clk) if (air) chord <= pipe;
endmodule
module organ (clk, pull, pipe, chord);
    input wire clk, pull;
    input wire [6:0] pipe;
    output wire [6:0] chord;
    organ_stop stop_1 (.clk(clk), .pull(pull), .pipe(pipe), .chord(chord));
endmodule
`default_nettype wire
