// expect: \ink+pen  gated
module \scribe.desk (
    input  logic       clk,
    input  logic       \dip! ,
    input  logic [7:0] \colour[0] ,
    output logic [7:0] shown
);
    logic [7:0] \ink+pen ;
    assign shown = \ink+pen ;
    always_ff @(posedge clk)
        if (\dip! ) \ink+pen <= \colour[0] ;
endmodule
module scriptorium (
    input  logic       clk, dip,
    input  logic [7:0] colour,
    output logic [7:0] shown
);
    \scribe.desk \u.desk (.clk(clk), .\dip! (dip), .\colour[0] (colour), .shown(shown));
endmodule
