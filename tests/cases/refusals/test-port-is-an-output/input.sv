// expect: pail_q gated
// The name of the test port is taken by an output: another name is found.
module well_pail (input logic clk, input logic dip, input logic [7:0] water, output logic [7:0] pail_q, output logic test_en);
    assign test_en = ^pail_q;
    always_ff @(posedge clk) if (dip) pail_q <= water;
endmodule
