// expect: mark_q gated
// A byte order mark at the start of the file.
module mark_file (input logic clk, go, input logic [3:0] d, output logic [3:0] mark_q, input wire test_en);
    // stillclock: mark_q sleeps unless it is written
    wire wake_mark_q = go;
    wire gclk_mark_q;
    stillclock_icg u_icg_mark_q (.clk(clk), .wake(wake_mark_q), .test(test_en), .gclk(gclk_mark_q));
    always_ff @(posedge gclk_mark_q) if (go) mark_q <= d;
endmodule
