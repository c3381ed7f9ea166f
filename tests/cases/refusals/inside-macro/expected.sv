// expect: ledger refused inside-macro
// expect: page gated
`define LEDGER(q, en, d) always_ff @(posedge clk) if (en) q <= d;
module counting_house (
    input  logic       clk,
    input  logic       post, turn,
    input  logic [7:0] entry,
    output logic [7:0] ledger, page,
    input  wire        test_en
);
    `LEDGER(ledger, post, entry)
    // stillclock: page sleeps unless it is written
    wire wake_page = turn;
    wire gclk_page;
    stillclock_icg u_icg_page (.clk(clk), .wake(wake_page), .test(test_en), .gclk(gclk_page));
    always_ff @(posedge gclk_page) if (turn) page <= entry;
endmodule
