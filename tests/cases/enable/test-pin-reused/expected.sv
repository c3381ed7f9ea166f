// expect: oil_q gated
// expect: wick_q gated
// The top has a scan enable already; the child gets a port of its own for it.
module lamp_wick (input logic clk, trim, input logic [4:0] d, output logic [4:0] wick_q, input wire test_en);
    // stillclock: wick_q sleeps unless it is written
    wire wake_wick_q = trim;
    wire gclk_wick_q;
    stillclock_icg u_icg_wick_q (.clk(clk), .wake(wake_wick_q), .test(test_en), .gclk(gclk_wick_q));
    always_ff @(posedge gclk_wick_q) if (trim) wick_q <= d;
endmodule
module oil_lamp (
    input  logic       clk, scan_enable, fill, trim,
    input  logic [4:0] d,
    output logic [4:0] oil_q, wick_q
);
    // stillclock: oil_q sleeps unless it is written
    wire wake_oil_q = fill;
    wire gclk_oil_q;
    stillclock_icg u_icg_oil_q (.clk(clk), .wake(wake_oil_q), .test(scan_enable), .gclk(gclk_oil_q));
    always_ff @(posedge gclk_oil_q) if (fill) oil_q <= d;
    lamp_wick u_wick (.test_en(scan_enable), .clk(clk), .trim(trim), .d(d), .wick_q(wick_q));
endmodule
