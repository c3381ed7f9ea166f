// expect: either gated
// expect: both gated
// expect: picked gated
// expect: masked gated
// Operators that bind more loosely than `!=` and `&&`.
module orchestra_pit (
    input  logic       clk, rst,
    input  logic [2:0] strings, brass,
    input  logic       tutti,
    input  logic [6:0] bar,
    output logic [6:0] either, both, picked, masked
);
    always_ff @(posedge clk) if (rst) either <= '0; else if (strings | brass) either <= bar;
    always_ff @(posedge clk) if (rst) both <= '0; else if (strings & brass) both <= bar;
    always_ff @(posedge clk) if (rst) picked <= '0; else if (tutti ? strings : brass) picked <= bar;
    always_ff @(posedge clk) if (!rst) if (strings ^ brass) begin if (!(tutti || brass == 3'd0)) masked <= bar; end
endmodule
