// expect: oven gated
// expect: crumbs gated
module bread_oven (
    input  logic       clk, rst,
    input  logic       bake,
    input  logic [9:0] heat,
    output logic [9:0] oven,
    output logic [5:0] crumbs,
    input  wire        test_en
);
    // the reset is part of the condition
    // stillclock: oven sleeps unless it is written
    wire wake_oven = rst || bake;
    wire gclk_oven;
    stillclock_icg u_icg_oven (.clk(clk), .wake(wake_oven), .test(test_en), .gclk(gclk_oven));
    always_ff @(posedge gclk_oven)
        if (rst) oven <= '0;
        else if (bake) oven <= heat;
    // here the reset comes last, and wins
    // stillclock: crumbs sleeps unless it is written
    wire wake_crumbs = bake || rst;
    wire gclk_crumbs;
    stillclock_icg u_icg_crumbs (.clk(clk), .wake(wake_crumbs), .test(test_en), .gclk(gclk_crumbs));
    always_ff @(posedge gclk_crumbs) begin
        if (bake) crumbs <= crumbs + 6'd1;
        if (rst) crumbs <= '0;
    end
endmodule
