// expect: blend gated
// The temporary decides what is written, not whether: the wake condition does not need it.
module paint_mixer (
    input  logic       clk,
    input  logic       pour,
    input  logic [7:0] red, blue,
    output logic [7:0] blend
);
    logic [8:0] both;
    always_ff @(posedge clk) begin
        both = red + blue;
        if (pour) blend <= both[8:1];
    end
endmodule
