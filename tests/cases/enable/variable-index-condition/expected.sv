// expect: mast gated
// An enable picked by a variable index out of a vector: the original holds where the index is out of range.
module mast_head (
    input  logic       clk,
    input  logic [4:0] sel,
    input  logic [2:0] pick,
    input  logic [7:0] wind,
    output logic [7:0] mast,
    input  wire        test_en
);
    // stillclock: mast sleeps unless it is written
    wire wake_mast = sel[pick];
    wire gclk_mast;
    stillclock_icg u_icg_mast (.clk(clk), .wake(wake_mast), .test(test_en), .gclk(gclk_mast));
    always_ff @(posedge gclk_mast) if (sel[pick]) mast <= wind;
endmodule
