// expect: cup gated
module tea_cup (clk, pour, tea, cup, test_en);
    input wire test_en;
    input clk, pour;
    input [`CUP-1:0] tea;
    output reg [`CUP-1:0] cup;
`ifdef HOT
    // stillclock: cup sleeps unless it is written
    wire wake_cup = pour && tea[0];
    wire gclk_cup;
    stillclock_icg u_icg_cup (.clk(clk), .wake(wake_cup), .test(test_en), .gclk(gclk_cup));
    always @(posedge gclk_cup) if (pour && tea[0]) cup <= tea;
`else
    always @(posedge clk) cup <= tea;
`endif
endmodule
