// expect: pace gated
module pace_log (
    input  logic       clk,
    input  logic       walking, mark,
    input  logic [1:0] mood,
    input  logic [7:0] step,
    output logic [7:0] pace
);
    always_ff @(posedge clk iff (walking || mood != 0))
        if (mark) pace <= step;
endmodule
