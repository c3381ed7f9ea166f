// expect: bell_q gated
// Selector and labels of different widths and signs: the comparison takes the widest of them all.
module carillon (
    input  logic              clk,
    input  logic [1:0]        pull,
    input  logic              loud,
    input  logic [5:0]        tone,
    output logic [5:0]        bell_q
);
    always_ff @(posedge clk)
        case (pull + loud)
            3'd4: bell_q <= tone;      // reached only because the sum keeps its carry
            1'b1: bell_q <= ~tone;
            2:    if (tone[0]) bell_q <= '0;
        endcase
endmodule
