// expect: end_q gated
// No line end at the end, and everything on one line.
module line_end (input logic clk, go, input logic [3:0] d, output logic [3:0] end_q, input wire test_en); // stillclock: end_q sleeps unless it is written
wire wake_end_q = go;
wire gclk_end_q;
stillclock_icg u_icg_end_q (.clk(clk), .wake(wake_end_q), .test(test_en), .gclk(gclk_end_q));
always_ff @(posedge gclk_end_q) if (go) end_q <= d; endmodule