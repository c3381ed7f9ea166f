// expect: lane gated
// Byte lanes with their own strobes, written through one loop: the bank wakes when any strobe is set.
module freight_lanes (
    input  logic        clk,
    input  logic        dock,
    input  logic [3:0]  strobe,
    input  logic [31:0] crate,
    output logic [31:0] lane,
    input  wire         test_en
);
    // stillclock: lane sleeps unless it is written; the branches are those of its block
    logic wake_lane;
    always_comb begin
        wake_lane = 1'b0;
        if (dock) for (int b = 0; b < 4; b++) if (strobe[b]) wake_lane = 1'b1;
    end
    wire gclk_lane;
    stillclock_icg u_icg_lane (.clk(clk), .wake(wake_lane), .test(test_en), .gclk(gclk_lane));
    always_ff @(posedge gclk_lane)
        if (dock)
            for (int b = 0; b < 4; b++)
                if (strobe[b]) lane[8*b +: 8] <= crate[8*b +: 8];
endmodule
