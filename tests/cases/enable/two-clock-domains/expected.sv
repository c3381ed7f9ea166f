// expect: sent gated
// expect: heard gated
module lighthouse_link (
    input  logic       clk_a, clk_b, rst_n,
    input  logic       send, hear,
    input  logic [7:0] words, beam,
    output logic [7:0] sent, heard,
    input  wire        test_en
);
    // stillclock: sent sleeps unless it is written
    wire wake_sent = send;
    wire gclk_sent;
    stillclock_icg u_icg_sent (.clk(clk_a), .wake(wake_sent), .test(test_en), .gclk(gclk_sent));
    always_ff @(posedge gclk_sent or negedge rst_n)
        if (!rst_n) sent <= '0;
        else if (send) sent <= words;
    // stillclock: heard sleeps unless it is written
    wire wake_heard = hear;
    wire gclk_heard;
    stillclock_icg u_icg_heard (.clk(clk_b), .wake(wake_heard), .test(test_en), .gclk(gclk_heard));
    always_ff @(posedge gclk_heard or negedge rst_n)
        if (!rst_n) heard <= '0;
        else if (hear) heard <= beam;
endmodule
