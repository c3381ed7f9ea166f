// expect: low_q refused no-falling-cell
// expect: high_q gated
module two_edges (input logic clk, input logic go, input logic [7:0] d, output logic [7:0] low_q, high_q, input wire test_en);
    always_ff @(negedge clk) if (go) low_q <= d;
    // stillclock: high_q sleeps unless it is written
    wire wake_high_q = go;
    wire gclk_high_q;
    stillclock_icg u_icg_high_q (.clk(clk), .wake(wake_high_q), .test(test_en), .gclk(gclk_high_q));
    always_ff @(posedge gclk_high_q) if (go) high_q <= d;
endmodule
