// expect: pulse refused drives-clock
// The register is the clock of a child module.
module heart_cell (input logic clk, input logic [3:0] d, output logic [3:0] beat_q);
    always_ff @(posedge clk) beat_q <= d;
endmodule
module heart (
    input  logic       clk,
    input  logic       pump,
    input  logic [3:0] rate,
    output logic [3:0] pulse, beat_q
);
    always_ff @(posedge clk) if (pump) pulse <= rate;
    heart_cell u_cell (.clk(pulse[0]), .d(rate), .beat_q(beat_q));
endmodule
