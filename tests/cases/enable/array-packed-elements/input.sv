// expect: bin[0] gated
// expect: bin[1] gated
module grain_bins (
    input  logic            clk,
    input  logic            pour, drain,
    input  logic [4:0]      grain,
    output logic [2:0][4:0] bin
);
    always_ff @(posedge clk)
        if (pour) begin
            bin[0] <= grain;
            bin[2] <= bin[0];
        end else if (drain) bin[1] <= '0;
endmodule
