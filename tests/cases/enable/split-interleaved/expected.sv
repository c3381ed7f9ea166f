// expect: left_oar gated
// expect: right_oar gated
// expect: drum left never-holds
// Comments, one-line statements and registers of several banks on one line.
module galley (
    input  logic       clk, rst,
    input  logic       pull_left, pull_right, turn,
    input  logic [4:0] power,
    output logic [4:0] left_oar, right_oar, drum,
    input  wire        test_en
);
    always_ff @(posedge clk) begin : rowing   // the whole crew
        drum <= drum + 5'd1;
        /* turning needs both */ if (turn) begin drum <= 5'd0; end
    end : rowing
    // stillclock: left_oar sleeps unless it is written
    wire wake_left_oar = pull_left || turn || rst;
    wire gclk_left_oar;
    stillclock_icg u_icg_left_oar (.clk(clk), .wake(wake_left_oar), .test(test_en), .gclk(gclk_left_oar));
    always_ff @(posedge gclk_left_oar) begin   // the whole crew
        if (pull_left) left_oar <= power;
        /* turning needs both */ if (turn) begin left_oar <= power; end
        if (rst) begin left_oar <= '0; end // reset wins
    end
    // stillclock: right_oar sleeps unless it is written
    wire wake_right_oar = pull_right || turn || rst;
    wire gclk_right_oar;
    stillclock_icg u_icg_right_oar (.clk(clk), .wake(wake_right_oar), .test(test_en), .gclk(gclk_right_oar));
    always_ff @(posedge gclk_right_oar) begin   // the whole crew
        if (pull_right) right_oar <= power;
        /* turning needs both */ if (turn) begin right_oar <= ~power; end
        if (rst) begin right_oar <= '0; end // reset wins
    end
endmodule
