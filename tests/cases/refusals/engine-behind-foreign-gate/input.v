// expect: owl_q gated
// The clock of the child comes from somebody's gate, its enable is launched on the clock before it: the same edges.
module night_gate (clk, en, gclk);
    input  clk, en;
    output gclk;
    reg    en_l;
    always @(clk or en) if (!clk) en_l = en;
    assign gclk = clk & en_l;
endmodule
module owl_box (clk, hoot, call, owl_q);
    input            clk, hoot;
    input      [7:0] call;
    output reg [7:0] owl_q;
    always @(posedge clk) if (hoot) owl_q <= call;
endmodule
module owl_wood (clk, night, hoot, call, owl_q);
    input            clk, night, hoot;
    input      [7:0] call;
    output     [7:0] owl_q;
    wire             gclk;
    reg              hoot_q;
    night_gate u_gate (clk, night, gclk);
    always @(posedge clk) hoot_q <= hoot;
    owl_box u_box (gclk, hoot_q, call, owl_q);
endmodule
