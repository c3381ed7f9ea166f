// expect: strip[7:CUT] gated
// expect: strip[CUT-1:0] gated
// A parameter moves the cut through the register; both copies are cut at the same place of the text.
module strip_field #(parameter int CUT = 4) (
    input  logic       clk,
    input  logic       sow, reap,
    input  logic [7:0] crop,
    output logic [7:0] strip
);
    always_ff @(posedge clk) begin
        if (sow)  strip[7:CUT] <= crop[7:CUT];
        if (reap) strip[CUT-1:0] <= '0;
    end
endmodule
module strip_farm (
    input  logic       clk, sow, reap,
    input  logic [7:0] crop,
    output logic [7:0] east, west
);
    strip_field #(.CUT(4)) u_east (.clk(clk), .sow(sow), .reap(reap), .crop(crop), .strip(east));
    strip_field #(.CUT(3)) u_west (.clk(clk), .sow(sow), .reap(reap), .crop(crop), .strip(west));
endmodule
