// expect: pail_q gated
// The name of the test port is taken by an output: another name is found.
module well_pail (input logic clk, input logic dip, input logic [7:0] water, output logic [7:0] pail_q, output logic test_en, input wire test_en_2);
    assign test_en = ^pail_q;
    // stillclock: pail_q sleeps unless it is written
    wire wake_pail_q = dip;
    wire gclk_pail_q;
    stillclock_icg u_icg_pail_q (.clk(clk), .wake(wake_pail_q), .test(test_en_2), .gclk(gclk_pail_q));
    always_ff @(posedge gclk_pail_q) if (dip) pail_q <= water;
endmodule
