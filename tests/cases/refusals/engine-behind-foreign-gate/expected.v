// expect: owl_q gated
// The clock of the child comes from somebody's gate, its enable is launched on the clock before it: the same edges.
module night_gate (clk, en, gclk);
    input  clk, en;
    output gclk;
    reg    en_l;
    always @(clk or en) if (!clk) en_l = en;
    assign gclk = clk & en_l;
endmodule
module owl_box (clk, hoot, call, owl_q, test_en);
    input wire test_en;
    input            clk, hoot;
    input      [7:0] call;
    output reg [7:0] owl_q;
    // stillclock: owl_q sleeps unless it is written
    wire wake_owl_q = hoot;
    wire gclk_owl_q;
    stillclock_icg u_icg_owl_q (.clk(clk), .wake(wake_owl_q), .test(test_en), .gclk(gclk_owl_q));
    always @(posedge gclk_owl_q) if (hoot) owl_q <= call;
endmodule
module owl_wood (clk, night, hoot, call, owl_q, test_en);
    input wire test_en;
    input            clk, night, hoot;
    input      [7:0] call;
    output     [7:0] owl_q;
    wire             gclk;
    reg              hoot_q;
    night_gate u_gate (clk, night, gclk);
    always @(posedge clk) hoot_q <= hoot;
    owl_box u_box (gclk, hoot_q, call, owl_q, test_en);
endmodule
