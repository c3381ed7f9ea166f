// expect: roof[5:0] gated
// The ranges overlap: one register.
module roof_tiles (
    input  logic       clk,
    input  logic       east, west,
    input  logic [5:0] tile,
    output logic [7:0] roof,
    input  wire        test_en
);
    // stillclock: roof sleeps unless it is written
    wire wake_roof = east || west;
    wire gclk_roof;
    stillclock_icg u_icg_roof (.clk(clk), .wake(wake_roof), .test(test_en), .gclk(gclk_roof));
    always_ff @(posedge gclk_roof) begin
        if (east) roof[5:0] <= tile;
        if (west) roof[7:2] <= tile;
    end
endmodule
