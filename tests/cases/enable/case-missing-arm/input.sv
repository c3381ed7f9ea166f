// expect: angle gated
// Two codes move the vane; the third is missing from the case and holds.
module wind_vane (
    input  logic       clk,
    input  logic [1:0] turn,
    output logic [8:0] angle
);
    always_ff @(posedge clk)
        case (turn)
            2'd1: angle <= angle + 9'd1;
            2'd2: angle <= angle - 9'd1;
        endcase
endmodule
