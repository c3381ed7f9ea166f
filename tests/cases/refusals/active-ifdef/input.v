// expect: cargo_q refused inactive-code
// Both texts are conditional, the active one writes: another configuration has other branches.
module cargo_lift (clk, up, down, load, cargo_q);
    input            clk, up, down;
    input      [7:0] load;
    output reg [7:0] cargo_q;
    always @(posedge clk) begin
`ifdef HEAVY
        if (up || down) cargo_q <= load;
`else
        if (up) cargo_q <= load;
`endif
    end
endmodule
