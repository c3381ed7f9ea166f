// expect: chosen gated
// Labels that are signals, may be equal, and are compared at the selector's width.
module dial_match (
    input  logic       clk,
    input  logic [3:0] dial, first, second,
    input  logic [7:0] prize,
    output logic [7:0] chosen
);
    always_ff @(posedge clk)
        case (dial)
            first:  ;
            second: chosen <= prize;
            4'd9:   chosen <= prize + 8'd1;
            default: ;
        endcase
endmodule
