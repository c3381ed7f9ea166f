// expect: gong gated
// The wake condition reads the bank's own asynchronous reset as data: it is stable whenever the clock runs.
module temple_gong (
    input  logic       clk, rst_n,
    input  logic       strike,
    input  logic [7:0] tone,
    output logic [7:0] gong
);
    wire ready = strike & rst_n;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) gong <= '0;
        else if (ready) gong <= tone;
endmodule
