// expect: sent gated
// expect: heard gated
module lighthouse_link (
    input  logic       clk_a, clk_b, rst_n,
    input  logic       send, hear,
    input  logic [7:0] words, beam,
    output logic [7:0] sent, heard
);
    always_ff @(posedge clk_a or negedge rst_n)
        if (!rst_n) sent <= '0;
        else if (send) sent <= words;
    always_ff @(posedge clk_b or negedge rst_n)
        if (!rst_n) heard <= '0;
        else if (hear) heard <= beam;
endmodule
