// expect: moth_q gated
// The child's rising edge is the parent's falling one; its wake register runs on the other edge: half a cycle is enough.
module moth_trap (
    input  logic       clk, lure,
    input  logic [7:0] wing,
    output logic [7:0] moth_q,
    input  wire        test_en
);
    // stillclock: moth_q sleeps unless it is written
    wire wake_moth_q = lure;
    wire gclk_moth_q;
    stillclock_icg u_icg_moth_q (.clk(clk), .wake(wake_moth_q), .test(test_en), .gclk(gclk_moth_q));
    always_ff @(posedge gclk_moth_q) if (lure) moth_q <= wing;
endmodule
module moth_field (
    input  logic       clk, dusk,
    input  logic [7:0] wing,
    output logic [7:0] moth_q,
    input  wire        test_en
);
    logic dusk_q;
    wire  clk_n = ~clk;
    always_ff @(posedge clk) dusk_q <= dusk;
    moth_trap u_trap (.test_en(test_en), .clk(clk_n), .lure(dusk_q), .wing(wing), .moth_q(moth_q));
endmodule
