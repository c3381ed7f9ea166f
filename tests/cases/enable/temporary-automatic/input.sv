// expect: trough gated
// The condition reads a temporary of the block: the copy computes it again.
module wave_trough (
    input  logic        clk, rst_n,
    input  logic [7:0]  near, far,
    input  logic        calm,
    output logic [8:0]  trough
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) trough <= '0;
        else begin : peak
            automatic logic [8:0] sum;
            sum = {1'b0, near} + {1'b0, far};
            if (calm) sum = sum >> 1;
            if (sum < trough) trough <= sum;
        end
endmodule
