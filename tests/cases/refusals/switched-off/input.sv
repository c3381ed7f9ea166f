// expect: anchor left switched-off
// expect: chain gated
module windlass (
    input  logic       clk,
    input  logic       drop, heave,
    input  logic [7:0] fathoms,
    output logic [7:0] anchor, chain
);
    always_ff @(posedge clk) if (drop) anchor <= fathoms;
    always_ff @(posedge clk) if (heave) chain <= fathoms;
endmodule
