// expect: anchor left switched-off
// expect: chain gated
module windlass (
    input  logic       clk,
    input  logic       drop, heave,
    input  logic [7:0] fathoms,
    output logic [7:0] anchor, chain,
    input  wire        test_en
);
    always_ff @(posedge clk) if (drop) anchor <= fathoms;
    // stillclock: chain sleeps unless it is written
    wire wake_chain = heave;
    wire gclk_chain;
    stillclock_icg u_icg_chain (.clk(clk), .wake(wake_chain), .test(test_en), .gclk(gclk_chain));
    always_ff @(posedge gclk_chain) if (heave) chain <= fathoms;
endmodule
