// expect: shown_q gated
// A module without source stands beside the bank, and feeds its condition: fine, its outputs are free.
module fog_bank (input logic clk, input logic go, input logic [7:0] d, output logic [7:0] shown_q);
    wire ready;
    unknown_sensor u_sensor (.clk(clk), .ready(ready));
    always_ff @(posedge clk) if (go && ready) shown_q <= d;
endmodule
