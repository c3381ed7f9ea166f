// expect: trough gated
// The condition reads a temporary of the block: the copy computes it again.
module wave_trough (
    input  logic        clk, rst_n,
    input  logic [7:0]  near, far,
    input  logic        calm,
    output logic [8:0]  trough,
    input  wire         test_en
);
    // stillclock: trough sleeps unless it is written; the branches are those of its block
    logic wake_trough;
    always_comb begin : wake_trough_branches
        logic [8:0] sum_t;
        wake_trough = 1'b0;
        sum_t = {1'b0, near} + {1'b0, far};
        if (calm) sum_t = sum_t >> 1;
        if (sum_t < trough) wake_trough = 1'b1;
    end
    wire gclk_trough;
    stillclock_icg u_icg_trough (.clk(clk), .wake(wake_trough), .test(test_en), .gclk(gclk_trough));
    always_ff @(posedge gclk_trough or negedge rst_n)
        if (!rst_n) trough <= '0;
        else begin : peak
            automatic logic [8:0] sum;
            sum = {1'b0, near} + {1'b0, far};
            if (calm) sum = sum >> 1;
            if (sum < trough) trough <= sum;
        end
endmodule
