// expect: angle gated
// Two codes move the vane; the third is missing from the case and holds.
module wind_vane (
    input  logic       clk,
    input  logic [1:0] turn,
    output logic [8:0] angle,
    input  wire        test_en
);
    // stillclock: angle sleeps unless it is written; the branches are those of its block
    logic wake_angle;
    always_comb begin
        wake_angle = 1'b0;
        case (turn)
            2'd1: wake_angle = 1'b1;
            2'd2: wake_angle = 1'b1;
            default: ;
        endcase
    end
    wire gclk_angle;
    stillclock_icg u_icg_angle (.clk(clk), .wake(wake_angle), .test(test_en), .gclk(gclk_angle));
    always_ff @(posedge gclk_angle)
        case (turn)
            2'd1: angle <= angle + 9'd1;
            2'd2: angle <= angle - 9'd1;
        endcase
endmodule
