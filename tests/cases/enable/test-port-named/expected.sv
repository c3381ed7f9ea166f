// expect: seal_q gated
module seal_rock (input logic clk, bask, input logic [4:0] d, output logic [4:0] seal_q, input wire dft_mode);
    // stillclock: seal_q sleeps unless it is written
    wire wake_seal_q = bask;
    wire gclk_seal_q;
    stillclock_icg u_icg_seal_q (.clk(clk), .wake(wake_seal_q), .test(dft_mode), .gclk(gclk_seal_q));
    always_ff @(posedge gclk_seal_q) if (bask) seal_q <= d;
endmodule
