// expect: wicket gated
// A ternary hold below a case: an unknown `lift` corrupts the original, so the copy must pass it on.
module sheep_wicket (
    input  logic       clk, rst,
    input  logic [1:0] herd,
    input  logic       lift,
    input  logic [5:0] ewes,
    output logic [5:0] wicket
);
    always_ff @(posedge clk)
        if (rst) wicket <= '0;
        else case (herd)
            2'd0: wicket <= lift ? ewes : wicket;
            2'd1: wicket <= lift ? wicket : ~ewes;
            default: ;
        endcase
endmodule
