// expect: cider_q refused
// The enable comes from a latch of the parent that is open while the clock is high.
module cider_vat (
    input  logic       clk, press,
    input  logic [7:0] juice,
    output logic [7:0] cider_q
);
    always_ff @(posedge clk) if (press) cider_q <= juice;
endmodule
module cider_barn (
    input  logic       clk, call,
    input  logic [7:0] juice,
    output logic [7:0] cider_q
);
    logic call_l;
    always_latch if (clk) call_l = call;
    cider_vat u_vat (.clk(clk), .press(call_l), .juice(juice), .cider_q(cider_q));
endmodule
