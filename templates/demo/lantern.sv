// Lantern of the buoy: a light pattern on the falling edge, and a mode that is strapped on the board.
module lantern (
    input  logic       clk,
    input  logic       rst_n,
    input  logic       dark,
    input  logic       step,
    input  logic       load,
    input  logic [7:0] pattern_in,
    input  logic [3:0] straps,
    output logic       lamp,
    output logic [3:0] mode
);
    // The lamp driver wants its data at the falling edge.
    logic [7:0] pattern;
    always_ff @(negedge clk or negedge rst_n) begin
        if (!rst_n) pattern <= 8'b1000_0000;
        else if (load) pattern <= pattern_in;
        else if (dark && step) pattern <= {pattern[6:0], pattern[7]};
    end
    assign lamp = dark & pattern[7];

    // While reset is active this follows the straps at every clock edge, which a stopped clock would miss: refused.
    always_ff @(posedge clk or negedge rst_n) begin
        if (!rst_n) mode <= straps;
        else if (load) mode <= pattern_in[3:0];
    end
endmodule
