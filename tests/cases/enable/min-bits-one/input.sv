// expect: a gated
// expect: b gated
module two_flags (input logic clk, rst_n, set_a, set_b, d, output logic a, b);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin a <= 1'b0; b <= 1'b1; end
        else begin
            if (set_a) a <= d;
            if (set_b) b <= ~d;
        end
endmodule
