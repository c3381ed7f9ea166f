// expect: yarn gated
// A block-local name hides a port of the module: the wake condition must not read the port in its place.
module loom (
    input  logic       clk, rst_n,
    input  logic       pick,
    input  logic [5:0] thread,
    output logic [5:0] yarn
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) yarn <= '0;
        else begin : weave
            logic pick;
            pick = thread[0] & ~thread[5];
            if (pick) yarn <= thread;
        end
endmodule
