// expect: final gated
// Verilog identifiers that are keywords of SystemVerilog stay what they are.
module museum_case (clk, do, unique, final, test_en);
    input wire test_en;
    input            clk, do;
    input      [5:0] unique;
    output reg [5:0] final;
    // stillclock: final sleeps unless it is written
    wire wake_final = do;
    wire gclk_final;
    stillclock_icg u_icg_final (.clk(clk), .wake(wake_final), .test(test_en), .gclk(gclk_final));
    always @(posedge gclk_final) if (do) final <= unique;
endmodule
