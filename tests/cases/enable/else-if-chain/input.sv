// expect: depth gated
// A pond level that is set, raised, or lowered; the order of the branches decides.
module pond_level (
    input  logic       clk, rst,
    input  logic       preset, inflow, outflow, locked,
    input  logic [9:0] start,
    output logic [9:0] depth
);
    always_ff @(posedge clk) begin
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
