// expect: odd gated
module card_dealer (clk, deal, swap, card, even, odd);
    input            clk, deal, swap;
    input      [3:0] card;
    output reg [3:0] even, odd;
    always @(posedge clk) begin
        if (deal) even <= card;
        if (swap) {even, odd} <= {odd, even};
    end
endmodule
