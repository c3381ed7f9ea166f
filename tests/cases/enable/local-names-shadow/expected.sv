// expect: yarn gated
// A block-local name hides a port of the module: the wake condition must not read the port in its place.
module loom (
    input  logic       clk, rst_n,
    input  logic       pick,
    input  logic [5:0] thread,
    output logic [5:0] yarn,
    input  wire        test_en
);
    // stillclock: yarn sleeps unless it is written; the branches are those of its block
    logic wake_yarn;
    always_comb begin : wake_yarn_branches
        logic pick_t;
        wake_yarn = 1'b0;
        pick_t = thread[0] & ~thread[5];
        if (pick_t) wake_yarn = 1'b1;
    end
    wire gclk_yarn;
    stillclock_icg u_icg_yarn (.clk(clk), .wake(wake_yarn), .test(test_en), .gclk(gclk_yarn));
    always_ff @(posedge gclk_yarn or negedge rst_n)
        if (!rst_n) yarn <= '0;
        else begin : weave
            logic pick;
            pick = thread[0] & ~thread[5];
            if (pick) yarn <= thread;
        end
endmodule
