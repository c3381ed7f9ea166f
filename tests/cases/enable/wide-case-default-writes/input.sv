// expect: tide_q gated
// Only the default writes: the holding arms must stay in the copy.
module harbour_gauge (
    input  logic       clk,
    input  logic [2:0] mode,
    input  logic [7:0] level,
    output logic [7:0] tide_q
);
    always_ff @(posedge clk)
        case (mode)
            3'd0, 3'd1: ;
            3'd4: tide_q <= tide_q;
            default: tide_q <= level;
        endcase
endmodule
