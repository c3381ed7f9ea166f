// expect: field[7:4] refused differs-by-parameter
// A parameter moves one range over another: two registers in one copy, a single one in the other.
module crop_field #(parameter int CUT = 4) (
    input  logic       clk,
    input  logic       sow, reap,
    input  logic [7:0] crop,
    output logic [7:0] field
);
    always_ff @(posedge clk) begin
        if (sow)  field[7:4] <= crop[7:4];
        if (reap) field[CUT-1:0] <= '0;
    end
endmodule
module crop_farm (
    input  logic       clk, sow, reap,
    input  logic [7:0] crop,
    output logic [7:0] east, west
);
    crop_field #(.CUT(4)) u_east (.clk(clk), .sow(sow), .reap(reap), .crop(crop), .field(east));
    crop_field #(.CUT(6)) u_west (.clk(clk), .sow(sow), .reap(reap), .crop(crop), .field(west));
endmodule
