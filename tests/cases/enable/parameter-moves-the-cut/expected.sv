// expect: strip[7:CUT] gated
// expect: strip[CUT-1:0] gated
// A parameter moves the cut through the register; both copies are cut at the same place of the text.
module strip_field #(parameter int CUT = 4) (
    input  logic       clk,
    input  logic       sow, reap,
    input  logic [7:0] crop,
    output logic [7:0] strip,
    input  wire        test_en
);
    // stillclock: strip sleeps unless it is written
    wire wake_strip = sow;
    wire gclk_strip;
    stillclock_icg u_icg_strip (.clk(clk), .wake(wake_strip), .test(test_en), .gclk(gclk_strip));
    always_ff @(posedge gclk_strip) begin
        if (sow)  strip[7:CUT] <= crop[7:CUT];
    end
    // stillclock: strip sleeps unless it is written
    wire wake_strip_2 = reap;
    wire gclk_strip_2;
    stillclock_icg u_icg_strip_2 (.clk(clk), .wake(wake_strip_2), .test(test_en), .gclk(gclk_strip_2));
    always_ff @(posedge gclk_strip_2) begin
        if (reap) strip[CUT-1:0] <= '0;
    end
endmodule
module strip_farm (
    input  logic       clk, sow, reap,
    input  logic [7:0] crop,
    output logic [7:0] east, west,
    input  wire        test_en
);
    strip_field #(.CUT(4)) u_east (.test_en(test_en), .clk(clk), .sow(sow), .reap(reap), .crop(crop), .strip(east));
    strip_field #(.CUT(3)) u_west (.test_en(test_en), .clk(clk), .sow(sow), .reap(reap), .crop(crop), .strip(west));
endmodule
