// expect: ledger refused inside-macro
// expect: page gated
`define LEDGER(q, en, d) always_ff @(posedge clk) if (en) q <= d;
module counting_house (
    input  logic       clk,
    input  logic       post, turn,
    input  logic [7:0] entry,
    output logic [7:0] ledger, page
);
    `LEDGER(ledger, post, entry)
    always_ff @(posedge clk) if (turn) page <= entry;
endmodule
