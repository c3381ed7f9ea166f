// expect: bin[0] gated
// expect: bin[1] gated
module grain_bins (
    input  logic            clk,
    input  logic            pour, drain,
    input  logic [4:0]      grain,
    output logic [2:0][4:0] bin,
    input  wire             test_en
);
    // stillclock: bin sleeps unless it is written
    wire wake_bin = pour;
    wire gclk_bin;
    stillclock_icg u_icg_bin (.clk(clk), .wake(wake_bin), .test(test_en), .gclk(gclk_bin));
    always_ff @(posedge gclk_bin)
        if (pour) begin
            bin[0] <= grain;
            bin[2] <= bin[0];
        end
    // stillclock: bin sleeps unless it is written
    wire wake_bin_2 = !pour && drain;
    wire gclk_bin_2;
    stillclock_icg u_icg_bin_2 (.clk(clk), .wake(wake_bin_2), .test(test_en), .gclk(gclk_bin_2));
    always_ff @(posedge gclk_bin_2)
        if (pour) ; else if (drain) bin[1] <= '0;
endmodule
