// expect: bought_q refused library-file
// expect: own_q gated
module own_part (
    input  logic       clk, go,
    input  logic [7:0] d,
    output logic [7:0] bought, own_q,
    input  wire        test_en
);
    bought_part u_bought (.clk(clk), .go(go), .d(d), .bought_q(bought));
    // stillclock: own_q sleeps unless it is written
    wire wake_own_q = go;
    wire gclk_own_q;
    stillclock_icg u_icg_own_q (.clk(clk), .wake(wake_own_q), .test(test_en), .gclk(gclk_own_q));
    always_ff @(posedge gclk_own_q) if (go) own_q <= d;
endmodule
