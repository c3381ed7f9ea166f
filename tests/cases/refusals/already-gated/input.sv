// expect: own_gate_q left already-gated
// A cell of ours stands in the source already.
module gated_before (input logic clk, input logic go, input logic [7:0] d, output logic [7:0] own_gate_q, input logic test_en);
    wire gclk_own;
    stillclock_icg u_icg_own (.clk(clk), .wake(go), .test(test_en), .gclk(gclk_own));
    always_ff @(posedge gclk_own) if (go) own_gate_q <= d;
endmodule
