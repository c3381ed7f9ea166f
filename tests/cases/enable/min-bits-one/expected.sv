// expect: a gated
// expect: b gated
module two_flags (input logic clk, rst_n, set_a, set_b, d, output logic a, b, input wire test_en);
    // stillclock: a sleeps unless it is written
    wire wake_a = set_a;
    wire gclk_a;
    stillclock_icg u_icg_a (.clk(clk), .wake(wake_a), .test(test_en), .gclk(gclk_a));
    always_ff @(posedge gclk_a or negedge rst_n)
        if (!rst_n) begin a <= 1'b0; end
        else begin
            if (set_a) a <= d;
        end
    // stillclock: b sleeps unless it is written
    wire wake_b = set_b;
    wire gclk_b;
    stillclock_icg u_icg_b (.clk(clk), .wake(wake_b), .test(test_en), .gclk(gclk_b));
    always_ff @(posedge gclk_b or negedge rst_n)
        if (!rst_n) begin b <= 1'b1; end
        else begin
            if (set_b) b <= ~d;
        end
endmodule
