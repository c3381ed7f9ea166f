// expect: brew gated
// The reset writes the whole word, the enables its halves: one register that wakes for both.
module tea_urn (
    input  logic        clk, rst,
    input  logic        fill, steep,
    input  logic [7:0]  leaves,
    output logic [15:0] brew,
    input  wire         test_en
);
    // stillclock: brew sleeps unless it is written
    wire wake_brew = rst || fill || steep;
    wire gclk_brew;
    stillclock_icg u_icg_brew (.clk(clk), .wake(wake_brew), .test(test_en), .gclk(gclk_brew));
    always_ff @(posedge gclk_brew)
        if (rst) brew <= '0;
        else begin
            if (fill)  brew[7:0]  <= leaves;
            if (steep) brew[15:8] <= leaves;
        end
endmodule
