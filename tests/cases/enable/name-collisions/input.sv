// expect: q gated
// The names the tool would choose are taken, one of them by the port it would add, one by an instance.
module bottle_neck (input logic clk, input logic test_en, input logic [4:0] d, output logic [4:0] q);
    logic wake_q, gclk_q;
    assign wake_q = test_en;
    assign gclk_q = clk & wake_q;
    always_ff @(posedge clk) if (wake_q) q <= d;
    bottle_cap u_icg_q (.level(gclk_q));
endmodule
module bottle_cap (input logic level);
endmodule
module bottle_line (input logic clk, input logic go, input logic [4:0] d, output logic [4:0] q);
    bottle_neck u_neck (.clk(clk), .test_en(go), .d(d), .q(q));
endmodule
