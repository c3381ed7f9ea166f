// expect: rig refused async-load
// The values are constants, but a signal chooses between them while the reset lasts.
module sail_rig (
    input  logic       clk, rst_n,
    input  logic       storm, set_sail,
    input  logic [7:0] area,
    output logic [7:0] rig
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            if (storm) rig <= 8'd1;
            else rig <= 8'd9;
        end else if (set_sail) rig <= area;
endmodule
