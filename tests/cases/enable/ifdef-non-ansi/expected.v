// expect: cask gated
module wine_cellar (test_en, clk, tap, litres
`ifdef LABELLED
    , year
`endif
    , cask);
    input wire test_en;
    input        clk, tap;
    input  [7:0] litres;
`ifdef LABELLED
    input [10:0] year;
`endif
    output [7:0] cask;
    reg    [7:0] cask;
    // stillclock: cask sleeps unless it is written
    wire wake_cask = tap;
    wire gclk_cask;
    stillclock_icg u_icg_cask (.clk(clk), .wake(wake_cask), .test(test_en), .gclk(gclk_cask));
    always @(posedge gclk_cask) if (tap) cask <= litres;
endmodule
