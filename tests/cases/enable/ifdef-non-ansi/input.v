// expect: cask gated
module wine_cellar (clk, tap, litres
`ifdef LABELLED
    , year
`endif
    , cask);
    input        clk, tap;
    input  [7:0] litres;
`ifdef LABELLED
    input [10:0] year;
`endif
    output [7:0] cask;
    reg    [7:0] cask;
    always @(posedge clk) if (tap) cask <= litres;
endmodule
