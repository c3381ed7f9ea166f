// expect: left_oar gated
// expect: right_oar gated
// expect: drum left never-holds
// Comments, one-line statements and registers of several banks on one line.
module galley (
    input  logic       clk, rst,
    input  logic       pull_left, pull_right, turn,
    input  logic [4:0] power,
    output logic [4:0] left_oar, right_oar, drum
);
    always_ff @(posedge clk) begin : rowing   // the whole crew
        drum <= drum + 5'd1; if (pull_left) left_oar <= power; if (pull_right) right_oar <= power;
        /* turning needs both */ if (turn) begin left_oar <= power; right_oar <= ~power; drum <= 5'd0; end
        if (rst) begin left_oar <= '0; right_oar <= '0; end // reset wins
    end : rowing
endmodule
