// expect: coach refused clock-unclear
// Two edges, and no branch says which is the reset.
module stage_coach (clk_a, clk_b, board, rider, coach);
    input            clk_a, clk_b, board;
    input      [7:0] rider;
    output reg [7:0] coach;
    always @(posedge clk_a or posedge clk_b)
        if (board) coach <= rider;
endmodule
