// expect: crest gated
// The condition reads a temporary of the block: the copy computes it again.
module wave_crest (
    input  logic        clk, rst_n,
    input  logic [7:0]  near, far,
    input  logic        calm,
    output logic [8:0]  crest
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) crest <= '0;
        else begin : peak
            logic [8:0] sum;
            sum = {1'b0, near} + {1'b0, far};
            if (calm) sum = sum >> 1;
            if (sum > crest) crest <= sum;
        end
endmodule
