// expect: nest gated
// The clock is data for somebody else; the bank's condition has nothing to do with it.
module bird_nest (
    input  logic       clk,
    input  logic       lay,
    input  logic [7:0] egg,
    output logic [7:0] nest,
    output logic       shown,
    input  wire        test_en
);
    assign shown = clk & egg[0];
    // stillclock: nest sleeps unless it is written
    wire wake_nest = lay;
    wire gclk_nest;
    stillclock_icg u_icg_nest (.clk(clk), .wake(wake_nest), .test(test_en), .gclk(gclk_nest));
    always_ff @(posedge gclk_nest) if (lay) nest <= egg;
endmodule
