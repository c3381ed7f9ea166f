// expect: mast gated
module radio_mast (
    input  logic       clk, rst,
    input  logic       hoist,
    input  logic [6:0] height,
    output logic [6:0] mast,
    input  wire        test_en
);
    // stillclock: mast sleeps unless it is written
    wire wake_mast = hoist;
    wire gclk_mast;
    stillclock_icg u_icg_mast (.clk(clk), .wake(wake_mast), .test(test_en), .gclk(gclk_mast));
    always_ff @(posedge gclk_mast, posedge rst)
        if (rst) mast <= 7'h55;
        else if (hoist) mast <= height;
endmodule
