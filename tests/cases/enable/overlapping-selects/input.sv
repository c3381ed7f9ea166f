// expect: roof[5:0] gated
// The ranges overlap: one register.
module roof_tiles (
    input  logic       clk,
    input  logic       east, west,
    input  logic [5:0] tile,
    output logic [7:0] roof
);
    always_ff @(posedge clk) begin
        if (east) roof[5:0] <= tile;
        if (west) roof[7:2] <= tile;
    end
endmodule
