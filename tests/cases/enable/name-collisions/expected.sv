// expect: q gated
// The names the tool would choose are taken, one of them by the port it would add, one by an instance.
module bottle_neck (input logic clk, input logic test_en, input logic [4:0] d, output logic [4:0] q, input wire test_en_2);
    logic wake_q, gclk_q;
    assign wake_q = test_en;
    assign gclk_q = clk & wake_q;
    // stillclock: q sleeps unless it is written
    wire wake_q_2 = wake_q;
    wire gclk_q_2;
    stillclock_icg u_icg_q_2 (.clk(clk), .wake(wake_q_2), .test(test_en_2), .gclk(gclk_q_2));
    always_ff @(posedge gclk_q_2) if (wake_q) q <= d;
    bottle_cap u_icg_q (.level(gclk_q));
endmodule
module bottle_cap (input logic level);
endmodule
module bottle_line (input logic clk, input logic go, input logic [4:0] d, output logic [4:0] q, input wire test_en_2);
    bottle_neck u_neck (.test_en_2(test_en_2), .clk(clk), .test_en(go), .d(d), .q(q));
endmodule
