// expect: depth gated
// A pond level that is set, raised, or lowered; the order of the branches decides.
module pond_level (
    input  logic       clk, rst,
    input  logic       preset, inflow, outflow, locked,
    input  logic [9:0] start,
    output logic [9:0] depth,
    input  wire        test_en
);
    // stillclock: depth sleeps unless it is written
    wire wake_depth = rst || (!locked && (preset || inflow || outflow));
    wire gclk_depth;
    stillclock_icg u_icg_depth (.clk(clk), .wake(wake_depth), .test(test_en), .gclk(gclk_depth));
    always_ff @(posedge gclk_depth) begin
        if (rst) begin
            depth <= 10'd0;
        end else if (locked) begin
            // nothing moves while the sluice is locked
        end else if (preset) begin
            depth <= start;
        end else if (inflow) begin
            depth <= depth + 10'd1;
        end else if (outflow) begin
            depth <= depth - 10'd1;
        end
    end
endmodule
