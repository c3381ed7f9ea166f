// expect: shown_q gated
// A module without source stands beside the bank, and feeds its condition: fine, its outputs are free.
module fog_bank (input logic clk, input logic go, input logic [7:0] d, output logic [7:0] shown_q, input wire test_en);
    wire ready;
    unknown_sensor u_sensor (.clk(clk), .ready(ready));
    // stillclock: shown_q sleeps unless it is written
    wire wake_shown_q = go && ready;
    wire gclk_shown_q;
    stillclock_icg u_icg_shown_q (.clk(clk), .wake(wake_shown_q), .test(test_en), .gclk(gclk_shown_q));
    always_ff @(posedge gclk_shown_q) if (go && ready) shown_q <= d;
endmodule
