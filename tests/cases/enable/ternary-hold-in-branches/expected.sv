// expect: wicket gated
// A ternary hold below a case: an unknown `lift` corrupts the original, so the copy must pass it on.
module sheep_wicket (
    input  logic       clk, rst,
    input  logic [1:0] herd,
    input  logic       lift,
    input  logic [5:0] ewes,
    output logic [5:0] wicket,
    input  wire        test_en
);
    // stillclock: wicket sleeps unless it is written; the branches are those of its block
    logic wake_wicket;
    always_comb begin
        wake_wicket = 1'b0;
        if (rst) wake_wicket = 1'b1;
        else case (herd)
            2'd0: wake_wicket = lift;
            2'd1: wake_wicket = !lift;
            default: ;
        endcase
    end
    wire gclk_wicket;
    stillclock_icg u_icg_wicket (.clk(clk), .wake(wake_wicket), .test(test_en), .gclk(gclk_wicket));
    always_ff @(posedge gclk_wicket)
        if (rst) wicket <= '0;
        else case (herd)
            2'd0: wicket <= lift ? ewes : wicket;
            2'd1: wicket <= lift ? wicket : ~ewes;
            default: ;
        endcase
endmodule
