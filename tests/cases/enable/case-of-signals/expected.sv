// expect: chosen gated
// Labels that are signals, may be equal, and are compared at the selector's width.
module dial_match (
    input  logic       clk,
    input  logic [3:0] dial, first, second,
    input  logic [7:0] prize,
    output logic [7:0] chosen,
    input  wire        test_en
);
    // stillclock: chosen sleeps unless it is written; the branches are those of its block
    logic wake_chosen;
    always_comb begin
        wake_chosen = 1'b0;
        case (dial)
            first: ;
            second: wake_chosen = 1'b1;
            4'd9: wake_chosen = 1'b1;
            default: ;
        endcase
    end
    wire gclk_chosen;
    stillclock_icg u_icg_chosen (.clk(clk), .wake(wake_chosen), .test(test_en), .gclk(gclk_chosen));
    always_ff @(posedge gclk_chosen)
        case (dial)
            first:  ;
            second: chosen <= prize;
            4'd9:   chosen <= prize + 8'd1;
            default: ;
        endcase
endmodule
