// expect: hatch refused inactive-code
// The switched-off text assigns nothing, but it would change whose else follows.
module ship_hatch (clk, storm, close, angle, hatch);
    input            clk, storm, close;
    input      [7:0] angle;
    output reg [7:0] hatch;
    always @(posedge clk)
`ifdef WEATHER
        if (!storm)
`endif
        if (close) hatch <= angle;
endmodule
