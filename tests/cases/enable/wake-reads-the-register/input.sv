// expect: remaining gated
// expect: best gated
module egg_timer (
    input  logic       clk, rst_n,
    input  logic       wind, pause,
    input  logic [9:0] minutes,
    output logic [9:0] remaining, best
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) remaining <= '0;
        else if (wind) remaining <= minutes;
        else if (remaining != 0 && !pause) remaining <= remaining - 10'd1;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) best <= '0;
        else if (remaining > best) best <= remaining;
endmodule
