// expect: odd gated
module card_dealer (clk, deal, swap, card, even, odd, test_en);
    input wire test_en;
    input            clk, deal, swap;
    input      [3:0] card;
    output reg [3:0] even, odd;
    // stillclock: even sleeps unless it is written
    wire wake_even = deal || swap;
    wire gclk_even;
    stillclock_icg u_icg_even (.clk(clk), .wake(wake_even), .test(test_en), .gclk(gclk_even));
    always @(posedge gclk_even) begin
        if (deal) even <= card;
        if (swap) {even, odd} <= {odd, even};
    end
endmodule
