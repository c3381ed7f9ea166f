// expect: tare gated
// expect: gross gated
// expect: crossed left never-holds
module market_scale (
    input  logic        clk, rst_n,
    input  logic        zero, weigh, invert,
    input  logic [13:0] cell_out,
    output logic [13:0] tare, gross,
    output logic [13:0] crossed,
    input  wire         test_en
);
    // stillclock: tare sleeps unless it is written
    wire wake_tare = zero;
    wire gclk_tare;
    stillclock_icg u_icg_tare (.clk(clk), .wake(wake_tare), .test(test_en), .gclk(gclk_tare));
    always_ff @(posedge gclk_tare or negedge rst_n)
        if (!rst_n) tare <= '0;
        else tare <= zero ? cell_out : tare;

    // stillclock: gross sleeps unless it is written
    wire wake_gross = zero || weigh;
    wire gclk_gross;
    stillclock_icg u_icg_gross (.clk(clk), .wake(wake_gross), .test(test_en), .gclk(gclk_gross));
    always_ff @(posedge gclk_gross)
        gross <= zero ? 14'd0 : !weigh ? gross : invert ? ~cell_out : cell_out - tare;

    // holds another register, not itself
    always_ff @(posedge clk)
        crossed <= zero ? cell_out : gross;
endmodule
