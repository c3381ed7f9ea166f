// expect: bell_q gated
// Selector and labels of different widths and signs: the comparison takes the widest of them all.
module carillon (
    input  logic              clk,
    input  logic [1:0]        pull,
    input  logic              loud,
    input  logic [5:0]        tone,
    output logic [5:0]        bell_q,
    input  wire               test_en
);
    // stillclock: bell_q sleeps unless it is written; the branches are those of its block
    logic wake_bell_q;
    always_comb begin
        wake_bell_q = 1'b0;
        case (pull + loud)
            3'd4: wake_bell_q = 1'b1;
            1'b1: wake_bell_q = 1'b1;
            2: if (tone[0]) wake_bell_q = 1'b1;
            default: ;
        endcase
    end
    wire gclk_bell_q;
    stillclock_icg u_icg_bell_q (.clk(clk), .wake(wake_bell_q), .test(test_en), .gclk(gclk_bell_q));
    always_ff @(posedge gclk_bell_q)
        case (pull + loud)
            3'd4: bell_q <= tone;      // reached only because the sum keeps its carry
            1'b1: bell_q <= ~tone;
            2:    if (tone[0]) bell_q <= '0;
        endcase
endmodule
