// expect: hull_q gated
// Both modules have a pin for it already: nothing is threaded.
module boat_hull (input logic clk, tm, tar, input logic [4:0] d, output logic [4:0] hull_q);
    // stillclock: hull_q sleeps unless it is written
    wire wake_hull_q = tar;
    wire gclk_hull_q;
    stillclock_icg u_icg_hull_q (.clk(clk), .wake(wake_hull_q), .test(tm), .gclk(gclk_hull_q));
    always_ff @(posedge gclk_hull_q) if (tar) hull_q <= d;
endmodule
module boat_yard (input logic clk, mode, tar, input logic [4:0] d, output logic [4:0] hull_q);
    boat_hull u_hull (.clk(clk), .tm(mode), .tar(tar), .d(d), .hull_q(hull_q));
endmodule
