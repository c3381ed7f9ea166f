// expect: \ink+pen  gated
module \scribe.desk (
    input  logic       clk,
    input  logic       \dip! ,
    input  logic [7:0] \colour[0] ,
    output logic [7:0] shown,
    input  wire        test_en
);
    logic [7:0] \ink+pen ;
    assign shown = \ink+pen ;
    // stillclock: ink_pen sleeps unless it is written
    wire wake_ink_pen = \dip! ;
    wire gclk_ink_pen;
    stillclock_icg u_icg_ink_pen (.clk(clk), .wake(wake_ink_pen), .test(test_en), .gclk(gclk_ink_pen));
    always_ff @(posedge gclk_ink_pen)
        if (\dip! ) \ink+pen <= \colour[0] ;
endmodule
module scriptorium (
    input  logic       clk, dip,
    input  logic [7:0] colour,
    output logic [7:0] shown,
    input  wire        test_en
);
    \scribe.desk \u.desk (.test_en(test_en), .clk(clk), .\dip! (dip), .\colour[0] (colour), .shown(shown));
endmodule
