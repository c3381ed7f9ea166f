// expect: behind_q refused
// A gating cell of someone else: its output is a clock that the bank runs on; the wake condition is of the ungated clock.
module foreign_icg (clk, en, gclk);
    input  clk, en;
    output gclk;
    reg    en_l;
    always @* if (!clk) en_l = en;
    assign gclk = clk & en_l;
endmodule
module behind_gate (clk, on, go, d, behind_q);
    input            clk, on, go;
    input      [7:0] d;
    output reg [7:0] behind_q;
    wire             gclk;
    reg              go_q;
    foreign_icg u_icg (.clk(clk), .en(on), .gclk(gclk));
    always @(posedge clk) go_q <= go;
    always @(posedge gclk) if (go_q) behind_q <= d;
endmodule
