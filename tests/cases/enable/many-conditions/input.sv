// expect: score gated
// More branches than a person would read in one expression.
module archery (
    input  logic       clk, rst_n,
    input  logic       bull, inner, magpie, outer, miss, bonus, wind, late, foul,
    input  logic [9:0] hit,
    output logic [9:0] score
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) score <= '0;
        else if (foul) score <= score;
        else if (bull) score <= score + 10'd10;
        else if (inner) begin if (!wind) score <= score + 10'd8; end
        else if (magpie) begin if (!late) score <= score + 10'd6; end
        else if (outer) score <= score + hit;
        else if (miss) begin if (bonus) score <= score + 10'd1; end
        else if (late && wind) score <= '0;
endmodule
