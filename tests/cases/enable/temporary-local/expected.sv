// expect: crest gated
// The condition reads a temporary of the block: the copy computes it again.
module wave_crest (
    input  logic        clk, rst_n,
    input  logic [7:0]  near, far,
    input  logic        calm,
    output logic [8:0]  crest,
    input  wire         test_en
);
    // stillclock: crest sleeps unless it is written; the branches are those of its block
    logic wake_crest;
    always_comb begin : wake_crest_branches
        logic [8:0] sum_t;
        wake_crest = 1'b0;
        sum_t = {1'b0, near} + {1'b0, far};
        if (calm) sum_t = sum_t >> 1;
        if (sum_t > crest) wake_crest = 1'b1;
    end
    wire gclk_crest;
    stillclock_icg u_icg_crest (.clk(clk), .wake(wake_crest), .test(test_en), .gclk(gclk_crest));
    always_ff @(posedge gclk_crest or negedge rst_n)
        if (!rst_n) crest <= '0;
        else begin : peak
            logic [8:0] sum;
            sum = {1'b0, near} + {1'b0, far};
            if (calm) sum = sum >> 1;
            if (sum > crest) crest <= sum;
        end
endmodule
