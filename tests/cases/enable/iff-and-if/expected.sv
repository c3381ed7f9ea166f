// expect: pace gated
module pace_log (
    input  logic       clk,
    input  logic       walking, mark,
    input  logic [1:0] mood,
    input  logic [7:0] step,
    output logic [7:0] pace,
    input  wire        test_en
);
    // stillclock: pace sleeps unless it is written
    wire wake_pace = (walking || mood != 0) && mark;
    wire gclk_pace;
    stillclock_icg u_icg_pace (.clk(clk), .wake(wake_pace), .test(test_en), .gclk(gclk_pace));
    always_ff @(posedge gclk_pace iff (walking || mood != 0))
        if (mark) pace <= step;
endmodule
